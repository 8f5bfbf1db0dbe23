import { expect, test } from 'vitest';
import { civilOf } from '../../../core/sun/civil.ts';
import { stereographic, sunPath } from '../../../core/sun/sun-path.ts';
import { toDegrees } from '../../../core/units/angle.ts';

const at = (latitude_deg: number, longitude_deg: number) => ({ latitude_deg, longitude_deg, elevation_m: 0 });

test('at 51.5° N the highest and lowest noons are 90 − φ ± ε, closed form', () => {
  const path = sunPath(at(51.5, 0), 'Europe/London', 2025);
  const highest = (date: string) =>
    Math.max(...path.dates.filter((d) => d.date === date).flatMap((d) => d.runs.flatMap((r) => [...r.altitude_rad])));
  expect(toDegrees(highest('2025-06-21'))).toBeCloseTo(90 - 51.5 + 23.44, 1);
  expect(toDegrees(highest('2025-12-21'))).toBeCloseTo(90 - 51.5 - 23.44, 1);
});

test('an hour line shows the clock on the wall on every one of its days, and breaks at the clock changes', () => {
  const zone = 'Europe/London';
  const noon = sunPath(at(51.5, 0), zone, 2025).hours.find((h) => h.time === '12:00');
  for (const run of noon?.runs ?? []) for (const t of run.instant_ms) expect(civilOf(t, zone).time).toBe('12:00');
  expect(noon?.runs.length).toBe(3);
  expect(noon?.runs.reduce((n, r) => n + r.instant_ms.length, 0)).toBe(365);
});

test('a zone without daylight saving has unbroken noon lines', () => {
  expect(sunPath(at(1.35, 103.8), 'Asia/Singapore', 2025).hours.find((h) => h.time === '12:00')?.runs.length).toBe(1);
});

test('beyond the polar circle midsummer has no gap and midwinter no line', () => {
  const path = sunPath(at(69, 19), 'Europe/Oslo', 2025);
  expect(path.dates.find((d) => d.date === '2025-06-21')?.runs.length).toBe(1);
  expect(path.dates.find((d) => d.date === '2025-12-21')?.runs.length).toBe(0);
});

test('south of the tropics the noon sun stands in the north', () => {
  const noon = sunPath(at(-34, 151), 'Australia/Sydney', 2025).dates.find((d) => d.date === '2025-06-21');
  const run = noon?.runs[0];
  const k = run?.altitude_rad.indexOf(Math.max(...run.altitude_rad)) ?? 0;
  const azimuth = toDegrees(run?.azimuth_rad[k] ?? 180);
  expect(Math.min(azimuth, 360 - azimuth)).toBeLessThan(2);
});

test('stereographic: rim at the horizon, centre at the zenith, √2 − 1 at 45°', () => {
  expect(stereographic(0, 0)[1]).toBeCloseTo(1, 12);
  expect(stereographic(Math.PI / 2, 0)[0]).toBeCloseTo(1, 12);
  expect(stereographic(1, Math.PI / 2)[0]).toBeCloseTo(0, 12);
  expect(stereographic(0, Math.PI / 4)[1]).toBeCloseTo(Math.SQRT2 - 1, 12);
});
