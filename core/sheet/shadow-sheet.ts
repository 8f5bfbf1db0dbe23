import type { Model, Solid } from '../form/model.ts';
import { CAUTIONS } from '../limits/cautions.ts';
import type { Checked } from '../scheme/fault.ts';
import type { Scheme } from '../scheme/schema.ts';
import { diagram, STAR_NOTE } from './diagram.ts';
import type { Document, Mark, Mm } from './drawing.ts';
import { SOFT } from './ink.ts';
import { type Piece, paragraph } from './marks.ts';
import { place } from './numerals.ts';
import { contentRect, finishPages, type PaperName, type Rect } from './paper.ts';
import { blockLabels, heightWords } from './plan.ts';
import type { PlanView } from './plan-view.ts';
import { chooseScale, scaleWords } from './scale.ts';
import { northPoint, scaleBar } from './scale-marks.ts';
import { type Grid, gridOf } from './shadow-grid.ts';
import { shadowKey } from './shadow-key.ts';
import type { ShadowMoment } from './shadow-moment.ts';
import { shortHash, titleBlock } from './title-block.ts';

export type ShadowSheetInput = {
  readonly scheme: Scheme;
  readonly model: Model;
  /** In the order in which they are drawn: along the rows. */
  readonly moments: readonly ShadowMoment[];
  /** Such as 500 for 1:500; null: the largest standard scale that shows the scheme and the shadow it adds. */
  readonly scale: number | null;
  readonly paper: PaperName;
  readonly landscape: boolean;
  /** Diagrams a page, at most. */
  readonly perPage?: number;
  /** Level of the ground that the shadows were worked out on [m]. */
  readonly level_m?: number;
  /** Drawing number. */
  readonly number?: string;
  /** Date of the drawing, YYYY-MM-DD. */
  readonly drawn: string;
  readonly engine: string;
  readonly hash: string;
  readonly language?: string;
};

const SUBJECT = 'Shadow study';
const GAP: Mm = 6;
const PANEL: { readonly [P in PaperName]: Mm } = { A4: 76, A3: 90, A2: 96, A1: 104 };

/**
 * The shadow study: the moments as diagrams on one grid and at one scale, with north, scale, key, method, cautions and title
 * block on every page.
 * @returns the document, or a fault that says which scale would fit
 */
export function shadowSheet(input: ShadowSheetInput): Checked<Document> {
  const { model, moments, paper, landscape } = input;
  if (model.solids.length === 0 || moments.length === 0) {
    const [what, cure] =
      moments.length === 0
        ? ['no moment to draw', 'name a date and a time']
        : ['the scheme has no blocks to draw', 'add a block'];
    return { ok: false, faults: [{ level: 'error', code: 'nothing-to-draw', place: '', message: what, cure }] };
  }
  const areas = pageAreas(paper, landscape);
  const extent = { size: sizeOf(model.extent) };
  const grid = gridOf(
    moments,
    input.scheme.site.zone,
    input.perPage ?? (paper === 'A4' ? 4 : 9),
    areas.drawing,
    extent.size,
  );
  const wish = wantedBox(model, moments);
  const scale = chooseScale(
    input.scale,
    extent.size,
    sizeOf(wish),
    grid.frame,
    `${paper} ${landscape ? 'landscape' : 'portrait'}`,
  );
  if (typeof scale !== 'number') return { ok: false, faults: [scale] };
  const contents = pages(input, areas, grid, scale, centreOf(model.extent, wish, grid.frame, scale));
  return {
    ok: true,
    notes: [],
    value: {
      title: [input.scheme.title, SUBJECT].filter((t) => t !== '').join(' – '),
      author: input.scheme.author,
      language: input.language ?? 'en-GB',
      pages: finishPages(contents, paper, landscape, `scheme ${shortHash(input.hash)}, drawn ${input.drawn}`),
    },
  };
}

type Areas = { readonly drawing: Rect; readonly panel: readonly Rect[] };

