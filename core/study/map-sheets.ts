import type { Model, Solid, Stage } from '../form/model.ts';
import { trueBearing_deg } from '../form/panel.ts';
import { solidsAt, stands } from '../form/stands.ts';
import { compassWord } from '../limits/reason.ts';
import { contains } from '../plane/ring.ts';
import type { Ring } from '../plane/vec.ts';
import type { Checked, Fault } from '../scheme/fault.ts';
import type { Scheme } from '../scheme/schema.ts';
import { solidWall } from '../shade/exposure-grid.ts';
import type { Exposure } from '../shade/exposure-slice.ts';
import type { Document } from '../sheet/drawing.ts';
import type { ElevationMap } from '../sheet/elevation.ts';
import { elevationSheet } from '../sheet/elevation-sheet.ts';
import { exposurePlan, exposurePlanGround, exposurePlanScale } from '../sheet/exposure-plan.ts';
import type { PaperName } from '../sheet/paper.ts';
import type { PlanStage } from '../sheet/plan-figures.ts';
import type { SheetUnits } from '../sheet/sheet-units.ts';
import { dateText } from '../sun/civil.ts';
import { toDegrees } from '../units/angle.ts';
import { SUN_HOURS_METHOD } from './exposure.ts';
import { exposureMap, type Surface, type SurfaceMap } from './exposure-map.ts';
import type { Pulse } from './job.ts';

/** What the map sheets are drawn from, beside scheme and model. */
export type MapSheetAsk = {
  /** Civil dates; the values are means over them. */
  readonly dates: readonly string[];
  readonly scale: number | null;
  readonly paper: PaperName;
  readonly landscape: boolean;
  readonly number?: string;
  readonly drawn: string;
  readonly engine: string;
  readonly hash: string;
  readonly language?: string;
  readonly units?: SheetUnits;
};

/** Between points of the ground and of roofs on paper [mm]: as fine as a figure can be told from the next. */
const CELL_mm = 2.5;
/** Between points of a wall [m]. */
const WALL_SPACING_m = 0.5;
/** Walls narrower than this are not drawn [m]. */
const NARROW_m = 0.5;
/** The most walls of one set of sheets: some hundred pages. Of a scheme larger than that the blocks are named one by one. */
const MOST_WALLS = 1000;

const QUANTITY = { name: 'sun hours a day', unit: 'h' } as const;
const hoursADay = (e: Exposure, days: number): Float64Array => e.minutes.map((m) => m / 60 / days);
const method = (scheme: Scheme, step_min: number): readonly string[] => [
  `${SUN_HOURS_METHOD.replace(/^s/u, 'S')}. Step ${step_min} min, true altitude without refraction${
    scheme.site.lowSun ? `, sun above ${scheme.site.lowSun}° only` : ''
  }.`,
];

/** Dates as a sheet states them. */
export function periodWords(dates: readonly string[]): string {
  const each = dates.map(dateText);
  const list = each.length < 2 ? (each[0] ?? '') : `${each.slice(0, -1).join(', ')} and ${each.at(-1)}`;
  return each.length > 1 ? `Mean of ${list}.` : `${list}.`;
}

/**
 * Sun hours over facades: every outside wall of the proposed blocks, or of one block that is named.
 * @returns null when `pulse` said stop
 */
export async function facadeSheet(
  scheme: Scheme,
  model: Model,
  ask: MapSheetAsk & { readonly block?: string },
  pulse: Pulse,
): Promise<Checked<Document> | null> {
  const chosen = blocksToDraw(model, ask.block);
  if (!Array.isArray(chosen)) return { ok: false, faults: [chosen as Fault] };
  const surfaces = (chosen as readonly Solid[]).flatMap((s) =>
    s.outline.flatMap((_, wall): Surface[] => {
      const panel = solidWall(s, wall);
      return panel && panel.width_m >= NARROW_m ? [{ kind: 'wall', block: s.id, wall }] : [];
    }),
  );
  if (surfaces.length > MOST_WALLS)
    return refuse(
      'too-many-walls',
      `${surfaces.length} walls are to be drawn, more than ${MOST_WALLS}`,
      'name one block for the sheet',
    );
  const made = await exposureMap(
    scheme,
    model,
    { dates: ask.dates, surfaces, spacing_m: WALL_SPACING_m, hasDiffuse: false },
    pulse,
  );
  if (made === null || !made.ok) return made;
  const names = new Map(model.solids.map((s) => [s.id, s.name || s.id]));
  const maps = made.value.surfaces.flatMap((map): ElevationMap[] => {
    const at = map.after ?? map.before;
    if (!map.panel || !at || map.surface.kind !== 'wall') return [];
    const { block, wall } = map.surface;
    const covered = builtAgainst(map, at, solidsAt(model.solids, map.after ? 'after' : 'before'));
    if (covered.every((c) => c === 1)) return [];
    const faces = compassWord(trueBearing_deg(map.panel.normal, toDegrees(model.north_rad)));
    return [
      {
        title: `${names.get(block)}, wall ${wall}, faces ${faces}`,
        panel: map.panel,
        grid: map.grid,
        value: hoursADay(at, made.value.dates.length),
        covered,
      },
    ];
  });
  const drawn = elevationSheet({
    ...ask,
    scheme,
    model,
    maps,
    quantity: QUANTITY,
    period: periodWords(made.value.dates),
    method: method(scheme, made.value.step_min),
  });
  return drawn.ok ? { ...drawn, notes: made.notes } : drawn;
}

