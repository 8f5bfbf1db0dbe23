import { describe, expect, test } from 'vitest';
import { faultLine } from '../../../core/scheme/fault.ts';
import { checkInstant, checkObserver } from '../../../core/sun/check-observer.ts';
import { sunPosition } from '../../../core/sun/spa.ts';

const good = { latitude_deg: 51.5, longitude_deg: -0.1, elevation_m: 20 };

const linesOf = (result: ReturnType<typeof checkObserver> | ReturnType<typeof checkInstant>): string[] =>
  result.ok ? [] : result.faults.map(faultLine);

describe('an observer', () => {
  test('as given, when nothing is wrong', () => {
    const full = { ...good, pressure_hPa: 1010, temperature_C: 8, deltaT_s: 69 };
    expect(checkObserver(full)).toEqual({ ok: true, value: full, notes: [] });
    expect(checkObserver(good)).toEqual({ ok: true, value: good, notes: [] });
  });

  test('longitude 540 is refused and told where it would lie', () => {
    expect(linesOf(checkObserver({ ...good, longitude_deg: 540 }))).toEqual([
      'longitude: must be from -180 to 180°, got 540; 540° is the meridian of 180°; east is positive, west negative',
    ]);
    expect(linesOf(checkObserver({ ...good, longitude_deg: 359.9 }))[0]).toContain('the meridian of -0.1°');
  });

  test('no pressure, and a pressure in pascals', () => {
    for (const pressure_hPa of [0, -5, 101325])
      expect(linesOf(checkObserver({ ...good, pressure_hPa }))[0]).toContain('must be from 300 to 1100 hPa');
  });

  test('every fault is listed, and what is no number is one', () => {
    const wrong = {
      latitude_deg: Number.NaN,
      longitude_deg: Number.POSITIVE_INFINITY,
      elevation_m: 12_000,
      pressure_hPa: 0,
      temperature_C: -300,
      deltaT_s: 1e6,
    };
    const result = checkObserver(wrong);
    expect(result.ok ? [] : result.faults.map((f) => f.place)).toEqual([
      'latitude',
      'longitude',
      'elevation',
      'pressure',
      'temperature',
      'delta T',
    ]);
  });

  test.each([90, -90])('a pole (%i) is an observer, with a note, and has a sun', (latitude_deg) => {
    const result = checkObserver({ ...good, latitude_deg });
    expect(result.ok && result.notes.map((n) => n.code)).toEqual(['at-a-pole']);
    expect(Number.isFinite(sunPosition(Date.UTC(2025, 5, 21), { ...good, latitude_deg }).azimuth_deg)).toBe(true);
  });
});

describe('an instant', () => {
  test('the year 1600 is refused with the range and the cure', () => {
    expect(linesOf(checkInstant(Date.UTC(1600, 5, 21)))).toEqual([
      'instant: lies in the year 1600, outside the years 1900 to 2100; give a date from 1900-01-01 to 2100-12-31',
    ]);
    expect(linesOf(checkInstant(Number.NaN))[0]).toContain('is no instant');
    expect(linesOf(checkInstant(1e20))[0]).toContain('is no instant');
  });

  test('every civil moment of 1900 and of 2100 is accepted, and has a sun', () => {
    for (const at of [Date.parse('1900-01-01T00:00+14:00'), Date.parse('2100-12-31T23:59-12:00')]) {
      expect(checkInstant(at).ok).toBe(true);
      expect(Number.isFinite(sunPosition(at, good).altitude_deg)).toBe(true);
    }
  });
});
