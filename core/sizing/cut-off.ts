import * as maths from '../maths/maths.ts';

/** Depths that keep the sun off the glass at one moment, for devices that run on endlessly: the closed forms of shadow angles. */

/**
 * Profile angle: the altitude of the sun as seen along a wall, in the plane at right angles to it. tan VSA = tan h / cos HSA.
 * @param altitude_rad  of the sun, above 0
 * @param across_rad    horizontal shadow angle: sun's azimuth less that of the wall's normal, within ±π/2 of it
 * @returns             0..π/2; NaN when the sun is not in front of the wall or not up
 */
export function profileAngle_rad(altitude_rad: number, across_rad: number): number {
  const front = maths.cos(across_rad);
  if (!(front > 0 && altitude_rad > 0)) return Number.NaN;
  return maths.atan2(maths.tan(altitude_rad), front);
}

/**
 * Depth of an overhang that just shades a window from head to sill. P = (H + e) / tan VSA.
 * @param height_m  of the window
 * @param above_m   from its head up to the overhang, 0 or more
 */
export const overhangDepth_m = (height_m: number, above_m: number, profile_rad: number): number =>
  (height_m + above_m) / maths.tan(profile_rad);

/**
 * How far below the head the shadow's edge of an overhang falls [m]; below 0 it stays above the head.
 * @param depth_m how far it projects
 */
export const overhangDrop_m = (depth_m: number, above_m: number, profile_rad: number): number =>
  depth_m * maths.tan(profile_rad) - above_m;

/** Depth of a fin beside the jamb that just shades the whole width of a window. P = (W + e) / tan |HSA|. */
export const finDepth_m = (width_m: number, gap_m: number, across_rad: number): number =>
  (width_m + gap_m) / maths.tan(Math.abs(across_rad));

/** How far an overhang must run on past the window on the sun's side to act as an endless one [m]. */
export const sideRun_m = (depth_m: number, across_rad: number): number => depth_m * maths.tan(Math.abs(across_rad));
