import type { Scheme } from '../scheme/schema.ts';
import { DEFAULT_YEAR } from '../scheme/schema.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import { type DesignDayInput, designDay } from '../sky/design-day.ts';

/** Minutes between the samples of a check. */
export const CHECK_STEP_MIN = 5;
/** Temperatures of the hottest design day where a scheme gives none; the gain does not depend on them. */
export const HOTTEST_DEFAULT = { maximum: 30, range: 10 } as const;

/** The days every check looks at. `hottest` falls in the warmest month of its hemisphere. */
export const CHECK_DAYS = [
  { key: 'march', name: '21 March', date: '03-21' },
  { key: 'june', name: '21 June', date: '06-21' },
  { key: 'september', name: '23 September', date: '09-23' },
  { key: 'december', name: '21 December', date: '12-21' },
  { key: 'hottest', name: 'hottest design day', date: null },
] as const;
export type CheckDayKey = (typeof CHECK_DAYS)[number]['key'];

const MONTHS = 'January February March April May June July August September October November December'.split(' ');

/** Whether a place has its summer about December. The equator counts as north. */
export const isSouthern = (latitude_deg: number): boolean => latitude_deg < 0;

/** The hottest design day's date: the 21st of July in the north, of January in the south (common practice, no source). */
export const hottestDate = (latitude_deg: number): string => (isSouthern(latitude_deg) ? '01-21' : '07-21');

/** Keys of the days with the highest and the lowest noon sun of a place: summer and winter of its hemisphere. */
export const solsticeKeys = (latitude_deg: number): { readonly summer: CheckDayKey; readonly winter: CheckDayKey } =>
  isSouthern(latitude_deg) ? { summer: 'december', winter: 'june' } : { summer: 'june', winter: 'december' };

/** Months of the warm half-year, 1..12: April to September in the north, October to March in the south. */
export const warmMonths = (latitude_deg: number): readonly number[] =>
  isSouthern(latitude_deg) ? [10, 11, 12, 1, 2, 3] : [4, 5, 6, 7, 8, 9];

/** Key of the clear 21st that stands for a month of the warm half-year. */
export const monthKey = (month: number): string => `month-${month}`;

/** Days of a month in a year of the Gregorian calendar. @param month 1..12 */
export const daysInMonth = (year: number, month: number): number => new Date(Date.UTC(year, month, 0)).getUTCDate();

/** A day to be run: its key, its name and its civil date. */
export type DayOf = { readonly key: string; readonly name: string; readonly date: string };

/**
 * The days that a check looks at, with their dates in the scheme's year.
 * @param season also the 21st of each warm month, for a season's total
 */
export function checkDayList(scheme: Scheme, season: boolean): readonly DayOf[] {
  const year = scheme.year ?? DEFAULT_YEAR;
  const hottest = hottestDate(scheme.site.latitude);
  const days: DayOf[] = CHECK_DAYS.map((d) => ({
    key: d.key,
    name: d.date === null ? `${d.name}, 21 ${MONTHS[Number(hottest.slice(0, 2)) - 1]}` : d.name,
    date: `${year}-${d.date ?? hottest}`,
  }));
  if (!season) return days;
  const months = warmMonths(scheme.site.latitude).map((month) => ({
    key: monthKey(month),
    name: `21 ${MONTHS[month - 1]}`,
    date: `${year}-${String(month).padStart(2, '0')}-21`,
  }));
  return [...days, ...months];
}

/** What a design day of a scheme depends on, besides its key and name. */
export const dayInput = (scheme: Scheme, day: DayOf, step_min: number = CHECK_STEP_MIN): DesignDayInput => ({
  ...day,
  zone: scheme.site.zone,
  step_min,
  observer: {
    latitude_deg: scheme.site.latitude,
    longitude_deg: scheme.site.longitude,
    elevation_m: scheme.site.elevation,
  },
  linkeTurbidity: scheme.site.linkeTurbidity,
  maximum_C: scheme.site.hottest?.maximum ?? HOTTEST_DEFAULT.maximum,
  range_K: scheme.site.hottest?.range ?? HOTTEST_DEFAULT.range,
});

/**
 * One design day of a scheme. A scheme knows the temperatures of its hottest day alone, so the air temperature of the others is
 * left open (NaN) and not made up; no gain depends on it.
 */
export function checkDay(scheme: Scheme, day: DayOf, step_min: number = CHECK_STEP_MIN): DayGrid {
  const grid = designDay(dayInput(scheme, day, step_min));
  return day.key === 'hottest' ? grid : { ...grid, tAir_C: new Float64Array(grid.tAir_C.length).fill(Number.NaN) };
}
