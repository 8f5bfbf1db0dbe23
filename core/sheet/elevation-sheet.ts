import type { Model } from '../form/model.ts';
import { CAUTIONS } from '../limits/cautions.ts';
import type { Checked } from '../scheme/fault.ts';
import type { Scheme } from '../scheme/schema.ts';
import { colourKey, type Quantity, scaleEnd } from './colour-key.ts';
import type { Document, Mark, Mm } from './drawing.ts';
import { type ElevationMap, elevation } from './elevation.ts';
import { SOFT } from './ink.ts';
import { paragraph } from './marks.ts';
import { fixed } from './numerals.ts';
import { finishPages, type PaperName, type Rect } from './paper.ts';
import { standardScales } from './scale.ts';
import { type SheetUnits, scaleWords } from './sheet-units.ts';
import { scaleBar } from './scale-marks.ts';
import { DRAWING_CAUTIONS, type Note, pageAreas, placeNotes, withNotes } from './side-panel.ts';
import { shortHash, titleBlock } from './title-block.ts';

export type ElevationSheetInput = {
  readonly scheme: Scheme;
  readonly model: Model;
  readonly maps: readonly ElevationMap[];
  /** What the values are, such as `sun hours` in `h`. */
  readonly quantity: Quantity;
  /** Such as `21 March, 21 June and 21 December 2025`. */
  readonly period: string;
  /** How the values were worked out, in sentences. */
  readonly method: readonly string[];
  readonly scale: number | null;
  readonly paper: PaperName;
  readonly number?: string;
  readonly drawn: string;
  readonly engine: string;
  readonly hash: string;
  readonly language?: string;
  /** Absent: metric. */
  readonly units?: SheetUnits;
};

const GAP: Mm = 10;
const CAPTION: Mm = 13;
/** A wall's name and numbers take so much at least. */
const NAMED: Mm = 62;

type Placed = { readonly map: ElevationMap; readonly page: number; readonly x: Mm; readonly bottom: Mm };

/** Maps over facades as elevations to scale, with the numbers of their colours beside them. */
export function elevationSheet(input: ElevationSheetInput): Checked<Document> {
  const { maps, paper, scheme } = input;
  const areas = pageAreas(paper, true);
  if (maps.length === 0) {
    return {
      ok: false,
      faults: [
        {
          level: 'error',
          code: 'nothing-to-draw',
          place: '',
          message: 'no wall to draw',
          cure: 'name a wall of a block',
        },
      ],
    };
  }
  const scales = standardScales(input.units ?? 'metric');
  const wanted = input.scale === null ? scales : [input.scale];
  const packed = wanted.map((scale) => ({ scale, placed: pack(maps, areas.drawing, scale) }));
  const one = packed.find((p) => p.placed?.every((q) => q.page === 0)) ?? packed.find((p) => p.placed !== null);
  if (!one?.placed) {
    const fitting = scales.find((s) => pack(maps, areas.drawing, s) !== null);
    const message = `the widest or highest wall does not fit on ${paper} at ${wanted.map((s) => scaleWords(s, input.units)).join(', ')}`;
    const cure = fitting ? `${scaleWords(fitting, input.units)} fits, or take larger paper` : 'take larger paper';
    return { ok: false, faults: [{ level: 'error', code: 'scale-too-large', place: '', message, cure }] };
  }
  const { scale, placed } = one;
  const most = scaleEnd(maps.map((m) => m.value));
  const count = 1 + Math.max(...placed.map((p) => p.page));
  const title = `Facades, ${input.quantity.name}`;
  const beside = panel(input, areas.panel[0] as Rect, scale, most);
  const contents = Array.from({ length: count }, (_, page) => ({
    title,
    marks: [...placed.filter((p) => p.page === page).flatMap((p) => drawn(p, input, scale, most)), ...beside.marks],
  }));
  return {
    ok: true,
    notes: [],
    value: {
      title: [scheme.title, title].filter((t) => t !== '').join(' – '),
      author: scheme.author,
      language: input.language ?? 'en-GB',
      pages: finishPages(
        withNotes(contents, beside.spill, paper, true),
        paper,
        true,
        `scheme ${shortHash(input.hash)}, drawn ${input.drawn}`,
      ),
    },
  };
}

