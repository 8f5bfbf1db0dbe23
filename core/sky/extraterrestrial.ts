import * as maths from '../maths/maths.ts';
import { DEG } from '../units/angle.ts';

/**
 * The solar constants in use here, each with its method. They differ by less than any clear-sky model promises; what matters is
 * that a model meets the constant it was fitted with, which is why today's 1361 W/m² (G. Kopp, J. L. Lean, Geophysical Research
 * Letters 38, L01706, 2011) serves none of them.
 */
export const SOLAR_CONSTANT = {
  /** ASTM E490 (2000). Used for design days, transposition and Erbs: the fits of Ineichen–Perez and Perez 1990 are of that time. */
  astm_Wm2: 1366.1,
  /** As the DISC and DIRINT fits take it (Maxwell 1987). */
  disc_Wm2: 1370,
  /** As the ASHRAE clear-sky model takes it (Handbook of Fundamentals 2009, ch. 14). */
  ashrae_Wm2: 1367,
} as const;

/**
 * Irradiance on a plane facing the sun outside the air.
 * @param distance_au  distance of the sun [au], 0.983 to 1.017
 * @param constant_Wm2 at 1 au; absent: ASTM E490
 */
export const extraterrestrial = (distance_au: number, constant_Wm2: number = SOLAR_CONSTANT.astm_Wm2): number =>
  constant_Wm2 / (distance_au * distance_au);

/**
 * The same from the day of the year alone, within 0.1 % of the true distance.
 * @param dayOfYear  1 = 1 January, to 366
 * @see J. W. Spencer, Fourier series representation of the position of the sun, Search 2 (5), 172 (1971)
 */
export function extraterrestrialSpencer(dayOfYear: number, constant_Wm2: number = SOLAR_CONSTANT.astm_Wm2): number {
  const b = (2 * Math.PI * (dayOfYear - 1)) / 365;
  const ratio =
    1.00011 +
    0.034221 * maths.cos(b) +
    0.00128 * maths.sin(b) +
    0.000719 * maths.cos(2 * b) +
    7.7e-5 * maths.sin(2 * b);
  return constant_Wm2 * ratio;
}

/**
 * The same by the one-term form of the ASHRAE model, whose τ values belong to it.
 * @param dayOfYear  1 = 1 January, to 366
 * @see ASHRAE Handbook of Fundamentals (2009), ch. 14
 */
export function extraterrestrialAshrae(dayOfYear: number, constant_Wm2: number = SOLAR_CONSTANT.ashrae_Wm2): number {
  return constant_Wm2 * (1 + 0.033 * maths.cos(((360 * (dayOfYear - 3)) / 365) * DEG));
}

/** Day of the year of an instant, counted in UTC: 1 = 1 January. @param instant_ms UTC milliseconds */
export function dayOfYear(instant_ms: number): number {
  const year = new Date(instant_ms).getUTCFullYear();
  return Math.floor((instant_ms - Date.UTC(year, 0, 1)) / 86_400_000) + 1;
}
