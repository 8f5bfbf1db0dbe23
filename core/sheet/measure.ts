import type { Face, Mm } from './drawing.ts';
import { ITALIC, REGULAR, SEMIBOLD } from './font-widths.ts';

/** Capitals of the house face stand this share of the em high (its `capHeight`). */
export const CAP_HEIGHT = 0.698;
/** Em of the smallest text that must be read on paper: capitals of 2.5 mm. */
export const READ: Mm = 3.6;
/** Em of small labels where room is short: capitals of 1.8 mm. */
export const SMALL: Mm = 2.6;

type Widths = ReadonlyMap<number, number>;

function unpack(runs: readonly string[]): Widths {
  const widths = new Map<number, number>();
  for (const run of runs) {
    const colon = run.indexOf(':');
    let point = Number.parseInt(run.slice(0, colon), 16);
    for (const width of run.slice(colon + 1).split(' ')) widths.set(point++, Number.parseInt(width, 36) / 1000);
  }
  return widths;
}

const WIDTHS: { readonly [F in Face]: Widths } = {
  regular: unpack(REGULAR),
  semibold: unpack(SEMIBOLD),
  italic: unpack(ITALIC),
};

/** Whether the house face has a glyph for a code point; where not, another font is called in. */
export const hasGlyph = (point: number): boolean => WIDTHS.regular.has(point);

/** Marks that stand over or under a letter, joiners and direction marks: no width of their own. */
const isMark = (point: number): boolean =>
  (point >= 0x300 && point <= 0x36f) ||
  (point >= 0x591 && point <= 0x5c7) ||
  (point >= 0x64b && point <= 0x65f) ||
  (point >= 0x200b && point <= 0x200f) ||
  (point >= 0xfe00 && point <= 0xfe0f);

/** East Asian full-width letters are a square em; what the house face lacks otherwise is taken a little wide. */
const guess = (point: number): number =>
  isMark(point) ? 0 : point >= 0x1100 && !(point >= 0xfb1d && point <= 0xfdff) ? 1 : 0.65;

/**
 * Width of a line of text [mm], from the advances of the face without kerning: never narrower than it is set by more than
 * rounding.
 * @param size_mm  height of the em
 */
export function measure(text: string, size_mm: Mm, face: Face = 'regular'): Mm {
  const widths = WIDTHS[face];
  let ems = 0;
  for (const letter of text) {
    const point = letter.codePointAt(0) ?? 0;
    ems += widths.get(point) ?? guess(point);
  }
  return ems * size_mm;
}

/** The text, or as much of its start as fits with an ellipsis. */
export function shorten(text: string, width_mm: Mm, size_mm: Mm, face: Face = 'regular'): string {
  if (measure(text, size_mm, face) <= width_mm) return text;
  const letters = [...text];
  const dots = measure('…', size_mm, face);
  let used = dots;
  let n = 0;
  while (n < letters.length) {
    used += measure(letters[n] as string, size_mm, face);
    if (used > width_mm) break;
    n++;
  }
  return `${letters.slice(0, n).join('').trimEnd()}…`;
}

/**
 * Text broken into lines no wider than a column. Words too long for it are broken where they must; what does not fit into
 * `most` lines ends in an ellipsis.
 */
export function wrap(
  text: string,
  width_mm: Mm,
  size_mm: Mm,
  face: Face = 'regular',
  most = Number.POSITIVE_INFINITY,
): readonly string[] {
  const lines: string[] = [];
  // A number and its unit stay on one line.
  const kept = text.replace(/(\d) (?=%|°|m²|W\/m²|Wh\/m²)/gu, '$1\u00a0');
  let line = '';
  const wide = (s: string): boolean => measure(s, size_mm, face) > width_mm;
  for (const word of kept.split(/[ \t\r\n]+/u).filter((w) => w !== '')) {
    const longer = line === '' ? word : `${line} ${word}`;
    if (!wide(longer)) {
      line = longer;
      continue;
    }
    if (line !== '') lines.push(line);
    line = word;
    while (wide(line)) {
      const letters = [...line];
      let n = letters.length - 1;
      while (n > 1 && wide(letters.slice(0, n).join(''))) n--;
      if (n < 1) break;
      lines.push(letters.slice(0, n).join(''));
      line = letters.slice(n).join('');
      if (lines.length > most) break;
    }
  }
  if (line !== '') lines.push(line);
  if (lines.length <= most) return lines;
  const short = lines.slice(0, most);
  short[most - 1] = shorten(lines.slice(most - 1).join(' '), width_mm, size_mm, face);
  return short;
}