/** Diagrams and the panel beside them: a column on the right of a landscape page, a strip of two at the foot of an upright one. */
function pageAreas(paper: PaperName, landscape: boolean): Areas {
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

type Box = Model['extent'];
const sizeOf = (box: Box): readonly [number, number] => [box[2] - box[0], box[3] - box[1]];

/** The scheme with the shadow it adds, as far as twice its own height out: what best fit would like to show. */
function wantedBox(model: Model, moments: readonly ShadowMoment[]): Box {
  const reach = 2 * Math.max(...model.solids.map((s) => s.top_m));
  const [x0, y0, x1, y1] = model.extent;
  const box: [number, number, number, number] = [x0, y0, x1, y1];
  for (const m of moments) {
    for (const region of m.change?.added.regions ?? []) {
      for (const [x, y] of region.outer) {
        box[0] = Math.max(x0 - reach, Math.min(box[0], x));
        box[1] = Math.max(y0 - reach, Math.min(box[1], y));
        box[2] = Math.min(x1 + reach, Math.max(box[2], x));
        box[3] = Math.min(y1 + reach, Math.max(box[3], y));
      }
    }
  }
  return box;
}

/** The middle of what is wanted, moved so that no part of the scheme itself leaves the frame. */
function centreOf(extent: Box, wish: Box, frame: readonly [Mm, Mm], scale: number): readonly [number, number] {
  const along = (axis: 0 | 1): number => {
    const half = (frame[axis] * scale) / 2000;
    const middle = (wish[axis] + (wish[axis + 2] as number)) / 2;
    return Math.max((extent[axis + 2] as number) - half, Math.min(extent[axis] + half, middle));
  };
  return [along(0), along(1)];
}

type Content = { readonly title: string; readonly marks: readonly Mark[] };

function pages(
  input: ShadowSheetInput,
  areas: Areas,
  grid: Grid,
  scale: number,
  centre: readonly [number, number],
): readonly Content[] {
  const view = { scale, centre, frame: grid.place(0) };
  const panel = panelPieces(input, areas, scale, blockLabels(view, input.model.solids).left);
  const contents: Content[] = [];
  for (let start = 0; start < input.moments.length; start += grid.perPage) {
    const on = input.moments.slice(start, start + grid.perPage);
    const marks = on.flatMap((moment, i) => {
      const view: PlanView = { scale, centre, frame: grid.place(i) };
      return diagram(view, input.model, input.scheme.site.zone, moment);
    });
    const days = [...new Set(on.map((m) => m.text.split(',')[0] as string))];
    contents.push({ title: `${SUBJECT}: ${days.join(', ')}`, marks: [...marks, ...panel.marks] });
  }
  if (panel.spill.length > 0) contents.push({ title: 'Method and cautions', marks: spillPage(input, panel.spill) });
  return contents;
}

type Text = { readonly heading: string; readonly lines: readonly string[] };

/** What the drawing shows and leaves out, in words. */
function methodText(input: ShadowSheetInput): Text {
  const { site } = input.scheme;
  return {
    heading: 'How it was worked out',
    lines: [
      `Site ${place(site.latitude, site.longitude)}. Civil time, with its offset from UTC.`,
      'Azimuth clockwise from true north.',
      `Shadow of the blocks on level ground at ${(input.level_m ?? 0).toFixed(2)} m under a clear sky. Slopes, and shadow on roofs and walls, are not drawn.`,
      'Added: in shadow after and in sun before. Areas leave out ground under buildings. Their shares in sun count tree crowns, which let through what the scheme says for the month; added shadow does not.',
      STAR_NOTE,
    ],
  };
}

const cautionText: Text = { heading: 'Cautions', lines: [CAUTIONS[0] as string, CAUTIONS[3] as string] };

/** Heights of the blocks that are too small to carry a figure at this scale. */
const unlabelledText = (left: readonly Solid[]): Text => ({
  heading: 'Blocks too small for a figure',
  lines: [left.map((s) => `${s.name || s.id} ${heightWords(s)}`).join('; ')],
});

function textPiece(text: Text, x: Mm, top: Mm, width: Mm): Piece {
  const marks: Mark[] = [];
  const heading = paragraph(text.heading, x, top, width, { face: 'semibold' });
  let y = top + heading.height;
  marks.push(...heading.marks);
  for (const l of text.lines) {
    const piece = paragraph(l, x, y, width, { colour: SOFT });
    marks.push(...piece.marks);
    y += piece.height + 1;
  }
  return { marks, height: y - top };
}

/** North, scale and key from the top, title block at the lower right, and between them whatever text has room. */
function panelPieces(
  input: ShadowSheetInput,
  areas: Areas,
  scale: number,
  left: readonly Solid[],
): { readonly marks: readonly Mark[]; readonly spill: readonly Text[] } {
  const first = areas.panel[0] as Rect;
  const last = areas.panel.at(-1) as Rect;
  const marks: Mark[] = [];
  const radius = 8;
  marks.push(northPoint(first.x + radius, first.y + radius * 1.34 + 4, radius, input.scheme.site.north));
  const bar = scaleBar(first.x + radius * 2 + 8, first.y + 3, first.width - radius * 2 - 8, scale, input.paper);
  marks.push(...bar.marks);
  let y = first.y + radius * 2.7 + 6;
  const any = (kind: 'added' | 'gained'): boolean =>
    input.moments.some((m) => (m.change?.[kind].regions.length ?? 0) > 0);
  const key = shadowKey(first.x, y, input.model, { added: any('added'), gained: any('gained') });
  marks.push(...key.marks);
  y += key.height + 3;
  const facts = {
    subject: SUBJECT,
    number: input.number ?? '',
    date: input.drawn,
    engine: input.engine,
    hash: input.hash,
    scale: `${scaleWords(scale)} on ${input.paper}`,
  };
  const height = titleBlock(last.x, 0, last.width, input.scheme, facts).height;
  const foot = last.y + last.height - height;
  marks.push(...titleBlock(last.x, foot, last.width, input.scheme, facts).marks);
  const spill: Text[] = [];
  const slots =
    areas.panel.length === 1
      ? [{ x: first.x, y, end: foot - 2 }]
      : [
          { x: first.x, y, end: first.y + first.height },
          { x: last.x, y: last.y, end: foot - 2 },
        ];
  for (const text of [methodText(input), cautionText, ...(left.length > 0 ? [unlabelledText(left)] : [])]) {
    const slot = slots.find((s) => s.y + textPiece(text, s.x, s.y, first.width).height <= s.end);
    if (!slot) {
      spill.push(text);
      continue;
    }
    const piece = textPiece(text, slot.x, slot.y, first.width);
    marks.push(...piece.marks);
    slot.y += piece.height + 2;
  }
  return { marks, spill };
}

/** What found no room beside the diagrams, on a page of its own. */
function spillPage(input: ShadowSheetInput, texts: readonly Text[]): readonly Mark[] {
  const c = contentRect(input.paper, input.landscape);
  const width = Math.min(c.width, 150);
  const marks: Mark[] = [];
  let y = c.y;
  for (const text of texts) {
    const piece = textPiece(text, c.x, y, width);
    marks.push(...piece.marks);
    y += piece.height + 4;
  }
  return marks;
}
