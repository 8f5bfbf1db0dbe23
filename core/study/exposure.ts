import type { Model, ReceptorForm, Shader, Solid, Stage } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import { unit } from '../plane/vec.ts';
import type { Checked, Fault } from '../scheme/fault.ts';
import type { Scheme } from '../scheme/schema.ts';
import {
  cellsOfOutline,
  cellsOfPanel,
  type ExposureGrid,
  facing,
  joined,
  levelGrid,
  panelGrid,
} from '../shade/exposure-grid.ts';
import { momentSky, type PeriodSky, periodSky } from '../shade/exposure-period.ts';
import { type Exposure, exposureJob } from '../shade/exposure-slice.ts';
import { type ExposureDates, exposureDates } from './exposure-dates.ts';
import type { Pulse } from './job.ts';
import { builtShare, receptorNotes } from './receptor-notes.ts';
import { runHere, type RunJobs } from './run-jobs.ts';

/** What is asked of an exposure study. */
export type ExposureAsk = ExposureDates & {
  /** Minutes a step, or that a moment stands for: a whole number from 1 to 60; absent: 5. */
  readonly step_min?: number;
  /** Between grid points on areas [m]; absent: 1. */
  readonly spacing_m?: number;
  /** Absent: after. */
  readonly stage?: Stage;
  /** Whether a neighbour's window is asked at its centre or on a grid with the areas' spacing; absent: centre. */
  readonly windows?: 'centre' | 'grid';
};

/** Sun and energy of one receptor over the period: minutes; Wh/m² on its own plane by part. */
export type ReceptorExposure = {
  readonly id: string;
  readonly sunMinutes: number;
  readonly beam: number;
  readonly sky: number;
  readonly ground: number;
  /** For an area, or a window on a grid: the points behind the means above, of those that are not built over. */
  readonly grid: { readonly layout: ExposureGrid; readonly values: Exposure } | null;
};

export type ExposureResult = {
  readonly stage: Stage;
  readonly dates: readonly string[];
  readonly step_min: number;
  readonly spacing_m: number;
  /** How many samples of the period the sun counts at. */
  readonly sunSamples: number;
  /** In the order of the scheme. */
  readonly receptors: readonly ReceptorExposure[];
};

/** The most points that one study takes on: a year of them is the better part of a minute, and some 300 MB. */
export const MOST_POINTS = 1_000_000;
/** The most samples of one study: a year by the minute is 525 600. */
export const MOST_SAMPLES = 600_000;

/** How sun hours come about. */
export const SUN_HOURS_METHOD =
  'sun sampled at the middle of each step, hidden or not exactly by the solids and devices that stand; crowns of trees let through what each month says';

/** How all the numbers come about, for the working. */
export const EXPOSURE_METHOD =
  'sun sampled at the middle of each step, hidden or not exactly by the solids and devices that stand; clear sky by Ineichen–Perez 2002; sky light from an even dome past what hides it; ground light from open level ground; crowns of trees let through what each month says';

/**
 * Sun time and energy on every receptor of a scheme.
 * @param model  `buildModel(scheme)`
 * @param pulse  called between slices of points
 * @param run    where the points are worked out; absent: in this thread
 * @returns null when `pulse` said stop; faults where the question cannot be answered
 */
export async function exposureStudy(
  scheme: Scheme,
  model: Model,
  ask: ExposureAsk,
  pulse: Pulse,
  run: RunJobs = runHere,
): Promise<Checked<ExposureResult> | null> {
  const step_min = ask.step_min ?? 5;
  const spacing_m = ask.spacing_m ?? 1;
  const stage = ask.stage ?? 'after';
  const dates = exposureDates(ask);
  if (!dates.ok) return dates;
  const faults = [...checkAsk(step_min, spacing_m, dates.value.length), ...checkPoints(model, spacing_m, ask.windows)];
  if (faults.length > 0) return { ok: false, faults };
  const grids = model.receptors.map((r) => gridOf(r, spacing_m, ask.windows ?? 'centre'));
  const sky = skyOf(scheme, model, ask, dates.value, step_min);
  const job = exposureJob(
    solidsAt(model.solids, stage),
    shadersAt(model, stage),
    sky.light,
    joined(grids.map((g) => g.receptors)),
    sky,
    model.trees,
  );
  const done = await run([job], pulse);
  if (done === null) return null;
  const values = done[0] as Exposure;
  let at = 0;
  const receptors = model.receptors.map((receptor, i) => {
    const layout = grids[i] as ExposureGrid;
    const own = partOf(values, at, at + layout.cell.length);
    at += layout.cell.length;
    return summary(receptor, layout, own);
  });
  const value = { stage, dates: dates.value, step_min, spacing_m, sunSamples: sky.light.sx.length, receptors };
  const built = receptors.map((r, i) =>
    model.receptors[i]?.kind === 'area' && r.grid !== null ? [{ stage, share: builtShare(r.grid.values.covered) }] : [],
  );
  return { ok: true, value, notes: [...notesOf(model), ...receptorNotes(model, [stage], built)] };
}

