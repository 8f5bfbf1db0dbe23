import * as maths from '../maths/maths.ts';
import { DEG } from '../units/angle.ts';

/** The sun's radius and the refraction at the horizon which the algorithm takes [°]. */
const SUN_RADIUS_deg = 0.26667;
const HORIZON_REFRACTION_deg = 0.5667;

/**
 * True altitude below which the algorithm leaves refraction out: the upper edge of the sun is then under the horizon. The
 * apparent altitude steps by some 0.6° there; the step belongs to the method.
 */
export const LAST_REFRACTED_deg = -(SUN_RADIUS_deg + HORIZON_REFRACTION_deg);

/**
 * How much the air lifts the sun.
 * @param altitude_deg   true altitude
 * @param pressure_hPa   at the place, 0 or more
 * @param temperature_C  above −273
 * @returns degrees, 0 below −0.83337°
 * @see Reda & Andreas 2004, equation 42, after Meeus 1998, equation 16.4 (Saemundsson)
 */
export function refraction_deg(altitude_deg: number, pressure_hPa: number, temperature_C: number): number {
  if (altitude_deg < LAST_REFRACTED_deg) return 0;
  const bend = 1.02 / (60 * maths.tan((altitude_deg + 10.3 / (altitude_deg + 5.11)) * DEG));
  return (pressure_hPa / 1010) * (283 / (273 + temperature_C)) * bend;
}

/** What stands in where no temperature is given [°C]. Common practice (pvlib takes the same), no source. */
export const USUAL_TEMPERATURE_C = 12;

/**
 * Pressure of the standard atmosphere.
 * @param elevation_m  above the sea [m], −500 to 11 000 (the troposphere, where temperature falls evenly)
 * @returns  station pressure [hPa]
 * @see ISO 2533:1975 and U.S. Standard Atmosphere (1976), hydrostatic equation with a lapse of 6.5 K/km, in the closed form
 *      p = 100·[(44331.514 − z)/11880.516]^(1/0.1902632) Pa
 */
export const standardPressure_hPa = (elevation_m: number): number =>
  maths.pow((44331.514 - elevation_m) / 11880.516, 1 / 0.1902632);
