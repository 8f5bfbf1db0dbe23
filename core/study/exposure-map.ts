import type { Model, Panel, Solid, Stage } from '../form/model.ts';
import { solidsAt, stands } from '../form/stands.ts';
import type { Ring } from '../plane/vec.ts';
import type { Checked, Fault } from '../scheme/fault.ts';
import type { Scheme } from '../scheme/schema.ts';
import {
  cellsOfOutline,
  cellsOfPanel,
  type ExposureGrid,
  joined,
  levelGrid,
  panelGrid,
  solidWall,
} from '../shade/exposure-grid.ts';
import { type Exposure, type ExposureJob, exposureJob } from '../shade/exposure-slice.ts';
import { checkAsk, fault, partOf, shadersAt, skyOf, tooManyPoints } from './exposure.ts';
import { type ExposureDates, exposureDates } from './exposure-dates.ts';
import type { Pulse } from './job.ts';
import { runHere, type RunJobs } from './run-jobs.ts';

/** A surface that a map can cover. */
export type Surface =
  | { readonly kind: 'wall'; readonly block: string; readonly wall: number }
  | { readonly kind: 'roof'; readonly block: string }
  | { readonly kind: 'ground'; readonly outline: Ring; readonly level_m: number };

export type ExposureMapAsk = ExposureDates & {
  readonly surfaces: readonly Surface[];
  /** Minutes a step; absent: 5. */
  readonly step_min?: number;
  /** Between points [m]; absent: 1. */
  readonly spacing_m?: number;
  /** Whether the light of sky and ground is wanted too; absent: it is. Without it a map takes a fraction of the time. */
  readonly hasDiffuse?: boolean;
};

/** The map of one surface. Rows run together: grid, before, after and change. */
export type SurfaceMap = {
  readonly surface: Surface;
  /** The rectangle of a wall, for drawing; null for what is level. */
  readonly panel: Panel | null;
  readonly grid: ExposureGrid;
  /** Null where the surface is not there at that stage. */
  readonly before: Exposure | null;
  readonly after: Exposure | null;
  /** After less before; null unless both are there. Where a point is built over at one stage its numbers are 0 there. */
  readonly change: { readonly [K in 'minutes' | 'beam' | 'sky' | 'ground']: Float64Array } | null;
};

export type ExposureMap = {
  readonly dates: readonly string[];
  readonly step_min: number;
  readonly spacing_m: number;
  readonly surfaces: readonly SurfaceMap[];
};

/** Every wall and roof of the blocks that stand at a stage. */
export const surfacesOf = (model: Model, stage: Stage): Surface[] =>
  solidsAt(model.solids, stage).flatMap((s): Surface[] => [
    ...s.outline.map((_, wall) => ({ kind: 'wall' as const, block: s.id, wall })),
    { kind: 'roof' as const, block: s.id },
  ]);

/** A surface with its grid, and whether it is there before and after. */
export type MapPlace = {
  readonly surface: Surface;
  /** The rectangle of a wall, for drawing; null for what is level. */
  readonly panel: Panel | null;
  readonly grid: ExposureGrid;
  readonly there: { readonly [S in Stage]: boolean };
};

/** A map that is yet to be worked out; plain data, which may go from worker to worker. */
export type MapPlan = {
  readonly dates: readonly string[];
  readonly step_min: number;
  readonly spacing_m: number;
  readonly places: readonly MapPlace[];
  /** After, which is looked at first, and before; or one for both where the proposal changes nothing. */
  readonly stages: readonly (readonly Stage[])[];
  /** One for each entry of `stages`, over the points of the surfaces that are there. */
  readonly jobs: readonly ExposureJob[];
};

/**
 * Checks what is asked of a map, and lays out its points and jobs.
 * @returns faults where the question cannot be answered
 */
export function planMap(scheme: Scheme, model: Model, ask: ExposureMapAsk): Checked<MapPlan> {
  const step_min = ask.step_min ?? 5;
  const spacing_m = ask.spacing_m ?? 1;
  const dates = exposureDates(ask);
  if (!dates.ok) return dates;
  const faults = checkAsk(step_min, spacing_m, dates.value.length);
  if (faults.length > 0) return { ok: false, faults };
  const laid = placesOf(model, ask.surfaces, spacing_m);
  if (!laid.ok) return laid;
  const places = laid.value;
  const sky = skyOf(scheme, model, ask, dates.value, step_min);
  const same = model.solids.every((s) => stands(s.standing, 'before') === stands(s.standing, 'after'));
  const stages: (readonly Stage[])[] = same ? [['before', 'after']] : [['after'], ['before']];
  const energy = ask.hasDiffuse === false ? null : sky;
  const jobs = stages.map(([stage]) => {
    const at = stage as Stage;
    const grids = places.filter((p) => p.there[at]).map((p) => p.grid.receptors);
    return exposureJob(solidsAt(model.solids, at), shadersAt(model, at), sky.light, joined(grids), energy, model.trees);
  });
  const value = { dates: dates.value, step_min, spacing_m, places, stages, jobs };
  return { ok: true, value, notes: [] };
}

