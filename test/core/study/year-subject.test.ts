import { describe, expect, it } from 'vitest';
import { buildModel } from '../../../core/form/build-model.ts';
import { Scheme } from '../../../core/scheme/schema.ts';
import { SUN_DOWN, type SunYear, sunYear } from '../../../core/study/sun-year.ts';
import type { YearSubject } from '../../../core/study/year-subject.ts';
import { daySamples } from '../../../core/sun/civil.ts';
import { sunTable } from '../../../core/sun/sun-table.ts';

const STEP_min = 20;
const YEAR = 2025;
const SITE = { latitude: 51.45, longitude: -2.59, zone: 'Europe/London' };
/** So long that its ends are nowhere near: what it hides depends on the profile angle alone. */
const LONG_m = 40_000;
const TOP_m = 9;
const BAR = { x: -LONG_m / 2, width: LONG_m };
const MONTHS = [0.9, 0.85, 0.7, 0.5, 0.3, 0.2, 0.15, 0.1, 0.25, 0.4, 0.6, 0.8];

/** A long wall along x whose north side stands at y = 0; what looks at it stands to the north of it. */
const scheme = Scheme.parse({
  format: 'shadewright',
  version: 1,
  site: SITE,
  blocks: [
    { id: 'bar', standing: 'proposed', box: { at: [BAR.x, -5], width: BAR.width, depth: 5 }, height: TOP_m },
    { id: 'house', standing: 'context', box: { at: [-10, 12], width: 20, depth: 8 }, height: 6 },
    { id: 'shed', standing: 'removed', box: { at: [40, 12], width: 4, depth: 4 }, height: 3 },
  ],
  receptors: [
    { id: 'V', kind: 'window', block: 'house', wall: 0, from: 8, sill: 1, width: 3, height: 2 },
    {
      id: 'A',
      kind: 'area',
      outline: [
        [60, 2],
        [90, 2],
        [90, 10],
        [60, 10],
      ],
    },
    { id: 'P', kind: 'point', at: [100, 7, 1.5] },
    { id: 'S', kind: 'point', at: [100, 7, 1.5], normal: [0, -1, 1] },
  ],
});
const model = buildModel(scheme);
const go = async (): Promise<'go'> => 'go';
const yearOf = async (subject: YearSubject, stage: 'before' | 'after' = 'after', of = scheme): Promise<SunYear> => {
  const year = await sunYear(of, buildModel(of), subject, stage, YEAR, STEP_min, go);
  if (year === null) throw new Error('stopped');
  return year;
};

type Sun = { readonly altitude: number; readonly south: number; readonly profile: number };

/** Every sun above the horizon on some dates with the share that the year has for it. */
function shares(year: SunYear, dates: readonly string[]): readonly { sun: Sun; share: number }[] {
  const observer = { latitude_deg: SITE.latitude, longitude_deg: SITE.longitude, elevation_m: 0 };
  return dates.flatMap((date) => {
    const { instant_ms, clock_min } = daySamples(date, SITE.zone, STEP_min);
    const sun = sunTable(instant_ms, observer);
    const d = year.dates.indexOf(date);
    return [...instant_ms].flatMap((_, i) => {
      const altitude = sun.altitude_rad[i] as number;
      if (altitude <= 0) return [];
      const south = -Math.cos(sun.azimuth_rad[i] as number) * Math.cos(altitude);
      const share = year.share[d * year.rows + Math.floor((clock_min[i] as number) / STEP_min)] as number;
      // The slope at which the sun comes over something that runs along x: rise over the way south.
      return [{ sun: { altitude, south, profile: Math.sin(altitude) / south }, share }];
    });
  });
}

const DATES = ['2025-02-03', '2025-03-21', '2025-06-21', '2025-10-09', '2025-12-21'];
const clamp = (v: number): number => Math.min(1, Math.max(0, v));

