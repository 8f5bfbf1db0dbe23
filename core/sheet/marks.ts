import type { Face, Mark, Mm, Stroke } from './drawing.ts';
import { INK } from './ink.ts';
import { READ, shorten, wrap } from './measure.ts';
import { startsRtl } from './text-runs.ts';

export type WordStyle = {
  readonly size?: Mm;
  readonly face?: Face;
  readonly colour?: string;
  readonly anchor?: 'start' | 'middle' | 'end';
  readonly turn_deg?: number;
};

/** Distance between baselines for a size of text. */
export const leading = (size: Mm): Mm => size * 1.3;

/** One line of text on a baseline. */
export function words(text: string, x: Mm, y: Mm, style: WordStyle = {}): Mark {
  return {
    kind: 'text',
    text,
    at: [x, y],
    size: style.size ?? READ,
    face: style.face ?? 'regular',
    colour: style.colour ?? INK,
    anchor: style.anchor ?? 'start',
    tabular: true,
    ...(style.turn_deg === undefined ? {} : { turn_deg: style.turn_deg }),
    ...(startsRtl(text) ? { rtl: true } : {}),
  };
}

/** One line of text cut to a field; text that is read from right to left stands at the right of it. */
export function field(text: string, x: Mm, y: Mm, width: Mm, style: WordStyle = {}): Mark {
  const cut = shorten(text, width, style.size ?? READ, style.face);
  return startsRtl(cut) && style.anchor === undefined
    ? words(cut, x + width, y, { ...style, anchor: 'end' })
    : words(cut, x, y, style);
}

/** What was drawn from the top of a place down, and how high it stands. */
export type Piece = { readonly marks: readonly Mark[]; readonly height: Mm };

/** Text broken to a width, its first line's capitals touching the top of the piece. */
export function paragraph(
  text: string,
  x: Mm,
  top: Mm,
  width: Mm,
  style: WordStyle = {},
  most = Number.POSITIVE_INFINITY,
): Piece {
  const size = style.size ?? READ;
  const lines = wrap(text, width, size, style.face, most);
  const rtl = startsRtl(text);
  return {
    marks: lines.map((l, i) =>
      words(l, rtl ? x + width : x, top + size * 0.75 + i * leading(size), rtl ? { ...style, anchor: 'end' } : style),
    ),
    height: lines.length * leading(size),
  };
}

/** A straight line. */
export const line = (x1: Mm, y1: Mm, x2: Mm, y2: Mm, stroke: Stroke): Mark => ({
  kind: 'path',
  runs: [
    [
      [x1, y1],
      [x2, y2],
    ],
  ],
  closed: false,
  stroke,
});

/** A rectangle. */
export const rect = (
  x: Mm,
  y: Mm,
  width: Mm,
  height: Mm,
  look: Pick<Extract<Mark, { kind: 'path' }>, 'fill' | 'hatch' | 'stroke'>,
): Mark => ({
  kind: 'path',
  runs: [
    [
      [x, y],
      [x + width, y],
      [x + width, y + height],
      [x, y + height],
    ],
  ],
  closed: true,
  ...look,
});
