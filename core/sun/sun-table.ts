import { DEG } from '../units/angle.ts';
import type { Observer } from './position.ts';
import { LAST_REFRACTED_deg, refraction_deg, standardPressure_hPa, USUAL_TEMPERATURE_C } from './refraction.ts';
import type { SunKnots } from './sun-knots.ts';
import { type SunSight, sunTrack } from './sun-track.ts';

/** Sun positions in columns, one row an instant. */
export type SunTable = {
  /** Clockwise from true north, [0, 2π). */
  readonly azimuth_rad: Float64Array;
  /** True altitude. */
  readonly altitude_rad: Float64Array;
  /** With refraction, as in `sunPosition`. */
  readonly apparentAltitude_rad: Float64Array;
  readonly distance_au: Float64Array;
};

/**
 * The sun at many instants. Equal to `sunPosition` within 2e-8° (azimuth: divided by the sine of the zenith distance), far
 * inside the 0.0003° of the algorithm, at a twentieth of its cost: see `SunKnots` for how.
 * @param instant_ms UTC milliseconds; quickest in the order of time, right in any
 * @param observer   as for `sunPosition`
 * @param knots      share one between tables of the same dates at several places
 * @throws {RangeError} when ΔT is wanted outside 1860 to 2149
 */
export function sunTable(instant_ms: Float64Array, observer: Observer, knots?: SunKnots): SunTable {
  const track = sunTrack(observer, knots);
  const pressure_hPa = observer.pressure_hPa ?? standardPressure_hPa(observer.elevation_m);
  const temperature_C = observer.temperature_C ?? USUAL_TEMPERATURE_C;
  const last_rad = LAST_REFRACTED_deg * DEG;
  const n = instant_ms.length;
  const table = {
    azimuth_rad: new Float64Array(n),
    altitude_rad: new Float64Array(n),
    apparentAltitude_rad: new Float64Array(n),
    distance_au: new Float64Array(n),
  };
  const sight: SunSight = { azimuth_rad: 0, altitude_rad: 0, distance_au: 1 };
  for (let i = 0; i < n; i++) {
    track(instant_ms[i]!, sight);
    const altitude = sight.altitude_rad;
    table.azimuth_rad[i] = sight.azimuth_rad;
    table.altitude_rad[i] = altitude;
    table.apparentAltitude_rad[i] =
      altitude < last_rad ? altitude : altitude + refraction_deg(altitude / DEG, pressure_hPa, temperature_C) * DEG;
    table.distance_au[i] = sight.distance_au;
  }
  return table;
}
