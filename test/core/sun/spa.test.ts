import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { deltaT_s, deltaTOfMonth_s, nextMonth_ms } from '../../../core/sun/delta-t.ts';
import { declination_deg, geocentricSun, rightAscension_deg } from '../../../core/sun/geocentric.ts';
import { daysFromJ2000, instantFromJ2000_ms, julianDay } from '../../../core/sun/julian.ts';
import { LAST_REFRACTED_deg, refraction_deg, standardPressure_hPa } from '../../../core/sun/refraction.ts';
import { meanSiderealTime_deg } from '../../../core/sun/sidereal.ts';
import { sunPosition } from '../../../core/sun/spa.ts';
import { wrap360 } from '../../../core/units/angle.ts';
import { apart_deg, observerOf, positionCases } from './reference.ts';

describe('the worked example of Reda and Andreas 2004', () => {
  const instant = Date.UTC(2003, 9, 17, 19, 30, 30);
  const observer = {
    latitude_deg: 39.742476,
    longitude_deg: -105.1786,
    elevation_m: 1830.14,
    pressure_hPa: 820,
    temperature_C: 11,
    deltaT_s: 67,
  };

  test('zenith and azimuth as printed in table A5.1', () => {
    const sun = sunPosition(instant, observer);
    expect(90 - sun.apparentAltitude_deg).toBeCloseTo(50.11162, 5);
    expect(sun.azimuth_deg).toBeCloseTo(194.34024, 5);
  });

  test('steps on the way, as printed', () => {
    const days_TT = daysFromJ2000(instant) + 67 / 86400;
    const sun = geocentricSun(days_TT);
    expect(julianDay(instant)).toBeCloseTo(2452930.312847, 6);
    expect(wrap360(sun.heliocentricLongitude_deg)).toBeCloseTo(24.0182616917, 9);
    expect(sun.heliocentricLatitude_deg).toBeCloseTo(-0.0001011219, 10);
    expect(sun.distance_au).toBeCloseTo(0.9965422974, 10);
    expect(sun.nutationLongitude_deg).toBeCloseTo(-0.0039984, 8);
    expect(sun.nutationObliquity_deg).toBeCloseTo(0.00166657, 8);
    expect(sun.obliquity_deg).toBeCloseTo(23.440465, 6);
    expect(wrap360(sun.apparentLongitude_deg)).toBeCloseTo(204.0085519281, 9);
    expect(wrap360(rightAscension_deg(sun))).toBeCloseTo(202.22741, 5);
    expect(declination_deg(sun)).toBeCloseTo(-9.31434, 5);
    const sidereal = wrap360(meanSiderealTime_deg(daysFromJ2000(instant)) + sun.equationOfEquinoxes_deg);
    expect(apart_deg(sidereal, 318.5119098411589)).toBeLessThan(2e-7);
  });
});

describe('sixty positions by another implementation', () => {
  test.each(positionCases())('$id $inputs.place $inputs.utc', (c) => {
    const sun = sunPosition(Date.parse(c.inputs.utc), observerOf(c));
    // The azimuth is the worse known the nearer the zenith, by 1/sin(zenith).
    const spread = Math.max(1, 1 / Math.sin((c.expected.zenith * Math.PI) / 180));
    expect(Math.abs(90 - sun.altitude_deg - c.expected.zenith)).toBeLessThan(1e-6);
    expect(apart_deg(sun.azimuth_deg, c.expected.azimuth)).toBeLessThan(1e-6 * spread);
    expect(Math.abs(sun.apparentAltitude_deg - c.expected.apparent_elevation)).toBeLessThan(1e-6);
    expect(Math.abs(sun.equationOfTime_min - c.expected.equation_of_time)).toBeLessThan(1e-6);
    expect(Math.abs(sun.distance_au - c.expected.earth_sun_distance)).toBeLessThan(1e-9);
  });

  test('ΔT by our own polynomials is the ΔT given, where the case took the polynomials', () => {
    const cases = positionCases().filter((c) => c.inputs.delta_t_source !== 'fixed');
    expect(cases.length).toBeGreaterThan(30);
    for (const c of cases) expect(deltaT_s(Date.parse(c.inputs.utc))).toBeCloseTo(c.inputs.delta_t, 9);
  });
});

describe('delta T', () => {
  // Observed values: F. R. Stephenson, L. V. Morrison, C. Y. Hohenkerk, Proc. R. Soc. A 472 (2016) 20160404 and the yearly
  // table of the Astronomical Almanac, page K9; to a second, from memory.
  test.each([
    [1900, -3],
    [1920, 21],
    [1950, 29],
    [1970, 40],
    [1990, 57],
    [2000, 64],
    [2010, 66],
  ])('January %i is about %i s', (year, seconds) => {
    expect(Math.abs(deltaTOfMonth_s(year, 1) - seconds)).toBeLessThan(1.2);
  });

  test('the pieces join to a second, and years without a piece are refused', () => {
    for (const year of [1900, 1920, 1941, 1961, 1986, 2005, 2050])
      expect(Math.abs(deltaTOfMonth_s(year, 1) - deltaTOfMonth_s(year - 1, 12))).toBeLessThan(1);
    expect(() => deltaTOfMonth_s(1859, 12)).toThrow(RangeError);
    expect(() => deltaTOfMonth_s(2150, 1)).toThrow(RangeError);
    expect(() => deltaT_s(Number.NaN)).toThrow(RangeError);
  });

  test('holds until the month ends', () => {
    const end = nextMonth_ms(Date.UTC(2024, 11, 5));
    expect(end).toBe(Date.UTC(2025, 0, 1));
    expect(deltaT_s(end - 1)).toBe(deltaT_s(Date.UTC(2024, 11, 5)));
    expect(deltaT_s(end)).not.toBe(deltaT_s(end - 1));
  });
});

