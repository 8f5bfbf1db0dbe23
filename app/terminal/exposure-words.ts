/** Minutes as hours and minutes, such as "3 h 05". Rounded as a whole, so that 59.6 min is an hour. */
export function hoursText(minutes: number): string {
  const whole = Math.round(minutes);
  return `${Math.floor(whole / 60)} h ${String(whole % 60).padStart(2, '0')}`;
}

/** The dates of a result in a few words. */
export const periodText = (dates: readonly string[]): string =>
  dates.length === 1 ? `${dates[0]}` : `${dates.length} days, ${dates[0]} to ${dates.at(-1)}`;
