import type { Model, Stage } from '../form/model.ts';
import { stands } from '../form/stands.ts';
import type { Point, Ring } from '../plane/vec.ts';
import type { Checked } from '../scheme/fault.ts';
import type { Scheme } from '../scheme/schema.ts';
import { colourKey, type Quantity, scaleEnd } from './colour-key.ts';
import type { Document, Mark, Mm } from './drawing.ts';
import { AREA_LINE, BOUNDARY_LINE, FRAME, WHITE } from './ink.ts';
import { levelMapMarks } from './level-map.ts';
import { paragraph, rect } from './marks.ts';
import { finishPages, type PaperName, type Rect } from './paper.ts';
import { BLOCK_LOOK } from './plan.ts';
import { groundFigures, type PlanStage, roofFigures } from './plan-figures.ts';
import { onPage, type PlanView } from './plan-view.ts';
import { chooseScale } from './scale.ts';
import { type SheetUnits, scaleWords } from './sheet-units.ts';
import { northPoint, scaleBar } from './scale-marks.ts';
import { type Areas, DRAWING_CAUTIONS, type Note, pageAreas, placeNotes, withNotes } from './side-panel.ts';
import { shortHash, titleBlock } from './title-block.ts';

export type ExposurePlanInput = {
  readonly scheme: Scheme;
  readonly model: Model;
  /** One page each. */
  readonly stages: readonly PlanStage[];
  readonly quantity: Quantity;
  /** Such as `21 March, 21 June and 21 December 2025`. */
  readonly period: string;
  /** How the values were worked out, in sentences. */
  readonly method: readonly string[];
  readonly scale: number | null;
  readonly paper: PaperName;
  readonly landscape: boolean;
  readonly number?: string;
  readonly drawn: string;
  readonly engine: string;
  readonly hash: string;
  readonly language?: string;
  /** Absent: metric. */
  readonly units?: SheetUnits;
};

/** What the sheet is called. */
export const PLAN_SUBJECT = 'Sun on roofs and ground';
const CAPTION: Mm = 7;
const STAGE_WORDS: { readonly [S in Stage]: string } = { before: 'before', after: 'after, with the proposal' };

/** The frame of the plan on a paper [mm]. */
function planFrame(areas: Areas): Rect {
  const { drawing } = areas;
  return { ...drawing, y: drawing.y + CAPTION, height: drawing.height - CAPTION };
}

/** The scale that an exposure plan of a scheme will be drawn at, for choosing how far apart its points stand; or why it cannot be. */
export function exposurePlanScale(
  model: Model,
  asked: number | null,
  paper: PaperName,
  landscape: boolean,
  units: SheetUnits = 'metric',
): ReturnType<typeof chooseScale> {
  const frame = planFrame(pageAreas(paper, landscape));
  const size = [model.extent[2] - model.extent[0], model.extent[3] - model.extent[1]] as const;
  return chooseScale(
    asked,
    size,
    size,
    [frame.width - 4, frame.height - 4],
    `${paper} ${landscape ? 'landscape' : 'portrait'}`,
    units,
  );
}

/** The ground that a plan shows at a scale: all round the scheme as far as its highest top, where the paper has room. */
export function exposurePlanGround(model: Model, scale: number, paper: PaperName, landscape: boolean): Ring {
  const frame = planFrame(pageAreas(paper, landscape));
  const [x0, y0, x1, y1] = model.extent;
  const reach = Math.max(0, ...model.solids.map((s) => s.top_m));
  const along = (low: number, high: number, mm: Mm): number =>
    Math.max(0, Math.min(reach, ((mm * scale) / 1000 - (high - low)) / 2));
  const [dx, dy] = [along(x0, x1, frame.width), along(y0, y1, frame.height)];
  return [
    [x0 - dx, y0 - dy],
    [x1 + dx, y0 - dy],
    [x1 + dx, y1 + dy],
    [x0 - dx, y1 + dy],
  ];
}

