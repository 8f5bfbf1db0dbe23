/** Minutes since midnight of a clock time. @param time HH:MM, 00:00 to 24:00 @returns null when it is no such time */
export function clockMinutes(time: string): number | null {
  const found = /^(\d\d):(\d\d)$/.exec(time);
  if (!found) return null;
  const minutes = Number(found[1]) * 60 + Number(found[2]);
  return Number(found[2]) < 60 && minutes <= 1440 ? minutes : null;
}

/** Whether a clock minute lies in a stretch of the day; one that ends before it begins runs over midnight. */
export const inClockWindow = (clock_min: number, from_min: number, to_min: number): boolean =>
  from_min <= to_min ? clock_min >= from_min && clock_min < to_min : clock_min >= from_min || clock_min < to_min;
