import { describe, expect, test } from 'vitest';
import { apsides } from '../../../core/sun/apsides.ts';
import { addDays, civilOf } from '../../../core/sun/civil.ts';
import { deltaT_s } from '../../../core/sun/delta-t.ts';
import { horizonDip_deg, RISING_deg, sunEvents } from '../../../core/sun/events.ts';
import { lowestBetween, rootBetween } from '../../../core/sun/root.ts';
import { seasons } from '../../../core/sun/seasons.ts';
import { sunPosition } from '../../../core/sun/spa.ts';
import { referenceCases } from './reference.ts';

type EventCase = { readonly id: string; readonly kind: string };
const ofKind = <T extends EventCase>(kind: string): readonly T[] =>
  referenceCases<T>('sun-events.json').filter((c) => c.kind === kind);

type RiseCase = EventCase & {
  readonly inputs: {
    readonly place: string;
    readonly latitude: number;
    readonly longitude: number;
    readonly zone: string;
    readonly local_date: string;
    readonly delta_t: number;
  };
  readonly expected: {
    readonly position: {
      readonly sunrise_utc: string | null;
      readonly sunrise_local: string | null;
      readonly transit_utc: string;
      readonly transit_local: string;
      readonly sunset_utc: string | null;
      readonly elevation_at_transit: number;
      readonly day_length: number | null;
    };
  };
};

/** Within a tenth of a second, or both not there. */
function expectSame(got_ms: number | null, utc: string | null): void {
  if (utc === null) expect(got_ms).toBeNull();
  else expect(Math.abs((got_ms ?? Number.NaN) - Date.parse(utc))).toBeLessThan(100);
}

describe('rising, transit and setting by a search on another implementation (sun-events.json, position)', () => {
  test.each(ofKind<RiseCase>('rise-transit-set'))('$id $inputs.place $inputs.local_date', ({ inputs: i, expected }) => {
    const observer = { latitude_deg: i.latitude, longitude_deg: i.longitude, elevation_m: 0, deltaT_s: i.delta_t };
    const got = sunEvents(i.local_date, i.zone, observer);
    const want = expected.position;
    expectSame(got.sunrise_ms, want.sunrise_utc);
    expectSame(got.transit_ms, want.transit_utc);
    expectSame(got.sunset_ms, want.sunset_utc);
    expect(Math.abs(got.transitAltitude_deg - want.elevation_at_transit)).toBeLessThan(1e-6);
    const local = civilOf(got.transit_ms, i.zone);
    expect(`${local.date}T${local.time}`).toBe(want.transit_local.slice(0, 16));
    const state = want.day_length !== null ? 'rises' : want.elevation_at_transit > 0 ? 'never-sets' : 'never-rises';
    expect(got.state).toBe(state);
  });
});

type SeasonCase = EventCase & {
  readonly inputs: { readonly year: number };
  readonly expected: Readonly<
    Record<string, { readonly utc: string; readonly terrestrial_time: string; readonly spa_terrestrial_time: string }>
  >;
};

describe('equinoxes and solstices', () => {
  test.each(ofKind<SeasonCase>('seasons'))('$id', ({ inputs, expected }) => {
    const got = seasons(inputs.year);
    const pairs = [
      [got.marchEquinox_ms, expected['march_equinox']],
      [got.juneSolstice_ms, expected['june_solstice']],
      [got.septemberEquinox_ms, expected['september_equinox']],
      [got.decemberSolstice_ms, expected['december_solstice']],
    ] as const;
    for (const [utc_ms, want] of pairs) {
      const terrestrial = utc_ms + 1000 * deltaT_s(utc_ms);
      expect(Math.abs(terrestrial - Date.parse(`${want?.spa_terrestrial_time}Z`))).toBeLessThan(2000);
      expect(Math.abs(terrestrial - Date.parse(`${want?.terrestrial_time}Z`))).toBeLessThan(60_000);
    }
  });
});

type ApsisCase = EventCase & {
  readonly inputs: { readonly year: number };
  readonly expected: Readonly<
    Record<
      'perihelion' | 'aphelion',
      { readonly utc: string; readonly distance: number; readonly inverse_square: number }
    >
  >;
};

describe('perihelion and aphelion', () => {
  test.each(ofKind<ApsisCase>('apsides'))('$id', ({ inputs, expected }) => {
    const got = apsides(inputs.year);
    expect(Math.abs(got.perihelion_ms - Date.parse(expected.perihelion.utc))).toBeLessThan(120_000);
    expect(Math.abs(got.aphelion_ms - Date.parse(expected.aphelion.utc))).toBeLessThan(120_000);
    expect(Math.abs(got.perihelion_au - expected.perihelion.distance)).toBeLessThan(1e-9);
    expect(Math.abs(got.aphelion_au - expected.aphelion.distance)).toBeLessThan(1e-9);
    expect(got.perihelion_au ** -2).toBeCloseTo(expected.perihelion.inverse_square, 9);
  });
});

