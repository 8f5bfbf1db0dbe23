import type { Panel, Shader, Solid } from '../form/model.ts';
import { MOST_CUT_CORNERS } from '../plane/patches.ts';
import { dot, minus, type Point, type Vec3 } from '../plane/vec.ts';
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

/** A flat convex polygon in panel axes, three numbers a corner, and where it is swept to. */
type Swept = { readonly corners: readonly number[]; readonly sweep: Vec3 };
type Bounds = [number, number, number, number];

/**
 * Everything that can hide the sky from a rectangle of a panel, up to its `width_m` and `height_m`.
 * @param panel   upright, or level and looking up
 * @param solids  those that stand
 */
export function hidersOf(panel: Panel, solids: readonly Solid[], shaders: readonly Shader[]): Hiders {
  const swept: Swept[] = [];
  for (const shader of shaders) addSheet(panel, shader, swept);
  const addSolid = isUpright(panel) ? addToWall : addToRoof;
  for (const solid of solids) addSolid(panel, solid, swept);
  return packed(panel, swept);
}

/** A point of the drawing in the axes of a panel [m]. */
export const inPanel = (panel: Panel, p: Vec3): Vec3 => {
  const v = minus(p, panel.origin);
  return [dot(v, panel.right), dot(v, panel.up), dot(v, panel.normal)];
};

/** Whether a panel stands upright (true) or lies level, looking up (false). @throws {RangeError} for any other tilt */
export function isUpright(panel: Panel): boolean {
  if (Math.abs(panel.normal[2]) < 1e-9) return true;
  if (panel.normal[2] > 1 - 1e-9) return false;
  throw new RangeError('shade is worked out on upright and on level planes only');
}

/** Below the ground nothing is seen; a panel below it looks out of a pit of its own depth. */
const lowest = (panel: Panel, solid: Solid): number => Math.max(solid.base_m, Math.min(0, panel.origin[2]));

/** The part of a solid's convex pieces in front of a wall: their bases, swept upwards. */
function addToWall(panel: Panel, solid: Solid, swept: Swept[]): void {
  const base = lowest(panel, solid);
  if (!(solid.top_m > base)) return;
  const [ox, oy, oz] = panel.origin;
  const [rx, ry] = panel.right;
  const [nx, ny] = panel.normal;
  for (const piece of solid.pieces) {
    const corners: number[] = [];
    let reach = 0;
    let last = piece[piece.length - 1] as Point;
    let lastOff = (last[0] - ox) * nx + (last[1] - oy) * ny;
    for (const p of piece) {
      const off = (p[0] - ox) * nx + (p[1] - oy) * ny;
      if (off * lastOff < 0) {
        const t = lastOff / (lastOff - off);
        const x = last[0] + t * (p[0] - last[0]) - ox;
        const y = last[1] + t * (p[1] - last[1]) - oy;
        corners.push(x * rx + y * ry, base - oz, 0);
      }
      if (off >= 0) corners.push((p[0] - ox) * rx + (p[1] - oy) * ry, base - oz, off);
      if (off > reach) reach = off;
      last = p;
      lastOff = off;
    }
    if (reach > IN_FRONT_m) swept.push({ corners, sweep: [0, solid.top_m - base, 0] });
  }
}

/** The part of a solid above a level plane. */
function addToRoof(panel: Panel, solid: Solid, swept: Swept[]): void {
  const base = Math.max(lowest(panel, solid), panel.origin[2]);
  if (!(solid.top_m > base + IN_FRONT_m)) return;
  for (const piece of solid.pieces)
    swept.push({
      corners: piece.flatMap((p) => inPanel(panel, [p[0], p[1], base])),
      sweep: [0, 0, solid.top_m - base],
    });
}

