/** A printed time, as numbers. */
export type Stamp = {
  readonly year: number;
  readonly month: number;
  readonly day: number;
  readonly hour: number;
  readonly minute: number;
  readonly second: number;
};

export type TimeForm = {
  readonly hasYear: boolean;
  /** Null when the text is not of the form or is no time of the calendar. @param year used where the form has none */
  readonly read: (text: string, year: number) => Stamp | null;
};

const TOKENS = ['YYYY', 'MM', 'DD', 'HH', 'mm', 'ss'] as const;
type Token = (typeof TOKENS)[number];

/**
 * A reader for printed times. The form names the places of the numbers: YYYY, MM, DD, HH (0 to 24), mm, ss; all else stands for
 * itself. A number may lack its leading zero where something other than a number follows. Seconds and minutes may be left out.
 * @returns null when month, day or hour has no place in the form, or one has two
 */
export function timeForm(form: string): TimeForm | null {
  const order: Token[] = [];
  const pattern = form.replace(/YYYY|MM|DD|HH|mm|ss|[^A-Za-z0-9\s]|\s+|[A-Za-z0-9]/g, (part, at: number) => {
    const token = TOKENS.find((t) => t === part);
    if (token) {
      order.push(token);
      const width = token === 'YYYY' ? 4 : 2;
      const joined = TOKENS.some((t) => form.startsWith(t, at + part.length));
      return width === 2 && !joined ? '(\\d{1,2})' : `(\\d{${width}})`;
    }
    return /\s/.test(part) ? '\\s+' : /[A-Za-z0-9]/.test(part) ? part : `\\${part}`;
  });
  if (new Set(order).size !== order.length) return null;
  for (const token of ['MM', 'DD', 'HH'] as const) if (!order.includes(token)) return null;
  const whole = new RegExp(`^\\s*${pattern}\\s*$`);
  const place = (token: Token): number => order.indexOf(token) + 1;
  const at = {
    year: place('YYYY'),
    month: place('MM'),
    day: place('DD'),
    hour: place('HH'),
    minute: place('mm'),
    second: place('ss'),
  };
  return {
    hasYear: at.year > 0,
    read: (text, year) => {
      const found = whole.exec(text);
      if (!found) return null;
      const value = (group: number, otherwise: number): number => (group > 0 ? Number(found[group]) : otherwise);
      const stamp: Stamp = {
        year: value(at.year, year),
        month: value(at.month, 0),
        day: value(at.day, 0),
        hour: value(at.hour, 0),
        minute: value(at.minute, 0),
        second: value(at.second, 0),
      };
      return isOfCalendar(stamp) ? stamp : null;
    },
  };
}

/** 24:00 is a time: the end of the day that is printed beside it. */
function isOfCalendar({ year, month, day, hour, minute, second }: Stamp): boolean {
  if (month < 1 || month > 12 || day < 1 || day > new Date(Date.UTC(year, month, 0)).getUTCDate()) return false;
  return minute < 60 && second < 60 && (hour < 24 || (hour === 24 && minute === 0 && second === 0));
}

/** Instant of a printed time by a clock that runs so many minutes ahead of UTC [UTC ms]. */
export const stampInstant_ms = (s: Stamp, ahead_min: number): number =>
  Date.UTC(s.year, s.month - 1, s.day, s.hour, s.minute, s.second) - ahead_min * 60_000;