describe('the year of direct sun on other things than windows', () => {
  // A long obstruction along x hides what lies below the slope from its top edge: geometry, worked by hand for each surface.
  it.each([
    ['wall', { kind: 'wall', block: 'house', wall: 0 }, 0, 6],
    ["neighbour's window", { kind: 'receptor', id: 'V' }, 1, 2],
  ] as const)('%s: lit above the line that the top of a long wall throws on it', async (_, subject, low, high) => {
    const found = shares(await yearOf(subject), DATES);
    expect(found.length).toBeGreaterThan(100);
    for (const { sun, share } of found) {
      const line = TOP_m - 12 * sun.profile;
      const expected = sun.south > 0 ? 1 - clamp((line - low) / high) : 0;
      expect(share).toBeCloseTo(expected, 5);
    }
  });

  it('amenity area: lit beyond the edge of a long shadow', async () => {
    for (const { sun, share } of shares(await yearOf({ kind: 'receptor', id: 'A' }), DATES)) {
      const reach = sun.south > 0 ? TOP_m / sun.profile : 0;
      expect(share).toBeCloseTo(1 - clamp((reach - 2) / 8), 5);
    }
  });

  it('point: in sun above the edge that hides it, on its own plane whichever way it is tilted', async () => {
    for (const { sun, share } of shares(await yearOf({ kind: 'receptor', id: 'P' }), DATES))
      expect(share).toBe(sun.south > 0 && sun.profile < (TOP_m - 1.5) / 7 ? 0 : 1);
    for (const { sun, share } of shares(await yearOf({ kind: 'receptor', id: 'S' }), DATES)) {
      const isInFront = sun.south + Math.sin(sun.altitude) > 0;
      expect(share).toBe(isInFront && !(sun.south > 0 && sun.profile < (TOP_m - 1.5) / 7) ? 1 : 0);
    }
  });

  it('roof: lit all day where nothing rises above it', async () => {
    for (const { share } of shares(await yearOf({ kind: 'roof', block: 'bar' }), DATES)) expect(share).toBe(1);
  });

  it('stands at the stage that is asked: before the long wall, the area is open', async () => {
    const noon = shares(await yearOf({ kind: 'receptor', id: 'A' }, 'before'), ['2025-12-21']);
    for (const { sun, share } of noon) if (sun.altitude > 0.1) expect(share).toBe(1);
  });

  it('asks the faces of a block that is gone at the stage at the other one', async () => {
    const shed = shares(await yearOf({ kind: 'roof', block: 'shed' }), ['2025-06-21']);
    expect(shed.filter(({ share }) => share === 1).length).toBeGreaterThan(20);
  });

  it('finds nothing in sun that the scheme does not hold', async () => {
    for (const subject of [
      { kind: 'receptor', id: 'none' },
      { kind: 'roof', block: 'none' },
      { kind: 'wall', block: 'house', wall: 9 },
    ] as const)
      expect(Math.max(...(await yearOf(subject)).share)).toBe(0);
  });

  it('lets through the crown of a tree what the month of the date says, of every kind of thing', async () => {
    // A crown so wide and high that every ray of these hours goes through it.
    const under = Scheme.parse({
      ...scheme,
      blocks: [
        { id: 'B', standing: 'proposed', box: { at: [0, 0], width: 6, depth: 6 }, height: 3 },
        { id: 'N', standing: 'context', box: { at: [0, 40], width: 6, depth: 6 }, height: 3 },
      ],
      rooms: [{ id: 'R', use: 'living', block: 'B', box: { at: [0, 0], width: 6, depth: 6 }, floor: 0, height: 3 }],
      glass: [{ id: 'G', g: 0.5, u: 1.2, light: 0.7 }],
      windows: [{ id: 'W', room: 'R', wall: 0, from: 2, sill: 1, width: 2, height: 1, glass: 'G' }],
      trees: [{ id: 'T', at: [3, 3], trunk: 0, height: 300, spread: 900, transmittance: MONTHS }],
      receptors: [
        { id: 'P', kind: 'point', at: [3, -20, 1.5] },
        {
          id: 'A',
          kind: 'area',
          outline: [
            [-4, -30],
            [4, -30],
            [4, -22],
            [-4, -22],
          ],
        },
        { id: 'V', kind: 'window', block: 'N', wall: 0, from: 2, sill: 1, width: 1, height: 1 },
      ],
    });
    const subjects: readonly YearSubject[] = [
      { kind: 'windows', ids: ['W'] },
      { kind: 'receptor', id: 'P' },
      { kind: 'receptor', id: 'A' },
      { kind: 'receptor', id: 'V' },
      { kind: 'wall', block: 'B', wall: 0 },
      { kind: 'roof', block: 'B' },
    ];
    for (const subject of subjects) {
      const year = await yearOf(subject, 'after', under);
      for (const [m, share] of MONTHS.entries()) {
        const date = `2025-${String(m + 1).padStart(2, '0')}-15`;
        const d = year.dates.indexOf(date);
        const noon = year.share[d * year.rows + (12 * 60) / STEP_min] as number;
        expect(noon, `${JSON.stringify(subject)} ${date}`).toBeCloseTo(share, 5);
      }
    }
  });

  it('says that the sun is down rather than that nothing is lit', async () => {
    const year = await yearOf({ kind: 'receptor', id: 'P' });
    expect(year.share[year.dates.indexOf('2025-12-21') * year.rows]).toBe(SUN_DOWN);
    expect(model.receptors).toHaveLength(4);
  });
});
