import type { Checked, Fault } from '../scheme/fault.ts';
import { addDays, isDate } from '../sun/civil.ts';

/** For when an exposure is asked: some civil dates, a span of them with both ends, a whole civil year, or single moments. */
export type ExposureDates =
  | { readonly moments_ms: readonly number[] }
  | { readonly dates: readonly string[] }
  | { readonly between: readonly [string, string] }
  | { readonly year: number };

/** The longest span that one exposure may cover [days]: ten years. */
export const MOST_DAYS = 3660;

/** The first and the last moment that the sun is good for here. */
const FIRST_ms = Date.UTC(1900, 0, 1);
const LAST_ms = Date.UTC(2101, 0, 1);

/**
 * The civil dates asked for, in order and each once; none for moments, which are only looked over. Years 1900 to 2100, as the
 * sun is good for.
 */
export function exposureDates(ask: ExposureDates): Checked<readonly string[]> {
  if ('moments_ms' in ask) {
    if (ask.moments_ms.length === 0) return refuse('moments', 'no moment is asked for', 'name at least one');
    const bad = ask.moments_ms.findIndex((t) => !(t >= FIRST_ms && t < LAST_ms));
    if (bad >= 0)
      return refuse(`moments[${bad}]`, 'the moment lies outside the years 1900 to 2100', 'choose one in that span');
    return { ok: true, value: [], notes: [] };
  }
  if ('year' in ask) {
    if (!(Number.isInteger(ask.year) && ask.year >= 1900 && ask.year <= 2100))
      return refuse(
        'year',
        `the year must be a whole number from 1900 to 2100, got ${ask.year}`,
        'name a year such as 2025',
      );
    return span(`${ask.year}-01-01`, `${ask.year}-12-31`);
  }
  const given = 'between' in ask ? ask.between : ask.dates;
  const place = 'between' in ask ? 'between' : 'dates';
  if (given.length === 0) return refuse(place, 'no date is asked for', 'name at least one date');
  for (const [i, date] of given.entries()) {
    if (!isDate(date))
      return refuse(
        `${place}[${i}]`,
        `${JSON.stringify(date)} is not a date`,
        'write it as year-month-day, such as 2025-06-21',
      );
    const year = Number(date.slice(0, 4));
    if (year < 1900 || year > 2100)
      return refuse(`${place}[${i}]`, `${date} lies outside the years 1900 to 2100`, 'choose a date in that span');
  }
  if ('between' in ask) {
    const [first, last] = ask.between;
    if (last < first) return refuse('between', `${last} comes before ${first}`, 'give the earlier date first');
    return span(first, last);
  }
  const dates = [...new Set(ask.dates)].sort();
  if (dates.length > MOST_DAYS) return tooLong(place, dates.length);
  return { ok: true, value: dates, notes: [] };
}

function span(first: string, last: string): Checked<readonly string[]> {
  const days = Math.round((Date.parse(last) - Date.parse(first)) / 86_400_000) + 1;
  if (days > MOST_DAYS) return tooLong('between', days);
  return { ok: true, value: Array.from({ length: days }, (_, i) => addDays(first, i)), notes: [] };
}

const tooLong = (place: string, days: number): Checked<never> =>
  refuse(place, `${days} days are asked for, more than ${MOST_DAYS}`, 'ask for a shorter span');

function refuse(place: string, message: string, cure: string): Checked<never> {
  const fault: Fault = { level: 'error', code: 'exposure-dates', place, message, cure };
  return { ok: false, faults: [fault] };
}