describe('refraction', () => {
  test('about 29′ at the true horizon, and 34′ when the sun seems to stand on it (Meeus 1998, chapter 16)', () => {
    expect(refraction_deg(0, 1010, 10) * 60).toBeCloseTo(28.98, 1);
    expect(refraction_deg(-0.5667, 1010, 10) * 60).toBeGreaterThan(33);
    expect(refraction_deg(-0.5667, 1010, 10) * 60).toBeLessThan(36);
  });

  test('ends where the upper edge has set', () => {
    expect(refraction_deg(LAST_REFRACTED_deg, 1013, 12)).toBeGreaterThan(0.5);
    expect(refraction_deg(LAST_REFRACTED_deg - 1e-9, 1013, 12)).toBe(0);
    expect(refraction_deg(10, 0, 12)).toBe(0);
  });

  test('standard atmosphere (ISO 2533:1975, table 5): 0, 1000 and 5000 m', () => {
    expect(standardPressure_hPa(0)).toBeCloseTo(1013.25, 3);
    expect(standardPressure_hPa(1000)).toBeCloseTo(898.75, 1);
    expect(standardPressure_hPa(5000)).toBeCloseTo(540.2, 1);
  });

  test('stands in when the observer gives no pressure and no temperature', () => {
    const place = { latitude_deg: 47, longitude_deg: 11, elevation_m: 1800 };
    const at = Date.UTC(2025, 5, 21, 4);
    const given = { ...place, pressure_hPa: standardPressure_hPa(1800), temperature_C: 12 };
    expect(sunPosition(at, place)).toEqual(sunPosition(at, given));
  });
});

describe('properties', () => {
  const instants = fc.integer({ min: Date.UTC(1900, 0, 1), max: Date.UTC(2100, 11, 31) });
  const latitudes = fc.double({ min: -90, max: 90, noNaN: true });
  const longitudes = fc.double({ min: -180, max: 180, noNaN: true });

  test('angles keep their ranges and a whole turn of longitude changes nothing', () => {
    fc.assert(
      fc.property(instants, latitudes, longitudes, (t, latitude_deg, longitude_deg) => {
        const observer = { latitude_deg, longitude_deg, elevation_m: 0 };
        const sun = sunPosition(t, observer);
        expect(sun.azimuth_deg).toBeGreaterThanOrEqual(0);
        expect(sun.azimuth_deg).toBeLessThan(360);
        expect(Math.abs(sun.altitude_deg)).toBeLessThanOrEqual(90);
        expect(sun.apparentAltitude_deg).toBeGreaterThanOrEqual(sun.altitude_deg - 0.01);
        expect(Math.abs(sun.equationOfTime_min)).toBeLessThan(17);
        expect(Math.abs(sun.distance_au - 1)).toBeLessThan(0.0171);
        const round = sunPosition(t, { ...observer, longitude_deg: longitude_deg + 360 });
        expect(Math.abs(round.altitude_deg - sun.altitude_deg)).toBeLessThan(1e-9);
      }),
      { numRuns: 300 },
    );
  });

  test('the instant survives the way to days and back', () => {
    fc.assert(fc.property(instants, (t) => Math.abs(instantFromJ2000_ms(daysFromJ2000(t)) - t) < 0.001));
  });

  test('at a pole the altitude is the declination, less the parallax', () => {
    fc.assert(
      fc.property(instants, (t) => {
        const north = sunPosition(t, { latitude_deg: 90, longitude_deg: 0, elevation_m: 0 });
        const south = sunPosition(t, { latitude_deg: -90, longitude_deg: 0, elevation_m: 0 });
        const declination = declination_deg(geocentricSun(daysFromJ2000(t) + deltaT_s(t) / 86400));
        expect(Math.abs(north.altitude_deg - declination)).toBeLessThan(0.0025);
        expect(Math.abs(south.altitude_deg + declination)).toBeLessThan(0.0025);
      }),
      { numRuns: 200 },
    );
  });

  test('what is not a number is refused', () => {
    const observer = { latitude_deg: 50, longitude_deg: 0, elevation_m: 0 };
    expect(() => sunPosition(Number.NaN, observer)).toThrow(RangeError);
    expect(() => sunPosition(0, { ...observer, latitude_deg: Number.NaN })).toThrow(RangeError);
  });
});
