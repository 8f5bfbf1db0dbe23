import * as Astronomy from 'astronomy-engine';
import { describe, expect, test } from 'vitest';
import { extraterrestrialSpencer } from '../../../core/sky/extraterrestrial.ts';
import { apsides } from '../../../core/sun/apsides.ts';
import { addDays, civilOf } from '../../../core/sun/civil.ts';
import { deltaT_s } from '../../../core/sun/delta-t.ts';
import { RISING_deg, sunEvents } from '../../../core/sun/events.ts';
import { declination_deg, geocentricSun } from '../../../core/sun/geocentric.ts';
import { daysFromJ2000 } from '../../../core/sun/julian.ts';
import { meanObliquity_deg } from '../../../core/sun/nutation.ts';
import { seasons } from '../../../core/sun/seasons.ts';
import { sunPosition } from '../../../core/sun/spa.ts';
import { DEG } from '../../../core/units/angle.ts';
import { apart_deg, referenceCases } from './reference.ts';

const HOUR_ms = 3_600_000;
const at = (latitude_deg: number, longitude_deg = 0) => ({ latitude_deg, longitude_deg, elevation_m: 0 });

/** Every second instant by another theory of the Earth's motion (astronomy-engine 2.1.19, its own series and nutation). */
describe('beside astronomy-engine', () => {
  test('positions of two centuries, all latitudes, within 0.001°', () => {
    Astronomy.SetDeltaTFunction((ut) => deltaT_s(ut * 86_400_000 + Date.UTC(2000, 0, 1, 12)));
    for (let i = 0; i < 400; i++) {
      const instant = Date.UTC(1900, 0, 1) + ((i * 0.618033988749895) % 1) * 201 * 365.2425 * 24 * HOUR_ms;
      const latitude = ((i * 37) % 179) - 89;
      const longitude = ((i * 53) % 360) - 180;
      const date = new Date(Math.round(instant));
      const there = new Astronomy.Observer(latitude, longitude, 0);
      const equator = Astronomy.Equator(Astronomy.Body.Sun, date, there, true, true);
      const theirs = Astronomy.Horizon(date, there, equator.ra, equator.dec);
      const ours = sunPosition(date.getTime(), at(latitude, longitude));
      expect(Math.abs(ours.altitude_deg - theirs.altitude)).toBeLessThan(0.001);
      expect(apart_deg(ours.azimuth_deg, theirs.azimuth) * Math.cos(theirs.altitude * DEG)).toBeLessThan(0.001);
      expect(Math.abs(ours.distance_au - equator.dist)).toBeLessThan(6e-5);
    }
    Astronomy.SetDeltaTFunction(Astronomy.DeltaT_EspenakMeeus);
  });

  test('seasons of every tenth year from 1900 to 2100 within a minute of terrestrial time', () => {
    for (let year = 1900; year <= 2100; year += 10) {
      const ours = seasons(year);
      const theirs = Astronomy.Seasons(year);
      const pairs = [
        [ours.marchEquinox_ms, theirs.mar_equinox],
        [ours.juneSolstice_ms, theirs.jun_solstice],
        [ours.septemberEquinox_ms, theirs.sep_equinox],
        [ours.decemberSolstice_ms, theirs.dec_solstice],
      ] as const;
      for (const [utc_ms, other] of pairs) {
        const days_TT = daysFromJ2000(utc_ms) + deltaT_s(utc_ms) / 86400;
        expect(Math.abs(days_TT - other.tt) * 86400).toBeLessThan(60);
      }
    }
  });
});

