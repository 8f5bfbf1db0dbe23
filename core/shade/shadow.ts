import type { Region } from '../plane/region.ts';

/** A region of the plane: an outer ring (anticlockwise) with its holes (clockwise), in metres of drawing axes (x, y). */
export type { Region };

/** Shadow on level ground at one moment. Ground under a building that stands at that stage is not ground and never counts. */
export type GroundShadow = {
  readonly regions: readonly Region[];
  readonly area_m2: number;
};

/**
 * Before, after and the difference at one moment. `added` lies in shadow after and lay in sun before; `gained` the reverse.
 * Ground that a removed building covered was never in sun, so it counts in neither.
 */
export type ShadowChange = {
  readonly before: GroundShadow;
  readonly after: GroundShadow;
  readonly added: GroundShadow;
  readonly gained: GroundShadow;
};
