import fc from 'fast-check';
import { expect, test } from 'vitest';
import { sunPosition } from '../../../core/sun/spa.ts';
import { whenSunAt } from '../../../core/sun/when-sun-at.ts';
import { DEG } from '../../../core/units/angle.ts';

const away = (a: { azimuth_deg: number; altitude_deg: number }, b: typeof a): number => {
  const [p, q] = [a.altitude_deg * DEG, b.altitude_deg * DEG];
  const cosine =
    Math.sin(p) * Math.sin(q) + Math.cos(p) * Math.cos(q) * Math.cos((a.azimuth_deg - b.azimuth_deg) * DEG);
  return Math.acos(Math.min(1, cosine)) / DEG;
};

test('where the sun was seen at an instant, it is found again: same half year, same place in the sky', () => {
  fc.assert(
    fc.property(
      fc.integer({ min: -66, max: 66 }),
      fc.integer({ min: -180, max: 180 }),
      fc.integer({ min: 1, max: 363 }),
      fc.integer({ min: 0, max: 1439 }),
      (latitude_deg, longitude_deg, day, minute) => {
        const observer = { latitude_deg, longitude_deg, elevation_m: 0 };
        const t = Date.UTC(2024, 11, 22) + day * 86_400_000 + minute * 60_000;
        const seen = sunPosition(t, observer);
        const found = whenSunAt(seen.azimuth_deg * DEG, seen.altitude_deg * DEG, observer, t);
        // One day moves the sun by up to 0.4°, one minute by 0.25°: half of each is the grid's own coarseness.
        expect(away(seen, sunPosition(found.instant_ms, observer))).toBeLessThan(0.26);
        expect(found.instant_ms % 60_000).toBe(0);
      },
    ),
    { numRuns: 60 },
  );
});

test('the two halves of the year give the two dates of one direction: equal declinations on both sides of the June solstice', () => {
  const observer = { latitude_deg: 51.5, longitude_deg: 0, elevation_m: 0 };
  const at = sunPosition(Date.UTC(2025, 3, 21, 12), observer);
  const direction = [at.azimuth_deg * DEG, at.altitude_deg * DEG] as const;
  const spring = whenSunAt(...direction, observer, Date.UTC(2025, 2, 1));
  const autumn = whenSunAt(...direction, observer, Date.UTC(2025, 8, 1));
  expect(new Date(spring.instant_ms).toISOString().slice(0, 10)).toBe('2025-04-21');
  // Declination 11.9° comes back on 21 or 22 August (any almanac).
  expect(new Date(autumn.instant_ms).toISOString().slice(0, 10)).toMatch(/^2025-08-2[012]$/);
});

test('a direction that the sun never reaches is answered with how far off it stays', () => {
  const observer = { latitude_deg: 51.5, longitude_deg: 0, elevation_m: 0 };
  const found = whenSunAt(180 * DEG, 89 * DEG, observer, Date.UTC(2025, 4, 1));
  expect(found.away_rad / DEG).toBeCloseTo(89 - (90 - 51.5 + 23.44), 0);
});