/** Where the elevations stand, row by row; null when one is larger than the page. */
function pack(maps: readonly ElevationMap[], area: Rect, scale: number): readonly Placed[] | null {
  const k = 1000 / scale;
  const placed: Placed[] = [];
  let [page, x, top, deepest] = [0, area.x + 4, area.y, 0];
  for (const map of maps) {
    const [width, height] = [map.panel.width_m * k, map.panel.height_m * k];
    if (width + 8 > area.width || height + CAPTION > area.height) return null;
    const wide = Math.max(width, NAMED);
    if (x + wide + 4 > area.x + area.width && x > area.x + 4) {
      x = area.x + 4;
      top += deepest + GAP;
      deepest = 0;
    }
    if (top + height + CAPTION > area.y + area.height) {
      page++;
      [x, top, deepest] = [area.x + 4, area.y, 0];
    }
    placed.push({ map, page, x, bottom: top + height });
    deepest = Math.max(deepest, height + CAPTION);
    x += wide + GAP;
  }
  return levelled(placed, k);
}

/** Elevations of one row stand on one line, as they stand on the ground. */
function levelled(placed: readonly Placed[], k: number): readonly Placed[] {
  const top = (p: Placed): string => `${p.page} ${(p.bottom - p.map.panel.height_m * k).toFixed(3)}`;
  const bottoms = new Map<string, number>();
  for (const p of placed) bottoms.set(top(p), Math.max(bottoms.get(top(p)) ?? 0, p.bottom));
  return placed.map((p) => ({ ...p, bottom: bottoms.get(top(p)) ?? p.bottom }));
}

function drawn(p: Placed, input: ElevationSheetInput, scale: number, most: number): readonly Mark[] {
  const width = Math.max(NAMED, (p.map.panel.width_m * 1000) / scale);
  const title = paragraph(p.map.title, p.x, p.bottom + 2, width, { face: 'semibold' }, 1);
  const values = [...p.map.value].filter((_, i) => p.map.covered?.[i] !== 1);
  const mean = values.reduce((a, b) => a + b, 0) / Math.max(1, values.length);
  const { unit } = input.quantity;
  const places = most >= 20 ? 0 : 1;
  const said = `mean ${fixed(mean, places)}, least ${fixed(Math.min(...values), places)}, most ${fixed(Math.max(...values), places)} ${unit}`;
  return [
    ...elevation(p.map, input.model, p.x, p.bottom, scale, most),
    ...title.marks,
    ...paragraph(said, p.x, p.bottom + 2 + title.height, width, { colour: SOFT }, 1).marks,
  ];
}

function panel(
  input: ElevationSheetInput,
  area: Rect,
  scale: number,
  most: number,
): { readonly marks: readonly Mark[]; readonly spill: readonly Note[] } {
  const bar = scaleBar(area.x, area.y, area.width - 4, scale, input.paper, input.units);
  const key = colourKey(area.x, area.y + bar.height + 3, area.width, most, input.quantity);
  const facts = {
    subject: `Facades, ${input.quantity.name}`,
    number: input.number ?? '',
    date: input.drawn,
    engine: input.engine,
    hash: input.hash,
    scale: `${scaleWords(scale, input.units)} on ${input.paper}`,
  };
  const height = titleBlock(area.x, 0, area.width, input.scheme, facts).height;
  const foot = area.y + area.height - height;
  const notes = [
    { heading: 'Period', lines: [input.period] },
    {
      heading: 'How it was worked out',
      lines: [
        ...input.method,
        'Walls are seen from outside. Figures stand in the middle of the cells that they are of. What is built against has no figure and a hatch.',
      ],
    },
    { heading: DRAWING_CAUTIONS.heading, lines: [CAUTIONS[0] as string] },
  ];
  const placed = placeNotes(notes, [{ x: area.x, y: area.y + bar.height + key.height + 6, end: foot - 2 }], area.width);
  const block = titleBlock(area.x, foot, area.width, input.scheme, facts);
  return { marks: [...bar.marks, ...key.marks, ...placed.marks, ...block.marks], spill: placed.spill };
}
