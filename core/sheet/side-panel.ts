import { CAUTIONS } from '../limits/cautions.ts';
import type { Mark, Mm } from './drawing.ts';
import { SOFT } from './ink.ts';
import { type Piece, paragraph } from './marks.ts';
import { contentRect, type PaperName, type Rect } from './paper.ts';

/** Between the drawing and what stands beside it. */
const GAP: Mm = 6;
const PANEL: { readonly [P in PaperName]: Mm } = { A4: 76, A3: 90, A2: 96, A1: 104 };

/** Where a sheet's drawing stands, and the panel beside or under it. */
export type Areas = { readonly drawing: Rect; readonly panel: readonly Rect[] };

/** Diagrams and the panel beside them: a column on the right of a landscape page, a strip of two at the foot of an upright one. */
export function pageAreas(paper: PaperName, landscape: boolean): Areas {
  const c = contentRect(paper, landscape);
  if (landscape) {
    const width = PANEL[paper];
    return {
      drawing: { ...c, width: c.width - width - GAP },
      panel: [{ x: c.x + c.width - width, y: c.y, width, height: c.height }],
    };
  }
  const height = paper === 'A4' ? 96 : 90;
  const width = (c.width - GAP * 2) / 2;
  const y = c.y + c.height - height;
  return {
    drawing: { ...c, height: c.height - height - GAP },
    panel: [
      { x: c.x, y, width, height },
      { x: c.x + width + GAP * 2, y, width, height },
    ],
  };
}

/** A note beside a drawing: a heading and its sentences. */
export type Note = { readonly heading: string; readonly lines: readonly string[] };

/** The cautions of a drawing without rooms: what results are, and how not to check them. */
export const DRAWING_CAUTIONS: Note = { heading: 'Cautions', lines: [CAUTIONS[0] as string, CAUTIONS[3] as string] };

/** A note drawn from its top. */
export function notePiece(note: Note, x: Mm, top: Mm, width: Mm): Piece {
  const marks: Mark[] = [];
  const heading = paragraph(note.heading, x, top, width, { face: 'semibold' });
  let y = top + heading.height;
  marks.push(...heading.marks);
  for (const l of note.lines) {
    const piece = paragraph(l, x, y, width, { colour: SOFT });
    marks.push(...piece.marks);
    y += piece.height + 1;
  }
  return { marks, height: y - top };
}

/** A column that notes may fill, from `y` down to `end`. */
export type Slot = { readonly x: Mm; readonly y: Mm; readonly end: Mm };

/** Notes set into the first column that has room for each; what finds none is left over for a page of its own. */
export function placeNotes(
  notes: readonly Note[],
  slots: readonly Slot[],
  width: Mm,
): { readonly marks: readonly Mark[]; readonly spill: readonly Note[] } {
  const columns = slots.map((s) => ({ ...s }));
  const marks: Mark[] = [];
  const spill: Note[] = [];
  for (const note of notes) {
    const height = notePiece(note, 0, 0, width).height;
    const column = columns.find((c) => c.y + height <= c.end);
    if (!column) {
      spill.push(note);
      continue;
    }
    marks.push(...notePiece(note, column.x, column.y, width).marks);
    column.y += height + 2;
  }
  return { marks, spill };
}

/** The pages of a sheet, and one more for the notes that found no room beside the drawing: none is ever dropped. */
export const withNotes = (
  pages: readonly { readonly title: string; readonly marks: readonly Mark[] }[],
  spill: readonly Note[],
  paper: PaperName,
  landscape: boolean,
): readonly { readonly title: string; readonly marks: readonly Mark[] }[] =>
  spill.length === 0
    ? pages
    : [...pages, { title: 'Method and cautions', marks: notesPage(contentRect(paper, landscape), spill) }];

/** Notes on a page of their own. */
function notesPage(rect: Rect, notes: readonly Note[]): readonly Mark[] {
  const width = Math.min(rect.width, 150);
  const marks: Mark[] = [];
  let y = rect.y;
  for (const note of notes) {
    const piece = notePiece(note, rect.x, y, width);
    marks.push(...piece.marks);
    y += piece.height + 4;
  }
  return marks;
}
