import { InvalidArgumentError } from 'commander';
import { readScale } from '../../core/sheet/sheet-units.ts';

/** Readers of option values. Each refuses with what it wants instead; the frame adds the name of the option. */

const DECIMAL = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/** A decimal number within bounds, both included. */
export const number =
  (least: number, most: number, what: string) =>
  (text: string): number => {
    const value = DECIMAL.test(text) ? Number(text) : Number.NaN;
    if (!(value >= least && value <= most))
      throw new InvalidArgumentError(`It must be ${what} from ${least} to ${most}.`);
    return value;
  };

/** Any decimal number, for values whose bounds are checked further on. */
export function decimal(text: string): number {
  if (!DECIMAL.test(text)) throw new InvalidArgumentError('It must be a number, such as 51.45 or -2.6.');
  return Number(text);
}

/** A whole number within bounds, both included. */
export const whole =
  (least: number, most: number, what: string) =>
  (text: string): number => {
    const value = /^\d+$/.test(text) ? Number(text) : Number.NaN;
    if (!(value >= least && value <= most))
      throw new InvalidArgumentError(`It must be ${what}, a whole number from ${least} to ${most}.`);
    return value;
  };

/** Twelve shares from 0 to 1 with commas between them, January to December. */
export function shares(text: string): readonly number[] {
  const values = text.split(',').map((part) => (DECIMAL.test(part.trim()) ? Number(part) : Number.NaN));
  if (values.length !== 12 || !values.every((v) => v >= 0 && v <= 1))
    throw new InvalidArgumentError(
      'It must be twelve shares from 0 to 1 with commas between them, January to December.',
    );
  return values;
}

const daysIn = (year: number, month: number): number => new Date(Date.UTC(year, month, 0)).getUTCDate();

/** A civil date that the calendar has, from 1900 to 2100. */
export function date(text: string): string {
  const [, year, month, day] = (/^(\d{4})-(\d\d)-(\d\d)$/.exec(text) ?? []).map(Number);
  const isReal =
    year !== undefined &&
    month !== undefined &&
    day !== undefined &&
    year >= 1900 &&
    year <= 2100 &&
    month >= 1 &&
    month <= 12 &&
    day >= 1 &&
    day <= daysIn(year, month);
  if (!isReal)
    throw new InvalidArgumentError('It must be a date that exists, from 1900-01-01 to 2100-12-31, such as 2025-06-21.');
  return text;
}

/** Dates with commas between them, or the option given again, or several after one option. */
export const dates = (text: string, before: readonly string[] | undefined): readonly string[] => [
  ...(before ?? []),
  ...text.split(',').map((part) => date(part.trim())),
];

/** A time of the civil clock, as minutes since midnight. */
export function clock(text: string): number {
  const [, hours, minutes] = (/^(\d{1,2}):(\d\d)$/.exec(text) ?? []).map(Number);
  if (hours === undefined || minutes === undefined || minutes > 59 || hours * 60 + minutes > 24 * 60)
    throw new InvalidArgumentError('It must be a time of the clock from 00:00 to 24:00, such as 09:00.');
  return hours * 60 + minutes;
}

/** Times of the clock with commas between them, as HH:MM. */
export const times = (text: string, before: readonly string[] | undefined): readonly string[] => [
  ...(before ?? []),
  ...text.split(',').map((part) => {
    const minute = clock(part.trim());
    if (minute >= 24 * 60) throw new InvalidArgumentError('It must be a time of the clock from 00:00 to 23:59.');
    return `${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;
  }),
];

/** A scale, as a ratio or as a foot rule says it. */
export function scale(text: string): number {
  const ratio = readScale(text);
  if (!(ratio >= 1 && ratio <= 100_000))
    throw new InvalidArgumentError(
      `It must be a scale from 1:1 to 1:100000, such as 500, 1:500, 1"=40' or 1/16"=1'-0".`,
    );
  return ratio;
}
