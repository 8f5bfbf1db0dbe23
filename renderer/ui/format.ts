const LOCALE = navigator.language || 'en-GB';

const formats = new Map<number, Intl.NumberFormat>();

/** A number with a fixed count of decimals in the reader's locale, with a true minus. */
export function fixed(value: number, decimals: number): string {
  let format = formats.get(decimals);
  if (format === undefined) {
    format = new Intl.NumberFormat(LOCALE, { minimumFractionDigits: decimals, maximumFractionDigits: decimals });
    formats.set(decimals, format);
  }
  const text = format.format(Math.abs(value));
  const isZero = Number(Math.abs(value).toFixed(decimals)) === 0;
  return value < 0 && !isZero ? `−${text}` : text;
}

/** A difference with its sign. */
export const signed = (value: number, decimals: number): string => {
  const text = fixed(value, decimals);
  return value > 0 && Number(value.toFixed(decimals)) !== 0 ? `+${text}` : text;
};

/** A share 0..1 as a percentage. */
export const percent = (share: number): string => `${fixed(share * 100, 0)} %`;

/** A change as a percentage with its sign. */
export const signedPercent = (share: number): string => `${signed(share * 100, 0)} %`;

export const metres = (m: number): string => fixed(m, 2);

export const degrees = (deg: number, decimals = 0): string => `${fixed(deg, decimals)}°`;

/** Decimals that give about three significant figures, and no more than a reader can use. */
export const decimalsFor = (size: number): number => {
  const a = Math.abs(size);
  return a >= 100 ? 0 : a >= 10 ? 1 : 2;
};

const POINTS = ['N', 'E', 'S', 'W'] as const;

/** A true bearing the way surveyors say it: the nearest quarter and the degrees off it, such as `S 12° W`. */
export function bearing(deg: number): string {
  const whole = ((Math.round(deg) % 360) + 360) % 360;
  const quarter = Math.round(whole / 90) % 4;
  let off = whole - quarter * 90;
  if (off > 180) off -= 360;
  const from = POINTS[quarter];
  if (off === 0) return `${from}`;
  return `${from} ${Math.abs(off)}° ${POINTS[(quarter + (off > 0 ? 1 : 3)) % 4]}`;
}

/** A place on Earth, such as `51.45° N 2.59° W`. */
export const placeOnEarth = (latitude: number, longitude: number): string =>
  `${fixed(Math.abs(latitude), 2)}° ${latitude < 0 ? 'S' : 'N'} ${fixed(Math.abs(longitude), 2)}° ${longitude < 0 ? 'W' : 'E'}`;

/** A civil date in the reader's words, such as `21 June`. */
export function dayAndMonth(date: string, month: 'short' | 'long' = 'long'): string {
  const [y, m, d] = date.split('-').map(Number) as [number, number, number];
  return new Intl.DateTimeFormat(LOCALE, { day: 'numeric', month, timeZone: 'UTC' }).format(Date.UTC(y, m - 1, d));
}

/** The months of a year, short, for axes. */
export const monthNames = (): readonly string[] =>
  Array.from({ length: 12 }, (_, m) =>
    new Intl.DateTimeFormat(LOCALE, { month: 'short', timeZone: 'UTC' }).format(Date.UTC(2025, m, 15)),
  );
