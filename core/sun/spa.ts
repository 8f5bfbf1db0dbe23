import { DEG, toDegrees, wrap360 } from '../units/angle.ts';
import { deltaT_s } from './delta-t.ts';
import { equationOfTime_min, geocentricSun } from './geocentric.ts';
import { daysFromJ2000 } from './julian.ts';
import type { Observer, SunPosition } from './position.ts';
import { refraction_deg, standardPressure_hPa, USUAL_TEMPERATURE_C } from './refraction.ts';
import { meanSiderealTime_deg } from './sidereal.ts';
import { type Direction, lookFrom, stationOf } from './station.ts';

/**
 * Where the sun stands, by the solar position algorithm: ±0.0003° from the year −2000 to 6000, given the right ΔT.
 *
 * UTC is taken as UT1; they differ by 0.9 s at most, which is 0.004° of hour angle.
 * @param instant_ms UTC milliseconds. Without `observer.deltaT_s`, years 1860 to 2149
 * @param observer   latitude −90 to 90, any longitude. At a pole every azimuth is counted from the meridian of the longitude
 *                   given
 * @throws {RangeError} when an argument is not a number, or ΔT is wanted outside those years
 * @see I. Reda, A. Andreas, Solar position algorithm for solar radiation applications, Solar Energy 76 (2004) 577–589, and
 *      corrigendum, Solar Energy 81 (2007) 838
 */
export function sunPosition(instant_ms: number, observer: Observer): SunPosition {
  if (!Number.isFinite(instant_ms + observer.latitude_deg + observer.longitude_deg + observer.elevation_m))
    throw new RangeError('a sun position needs an instant, a latitude, a longitude and an elevation');
  const days = daysFromJ2000(instant_ms);
  const days_TT = days + (observer.deltaT_s ?? deltaT_s(instant_ms)) / 86400;
  const sun = geocentricSun(days_TT);
  const sidereal_rad = (meanSiderealTime_deg(days) + sun.equationOfEquinoxes_deg) * DEG;
  const seen: Direction = { azimuth_rad: 0, altitude_rad: 0 };
  lookFrom(stationOf(observer), sun.x, sun.y, sun.z, sun.distance_au, sidereal_rad, seen);
  const altitude_deg = toDegrees(seen.altitude_rad);
  const pressure_hPa = observer.pressure_hPa ?? standardPressure_hPa(observer.elevation_m);
  const lift_deg = refraction_deg(altitude_deg, pressure_hPa, observer.temperature_C ?? USUAL_TEMPERATURE_C);
  return {
    azimuth_deg: wrap360(toDegrees(seen.azimuth_rad)),
    altitude_deg,
    apparentAltitude_deg: altitude_deg + lift_deg,
    equationOfTime_min: equationOfTime_min(days_TT, sun),
    distance_au: sun.distance_au,
  };
}
