import * as maths from '../maths/maths.ts';
import { DEG } from '../units/angle.ts';

/** Pressure of the standard atmosphere at sea level [hPa]. */
export const SEA_LEVEL_hPa = 1013.25;

/**
 * Relative optical air mass: how many times longer the sun's path through the air is than straight up, at sea level.
 * @param apparentAltitude_rad  altitude with refraction [rad]
 * @returns  1 at the zenith (0.9997 by this fit), 38 at the horizon; NaN below the horizon, where there is no such path
 * @see F. Kasten, A. T. Young, Applied Optics 28, 4735–4738 (1989)
 */
export function relativeAirMass(apparentAltitude_rad: number): number {
  const h_deg = apparentAltitude_rad / DEG;
  if (!(h_deg >= 0)) return Number.NaN;
  return 1 / (maths.sin(apparentAltitude_rad) + 0.50572 * maths.pow(h_deg + 6.07995, -1.6364));
}

/**
 * The older fit, which the DISC and DIRINT splits were made with and must be used with.
 * @param zenith_rad  true zenith angle [rad]
 * @returns  1 at the zenith, about 36 at the horizon; NaN below it
 * @see F. Kasten, A new table and approximation formula for the relative optical air mass, Arch. Meteorol. B 14, 206–223 (1966)
 */
export function relativeAirMass1966(zenith_rad: number): number {
  const z_deg = zenith_rad / DEG;
  if (!(z_deg <= 90)) return Number.NaN;
  return 1 / (maths.cos(zenith_rad) + 0.15 * maths.pow(93.885 - z_deg, -1.253));
}

/** Air mass for the thinner air of a high place: in proportion to the pressure. @param pressure_hPa station pressure [hPa] */
export const absoluteAirMass = (relative: number, pressure_hPa: number): number =>
  (relative * pressure_hPa) / SEA_LEVEL_hPa;
