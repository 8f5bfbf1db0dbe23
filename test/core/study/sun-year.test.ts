import { describe, expect, it } from 'vitest';
import { buildModel } from '../../../core/form/build-model.ts';
import { Scheme } from '../../../core/scheme/schema.ts';
import { NO_SUCH_TIME, SUN_DOWN, sunYear } from '../../../core/study/sun-year.ts';

const go = async (): Promise<'go'> => 'go';

/** One room in one box, open all round, with a window in each wall. */
function scheme(site: Record<string, unknown>, extra: Record<string, unknown> = {}): Scheme {
  const box = { at: [0, 0], width: 6, depth: 6 };
  return Scheme.parse({
    format: 'shadewright',
    version: 1,
    site: { latitude: 51.45, longitude: -2.59, zone: 'Europe/London', ...site },
    blocks: [{ id: 'B', standing: 'proposed', box, height: 3 }],
    rooms: [{ id: 'R', use: 'living', block: 'B', box, floor: 0, height: 3 }],
    glass: [{ id: 'G', g: 0.5, u: 1.2, light: 0.7 }],
    windows: [0, 1, 2, 3].map((wall) => ({
      id: `W${wall}`,
      room: 'R',
      wall,
      from: 2,
      sill: 1,
      width: 2,
      height: 1,
      glass: 'G',
    })),
    ...extra,
  });
}

const yearOf = async (s: Scheme, windows: readonly string[]) => {
  const year = await sunYear(s, buildModel(s), { kind: 'windows', ids: windows }, 'after', 2025, 10, go);
  if (year === null) throw new Error('stopped');
  return year;
};

describe('the year of direct sun on a window', () => {
  it('has sun on open flush south glass whenever the sun stands south of east and west, and never else', async () => {
    const year = await yearOf(scheme({ latitude: 0, longitude: 0, zone: 'UTC' }), ['W0']);
    // On the equator the sun is south of the zenith from the September to the March equinox, all day long: celestial sphere.
    const on = (date: string): number[] => {
      const d = year.dates.indexOf(date);
      return [...year.share.slice(d * year.rows, (d + 1) * year.rows)].filter((v) => v >= 0);
    };
    expect(on('2025-12-21').every((v) => v === 1)).toBe(true);
    expect(on('2025-06-21').every((v) => v === 0)).toBe(true);
    expect(on('2025-12-21').length).toBeGreaterThan(70);
  });

  it('weighs the windows of a room by their glass', async () => {
    const all = await yearOf(scheme({}), ['W0', 'W1', 'W2', 'W3']);
    const each = await Promise.all([0, 1, 2, 3].map((w) => yearOf(scheme({}), [`W${w}`])));
    for (let i = 0; i < all.share.length; i += 97) {
      const share = all.share[i] as number;
      if (share < 0) continue;
      expect(share).toBeCloseTo(each.reduce((sum, y) => sum + (y.share[i] as number), 0) / 4, 5);
    }
  });

  it('leaves out the hour that the clock skips, and shows the lead of the clock over UTC', async () => {
    // IANA time zone database, Europe/London 2025: 30 March 01:00 to 02:00, back on 26 October.
    const year = await yearOf(scheme({}), ['W0']);
    const d = year.dates.indexOf('2025-03-30');
    const skipped = [...year.share.slice(d * year.rows, (d + 1) * year.rows)].flatMap((v, row) =>
      v === NO_SUCH_TIME ? [row] : [],
    );
    expect(skipped).toEqual([6, 7, 8, 9, 10, 11]);
    expect(year.offset_min[d - 1]).toBe(0);
    expect(year.offset_min[d]).toBe(60);
    expect(year.offset_min[year.dates.indexOf('2025-10-25')]).toBe(60);
    expect(year.offset_min[year.dates.indexOf('2025-10-26')]).toBe(0);
    expect([...year.share].filter((v) => v === NO_SUCH_TIME)).toHaveLength(6);
  });

  it('knows polar night and midnight sun', async () => {
    const year = await yearOf(scheme({ latitude: 69.65, longitude: 18.96, zone: 'Europe/Oslo' }), ['W0']);
    const day = (date: string): number[] => {
      const d = year.dates.indexOf(date);
      return [...year.share.slice(d * year.rows, (d + 1) * year.rows)];
    };
    // Tromsø: sun below the horizon at the December solstice and above it at the June one (declination 23.4°).
    expect(day('2025-12-21').every((v) => v === SUN_DOWN)).toBe(true);
    expect(day('2025-06-21').some((v) => v === SUN_DOWN)).toBe(false);
    expect(Number.isNaN(year.sunrise_min[year.dates.indexOf('2025-12-21')] as number)).toBe(true);
  });

  it('leaves out low sun where the scheme does', async () => {
    const all = await yearOf(scheme({}), ['W0']);
    const some = await yearOf(scheme({ lowSun: 10 }), ['W0']);
    const hours = (y: typeof all): number => [...y.share].filter((v) => v > 0).length;
    expect(hours(some)).toBeLessThan(hours(all));
    expect([...some.share].filter((v) => v === SUN_DOWN)).toHaveLength(
      [...all.share].filter((v) => v === SUN_DOWN).length,
    );
  });

  it('stops when it is told to', async () => {
    const s = scheme({});
    expect(
      await sunYear(s, buildModel(s), { kind: 'windows', ids: ['W0'] }, 'after', 2025, 10, async (done) =>
        done > 100 ? 'stop' : 'go',
      ),
    ).toBeNull();
  });
});
