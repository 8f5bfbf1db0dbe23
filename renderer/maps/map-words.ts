import type { ExposureDates } from '../../core/study/exposure-dates.ts';
import { dayAndMonth, fixed, signed } from '../ui/format.ts';
import { words } from '../words/words.ts';
import type { MapScale } from './map-scale.ts';

/** A date with its year, such as `21 June 2025`. */
export const wholeDate = (date: string): string => `${dayAndMonth(date)} ${date.slice(0, 4)}`;

/** For when a map holds, in words. */
export function periodText(dates: ExposureDates): string {
  if ('year' in dates) return words.maps.inYear(`${dates.year}`);
  if ('between' in dates) return words.maps.between(wholeDate(dates.between[0]), wholeDate(dates.between[1]));
  if (!('dates' in dates)) return '';
  const [first] = dates.dates;
  if (first === undefined) return '';
  return dates.dates.length === 1 ? wholeDate(first) : words.maps.meanDay(first.slice(0, 4));
}

/** A cell's size, with no more decimals than it has [m]. */
export const cellSize = (m: number): string => fixed(m, m >= 1 ? 0 : m * 10 === Math.round(m * 10) ? 1 : 2);

/** A number of the map as it is shown: two figures finer than the end of its scale, and never finer than a hundredth. */
export const mapNumber = (scale: MapScale, value: number): string => {
  const decimals = scale.most >= 100 ? 0 : scale.most >= 2 ? 1 : 2;
  return (scale.isSigned ? signed : fixed)(value, decimals);
};
