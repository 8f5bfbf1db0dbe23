/** A number on paper: a true minus, and no −0. */
export function fixed(value: number, places: number): string {
  const text = value.toFixed(places);
  return text.startsWith('-') ? (Number(text) === 0 ? text.slice(1) : `−${text.slice(1)}`) : text;
}

/** A number as it was given, with a true minus. */
export const plain = (value: number): string => String(value).replace('-', '−');

/** An area, its unit kept on its line: whole square metres from a hundred up, tenths below. */
export const area = (m2: number): string => `${fixed(m2, Math.abs(m2) >= 99.95 ? 0 : 1)}\u00a0m²`;

/** A share 0..1 in whole percent. */
export const percent = (share: number): string => `${fixed(share * 100, 0)}\u00a0%`;

/** A place on the globe, such as `51.4500° N, 2.5900° W`. */
export const place = (latitude: number, longitude: number): string =>
  `${Math.abs(latitude).toFixed(4)}° ${latitude < 0 ? 'S' : 'N'}, ${Math.abs(longitude).toFixed(4)}° ${longitude < 0 ? 'W' : 'E'}`;
