import type { Panel, Shader, Solid } from '../form/model.ts';
import { keepSide } from '../plane/half-plane.ts';
import { MOST_CUT_CORNERS } from '../plane/patches.ts';
import { dot, minus, type Point, type Ring, type Vec3 } from '../plane/vec.ts';
import { IN_FRONT_m } from '../units/tolerance.ts';

/**
 * What may stand between a panel and the sky, in the panel's axes (x right, y up, z outwards, from its lower left corner):
 * flat convex polygons, each swept along a straight line. A prism is its base swept up to its top; a sheet is swept by
 * nothing. Cut off at the panel's plane, so that nothing behind it is left.
 *
 * A ray leaves the panel with the slopes a = sx / sz and b = sy / sz of the direction s; a point (x, y, z) hides
 * (x − z·a, y − z·b). `bounds` tells for which slopes a hider can matter at all, as the least and greatest a and b; hiders
 * stand in the order of falling greatest b, so that a loop may stop at the first one that is too low.
 */
export type Hiders = {
  readonly count: number;
  /** Four a hider: least a, greatest a, least b, greatest b. */
  readonly bounds: Float64Array;
  /** Hider i has the corners `start[i]` to `start[i + 1]` (exclusive). */
  readonly start: Int32Array;
  /** Three a corner. */
  readonly corners: Float64Array;
  /** Three a hider: where the sweep leads. */
  readonly sweep: Float64Array;
  /** Three a hider: area vector of the polygon, which tells which way round it looks from any direction. */
  readonly facing: Float64Array;
};

type Swept = { readonly corners: readonly Vec3[]; readonly sweep: Vec3 };

/**
 * Everything that can hide the sky from a rectangle of a panel, up to its `width_m` and `height_m`.
 * @param panel   upright, or level and looking up
 * @param solids  those that stand
 */
export function hidersOf(panel: Panel, solids: readonly Solid[], shaders: readonly Shader[]): Hiders {
  const swept: Swept[] = [];
  for (const shader of shaders) {
    const corners = shader.corners.map((c) => inPanel(panel, c));
    if (corners.some((c) => c[2] > IN_FRONT_m)) swept.push({ corners: keepInFront(corners), sweep: [0, 0, 0] });
  }
  for (const solid of solids) addSolid(panel, solid, swept);
  return packed(panel, swept);
}

/** A point of the drawing in the axes of a panel [m]. */
export const inPanel = (panel: Panel, p: Vec3): Vec3 => {
  const v = minus(p, panel.origin);
  return [dot(v, panel.right), dot(v, panel.up), dot(v, panel.normal)];
};

function addSolid(panel: Panel, solid: Solid, swept: Swept[]): void {
  // Below the ground nothing is seen; a panel below it looks out of a pit of its own depth.
  const base = Math.max(solid.base_m, Math.min(0, panel.origin[2]));
  if (!(solid.top_m > base)) return;
  if (isUpright(panel)) {
    for (const piece of solid.pieces) {
      const off = (p: Point): number =>
        (p[0] - panel.origin[0]) * panel.normal[0] + (p[1] - panel.origin[1]) * panel.normal[1];
      if (!piece.some((p) => off(p) > IN_FRONT_m)) continue;
      swept.push(prism(panel, keepSide(piece, off), base, solid.top_m));
    }
  } else if (solid.top_m > panel.origin[2] + IN_FRONT_m) {
    for (const piece of solid.pieces) swept.push(prism(panel, piece, Math.max(base, panel.origin[2]), solid.top_m));
  }
}

/** Whether a panel stands upright (true) or lies level, looking up (false). @throws {RangeError} for any other tilt */
export function isUpright(panel: Panel): boolean {
  if (Math.abs(panel.normal[2]) < 1e-9) return true;
  if (panel.normal[2] > 1 - 1e-9) return false;
  throw new RangeError('shade is worked out on upright and on level planes only');
}

const prism = (panel: Panel, ring: Ring, base_m: number, top_m: number): Swept => ({
  corners: ring.map((p) => inPanel(panel, [p[0], p[1], base_m])),
  sweep: [0, (top_m - base_m) * panel.up[2], (top_m - base_m) * panel.normal[2]],
});

/** The part of a flat polygon in front of the panel's plane. */
function keepInFront(corners: readonly Vec3[]): readonly Vec3[] {
  const out: Vec3[] = [];
  corners.forEach((a, i) => {
    const b = corners[(i + 1) % corners.length] as Vec3;
    if (a[2] >= 0) out.push(a);
    if (a[2] * b[2] < 0) {
      const t = a[2] / (a[2] - b[2]);
      out.push([a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1]), 0]);
    }
  });
  return out;
}

function packed(panel: Panel, all: readonly Swept[]): Hiders {
  const rows = all
    .filter((s) => s.corners.length >= 3)
    .map((s, order) => ({ ...s, order, bounds: boundsOf(s, panel.width_m, panel.height_m) }))
    .filter(({ bounds: [a0, a1, b0, b1] }) => a0 <= a1 && b0 <= b1)
    .sort((p, q) => q.bounds[3] - p.bounds[3] || p.order - q.order);
  const start = new Int32Array(rows.length + 1);
  rows.forEach((r, i) => {
    if (r.corners.length + 2 > MOST_CUT_CORNERS) throw new RangeError(`a piece of ${r.corners.length} corners`);
    start[i + 1] = (start[i] as number) + r.corners.length;
  });
  return {
    count: rows.length,
    bounds: Float64Array.from(rows.flatMap((r) => r.bounds)),
    start,
    corners: Float64Array.from(rows.flatMap((r) => r.corners.flat())),
    sweep: Float64Array.from(rows.flatMap((r) => r.sweep)),
    facing: Float64Array.from(rows.flatMap((r) => areaVector(r.corners))),
  };
}

/**
 * The slopes for which the image of a swept polygon can touch the rectangle from (0, 0) to (width, height). It reaches
 * x ≤ width where some corner has x − z·a ≤ width, that is from the least (x − width) / z on; and likewise the others.
 */
function boundsOf(s: Swept, width: number, height: number): [number, number, number, number] {
  const bounds: [number, number, number, number] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const c of s.corners)
    for (const [x, y, z] of [c, [c[0] + s.sweep[0], c[1] + s.sweep[1], c[2] + s.sweep[2]] as const]) {
      bounds[0] = Math.min(bounds[0], leastSlope(x - width, z));
      bounds[1] = Math.max(bounds[1], -leastSlope(-x, z));
      bounds[2] = Math.min(bounds[2], leastSlope(y - height, z));
      bounds[3] = Math.max(bounds[3], -leastSlope(-y, z));
    }
  return bounds;
}

/** The slope from which on x − z·slope ≤ 0; on the plane itself always or never. */
const leastSlope = (x: number, z: number): number => (z > 0 ? x / z : x <= 0 ? -Infinity : Infinity);

/** Half the sum of the cross products round a flat polygon: its normal times its area. @see M. E. Newell (1972) */
function areaVector(corners: readonly Vec3[]): [number, number, number] {
  const sum: [number, number, number] = [0, 0, 0];
  const o = corners[0] as Vec3;
  for (let i = 2; i < corners.length; i++) {
    const a = minus(corners[i - 1] as Vec3, o);
    const b = minus(corners[i] as Vec3, o);
    sum[0] += (a[1] * b[2] - a[2] * b[1]) / 2;
    sum[1] += (a[2] * b[0] - a[0] * b[2]) / 2;
    sum[2] += (a[0] * b[1] - a[1] * b[0]) / 2;
  }
  return sum;
}