/** Just outside a wall [m]: whether another block stands against it is asked there. */
const OUTSIDE_m = 0.01;

/** 1 where a point of a wall lies inside a block, or another block stands against it. */
function builtAgainst(map: SurfaceMap, at: Exposure, standing: readonly Solid[]): Uint8Array {
  const { x, y, z, nx, ny } = map.grid.receptors;
  return at.covered.map((inside, i) => {
    const [px, py, pz] = [x[i]! + nx[i]! * OUTSIDE_m, y[i]! + ny[i]! * OUTSIDE_m, z[i]!];
    const isAgainst = standing.some((s) => pz > s.base_m && pz < s.top_m && contains(s.outline, px, py));
    return inside === 1 || isAgainst ? 1 : 0;
  });
}

/** The block named, else what is proposed, else what stands and is neither context nor removed. */
function blocksToDraw(model: Model, block: string | undefined): readonly Solid[] | Fault {
  if (block !== undefined) {
    const found = model.solids.filter((s) => s.id === block);
    return found.length > 0
      ? found
      : fault('no-such-block', `the scheme has no block ${JSON.stringify(block)}`, 'name one that it has');
  }
  const proposed = model.solids.filter((s) => s.standing === 'proposed');
  const own = proposed.length > 0 ? proposed : model.solids.filter((s) => s.standing === 'existing');
  return own.length > 0
    ? own
    : fault('nothing-to-draw', 'the scheme has no proposed or existing block', 'name a block for the sheet');
}

/**
 * Sun hours over all roofs and the ground, before and after: one page a stage, or one where nothing changes.
 * @returns null when `pulse` said stop
 */
export async function exposurePlanSheet(
  scheme: Scheme,
  model: Model,
  ask: MapSheetAsk,
  pulse: Pulse,
): Promise<Checked<Document> | null> {
  if (model.solids.length === 0) return refuse('nothing-to-draw', 'the scheme has no blocks to draw', 'add a block');
  const scale = exposurePlanScale(model, ask.scale, ask.paper, ask.landscape, ask.units);
  if (typeof scale !== 'number') return { ok: false, faults: [scale] };
  const outline = exposurePlanGround(model, scale, ask.paper, ask.landscape);
  const changes = model.solids.some((s) => s.standing === 'proposed' || s.standing === 'removed');
  const stages: readonly Stage[] = changes ? ['before', 'after'] : ['after'];
  const standing = model.solids.filter((s) => stages.some((stage) => stands(s.standing, stage)));
  const surfaces: Surface[] = [
    { kind: 'ground', outline, level_m: 0 },
    ...standing.map((s) => ({ kind: 'roof' as const, block: s.id })),
  ];
  const spacing_m = Math.max(0.25, (CELL_mm * scale) / 1000);
  const made = await exposureMap(scheme, model, { dates: ask.dates, surfaces, spacing_m, hasDiffuse: false }, pulse);
  if (made === null || !made.ok) return made;
  const { dates, step_min } = made.value;
  const drawn = exposurePlan({
    ...ask,
    scheme,
    model,
    scale,
    stages: stages.map((stage) => stageOf(model, stage, outline, made.value.surfaces, dates.length)),
    quantity: QUANTITY,
    period: periodWords(dates),
    method: method(scheme, step_min),
  });
  return drawn.ok ? { ...drawn, notes: made.notes } : drawn;
}

function stageOf(model: Model, stage: Stage, outline: Ring, surfaces: readonly SurfaceMap[], days: number): PlanStage {
  const level = (map: SurfaceMap | undefined, ring: Ring) => {
    const at = map?.[stage];
    return map && at ? [{ outline: ring, grid: map.grid, value: hoursADay(at, days), covered: at.covered }] : [];
  };
  const [ground] = level(
    surfaces.find((s) => s.surface.kind === 'ground'),
    outline,
  );
  if (!ground) throw new Error('the map holds no ground');
  const roofs = solidsAt(model.solids, stage).flatMap((solid) =>
    level(
      surfaces.find((s) => s.surface.kind === 'roof' && s.surface.block === solid.id),
      solid.outline,
    ).map((map) => ({ ...map, block: solid.id })),
  );
  return { stage, ground, roofs };
}

const fault = (code: string, message: string, cure: string): Fault => ({
  level: 'error',
  code,
  place: '',
  message,
  cure,
});
const refuse = (code: string, message: string, cure: string): Checked<never> => ({
  ok: false,
  faults: [fault(code, message, cure)],
});
