/** Degrees, minutes and seconds with their signs, or a plain number; a letter of the compass before or behind. */
const FORM =
  /^\s*([NSEW])?\s*([+\-−])?\s*(\d+(?:[.,]\d+)?)\s*°?\s*(?:(\d+(?:[.,]\d+)?)\s*['’′]\s*)?(?:(\d+(?:[.,]\d+)?)\s*(?:["”″]|''|′′)\s*)?([NSEW])?\s*$/i;

const number = (text: string | undefined): number => (text === undefined ? 0 : Number(text.replace(',', '.')));

/**
 * An angle as people type it: `51.45`, `51,45 N`, `2°35′24″W`.
 * @param letters  the letters that this angle may carry, the positive one first
 * @param most     the largest size [°]
 * @returns degrees, or null when the text is no such angle
 */
export function parseDegrees(text: string, letters: 'NS' | 'EW', most: number): number | null {
  const found = FORM.exec(text);
  if (found === null) return null;
  const [, before, sign, degrees, minutes, seconds, behind] = found;
  const letter = (before ?? behind)?.toUpperCase();
  if (before !== undefined && behind !== undefined) return null;
  if (letter !== undefined && (!letters.includes(letter) || sign !== undefined)) return null;
  if (number(minutes) >= 60 || number(seconds) >= 60) return null;
  if ((minutes ?? seconds) !== undefined && !Number.isInteger(number(degrees))) return null;
  const size = number(degrees) + number(minutes) / 60 + number(seconds) / 3600;
  if (size > most) return null;
  const isNegative = letter === letters[1] || sign === '-' || sign === '−';
  return isNegative && size !== 0 ? -size : size;
}

export const parseLatitude = (text: string): number | null => parseDegrees(text, 'NS', 90);
export const parseLongitude = (text: string): number | null => parseDegrees(text, 'EW', 180);

/** Latitude and longitude in one text, as maps give them: `51.45, -2.59` or `51°27′N 2°35′W`. */
export function parsePair(text: string): readonly [latitude: number, longitude: number] | null {
  const parts = text.includes(';') ? text.split(';') : splitPair(text);
  if (parts.length !== 2) return null;
  const [latitude, longitude] = [parseLatitude(parts[0] as string), parseLongitude(parts[1] as string)];
  return latitude === null || longitude === null ? null : [latitude, longitude];
}

/** At the letter of the first angle, at a comma with a blank behind it, or at the only blank. */
function splitPair(text: string): readonly string[] {
  const lettered = /^(.*[NS])[\s,]+(.*)$/i.exec(text.trim());
  if (lettered !== null) return [lettered[1] as string, lettered[2] as string];
  const spaced = text.trim().split(/\s*,\s+|\s+/);
  return spaced.length === 2 ? spaced : text.trim().split(',');
}
