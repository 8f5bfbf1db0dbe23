import type { Finding, Verdict } from '../limits/finding.ts';
import { fixed } from './numerals.ts';

/**
 * Three figures, as far as they are worth printing.
 * @param like the quantity whose three figures set the decimals: of a value and its margin the limit, so that they add up as they are read
 */
export function figures(value: number, like: number = value): string {
  const size = Math.abs(like);
  return fixed(value, size >= 99.95 ? 0 : size >= 9.995 ? 1 : 2);
}

/** A quantity with its unit; a bare ratio stands as a percentage. */
export const quantity = (value: number, unit: string, like: number = value): string =>
  unit === '' || unit === '1' ? `${fixed(value * 100, 1)}\u00a0%` : `${figures(value, like)}\u00a0${unit}`;

/** What a finding found, to the digits of its limit. */
export const found = (f: Finding): string => quantity(f.value, f.unit, f.limitValue ?? f.value);

/** A margin with its sign: above the limit is +. */
export const margin = (f: Finding): string =>
  f.margin === null
    ? '–'
    : `${f.margin > 0 ? '+' : ''}${f.unit === '' ? fixed(f.margin * 100, 1) : figures(f.margin, f.limitValue ?? f.margin)}`;

/** `at most 60.0 W/m²`. */
export const limitWords = (f: Finding): string =>
  f.limitValue === null
    ? 'no limit set'
    : `${f.comparison === 'at-most' ? 'at most' : 'at least'} ${quantity(f.limitValue, f.unit)}`;

/** A civil moment without its offset, for columns: `21 July 2025, 17:27`. */
export const shortWhen = (f: Finding): string => (f.when ? (f.when.text.split(' (')[0] as string) : '–');

export const verdictWords: { readonly [V in Verdict]: string } = {
  over: 'over',
  close: 'close to the limit',
  within: 'within',
};

/** Rooms in a number: `1 room`, `4 rooms`. */
export const counted = (n: number, one: string, many: string): string => `${n} ${n === 1 ? one : many}`;
