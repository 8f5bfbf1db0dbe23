import * as maths from '../maths/maths.ts';

/**
 * Dew point of moist air over water.
 * @param tAir_C                air temperature [°C], −40 to 50
 * @param relativeHumidity_pct  0 to 100 [%]; below 1 % counts as 1 %, where the dew point would run away
 * @returns dew point [°C]
 * @see O. A. Alduchov, R. E. Eskridge, Journal of Applied Meteorology 35, 601–609 (1996), form "AERK", solved for the temperature
 */
export function dewPoint_C(tAir_C: number, relativeHumidity_pct: number): number {
  const share = Math.min(100, Math.max(1, relativeHumidity_pct)) / 100;
  const x = maths.log(share) + (17.625 * tAir_C) / (243.04 + tAir_C);
  return (243.04 * x) / (17.625 - x);
}
