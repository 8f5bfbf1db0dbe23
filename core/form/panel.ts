import * as maths from '../maths/maths.ts';
import type { Point, Ring, Vec3 } from '../plane/vec.ts';
import { DEG, wrap360 } from '../units/angle.ts';
import type { Panel } from './model.ts';

/** An upright face over one edge of an outline, before it is cut down to a window. */
export type Edge = { readonly start: Point; readonly end: Point };

/** Edge n of an outline: from corner n to corner n + 1. @throws {RangeError} when the outline has no such edge */
export function edgeOf(ring: Ring, n: number): Edge {
  const start = ring[n];
  const end = ring[(n + 1) % ring.length];
  if (start === undefined || end === undefined) throw new RangeError(`an outline of ${ring.length} has no edge ${n}`);
  return { start, end };
}

/**
 * A rectangle in the upright plane over an edge of an anticlockwise outline.
 *
 * The inside of such an outline lies to the left of the running edge, so the outward normal is to its right: (dy, −dx).
 * Whoever stands outside and looks at the wall looks along −normal; their right hand is (−normal) × up = (dx, dy), the
 * running direction. Seen from outside, an edge therefore runs from left to right, and `from` is measured from the left.
 * @param from_m    along the edge from its start to the left side of the rectangle [m]
 * @param bottom_m  height of the lower side [m]
 */
export function wallPanel(edge: Edge, from_m: number, bottom_m: number, width_m: number, height_m: number): Panel {
  const { start, end } = edge;
  const run = Math.hypot(end[0] - start[0], end[1] - start[1]);
  if (!(run > 0)) throw new RangeError('a wall needs a length above 0');
  const dx = (end[0] - start[0]) / run;
  const dy = (end[1] - start[1]) / run;
  return {
    origin: [start[0] + from_m * dx, start[1] + from_m * dy, bottom_m],
    right: [dx, dy, 0],
    up: [0, 0, 1],
    normal: [dy, 0 - dx, 0],
    width_m,
    height_m,
  };
}

/** A rectangle in a flat roof: `at` its corner, turned clockwise about it as a box is. Right × up is straight up. */
export function roofPanel(at: Point, turn_deg: number, level_m: number, width_m: number, height_m: number): Panel {
  const c = maths.cos(turn_deg * DEG);
  const s = maths.sin(turn_deg * DEG);
  return {
    origin: [at[0], at[1], level_m],
    right: [c, 0 - s, 0],
    up: [s, c, 0],
    normal: [0, 0, 1],
    width_m,
    height_m,
  };
}

/** The smallest box round an outline, as a level panel with the axes of the drawing. */
export function levelPanel(outline: Ring, level_m: number): Panel {
  let [x0, y0, x1, y1] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const [x, y] of outline) {
    x0 = Math.min(x0, x);
    x1 = Math.max(x1, x);
    y0 = Math.min(y0, y);
    y1 = Math.max(y1, y);
  }
  return {
    origin: [x0, y0, level_m],
    right: [1, 0, 0],
    up: [0, 1, 0],
    normal: [0, 0, 1],
    width_m: x1 - x0,
    height_m: y1 - y0,
  };
}

/** The point of a panel's axes at x along `right`, y along `up`, z along `normal` [m], in drawing axes. */
export const pointOn = (p: Panel, x: number, y: number, z: number): Vec3 => [
  p.origin[0] + x * p.right[0] + y * p.up[0] + z * p.normal[0],
  p.origin[1] + x * p.right[1] + y * p.up[1] + z * p.normal[1],
  p.origin[2] + x * p.right[2] + y * p.up[2] + z * p.normal[2],
];

/** True azimuth of an upright panel's outward normal [°, 0..360): its bearing in the drawing less `north`. */
export const trueBearing_deg = (normal: Vec3, north_deg: number): number =>
  wrap360(maths.atan2(normal[0], normal[1]) / DEG - north_deg);
