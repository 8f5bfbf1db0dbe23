import type { Shader, Solid } from '../form/model.ts';
import type { Tree } from '../scheme/schema.ts';
import { ANY_MONTH, type MonthShares } from './crown-sky.ts';
import { sunOnReceptors } from './exposure.ts';
import { columnsFor, type Light, type LightColumns, sortLight } from './exposure-light.ts';
import { domeOnReceptors, groundOnReceptors, mirroredOccluders } from './sky-view.ts';
import { makeSkyRays, RAYS_OF_A_MAP } from './sky-view-trace.ts';
import { type Receptors, rowsOf } from './skyline-groups.ts';
import { makeOccluders, type Occluders } from './skyline-occluders.ts';

/** A map to be worked out, all plain columns: it goes to a worker as it is. */
export type ExposureJob = {
  readonly occluders: Occluders;
  /** For the ground's light; null where only the sun is wanted. */
  readonly mirrored: Occluders | null;
  readonly light: LightColumns;
  readonly receptors: Receptors;
  readonly diffuse_Whm2: number;
  readonly reflected_Whm2: number;
  /** When that light falls, for the crowns of trees. */
  readonly diffuseMonths: MonthShares;
  readonly reflectedMonths: MonthShares;
};

/** A job without its receptors: what a worker is told once, before it is given tiles of receptors. */
export type JobHead = Omit<ExposureJob, 'receptors'>;

/** One row a receptor: sun time [min], and energy on its plane by part [Wh/m²]. */
export type Exposure = {
  readonly minutes: Float64Array;
  readonly beam: Float64Array;
  readonly sky: Float64Array;
  readonly ground: Float64Array;
  /** 1 where the receptor lies inside a solid: all its numbers are 0. */
  readonly covered: Uint8Array;
};

/** Receptors a slice: fixed, so that the cut does not depend on how many workers share the work. */
export const SLICE = 2048;

/** How many slices a job has. */
export const slicesOf = (job: ExposureJob): number => Math.ceil(job.receptors.x.length / SLICE);

/** Sky and ground light of a period (see `PeriodSky`); without months, crowns let through the mean of the year. */
export type PeriodEnergy = {
  readonly diffuse_Whm2: number;
  readonly reflected_Whm2: number;
  readonly diffuseMonths?: MonthShares;
  readonly reflectedMonths?: MonthShares;
};

/** The job of a map: what stands, the light of a period, the receptors. */
export function exposureJob(
  solids: readonly Solid[],
  shaders: readonly Shader[],
  light: Light,
  receptors: Receptors,
  energy: PeriodEnergy | null,
  trees: readonly Tree[] = [],
): ExposureJob {
  return {
    occluders: makeOccluders(solids, shaders, trees),
    mirrored: energy === null ? null : mirroredOccluders(solids, shaders, trees),
    light: sortLight(light, columnsFor(light.sx.length)),
    receptors,
    diffuse_Whm2: energy?.diffuse_Whm2 ?? 0,
    reflected_Whm2: energy?.reflected_Whm2 ?? 0,
    diffuseMonths: energy?.diffuseMonths ?? ANY_MONTH,
    reflectedMonths: energy?.reflectedMonths ?? ANY_MONTH,
  };
}

/** Works out one slice: rows `slice · SLICE` on. The same numbers whoever works it out, in whatever order. */
export const exposureSlice = (job: ExposureJob, slice: number): Exposure =>
  exposureTile(job, rowsOf(job.receptors, slice * SLICE, (slice + 1) * SLICE));

/**
 * Works out some receptors of a job. A receptor's numbers do not depend on which others are asked for with it.
 *
 * Beam: exact samples, weakened by the crowns that they pass. Sky: the period's diffuse on the level times the share of an evenly bright dome. Ground: what level
 * ground in the open throws back times its share; that the ground itself may lie in shadow is left out.
 */
export function exposureTile(job: JobHead, receptors: Receptors): Exposure {
  const n = receptors.x.length;
  const sun = sunOnReceptors(job.occluders, job.light, receptors);
  const sky = new Float64Array(n);
  const ground = new Float64Array(n);
  if (job.mirrored !== null) {
    const rays = makeSkyRays(RAYS_OF_A_MAP);
    const dome = domeOnReceptors(job.occluders, rays, receptors, 'uniform', job.diffuseMonths);
    const floor = groundOnReceptors(job.mirrored, rays, receptors, job.reflectedMonths);
    for (let i = 0; i < n; i++) {
      sky[i] = job.diffuse_Whm2 * dome[i]!;
      ground[i] = sun.covered[i] === 1 ? 0 : job.reflected_Whm2 * floor[i]!;
    }
  }
  return { ...sun, sky, ground };
}

/** Slices put together in their order. */
export function joinSlices(slices: readonly Exposure[]): Exposure {
  const n = slices.reduce((sum, s) => sum + s.minutes.length, 0);
  const all: Exposure = {
    minutes: new Float64Array(n),
    beam: new Float64Array(n),
    sky: new Float64Array(n),
    ground: new Float64Array(n),
    covered: new Uint8Array(n),
  };
  let at = 0;
  for (const s of slices) {
    for (const key of ['minutes', 'beam', 'sky', 'ground', 'covered'] as const) all[key].set(s[key], at);
    at += s.minutes.length;
  }
  return all;
}
