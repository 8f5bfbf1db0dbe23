import type { Vec3 } from '../plane/vec.ts';
import { dot, minus } from '../plane/vec.ts';
import type { Tree } from '../scheme/schema.ts';
import { seenSamples } from './exposure.ts';
import { facing } from './exposure-grid.ts';
import { columnsFor, sortLight } from './exposure-light.ts';
import type { Occluders } from './skyline-occluders.ts';

/**
 * Direct sun on one point from some directions: 1, 0, or between them what comes through the crowns of trees. Each direction is
 * exactly hidden or seen by solids and devices (see `skyline.ts`), and a crown is met exactly as the ellipsoid that it is
 * (see `crown.ts`); a point inside a crown has it before it whichever way it looks. 0 inside a solid.
 * @param normal  unit normal of the point's plane, any tilt: what is behind the plane does not reach it
 * @param suns    unit vectors in drawing axes, all of them above the horizon
 * @param month   1..12, for the trees
 */
export function pointSun(
  o: Occluders,
  trees: readonly Tree[],
  at: Vec3,
  normal: Vec3,
  suns: readonly Vec3[],
  month: number,
): Float64Array {
  const column = (i: 0 | 1 | 2): Float64Array => Float64Array.from(suns, (s) => s[i]);
  const none = new Float64Array(suns.length);
  const light = { sx: column(0), sy: column(1), sz: column(2), minutes: none, beam: none };
  const seen = seenSamples(o, sortLight(light, columnsFor(suns.length)), facing([at], normal), 0);
  return Float64Array.from(seen, (isSeen, i) => (isSeen === 1 ? throughCrowns(trees, at, suns[i] as Vec3, month) : 0));
}

/** What the crowns between a point and the sun let through, 0..1. */
function throughCrowns(trees: readonly Tree[], at: Vec3, sun: Vec3, month: number): number {
  let share = 1;
  for (const tree of trees) if (isBehindCrown(tree, at, sun)) share *= tree.transmittance[month - 1] ?? 1;
  return share;
}

/** Whether a ray from a point meets a crown: in axes in which the crown is a unit sphere, |p + t·s| = 1 for some t > 0. */
function isBehindCrown(tree: Tree, at: Vec3, sun: Vec3): boolean {
  const rise = (tree.height - tree.trunk) / 2;
  const radius = tree.spread / 2;
  if (!(rise > 0 && radius > 0)) return false;
  const scaled = (v: Vec3): Vec3 => [v[0] / radius, v[1] / radius, v[2] / rise];
  const p = scaled(minus(at, [tree.at[0], tree.at[1], tree.base + tree.trunk + rise]));
  const s = scaled(sun);
  const a = dot(s, s);
  const half = dot(p, s);
  const c = dot(p, p) - 1;
  const root = half * half - a * c;
  return root > 0 && (c < 0 || half < 0);
}
