/** Minutes as hours and minutes, such as "3 h 05". Rounded as a whole, so that 59.6 min is an hour. */
export function hoursText(minutes: number): string {
  const whole = Math.round(minutes);
  return `${Math.floor(whole / 60)} h ${String(whole % 60).padStart(2, '0')}`;
}

/** What is said of a scheme that leaves low sun out: nothing of one that does not. */
export const lowSunText = (lowSun: number | undefined): string => (lowSun ? `, sun above ${lowSun}° only` : '');

/** A number of things, one of them as one. */
export const counted = (n: number, thing: string): string => `${n} ${thing}${n === 1 ? '' : 's'}`;

const DAY_ms = 86_400_000;

/** Whether dates follow each other without a gap. @param dates in order, each once */
const isSpan = (dates: readonly string[]): boolean =>
  Math.round((Date.parse(dates.at(-1) ?? '') - Date.parse(dates[0] ?? '')) / DAY_ms) === dates.length - 1;

/** The dates of a result in a few words, so that two dates are not read as all that lies between them. */
export function periodText(dates: readonly string[]): string {
  if (dates.length === 1) return `${dates[0]}`;
  if (dates.length > 2 && isSpan(dates)) return `${dates.length} days, ${dates[0]} to ${dates.at(-1)}`;
  if (dates.length === 2) return `${dates[0]} and ${dates[1]}`;
  return dates.length <= 4
    ? `${dates.length} days, ${dates.slice(0, -1).join(', ')} and ${dates.at(-1)}`
    : `${dates.length} days from ${dates[0]} to ${dates.at(-1)}, not all that lie between`;
}
