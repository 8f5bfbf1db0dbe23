import { describe, expect, test } from 'vitest';
import { sunPosition } from '../../../core/sun/spa.ts';
import { SunKnots } from '../../../core/sun/sun-knots.ts';
import { sunTable } from '../../../core/sun/sun-table.ts';
import { type SunSight, sunTrack } from '../../../core/sun/sun-track.ts';
import { toDegrees } from '../../../core/units/angle.ts';
import { apart_deg } from './reference.ts';

/** A repeatable spread of instants over 1900 to 2100 (the golden ratio leaves no gaps and no period). */
const spread = (count: number): Float64Array =>
  Float64Array.from({ length: count }, (_, i) => {
    const share = (i * 0.618033988749895) % 1;
    return Math.round(Date.UTC(1900, 0, 1) + share * (Date.UTC(2101, 0, 1) - Date.UTC(1900, 0, 1)));
  });

describe('the table against the full series', () => {
  // The promise is 2e-8°; the algorithm itself is good to 3e-4°.
  const BOUND_deg = 2e-8;

  test.each([-90, -67, -33.9, 0, 23.4, 51.5, 69.6, 89.99])(
    'latitude %d°, 3000 instants of two centuries',
    (latitude_deg) => {
      const observer = { latitude_deg, longitude_deg: 10.5, elevation_m: 120 };
      const instants = spread(3000);
      const table = sunTable(instants, observer);
      let worst = 0;
      let worstDistance = 0;
      for (let i = 0; i < instants.length; i++) {
        const full = sunPosition(instants[i]!, observer);
        const turned = apart_deg(toDegrees(table.azimuth_rad[i]!), full.azimuth_deg) * Math.cos(table.altitude_rad[i]!);
        const raised = Math.abs(toDegrees(table.altitude_rad[i]!) - full.altitude_deg);
        worst = Math.max(worst, turned, raised);
        worstDistance = Math.max(worstDistance, Math.abs(table.distance_au[i]! - full.distance_au));
        // Not on the step of refraction, where the two may stand on either side.
        if (Math.abs(full.altitude_deg + 0.83337) > 1e-6)
          expect(Math.abs(toDegrees(table.apparentAltitude_rad[i]!) - full.apparentAltitude_deg)).toBeLessThan(1e-7);
      }
      expect(worst).toBeLessThan(BOUND_deg);
      expect(worstDistance).toBeLessThan(1e-9);
    },
  );

  test('every five minutes about the turn of a month, where ΔT steps', () => {
    const observer = { latitude_deg: 47, longitude_deg: 8, elevation_m: 400 };
    const instants = Float64Array.from({ length: 576 }, (_, i) => Date.UTC(2087, 3, 30) + i * 300_000);
    const table = sunTable(instants, observer);
    for (let i = 0; i < instants.length; i++) {
      const full = sunPosition(instants[i]!, observer);
      expect(Math.abs(toDegrees(table.altitude_rad[i]!) - full.altitude_deg)).toBeLessThan(BOUND_deg);
    }
  });
});

describe('order and company do not matter', () => {
  const observer = { latitude_deg: 51.5, longitude_deg: -0.1, elevation_m: 20 };

  test('the same instants backwards, one by one, or with shared knots: the same bits', () => {
    const instants = spread(500);
    const forward = sunTable(instants, observer);
    const knots = new SunKnots();
    sunTable(instants, { ...observer, latitude_deg: -20 }, knots);
    const backward = sunTable(instants.slice().reverse(), observer, knots);
    expect(backward.azimuth_rad.reverse()).toEqual(forward.azimuth_rad);
    const track = sunTrack(observer);
    const sight: SunSight = { azimuth_rad: 0, altitude_rad: 0, distance_au: 1 };
    track(instants[77]!, sight);
    expect(sight.altitude_rad).toBe(forward.altitude_rad[77]);
  });

  test('a given ΔT is kept, also where the polynomials end', () => {
    const fixed = { ...observer, deltaT_s: 67 };
    const at = Date.UTC(2500, 5, 21, 12);
    expect(toDegrees(sunTable(Float64Array.of(at), fixed).altitude_rad[0]!)).toBeCloseTo(
      sunPosition(at, fixed).altitude_deg,
      7,
    );
    expect(() => sunTable(Float64Array.of(at), observer)).toThrow(RangeError);
  });

  test('an empty table is empty', () => {
    expect(sunTable(new Float64Array(0), observer).azimuth_rad).toHaveLength(0);
  });
});