/** Maps over all roofs and the ground as a plan to scale, one page a stage, with the numbers of their colours beside them. */
export function exposurePlan(input: ExposurePlanInput): Checked<Document> {
  const { model, paper, landscape, stages } = input;
  const scale = exposurePlanScale(model, input.scale, paper, landscape, input.units);
  if (typeof scale !== 'number') return { ok: false, faults: [scale] };
  const areas = pageAreas(paper, landscape);
  const frame = planFrame(areas);
  const [x0, y0, x1, y1] = model.extent;
  const view: PlanView = { frame, scale, centre: [(x0 + x1) / 2, (y0 + y1) / 2] };
  const most = scaleEnd(stages.flatMap((s) => [s.ground.value, ...s.roofs.map((r) => r.value)]));
  const beside = panel(input, areas, scale, most);
  const contents = stages.map((stage) => {
    const title = stages.length > 1 ? `${PLAN_SUBJECT}, ${STAGE_WORDS[stage.stage]}` : PLAN_SUBJECT;
    return {
      title,
      marks: [
        ...paragraph(`${title}: ${input.quantity.name}`, frame.x, areas.drawing.y, frame.width, { face: 'semibold' }, 1)
          .marks,
        ...stageMarks(view, model, stage, most),
        rect(frame.x, frame.y, frame.width, frame.height, { stroke: FRAME }),
        ...beside.marks,
      ],
    };
  });
  return {
    ok: true,
    notes: [],
    value: {
      title: [input.scheme.title, PLAN_SUBJECT].filter((t) => t !== '').join(' – '),
      author: input.scheme.author,
      language: input.language ?? 'en-GB',
      pages: finishPages(
        withNotes(contents, beside.spill, paper, landscape),
        paper,
        landscape,
        `scheme ${shortHash(input.hash)}, drawn ${input.drawn}`,
      ),
    },
  };
}

function stageMarks(view: PlanView, model: Model, stage: PlanStage, most: number): readonly Mark[] {
  const standing = model.solids
    .filter((s) => stands(s.standing, stage.stage))
    .toSorted((a, b) => a.top_m - b.top_m || (a.id < b.id ? -1 : 1));
  const ring = (points: readonly Point[]): readonly (readonly [Mm, Mm])[] => points.map((p) => onPage(view, p));
  const marks: Mark[] = [...levelMapMarks(view, stage.ground, most)];
  for (const solid of standing) {
    const roof = stage.roofs.find((r) => r.block === solid.id);
    if (roof) marks.push(...levelMapMarks(view, roof, most));
    const { stroke } = BLOCK_LOOK[solid.standing];
    // An edge that holds on dark and on pale: white under ink.
    const outline = { kind: 'path' as const, runs: [ring(solid.outline)], closed: true };
    marks.push({ ...outline, stroke: { colour: WHITE, width: stroke.width + 0.4 } }, { ...outline, stroke });
  }
  if (model.boundary) marks.push({ kind: 'path', runs: [ring(model.boundary)], closed: true, stroke: BOUNDARY_LINE });
  for (const r of model.receptors)
    if (r.kind === 'area') marks.push({ kind: 'path', runs: [ring(r.outline)], closed: true, stroke: AREA_LINE });
  const { x, y, width, height } = view.frame;
  marks.push(...groundFigures(view, standing, stage.ground, most), ...roofFigures(view, standing, stage, most));
  return [{ kind: 'group', label: `plan ${STAGE_WORDS[stage.stage]}`, clip: [x, y, width, height], marks }];
}

function panel(
  input: ExposurePlanInput,
  areas: Areas,
  scale: number,
  most: number,
): { readonly marks: readonly Mark[]; readonly spill: readonly Note[] } {
  const first = areas.panel[0] as Rect;
  const last = areas.panel.at(-1) as Rect;
  const radius = 8;
  const marks: Mark[] = [northPoint(first.x + radius, first.y + radius * 1.34 + 4, radius, input.scheme.site.north)];
  const bar = scaleBar(
    first.x + radius * 2 + 8,
    first.y + 3,
    first.width - radius * 2 - 8,
    scale,
    input.paper,
    input.units,
  );
  const key = colourKey(first.x, first.y + radius * 2.7 + 6, first.width, most, input.quantity);
  marks.push(...bar.marks, ...key.marks);
  const facts = {
    subject: PLAN_SUBJECT,
    number: input.number ?? '',
    date: input.drawn,
    engine: input.engine,
    hash: input.hash,
    scale: `${scaleWords(scale, input.units)} on ${input.paper}`,
  };
  const height = titleBlock(last.x, 0, last.width, input.scheme, facts).height;
  const foot = last.y + last.height - height;
  const y = first.y + radius * 2.7 + 6 + key.height + 3;
  const slots =
    areas.panel.length === 1
      ? [{ x: first.x, y, end: foot - 2 }]
      : [
          { x: first.x, y, end: first.y + first.height },
          { x: last.x, y: last.y, end: foot - 2 },
        ];
  const notes = [
    { heading: 'Period', lines: [input.period] },
    {
      heading: 'How it was worked out',
      lines: [
        ...input.method,
        'Figures on the ground stand at the points that they are of; the figure on a roof is its mean.',
      ],
    },
    DRAWING_CAUTIONS,
  ];
  const placed = placeNotes(notes, slots, first.width);
  const block = titleBlock(last.x, foot, last.width, input.scheme, facts);
  return { marks: [...marks, ...placed.marks, ...block.marks], spill: placed.spill };
}
