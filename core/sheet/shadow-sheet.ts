import type { Model } from '../form/model.ts';
import type { Checked, Fault } from '../scheme/fault.ts';
import { diagram } from './diagram.ts';
import type { Document, Mark, Mm } from './drawing.ts';
import { finishPages, type Rect } from './paper.ts';
import { blockLabels } from './plan.ts';
import type { PlanView } from './plan-view.ts';
import { chooseScale } from './scale.ts';
import { type Grid, gridOf } from './shadow-grid.ts';
import { type ShadowSheetInput, SUBJECT } from './shadow-input.ts';
import type { ShadowMoment } from './shadow-moment.ts';
import { shadowPanel } from './shadow-panel.ts';
import { type Areas, pageAreas, withNotes } from './side-panel.ts';
import { shortHash } from './title-block.ts';

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
  const wish = wantedBox(model, moments);
  const laid = layOut(input, areas.drawing, wish);
  if ('code' in laid) return { ok: false, faults: [laid] };
  const { grid, scale } = laid;
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

/** Best fit takes fewer diagrams a page before it takes a smaller scale than this: block by block is no longer told below it. */
const SMALL_SCALE = 2500;
/** Diagrams a page that are tried where none are asked for, most first. */
const PER_PAGE = [9, 6, 4, 3, 2, 1] as const;

/**
 * Grid and scale: the diagrams a page asked for, or as many as let the scale asked for fit and keep best fit from going small; a
 * fault where not even one fits.
 */
function layOut(
  input: ShadowSheetInput,
  area: Rect,
  wish: Box,
): { readonly grid: Grid; readonly scale: number } | Fault {
  const { model, moments, paper, landscape, units } = input;
  const size = sizeOf(model.extent);
  const tries = input.perPage === undefined ? PER_PAGE.filter((n) => paper !== 'A4' || n <= 4) : [input.perPage];
  const what = `${paper} ${landscape ? 'landscape' : 'portrait'}`;
  let best: { readonly grid: Grid; readonly scale: number } | null = null;
  let why: Fault | null = null;
  for (const most of tries) {
    const grid = gridOf(moments, input.scheme.site.zone, most, area, size, units);
    const scale = chooseScale(input.scale, size, sizeOf(wish), grid.frame, what, units);
    if (typeof scale !== 'number') why = scale;
    else if (best === null || scale < best.scale) best = { grid, scale };
    if (best && (input.scale !== null || best.scale <= SMALL_SCALE)) break;
  }
  if (best !== null || why === null) return best as NonNullable<typeof best>;
  return (input.perPage ?? 1) > 1 ? { ...why, cure: `${why.cure} or fewer diagrams on a page` } : why;
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
  const panel = shadowPanel(input, areas, scale, blockLabels(view, input.model.solids, input.units).left);
  const contents: Content[] = [];
  for (let start = 0; start < input.moments.length; start += grid.perPage) {
    const on = input.moments.slice(start, start + grid.perPage);
    const marks = on.flatMap((moment, i) => {
      const view: PlanView = { scale, centre, frame: grid.place(i) };
      return diagram(view, input.model, input.scheme.site.zone, moment, input.units);
    });
    const days = [...new Set(on.map((m) => m.text.split(',')[0] as string))];
    contents.push({ title: `${SUBJECT}: ${days.join(', ')}`, marks: [...marks, ...panel.marks] });
  }
  return withNotes(contents, panel.spill, input.paper, input.landscape);
}