/** The part of a sheet in front of the panel's plane. */
function addSheet(panel: Panel, shader: Shader, swept: Swept[]): void {
  const all = shader.corners.map((c) => inPanel(panel, c));
  if (!all.some((c) => c[2] > IN_FRONT_m)) return;
  const corners: number[] = [];
  all.forEach((a, i) => {
    const b = all[(i + 1) % all.length] as Vec3;
    if (a[2] >= 0) corners.push(...a);
    if (a[2] * b[2] < 0) {
      const t = a[2] / (a[2] - b[2]);
      corners.push(a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1]), 0);
    }
  });
  swept.push({ corners, sweep: [0, 0, 0] });
}

function packed(panel: Panel, all: readonly Swept[]): Hiders {
  const rows: { readonly swept: Swept; readonly order: number; readonly bounds: Bounds }[] = [];
  let corners = 0;
  all.forEach((swept, order) => {
    const n = swept.corners.length / 3;
    if (n < 3) return;
    if (n + 2 > MOST_CUT_CORNERS) throw new RangeError(`a convex piece of ${n} corners`);
    const bounds = boundsOf(swept, panel.width_m, panel.height_m);
    if (bounds[0] > bounds[1] || bounds[2] > bounds[3]) return;
    rows.push({ swept, order, bounds });
    corners += n;
  });
  rows.sort((p, q) => q.bounds[3] - p.bounds[3] || p.order - q.order);
  const out: Hiders = {
    count: rows.length,
    bounds: new Float64Array(4 * rows.length),
    start: new Int32Array(rows.length + 1),
    corners: new Float64Array(3 * corners),
    sweep: new Float64Array(3 * rows.length),
    facing: new Float64Array(3 * rows.length),
  };
  let at = 0;
  rows.forEach(({ swept, bounds }, i) => {
    out.bounds.set(bounds, 4 * i);
    out.corners.set(swept.corners, 3 * at);
    at += swept.corners.length / 3;
    out.start[i + 1] = at;
    out.sweep.set(swept.sweep, 3 * i);
    out.facing.set(areaVector(swept.corners), 3 * i);
  });
  return out;
}

/**
 * The slopes for which the image of a swept polygon can touch the rectangle from (0, 0) to (width, height). It reaches
 * x ≤ width where some corner has x − z·a ≤ width, that is from the least (x − width) / z on; and likewise the others.
 */
function boundsOf({ corners, sweep }: Swept, width: number, height: number): Bounds {
  let [a0, a1, b0, b1] = [Infinity, -Infinity, Infinity, -Infinity];
  const ends = sweep[1] === 0 && sweep[2] === 0 ? 1 : 2;
  for (let end = 0; end < ends; end++)
    for (let k = 0; k < corners.length; k += 3) {
      const x = corners[k]! + end * sweep[0];
      const y = corners[k + 1]! + end * sweep[1];
      const z = corners[k + 2]! + end * sweep[2];
      a0 = Math.min(a0, leastSlope(x - width, z));
      a1 = Math.max(a1, -leastSlope(-x, z));
      b0 = Math.min(b0, leastSlope(y - height, z));
      b1 = Math.max(b1, -leastSlope(-y, z));
    }
  return [a0, a1, b0, b1];
}

/** The slope from which on x − z·slope ≤ 0; on the plane itself always or never. */
const leastSlope = (x: number, z: number): number => (z > 0 ? x / z : x <= 0 ? -Infinity : Infinity);

/** Half the sum of the cross products round a flat polygon: its normal times its area. @see M. E. Newell (1972) */
function areaVector(c: readonly number[]): Vec3 {
  let [x, y, z] = [0, 0, 0];
  for (let k = 6; k < c.length; k += 3) {
    const [ax, ay, az] = [c[k - 3]! - c[0]!, c[k - 2]! - c[1]!, c[k - 1]! - c[2]!];
    const [bx, by, bz] = [c[k]! - c[0]!, c[k + 1]! - c[1]!, c[k + 2]! - c[2]!];
    x += (ay * bz - az * by) / 2;
    y += (az * bx - ax * bz) / 2;
    z += (ax * by - ay * bx) / 2;
  }
  return [x, y, z];
}
