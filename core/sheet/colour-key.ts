import { cividis } from './cividis.ts';
import { niceStep } from './day-curve.ts';
import type { Mark, Mm } from './drawing.ts';
import { FINE } from './ink.ts';
import { leading, line, type Piece, rect, words } from './marks.ts';
import { READ } from './measure.ts';
import { fixed } from './numerals.ts';

/** What the values of a map are, such as `sun hours` in `h`. */
export type Quantity = { readonly name: string; readonly unit: string };

/** Where the sun is up in the period and never on it: a grey of its own, so that dark blue always means a little sun. */
export const NEVER = '#d9d5cc';
/** Parts of the colour scale, at most. */
const TICKS = 8;

/** The end of the colour scale: the first tick at or above the highest value; 0 where there is no sun at all. @param values one list a map */
export function scaleEnd(values: readonly Float64Array[]): number {
  const highest = Math.max(0, ...values.map((v) => v.reduce((a, b) => Math.max(a, b), 0)));
  if (highest === 0) return 0;
  const step = niceStep(highest, TICKS);
  return Math.ceil(highest / step - 1e-9) * step;
}

/** The colours with their numbers. @param most what the end of the scale stands for */
export function colourKey(x: Mm, top: Mm, width: Mm, most: number, quantity: Quantity): Piece {
  const marks: Mark[] = [words(`${quantity.name} [${quantity.unit}]`, x, top + READ * 0.75, { face: 'semibold' })];
  const y = top + leading(READ) + 0.6;
  const none = (at: Mm): readonly Mark[] => [
    rect(x, at, 11, 4, { fill: NEVER, stroke: FINE }),
    words('none in the period', x + 14, at + 3.3),
  ];
  if (most === 0) return { marks: [...marks, ...none(y)], height: leading(READ) + 7 };
  const n = 50;
  for (let i = 0; i < n; i++)
    marks.push(rect(x + (width * i) / n, y, width / n + (i < n - 1 ? 0.5 : 0), 5, { fill: cividis((i + 0.5) / n) }));
  marks.push(rect(x, y, width, 5, { stroke: FINE }));
  const step = niceStep(most, TICKS);
  for (let v = 0; v <= most + 1e-9; v += step) {
    const at = x + (width * v) / most;
    marks.push(line(at, y + 5, at, y + 6.2, FINE));
    const anchor = v === 0 ? 'start' : v > most - step / 2 ? 'end' : 'middle';
    marks.push(words(fixed(v, step >= 1 ? 0 : step >= 0.1 ? 1 : 2), at, y + 10, { anchor }));
  }
  marks.push(...none(y + 13));
  return { marks, height: leading(READ) + 20 };
}