/** The map of a plan whose jobs are done. @param values in the order of the jobs */
export function finishMap(plan: MapPlan, values: readonly Exposure[]): ExposureMap {
  const at = (stage: Stage): (Exposure | null)[] => {
    const all = values[plan.stages.findIndex((stages) => stages.includes(stage))] as Exposure;
    let row = 0;
    return plan.places.map((p) => {
      if (!p.there[stage]) return null;
      row += p.grid.cell.length;
      return partOf(all, row - p.grid.cell.length, row);
    });
  };
  const was = at('before');
  const is = at('after');
  const surfaces = plan.places.map(({ surface, panel, grid }, i): SurfaceMap => {
    const before = was[i] ?? null;
    const after = is[i] ?? null;
    return { surface, panel, grid, before, after, change: before && after ? changeOf(before, after) : null };
  });
  return { dates: plan.dates, step_min: plan.step_min, spacing_m: plan.spacing_m, surfaces };
}

/**
 * Exposure over facades, roofs and ground, before and after the proposal, with the difference.
 * @param pulse  called between slices of points, over both stages
 * @param run    where the points are worked out; absent: in this thread
 * @returns null when `pulse` said stop; faults where the question cannot be answered
 */
export async function exposureMap(
  scheme: Scheme,
  model: Model,
  ask: ExposureMapAsk,
  pulse: Pulse,
  run: RunJobs = runHere,
): Promise<Checked<ExposureMap> | null> {
  const plan = planMap(scheme, model, ask);
  if (!plan.ok) return plan;
  const values = await run(plan.value.jobs, pulse);
  return values === null ? null : { ok: true, value: finishMap(plan.value, values), notes: plan.notes };
}

function placesOf(model: Model, surfaces: readonly Surface[], spacing_m: number): Checked<readonly MapPlace[]> {
  const byId = new Map(model.solids.map((s) => [s.id, s]));
  const faults: Fault[] = [];
  const rough: { surface: Surface; solid: Solid | null; panel: Panel | null }[] = [];
  let points = 0;
  surfaces.forEach((surface, i) => {
    const place = `surfaces[${i}]`;
    if (surface.kind === 'ground') {
      points += cellsOfOutline(surface.outline, spacing_m);
      rough.push({ surface, solid: null, panel: null });
      return;
    }
    const solid = byId.get(surface.block);
    if (solid === undefined) {
      faults.push(fault(place, `the scheme holds no block ${JSON.stringify(surface.block)}`, 'name one that it holds'));
    } else if (surface.kind === 'roof') {
      points += cellsOfOutline(solid.outline, spacing_m);
      rough.push({ surface, solid, panel: null });
    } else {
      const panel = surface.wall < solid.outline.length ? solidWall(solid, surface.wall) : null;
      if (panel === null)
        faults.push(
          fault(place, `block ${JSON.stringify(solid.id)} has no wall ${surface.wall}`, 'name one that it has'),
        );
      else {
        points += cellsOfPanel(panel.width_m, panel.height_m, spacing_m);
        rough.push({ surface, solid, panel });
      }
    }
  });
  faults.push(...tooManyPoints(points));
  if (faults.length > 0) return { ok: false, faults };
  const value = rough.map(({ surface, solid, panel }): MapPlace => {
    const stage = (at: Stage): boolean => solid === null || stands(solid.standing, at);
    const there = { before: stage('before'), after: stage('after') };
    if (panel) return { surface, panel, grid: panelGrid(panel, spacing_m), there };
    const [outline, level] =
      surface.kind === 'ground'
        ? [surface.outline, surface.level_m]
        : [(solid as Solid).outline, (solid as Solid).top_m];
    return { surface, panel, grid: levelGrid(outline, level, spacing_m), there };
  });
  return { ok: true, value, notes: [] };
}

function changeOf(before: Exposure, after: Exposure): NonNullable<SurfaceMap['change']> {
  const less = (a: Float64Array, b: Float64Array): Float64Array => a.map((v, i) => v - b[i]!);
  return {
    minutes: less(after.minutes, before.minutes),
    beam: less(after.beam, before.beam),
    sky: less(after.sky, before.sky),
    ground: less(after.ground, before.ground),
  };
}