describe('common facts', () => {
  test('the axis is tilted by 23.4° and straightens by 0.0130° a century (Meeus 1998, equation 22.2: 46.815″)', () => {
    expect(geocentricSun(daysFromJ2000(Date.UTC(2025, 6, 1))).obliquity_deg).toBeCloseTo(23.44, 2);
    expect(Math.abs((meanObliquity_deg(0) - meanObliquity_deg(1)) * 3600 - 46.815)).toBeLessThan(0.02);
  });

  test('the June sun passes overhead at 23.4° north, the December sun at 23.4° south', () => {
    const june = sunEvents('2025-06-21', 'Etc/UTC', at(23.436));
    const december = sunEvents('2025-12-21', 'Etc/UTC', at(-23.436));
    expect(june.transitAltitude_deg).toBeGreaterThan(89.99);
    expect(december.transitAltitude_deg).toBeGreaterThan(89.99);
  });

  test('polar circles: at the solstice the true sun stays up a whole day from 66.56° on', () => {
    const lowest = (latitude: number) => {
      let low = 90;
      for (let m = 0; m < 1440; m += 2)
        low = Math.min(low, sunPosition(Date.UTC(2025, 5, 21) + m * 60_000, at(latitude)).altitude_deg);
      return low;
    };
    expect(lowest(66.58)).toBeGreaterThan(0);
    expect(lowest(66.54)).toBeLessThan(0);
  });

  test('midnight sun from 65.727°, polar night from 67.393°, refraction and disc counted (methods, section 10)', () => {
    expect(sunEvents('2025-06-21', 'Etc/UTC', at(65.76)).state).toBe('never-sets');
    expect(sunEvents('2025-06-21', 'Etc/UTC', at(65.69)).state).toBe('rises');
    expect(sunEvents('2025-12-21', 'Etc/UTC', at(67.43)).state).toBe('never-rises');
    expect(sunEvents('2025-12-21', 'Etc/UTC', at(67.36)).state).toBe('rises');
  });

  test('sunshine outside the air is 6.9 % stronger at perihelion than at aphelion: ((1 + e)/(1 − e))², e = 0.0167', () => {
    const { perihelion_au, aphelion_au, perihelion_ms, aphelion_ms } = apsides(2025);
    expect((aphelion_au / perihelion_au) ** 2).toBeCloseTo(1.069, 3);
    expect([perihelion_au.toFixed(5), aphelion_au.toFixed(5)]).toEqual(['0.98333', '1.01664']);
    expect(civilOf(perihelion_ms, 'Etc/UTC').date).toBe('2025-01-04');
    expect(civilOf(aphelion_ms, 'Etc/UTC').date).toBe('2025-07-03');
  });

  // Dates in universal time as almanacs print them; from memory: 20 March 2000–2100 save 2003 and 2007 (21 March), June
  // solstice 2020 on the 20th, 2019 on the 21st, September equinox 2023 on the 23rd, December solstice 2023 on the 22nd.
  test.each([
    ['2003-03-21', () => seasons(2003).marchEquinox_ms],
    ['2007-03-21', () => seasons(2007).marchEquinox_ms],
    ['2024-03-20', () => seasons(2024).marchEquinox_ms],
    ['2019-06-21', () => seasons(2019).juneSolstice_ms],
    ['2020-06-20', () => seasons(2020).juneSolstice_ms],
    ['2023-09-23', () => seasons(2023).septemberEquinox_ms],
    ['2023-12-22', () => seasons(2023).decemberSolstice_ms],
    ['2024-12-21', () => seasons(2024).decemberSolstice_ms],
  ] as const)('a season on %s', (date, instant) => {
    expect(civilOf(instant(), 'Etc/UTC').date).toBe(date);
  });

  test('every season of 1900 to 2100 falls on the 19th to 24th', () => {
    for (let year = 1900; year <= 2100; year += 4)
      for (const ms of Object.values(seasons(year))) {
        const day = new Date(ms).getUTCDate();
        expect(day).toBeGreaterThanOrEqual(19);
        expect(day).toBeLessThanOrEqual(24);
      }
  });
});

