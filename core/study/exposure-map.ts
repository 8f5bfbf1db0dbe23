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
import type { PeriodSky } from '../shade/exposure-period.ts';
import { type Exposure, exposureJob } from '../shade/exposure-slice.ts';
import { checkAsk, exposureNotes, fault, partOf, runSlices, shadersAt, skyOf, tooManyPoints } from './exposure.ts';
import { type ExposureDates, exposureDates } from './exposure-dates.ts';
import type { Pulse } from './job.ts';

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

/**
 * Exposure over facades, roofs and ground, before and after the proposal, with the difference.
 * @param pulse  called between slices of points, over both stages
 * @returns null when `pulse` said stop; faults where the question cannot be answered
 */
export async function exposureMap(
  scheme: Scheme,
  model: Model,
  ask: ExposureMapAsk,
  pulse: Pulse,
): Promise<Checked<ExposureMap> | null> {
  const step_min = ask.step_min ?? 5;
  const spacing_m = ask.spacing_m ?? 1;
  const dates = exposureDates(ask);
  if (!dates.ok) return dates;
  const faults = checkAsk(step_min, spacing_m, dates.value.length);
  if (faults.length > 0) return { ok: false, faults };
  const places = placesOf(model, ask.surfaces, spacing_m);
  if (!places.ok) return places;
  const sky = skyOf(scheme, model, ask, dates.value, step_min);
  const half: Pulse[] = [(done, total) => pulse(done, 2 * total), (done, total) => pulse(total + done, 2 * total)];
  const before = await stageMap(model, 'before', places.value, sky, half[0] as Pulse);
  if (before === null) return null;
  const same = model.solids.every((s) => stands(s.standing, 'before') === stands(s.standing, 'after'));
  const after = same ? before : await stageMap(model, 'after', places.value, sky, half[1] as Pulse);
  if (after === null) return null;
  const surfaces = places.value.map(({ surface, panel, grid }, i): SurfaceMap => {
    const was = before[i] ?? null;
    const is = after[i] ?? null;
    return { surface, panel, grid, before: was, after: is, change: was && is ? changeOf(was, is) : null };
  });
  return { ok: true, value: { dates: dates.value, step_min, spacing_m, surfaces }, notes: exposureNotes(scheme) };
}

type Place = {
  readonly surface: Surface;
  readonly panel: Panel | null;
  readonly grid: ExposureGrid;
  readonly solid: Solid | null;
};

function placesOf(model: Model, surfaces: readonly Surface[], spacing_m: number): Checked<readonly Place[]> {
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
  const value = rough.map(({ surface, solid, panel }): Place => {
    if (panel) return { surface, solid, panel, grid: panelGrid(panel, spacing_m) };
    const [outline, level] =
      surface.kind === 'ground'
        ? [surface.outline, surface.level_m]
        : [(solid as Solid).outline, (solid as Solid).top_m];
    return { surface, solid, panel, grid: levelGrid(outline, level, spacing_m) };
  });
  return { ok: true, value, notes: [] };
}

/** The surfaces that are there at a stage, each by its number; null when told to stop. */
async function stageMap(
  model: Model,
  stage: Stage,
  places: readonly Place[],
  sky: PeriodSky,
  pulse: Pulse,
): Promise<(Exposure | undefined)[] | null> {
  const there = places.map((p) => p.solid === null || stands(p.solid.standing, stage));
  const grids = places.filter((_, i) => there[i]).map((p) => p.grid.receptors);
  const solids = solidsAt(model.solids, stage);
  const values = await runSlices(exposureJob(solids, shadersAt(model, stage), sky.light, joined(grids), sky), pulse);
  if (values === null) return null;
  let at = 0;
  return places.map((p, i) => {
    if (!there[i]) return undefined;
    const from = at;
    at += p.grid.cell.length;
    return partOf(values, from, at);
  });
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
