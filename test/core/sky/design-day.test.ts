import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { relativeAirMass } from '../../../core/sky/air-mass.ts';
import { standardPressure_hPa } from '../../../core/sun/refraction.ts';
import { checkDesignDay, type DesignDayInput, designDay, hotSpell } from '../../../core/sky/design-day.ts';
import { designTemperature_C } from '../../../core/sky/design-temperature.ts';
import { dewPoint_C } from '../../../core/sky/dew-point.ts';
import { lowSunNote } from '../../../core/sky/low-sun.ts';
import { monthly, monthOf } from '../../../core/sky/monthly.ts';
import { sunPosition } from '../../../core/sun/spa.ts';
import { DEG } from '../../../core/units/angle.ts';
import { near } from './reference.ts';

const LONDON: DesignDayInput = {
  key: 'hottest',
  name: 'hottest day',
  date: '2025-07-21',
  zone: 'Europe/London',
  step_min: 5,
  observer: { latitude_deg: 51.5, longitude_deg: -0.13, elevation_m: 20 },
  linkeTurbidity: 3.5,
  maximum_C: 30,
  range_K: 11,
};

describe('temperature of a hot day (4f, from the ASHRAE profile)', () => {
  it('stands at the table on the hours', () => {
    const wanted = { 5: 19, 9: 23.95, 14: 30, 15: 30, 21: 23.51 };
    for (const [hour, t] of Object.entries(wanted))
      expect(designTemperature_C(Number(hour) * 60, 30, 11)).toBeCloseTo(t, 9);
    const mean = Array.from({ length: 24 }, (_, h) => designTemperature_C(h * 60, 30, 11)).reduce((a, b) => a + b) / 24;
    expect(mean).toBeCloseTo(24.10125, 9);
  });
  it('runs straight between the hours and closes over midnight', () => {
    expect(designTemperature_C(5.5 * 60, 30, 10)).toBeCloseTo(30 - 10 * 0.99, 9);
    expect(designTemperature_C(30, 30, 10)).toBeCloseTo(30 - 10 * 0.85, 9);
    expect(designTemperature_C(1440, 30, 10)).toBeCloseTo(designTemperature_C(0, 30, 10), 9);
  });
});

describe('a design day', () => {
  const day = designDay(LONDON);

  it('is the formulas of Ineichen and Perez at the sun of each step, written out anew here (1e-5)', () => {
    const z = LONDON.observer.elevation_m;
    const p = standardPressure_hPa(z) / 1013.25;
    for (let i = 0; i < day.instant_ms.length; i += 7) {
      const sun = sunPosition(day.instant_ms[i]!, LONDON.observer);
      if (sun.altitude_deg <= 0) continue;
      const e0 = 1366.1 / sun.distance_au ** 2;
      const m = relativeAirMass(sun.apparentAltitude_deg * DEG) * p;
      const [f1, f2] = [Math.exp(-z / 8000), Math.exp(-z / 1250)];
      const up = Math.sin(sun.apparentAltitude_deg * DEG);
      const global = (5.09e-5 * z + 0.868) * e0 * up * Math.exp(-(3.92e-5 * z + 0.0387) * m * (f1 + f2 * 2.5));
      const cap = (global * (1 - (0.1 - 0.2 * Math.exp(-3.5)) / (0.1 + 0.882 / f1))) / up;
      const beam = Math.min(e0 * (0.664 + 0.163 / f1) * Math.exp(-0.09 * m * 2.5), cap);
      near(day.beamNormal_Wm2[i]!, beam, 1e-5, 1e-3, 'beam');
      near(day.global_Wm2[i]!, global, 1e-5, 1e-3, 'global');
      near(day.diffuse_Wm2[i]!, global - beam * up, 1e-5, 1e-3, 'diffuse');
    }
  });

  it('has light by day and none by night, never negative, and closes', () => {
    for (let i = 0; i < day.instant_ms.length; i++) {
      const up = day.altitude_rad[i]! > 0;
      expect(day.beamNormal_Wm2[i]! > 0).toBe(up);
      if (day.altitude_rad[i]! < -0.6 * DEG)
        expect([day.diffuse_Wm2[i], day.global_Wm2[i], day.airMass[i]]).toEqual([0, 0, 0]);
      expect(day.diffuse_Wm2[i]).toBeGreaterThanOrEqual(0);
      expect(day.beamNormal_Wm2[i]).toBeLessThan(day.extraterrestrial_Wm2[i]!);
      // The horizontal beam is that of the refracted sun, up to half a degree higher than the true one near the horizon.
      const closure = day.diffuse_Wm2[i]! + day.beamNormal_Wm2[i]! * Math.sin(day.altitude_rad[i]!);
      expect(Math.abs(day.global_Wm2[i]! - closure)).toBeLessThan(2);
    }
  });

  it('is warmest at two and three by the civil clock', () => {
    const at = (h: number): number => day.tAir_C[day.clock_min.findIndex((c) => c > h * 60)]!;
    expect(at(14.5)).toBeCloseTo(30, 6);
    expect(at(5)).toBeLessThan(19.1);
  });

  it('lasts 23 and 25 hours where the clocks change', () => {
    expect(designDay({ ...LONDON, date: '2025-03-30' }).instant_ms.length).toBe(23 * 12);
    expect(designDay({ ...LONDON, date: '2025-10-26' }).instant_ms.length).toBe(25 * 12);
  });

  it('takes the turbidity of its month', () => {
    const twelve = Array.from({ length: 12 }, (_, m) => (m === 6 ? 3.5 : 9));
    expect(designDay({ ...LONDON, linkeTurbidity: twelve }).beamNormal_Wm2).toEqual(day.beamNormal_Wm2);
    expect([monthly(0.2, 5), monthly(twelve, 7), monthOf('2025-12-01')]).toEqual([0.2, 3.5, 12]);
    expect(() => monthly([1, 2], 1)).toThrow(RangeError);
    expect(() => monthly(1, 13)).toThrow(RangeError);
    expect(() => monthOf('2025')).toThrow(RangeError);
  });

  it('is dark through the polar night and light through the polar day', () => {
    const svalbard = {
      ...LONDON,
      zone: 'Arctic/Longyearbyen',
      observer: { latitude_deg: 78.2, longitude_deg: 15.6, elevation_m: 10 },
    };
    expect(Math.max(...designDay({ ...svalbard, date: '2025-12-21' }).global_Wm2)).toBe(0);
    expect(Math.min(...designDay({ ...svalbard, date: '2025-06-21' }).beamNormal_Wm2)).toBeGreaterThan(0);
  });

  it('hazier air gives less beam and less global, anywhere and any day (property)', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -60, max: 60, noNaN: true }),
        fc.integer({ min: 1, max: 12 }),
        fc.double({ min: 2, max: 7, noNaN: true }),
        fc.double({ min: 0, max: 2500, noNaN: true }),
        (latitude_deg, month, linkeTurbidity, elevation_m) => {
          const date = `2025-${String(month).padStart(2, '0')}-21`;
          const input = {
            ...LONDON,
            date,
            zone: 'UTC',
            step_min: 60,
            observer: { latitude_deg, longitude_deg: 0, elevation_m },
            linkeTurbidity,
          };
          const clear = designDay(input);
          const hazy = designDay({ ...input, linkeTurbidity: linkeTurbidity + 0.5 });
          // While refraction alone lifts the sun, global is diffuse, and haze may raise that.
          return clear.global_Wm2.every(
            (g, i) =>
              clear.altitude_rad[i]! <= 0 ||
              (hazy.global_Wm2[i]! <= g && hazy.beamNormal_Wm2[i]! <= clear.beamNormal_Wm2[i]!),
          );
        },
      ),
      { numRuns: 60 },
    );
  });
});

