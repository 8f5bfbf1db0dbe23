import * as maths from '../maths/maths.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import { planeIrradiance, type SkyModel } from '../sky/transpose.ts';
import { DEG } from '../units/angle.ts';
import type { OpenLight } from './window-day.ts';

/**
 * The sky model that checks use where nothing else is asked for: Perez 1990. A clear summer sky is much brighter round the sun
 * and along the horizon than straight up; an evenly bright sky gives the sunny side a fifth to a half too little of it, which is
 * the unsafe side when heat is judged.
 */
export const DEFAULT_SKY_MODEL: SkyModel = 'perez';

/** The sky model that a scheme asks for. */
export const skyModelOf = (scheme: Scheme): SkyModel => scheme.site.skyModel ?? DEFAULT_SKY_MODEL;

/** A plane by where it faces: all that the light on it depends on while nothing stands in front. */
export type Facing = { readonly bearing_deg: number; readonly tilt_deg: number };

/** Light on an open plane over a day, and the cosine of the sun's angle from its normal (0 with the sun behind it or down). */
export type FacingLight = { readonly open: OpenLight; readonly cosIncidence: Float64Array };

/**
 * Cosine of the angle between the sun and the normal of a plane; negative with the sun behind it.
 * cos θ = sin h cos β + cos h sin β cos(A − A_w)
 */
export function cosIncidence(altitude_rad: number, azimuth_rad: number, facing: Facing): number {
  const tilt = facing.tilt_deg * DEG;
  return (
    maths.sin(altitude_rad) * maths.cos(tilt) +
    maths.cos(altitude_rad) * maths.sin(tilt) * maths.cos(azimuth_rad - facing.bearing_deg * DEG)
  );
}

/** Irradiance on an open plane at one step of a day, part by part [W/m²]. */
export function openLightAt(
  grid: DayGrid,
  step: number,
  facing: Facing,
  model: SkyModel,
  groundReflectance: number,
): ReturnType<typeof planeIrradiance> {
  const altitude = grid.altitude_rad[step]!;
  return planeIrradiance(model, {
    beamNormal_Wm2: grid.beamNormal_Wm2[step]!,
    diffuse_Wm2: grid.diffuse_Wm2[step]!,
    global_Wm2: grid.global_Wm2[step]!,
    extraterrestrial_Wm2: grid.extraterrestrial_Wm2[step]!,
    airMass: grid.airMass[step]!,
    zenith_rad: Math.PI / 2 - altitude,
    cosIncidence: cosIncidence(altitude, grid.azimuth_rad[step]!, facing),
    tilt_rad: facing.tilt_deg * DEG,
    groundReflectance,
  });
}

/**
 * Light on an open plane over a whole day.
 * @param groundReflectance of the day's month, 0..1
 */
export function openLight(grid: DayGrid, facing: Facing, model: SkyModel, groundReflectance: number): FacingLight {
  const n = grid.instant_ms.length;
  const open = {
    beam: new Float64Array(n),
    circumsolar: new Float64Array(n),
    sky: new Float64Array(n),
    horizon: new Float64Array(n),
    ground: new Float64Array(n),
  };
  const cos = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    if (!(grid.global_Wm2[i]! > 0)) continue;
    const altitude = grid.altitude_rad[i]!;
    if (altitude > 0) cos[i] = Math.max(0, cosIncidence(altitude, grid.azimuth_rad[i]!, facing));
    const parts = openLightAt(grid, i, facing, model, groundReflectance);
    open.beam[i] = parts.beam;
    open.circumsolar[i] = parts.circumsolar;
    open.sky[i] = parts.sky;
    open.horizon[i] = parts.horizon;
    open.ground[i] = parts.ground;
  }
  return { open, cosIncidence: cos };
}

/**
 * What a window sees, as shares of what the same glass sees with nothing in front of it.
 * @param seen  cosine-weighted shares of dome and ground that reach the glass, and the visible share of the horizon
 */
export function viewOf(
  seen: { readonly sky: number; readonly horizon: number; readonly ground: number },
  tilt_deg: number,
): { readonly sky: number; readonly horizon: number; readonly ground: number } {
  const up = maths.cos(tilt_deg * DEG);
  const ground = (1 - up) / 2;
  return { sky: seen.sky / ((1 + up) / 2), horizon: seen.horizon, ground: ground > 0 ? seen.ground / ground : 0 };
}
