/**
 * Share of the daily range by which the air is cooler than the day's maximum, at clock hours 1 to 24: coolest at 5, warmest
 * at 14 and 15. One profile serves all places on hot design days.
 * @see ASHRAE Handbook of Fundamentals (2009 and later), ch. 14, table of the fraction of the daily temperature range, after
 *      research project RP-1363
 */
const FALL = [
  0.88, 0.92, 0.95, 0.98, 1.0, 0.98, 0.91, 0.74, 0.55, 0.38, 0.23, 0.13, 0.05, 0.0, 0.0, 0.06, 0.14, 0.24, 0.39, 0.5,
  0.59, 0.68, 0.75, 0.82,
];

/**
 * Air temperature of a hot design day.
 * @param clock_min  minutes of the civil clock since midnight; the profile is drawn straight between its hours and closes over midnight
 * @param maximum_C  maximum of the day [°C]
 * @param range_K    maximum less minimum [K], 0 or more
 */
export function designTemperature_C(clock_min: number, maximum_C: number, range_K: number): number {
  const hour = (((clock_min / 60) % 24) + 24) % 24;
  const before = Math.floor(hour);
  const fall = (h: number): number => FALL[(h + 23) % 24] as number;
  const share = hour - before;
  return maximum_C - range_K * (fall(before) * (1 - share) + fall(before + 1) * share);
}