describe('validity', () => {
  it('a day of low sun says so, a summer day does not', () => {
    const tromso = {
      ...LONDON,
      zone: 'Europe/Oslo',
      date: '2025-11-22',
      observer: { latitude_deg: 68.5, longitude_deg: 17, elevation_m: 0 },
    };
    expect(lowSunNote(designDay(tromso))[0]?.message).toMatch(/^100 % of the beam of 2025-11-22/);
    expect(lowSunNote(designDay(LONDON))).toEqual([]);
    expect(lowSunNote(designDay({ ...tromso, date: '2025-12-21' }))).toEqual([]);
  });
  it('dew point: 9.3 °C at 20 °C and 50 % (psychrometric tables, value from memory), the air itself at 100 %', () => {
    expect(dewPoint_C(20, 50)).toBeCloseTo(9.26, 1);
    expect(dewPoint_C(17.3, 100)).toBeCloseTo(17.3, 9);
  });
});

describe('a hot spell', () => {
  it('is so many days on end, the last on the date, each as hot', () => {
    const days = hotSpell(LONDON, 5);
    expect(days.map((d) => d.date)).toEqual(['2025-07-17', '2025-07-18', '2025-07-19', '2025-07-20', '2025-07-21']);
    expect(new Set(days.map((d) => d.key)).size).toBe(5);
    for (const d of days) expect(d.tAir_C).toEqual(days[4]!.tAir_C);
    for (let i = 1; i < 5; i++) expect(days[i]!.instant_ms[0]! - days[i - 1]!.instant_ms.at(-1)!).toBe(300_000);
    expect(() => hotSpell(LONDON, 0)).toThrow(RangeError);
  });
});

describe('bad input is refused, each fault with place, range and cure', () => {
  it.each<[string, Partial<DesignDayInput>, string]>([
    ['turbidity −1', { linkeTurbidity: -1 }, 'linkeTurbidity'],
    ['eleven turbidities', { linkeTurbidity: Array<number>(11).fill(3) }, 'linkeTurbidity'],
    ['one bad turbidity of twelve', { linkeTurbidity: [3, 3, 3, 3, 0, 3, 3, 3, 3, 3, 3, 3] }, 'linkeTurbidity[4]'],
    ['pressure 0', { observer: { ...LONDON.observer, pressure_hPa: 0 } }, 'observer.pressure'],
    ['a mountain too high', { observer: { ...LONDON.observer, elevation_m: 12000 } }, 'observer.elevation'],
    ['a maximum that is no number', { maximum_C: Number.NaN }, 'maximum'],
    ['a negative range', { range_K: -2 }, 'range'],
    ['no step', { step_min: 0 }, 'step'],
    ['no date', { date: '2025-02-30' }, 'date'],
    ['no zone', { zone: '+01:00' }, 'zone'],
  ])('%s', (_name, change, place) => {
    const faults = checkDesignDay({ ...LONDON, ...change }, '');
    expect(faults.map((f) => f.place)).toContain(place);
    for (const f of faults) expect(f.cure).not.toBe('');
    expect(() => designDay({ ...LONDON, ...change })).toThrow(RangeError);
  });
  it('and nothing where there is nothing', () => expect(checkDesignDay(LONDON, '')).toEqual([]));
});
