import { deltaT_s } from './delta-t.ts';
import { instantFromJ2000_ms } from './julian.ts';

/**
 * The UTC instant of a moment of terrestrial time, by the published ΔT.
 * @param days_TT days of terrestrial time from J2000, years 1860 to 2149
 * @returns UTC milliseconds, rounded to one
 */
export function instantOfTerrestrial_ms(days_TT: number): number {
  const as_ms = instantFromJ2000_ms(days_TT);
  return Math.round(as_ms - 1000 * deltaT_s(as_ms));
}
