/** One number for the whole year, or one for each month, January first. */
export type Monthly = number | readonly number[];

/**
 * The value of a month.
 * @param month  1 = January … 12 = December
 * @throws {RangeError} when the month is none, or the list has not twelve values (the scheme's schema sees to that)
 */
export function monthly(value: Monthly, month: number): number {
  if (!Number.isInteger(month) || month < 1 || month > 12) throw new RangeError(`no such month: ${month}`);
  if (typeof value === 'number') return value;
  if (value.length !== 12) throw new RangeError(`twelve monthly values needed, got ${value.length}`);
  return value[month - 1] as number;
}

/** Month of a civil date. @param date YYYY-MM-DD @throws {RangeError} when it is not of that form */
export function monthOf(date: string): number {
  const month = /^\d{4}-(\d\d)-\d\d$/.exec(date)?.[1];
  if (month === undefined) throw new RangeError(`not a date: ${date}`);
  return Number(month);
}