/** The sun and sky of what is asked. @param dates from `exposureDates` */
export const skyOf = (
  scheme: Scheme,
  model: Model,
  ask: ExposureDates,
  dates: readonly string[],
  step_min: number,
): PeriodSky =>
  'moments_ms' in ask
    ? momentSky(scheme.site, model.north_rad, ask.moments_ms, step_min)
    : periodSky(scheme.site, model.north_rad, dates, step_min);

/** Devices of the windows whose blocks stand at a stage. */
export function shadersAt(model: Model, stage: Stage): readonly Shader[] {
  const standing = new Set(solidsAt(model.solids, stage).map((s: Solid) => s.id));
  return model.windows.filter((w) => standing.has(w.block)).flatMap((w) => w.shaders);
}

function gridOf(r: ReceptorForm, spacing_m: number, windows: 'centre' | 'grid'): ExposureGrid {
  if (r.kind === 'area') return levelGrid(r.outline, r.level, spacing_m);
  if (r.kind === 'point') return single(facing([r.at], unit(r.normal)));
  if (r.panel === undefined) throw new RangeError(`the model holds no panel for receptor ${JSON.stringify(r.id)}`);
  return panelGrid(r.panel, windows === 'grid' ? spacing_m : Infinity);
}

const single = (receptors: ExposureGrid['receptors']): ExposureGrid => ({
  receptors,
  cell_m: [0, 0],
  across: 1,
  up: 1,
  cell: Uint32Array.of(0),
});

/** Rows of an exposure. */
export function partOf(e: Exposure, from: number, to: number): Exposure {
  return {
    minutes: e.minutes.slice(from, to),
    beam: e.beam.slice(from, to),
    sky: e.sky.slice(from, to),
    ground: e.ground.slice(from, to),
    covered: e.covered.slice(from, to),
  };
}

/** A receptor's numbers: the mean of its points that are not built over. */
function summary(r: ReceptorForm, layout: ExposureGrid, values: Exposure): ReceptorExposure {
  const mean = (column: Float64Array): number => {
    let sum = 0;
    let n = 0;
    for (let i = 0; i < column.length; i++) {
      if (values.covered[i] === 1) continue;
      sum += column[i]!;
      n++;
    }
    return n > 0 ? sum / n : 0;
  };
  return {
    id: r.id,
    sunMinutes: mean(values.minutes),
    beam: mean(values.beam),
    sky: mean(values.sky),
    ground: mean(values.ground),
    grid: layout.cell.length === 1 && r.kind !== 'area' ? null : { layout, values },
  };
}

/** Faults of step, spacing and length. */
export function checkAsk(step_min: number, spacing_m: number, days: number): Fault[] {
  const faults: Fault[] = [];
  if (!(Number.isInteger(step_min) && step_min >= 1 && step_min <= 60))
    faults.push(
      fault('step', `the step must be a whole number of minutes from 1 to 60, got ${step_min}`, 'ask for 5, say'),
    );
  else if ((days * 1440) / step_min > MOST_SAMPLES)
    faults.push(
      fault(
        'step',
        `${days} days in steps of ${step_min} min are more than ${MOST_SAMPLES} samples`,
        'ask for longer steps or fewer days',
      ),
    );
  if (!(spacing_m > 0 && Number.isFinite(spacing_m)))
    faults.push(fault('spacing', `the spacing must be more than 0 m, got ${spacing_m}`, 'ask for 1, say'));
  return faults;
}

function checkPoints(model: Model, spacing_m: number, windows: ExposureAsk['windows']): Fault[] {
  const faults: Fault[] = [];
  let points = 0;
  for (const r of model.receptors) {
    if (r.kind === 'area') points += cellsOfOutline(r.outline, spacing_m);
    else if (r.kind === 'window' && r.panel !== undefined && windows === 'grid')
      points += cellsOfPanel(r.panel.width_m, r.panel.height_m, spacing_m);
    else points++;
    if (r.kind === 'point' && !(Math.hypot(...r.normal) > 0))
      faults.push(
        fault(
          `${r.place}.normal`,
          'the normal has no length',
          'give the direction that the point faces, such as [0, 0, 1]',
        ),
      );
  }
  return [...faults, ...tooManyPoints(points)];
}

/** The refusal of more points than one study takes on. */
export const tooManyPoints = (points: number): Fault[] =>
  points > MOST_POINTS
    ? [
        fault(
          'spacing',
          `${points} points are asked for, more than ${MOST_POINTS}`,
          'ask for a wider spacing, or for smaller areas',
        ),
      ]
    : [];

function notesOf(model: Model): Fault[] {
  const notes: Fault[] = [];
  if (model.receptors.length === 0)
    notes.push({
      level: 'warning',
      code: 'no-receptors',
      place: 'receptors',
      message: 'the scheme has no receptors, so there is nothing to work out',
      cure: 'add points, areas or windows of neighbours',
    });
  return notes;
}

export const fault = (place: string, message: string, cure: string): Fault => ({
  level: 'error',
  code: 'exposure-ask',
  place,
  message,
  cure,
});