/** Tables of the methods dossier, section 10; its values come from closed forms and from an independent SPA. */
describe('tables', () => {
  test('extreme declinations of 2025: 23.4384 on 21 June, −23.4383 on 21 December', () => {
    const declination = (ms: number) => declination_deg(geocentricSun(daysFromJ2000(ms) + deltaT_s(ms) / 86400));
    const { juneSolstice_ms, decemberSolstice_ms } = seasons(2025);
    expect(declination(juneSolstice_ms)).toBeCloseTo(23.4384, 3);
    expect(declination(decemberSolstice_ms)).toBeCloseTo(-23.4383, 3);
  });

  test('equation of time of 2025, hour by hour: extremes and zeros', () => {
    const hours = Array.from({ length: 365 * 24 }, (_, hour) => {
      const ms = Date.UTC(2025, 0, 1, hour);
      return { date: new Date(ms).toISOString().slice(5, 10), minutes: sunPosition(ms, at(0)).equationOfTime_min };
    });
    const extreme = (from: string, to: string, sign: 1 | -1) => {
      const season = hours.filter(({ date }) => date >= from && date <= to);
      const best = season.reduce((a, b) => (sign * b.minutes > sign * a.minutes ? b : a));
      return [best.date, best.minutes.toFixed(2)];
    };
    expect(extreme('01-15', '03-15', -1)).toEqual(['02-11', '-14.19']);
    expect(extreme('04-15', '06-15', 1)).toEqual(['05-13', '3.68']);
    expect(extreme('06-15', '08-31', -1)).toEqual(['07-26', '-6.56']);
    expect(extreme('09-15', '12-15', 1)).toEqual(['11-03', '16.44']);
    const zeros = hours.filter(({ minutes }, i) => i > 0 && minutes * (hours[i - 1]?.minutes ?? 0) < 0);
    expect(zeros.map((z) => z.date)).toEqual(['04-15', '06-12', '09-01', '12-25']);
  });

  test('at 20° north the sun passes overhead on 20 May and 23 July 2025', () => {
    const overhead: string[] = [];
    for (let i = 0, date = '2025-05-01'; i < 100; i++, date = addDays(date, 1))
      if (sunEvents(date, 'Etc/UTC', at(20)).transitAltitude_deg > 89.9) overhead.push(date);
    expect(overhead).toContain('2025-05-20');
    expect(overhead).toContain('2025-07-23');
    expect(overhead.length).toBeLessThanOrEqual(4);
  });

  test.each([
    // latitude, noon altitudes and day lengths [h] at June, equinox and December, upper edge with refraction
    [0, 66.56, 90.0, 66.56, 12.1211, 12.1111, 12.1211],
    [20, 86.56, 70.0, 46.56, 13.3412, 12.1182, 10.9197],
    [30, 83.44, 60.0, 36.56, 14.0776, 12.1283, 10.2112],
    [40, 73.44, 50.0, 26.56, 15.015, 12.145, 9.3244],
    [51.5, 61.94, 38.5, 15.06, 16.6382, 12.1784, 7.8258],
    [60, 53.44, 30.0, 6.56, 18.8672, 12.2222, 5.8674],
  ])(
    'latitude %d°: noon altitudes and day lengths',
    (latitude, june, equinox, december, dayJune, dayEquinox, dayDecember) => {
      // The table holds the declination of a day fixed; on the sphere it moves by up to 0.4° a day at the equinoxes, which
      // moves noon by up to 0.2° and leaves the length of the day within a minute or two.
      const of = (date: string) => {
        const day = sunEvents(date, 'Etc/UTC', at(latitude));
        return [
          day.transitAltitude_deg,
          ((day.sunset_ms ?? 0) - (day.sunrise_ms ?? 0)) / HOUR_ms,
          day.transit_ms,
        ] as const;
      };
      const [juneNoon, juneLength] = of('2025-06-21');
      const [equinoxNoon, equinoxLength, equinoxTransit_ms] = of('2025-03-20');
      const [decemberNoon, decemberLength] = of('2025-12-21');
      expect(Math.abs(juneNoon - june)).toBeLessThan(0.01);
      expect(Math.abs(decemberNoon - december)).toBeLessThan(0.01);
      const late_h = (equinoxTransit_ms - seasons(2025).marchEquinox_ms) / HOUR_ms;
      expect(Math.abs(equinoxNoon - equinox)).toBeLessThan(late_h * 0.0166 + 0.003);
      expect(Math.abs(juneLength - dayJune)).toBeLessThan(0.005);
      expect(Math.abs(decemberLength - dayDecember)).toBeLessThan(0.005);
      expect(Math.abs(equinoxLength - dayEquinox)).toBeLessThan(0.06);
    },
  );

  test('sunrise azimuth cos A = sin δ/cos φ at the true horizon: 51.5° N, 50.2825° in June and 129.7175° in December', () => {
    for (const [date, azimuth] of [
      ['2025-06-21', 50.2825],
      ['2025-12-21', 129.7175],
    ] as const) {
      // Lifting the horizon to the true one: a dip of −0.8333° cancels refraction and disc.
      const rise = sunEvents(date, 'Etc/UTC', at(51.5), RISING_deg).sunrise_ms ?? Number.NaN;
      expect(apart_deg(sunPosition(rise, at(51.5)).azimuth_deg, azimuth)).toBeLessThan(0.02);
    }
  });

  test('four minutes of time a degree: London lies 0.5112 min behind Greenwich', () => {
    const greenwich = sunEvents('2025-02-11', 'Europe/London', at(51.5074)).transit_ms;
    const london = sunEvents('2025-02-11', 'Europe/London', at(51.5074, -0.1278)).transit_ms;
    expect((london - greenwich) / 60_000).toBeCloseTo(0.5112, 3);
  });

  test.each([
    ['2025-02-11', '12:15', 24.65],
    ['2025-05-14', '11:57', 57.25],
    ['2025-07-26', '12:07', 57.8],
    ['2025-11-03', '11:44', 23.27],
  ])('noon in London on %s is at %s UTC', (date, time, altitude) => {
    const day = sunEvents(date, 'Etc/UTC', at(51.5074, -0.1278));
    expect(civilOf(day.transit_ms + 30_000, 'Etc/UTC').time).toBe(time);
    expect(day.transitAltitude_deg).toBeCloseTo(altitude, 1);
  });

  test.each([
    ['London', 51.5074, -0.1278, '2025-06-21T12:00Z', 178.845, 61.926, 61.935, -1.854],
    ['London', 51.5074, -0.1278, '2025-12-21T10:00Z', 152.481, 10.653, 10.738, 1.861],
    ['London', 51.5074, -0.1278, '2025-03-21T15:00Z', 230.372, 27.454, 27.486, -7.022],
    ['Singapore', 1.3521, 103.8198, '2025-03-20T05:00Z', 114.981, 86.644, 86.645, -7.443],
    ['Sydney', -33.8688, 151.2093, '2025-06-21T02:00Z', 359.163, 32.686, 32.712, -1.763],
    ['Oslo', 59.9139, 10.7522, '2025-06-21T18:00Z', 290.692, 15.194, 15.254, -1.909],
  ])('%s at %d, %d, %s', (_, latitude, longitude, utc, azimuth, altitude, refracted, minutes) => {
    // The dossier's values were made with the usual ΔT of 67 s; near the zenith the azimuth shows it in the third decimal.
    const air = { pressure_hPa: 1013.25, temperature_C: 12, deltaT_s: 67 };
    const sun = sunPosition(Date.parse(utc), { ...at(latitude, longitude), ...air });
    expect(Math.abs(sun.azimuth_deg - azimuth)).toBeLessThan(0.0006);
    expect(Math.abs(sun.altitude_deg - altitude)).toBeLessThan(0.0006);
    expect(Math.abs(sun.apparentAltitude_deg - refracted)).toBeLessThan(0.0006);
    expect(Math.abs(sun.equationOfTime_min - minutes)).toBeLessThan(0.0006);
  });
});

type SpencerCase = {
  readonly kind: string;
  readonly inputs: { readonly day_of_year: number; readonly solar_constant: number };
  readonly expected: { readonly distance_factor: number; readonly dni_extra: number };
};

test('sunshine outside the air by Spencer 1971 on 24 days (sun-events.json)', () => {
  const cases = referenceCases<SpencerCase>('sun-events.json').filter((c) => c.kind === 'extraterrestrial-spencer');
  expect(cases).toHaveLength(24);
  for (const { inputs: i, expected } of cases) {
    const got = extraterrestrialSpencer(i.day_of_year, i.solar_constant);
    expect(Math.abs(got / expected.dni_extra - 1)).toBeLessThan(1e-12);
    expect(Math.abs(got / i.solar_constant / expected.distance_factor - 1)).toBeLessThan(1e-12);
  }
});