type DistanceCase = EventCase & {
  readonly inputs: { readonly utc: string; readonly delta_t: number };
  readonly expected: { readonly distance: number };
};

test('distance of the sun at 24 instants', () => {
  const cases = ofKind<DistanceCase>('earth-sun-distance');
  expect(cases).toHaveLength(24);
  for (const { inputs: i, expected } of cases) {
    const sun = sunPosition(Date.parse(i.utc), {
      latitude_deg: 0,
      longitude_deg: 0,
      elevation_m: 0,
      deltaT_s: i.delta_t,
    });
    expect(Math.abs(sun.distance_au - expected.distance)).toBeLessThan(1e-9);
  }
});

describe('what the instants mean', () => {
  const berlin = { latitude_deg: 52.52, longitude_deg: 13.405, elevation_m: 34 };

  test('at sunrise and sunset the true altitude is −0.8333°, lower by the dip from a height', () => {
    for (const dip of [0, horizonDip_deg(100)]) {
      const day = sunEvents('2025-04-12', 'Europe/Berlin', berlin, dip);
      for (const at of [day.sunrise_ms, day.sunset_ms])
        expect(sunPosition(at ?? Number.NaN, berlin).altitude_deg).toBeCloseTo(RISING_deg - dip, 4);
    }
  });

  test('dip from 100 m is 17.6′ (Nautical Almanac: 1.76′·√h) and lengthens the day', () => {
    expect(horizonDip_deg(100) * 60).toBeCloseTo(17.6, 10);
    expect(horizonDip_deg(0)).toBe(0);
    const level = sunEvents('2025-04-12', 'Europe/Berlin', berlin);
    const tower = sunEvents('2025-04-12', 'Europe/Berlin', berlin, horizonDip_deg(100));
    expect(tower.sunrise_ms).toBeLessThan(level.sunrise_ms ?? 0);
    expect(tower.sunset_ms).toBeGreaterThan(level.sunset_ms ?? 0);
  });

  test.each([
    ['Tromso', 69.6492, 18.9553, 'Europe/Oslo'],
    ['Rovaniemi', 66.5, 25.7, 'Europe/Helsinki'],
    ['near the South Pole', -89.9, 0, 'Antarctica/McMurdo'],
  ])(
    '%s, a whole year: days follow one another and no rising or setting is lost or told twice',
    (_, latitude_deg, longitude_deg, zone) => {
      const observer = { latitude_deg, longitude_deg, elevation_m: 0 };
      let last = 'set';
      let lastAt = Number.NEGATIVE_INFINITY;
      let date = '2025-01-01';
      const states = new Set<string>();
      for (let i = 0; i < 365; i++, date = addDays(date, 1)) {
        const day = sunEvents(date, zone, observer);
        states.add(day.state);
        for (const [kind, at] of [
          ['rise', day.sunrise_ms],
          ['set', day.sunset_ms],
        ] as const) {
          if (at === null) continue;
          if (lastAt > Number.NEGATIVE_INFINITY) expect(kind).not.toBe(last);
          expect(at).toBeGreaterThan(lastAt);
          last = kind;
          lastAt = at;
        }
      }
      expect(states).toContain('never-sets');
    },
  );

  test('the pole sees one sunrise and one sunset a year, in the week of the equinoxes', () => {
    const pole = { latitude_deg: 90, longitude_deg: 0, elevation_m: 0 };
    const found: string[] = [];
    for (let i = 0, date = '2025-01-01'; i < 365; i++, date = addDays(date, 1)) {
      const day = sunEvents(date, 'Etc/UTC', pole);
      if (day.sunrise_ms !== null) found.push(`rise ${date.slice(0, 7)}`);
      if (day.sunset_ms !== null) found.push(`set ${date.slice(0, 7)}`);
    }
    expect(found).toEqual(['rise 2025-03', 'set 2025-09']);
  });
});

describe('searching', () => {
  test('a root of x³ − 2 is the cube root of 2', () => {
    expect(rootBetween((x) => x * x * x - 2, 0, 2, 1e-12)).toBeCloseTo(Math.cbrt(2), 11);
    expect(rootBetween((x) => 2 - x * x * x, 2, 0, 1e-12)).toBeCloseTo(Math.cbrt(2), 11);
    expect(() => rootBetween((x) => x * x + 1, -1, 1, 1e-6)).toThrow(RangeError);
  });

  test('the lowest of (x − 1)² is at 1; of a line, at its end', () => {
    expect(lowestBetween((x) => (x - 1) * (x - 1), -5, 4, 1e-6)).toBeCloseTo(1, 5);
    expect(lowestBetween((x) => x, 3, 4, 1e-9)).toBeCloseTo(3, 8);
    expect(lowestBetween((x) => -x, 3, 4, 1e-9)).toBeCloseTo(4, 8);
  });
});
