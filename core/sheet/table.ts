import type { Verdict } from '../limits/finding.ts';
import type { Mark, Mm } from './drawing.ts';
import type { Flow } from './flow.ts';
import { INK, RULE, SOFT } from './ink.ts';
import { leading, line, words } from './marks.ts';
import { READ, wrap } from './measure.ts';
import { verdictColour, verdictDisc } from './verdict-disc.ts';

export type Column = { readonly head: string; readonly width: Mm; readonly align?: 'start' | 'end' };
/** A text, or the disc of a verdict, or a text in the colour of one. */
export type Cell =
  | string
  | { readonly disc: Verdict | null }
  | { readonly text: string; readonly verdict: Verdict | null };

const PAD: Mm = 1.1;
const GUTTER: Mm = 2.5;
/** Lines of text in a cell, at most. */
const MOST_LINES = 6;

function drawRow(
  columns: readonly Column[],
  cells: readonly Cell[],
  x: Mm,
  top: Mm,
  bold: boolean,
): { readonly marks: readonly Mark[]; readonly height: Mm } {
  const marks: Mark[] = [];
  let left = x;
  let deepest = 1;
  columns.forEach((column, i) => {
    const cell = cells[i] ?? '';
    const inside: Mark[] = [];
    const baseline = top + PAD + READ * 0.75 + 0.5;
    if (typeof cell === 'object' && 'disc' in cell)
      inside.push(...verdictDisc(cell.disc, left + 2, baseline - READ * 0.35));
    else {
      const text = typeof cell === 'string' ? cell : cell.text;
      const stands = typeof cell === 'object' && cell.verdict !== null && cell.verdict !== 'within';
      const face = bold || stands ? 'semibold' : 'regular';
      const colour = stands ? verdictColour(cell.verdict) : bold ? SOFT : INK;
      const lines = wrap(text, column.width - GUTTER, READ, face, MOST_LINES);
      deepest = Math.max(deepest, lines.length);
      const end = column.align === 'end';
      lines.forEach((l, n) => {
        const y = baseline + n * leading(READ);
        inside.push(
          words(l, end ? left + column.width - GUTTER : left, y, { face, colour, anchor: end ? 'end' : 'start' }),
        );
      });
    }
    marks.push({ kind: 'group', role: 'cell', marks: inside });
    left += column.width;
  });
  const height = deepest * leading(READ) + 2 * PAD - 0.6;
  const rule = line(x, top + height, left, top + height, RULE);
  return { marks: [{ kind: 'group', role: bold ? 'head' : 'row', marks: [...marks, rule] }], height };
}

/** A table down the pages; its head stands again at the top of every page that it runs on to. */
export function table(flow: Flow, columns: readonly Column[], rows: readonly (readonly Cell[])[]): void {
  const heads = columns.map((c) => c.head);
  const head = (): void => {
    const drawn = drawRow(columns, heads, flow.x, flow.y, true);
    flow.put(drawn.marks, drawn.height);
  };
  const headHeight = drawRow(columns, heads, 0, 0, true).height;
  flow.need(headHeight + leading(READ) + 2 * PAD);
  head();
  for (const cells of rows) {
    if (flow.need(drawRow(columns, cells, 0, 0, false).height)) head();
    const drawn = drawRow(columns, cells, flow.x, flow.y, false);
    flow.put(drawn.marks, drawn.height);
  }
  flow.gap(1.4);
}
