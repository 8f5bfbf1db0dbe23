import { IN_FRONT_m } from '../units/tolerance.ts';
import { LISTED } from './skyline.ts';
import { mayRise, mayStand, raiseHidden, turnRange } from './skyline-bounds.ts';
import type { Columns } from './skyline-columns.ts';
import { DISC, EXTENT, type Occluders, WALL } from './skyline-occluders.ts';

/**
 * Which occluders can matter to a group of receptors that lie in one box and share a plane's direction. Dropped is what
 * stands behind their plane or below them, what turns its back to all of them, and what cannot rise, seen from any of them,
 * above what others hide from all of them. The last is judged column by column of azimuth, from both sides: the least that a wall
 * hides from any receptor of the box, and the most. Dropping changes no result; it only saves work.
 */
export type Shortlist = {
  /** Walls as `raiseWalls` reads them, highest first, and their numbers. */
  readonly walls: Float64Array;
  readonly wallId: Uint32Array;
  wallCount: number;
  readonly patchId: Uint32Array;
  patchCount: number;
  /** Solids that may contain or touch a receptor of the box. */
  readonly nearId: Uint32Array;
  nearCount: number;
};

/** A box round receptors, and how far it lies along their normal (the least). */
export type ReceptorBox = { x0: number; x1: number; y0: number; y1: number; z0: number; z1: number; plane: number };

export type Culler = {
  readonly occluders: Occluders;
  readonly columns: Columns;
  readonly normal: readonly [number, number, number];
  /** How far each solid, and each patch, reaches along the normal. */
  readonly solidReach: Float64Array;
  readonly patchReach: Float64Array;
  /** Per column: the lowest altitude that is asked (tangent); and the least that is hidden from all receptors of the box. */
  readonly lowest: Float64Array;
  readonly hidden: Float64Array;
  /** Per wall of the list at hand: first and last turn, slopes of the upper bound along x and y, its peak. */
  readonly span: Float64Array;
  readonly key: Float64Array;
  /** What `turnRange` answers. */
  readonly range: Float64Array;
  /** 1 for a solid that a receptor of the box may touch: it may have to be moved a hair's breadth, so no bound holds for it. */
  readonly near: Uint8Array;
};

const SPAN = 5;
/** Walls nearer to the box than this are never judged by bounds. */
const TOUCHING_m = 4 * IN_FRONT_m;

export function makeShortlist(o: Occluders): Shortlist {
  const walls = o.wallSolid.length;
  const patches = o.patchCorner.length - 1;
  return {
    walls: new Float64Array(walls * LISTED),
    wallId: new Uint32Array(walls),
    wallCount: 0,
    patchId: new Uint32Array(patches),
    patchCount: 0,
    nearId: new Uint32Array(o.solidCount),
    nearCount: 0,
  };
}

/** Everything, as the list that the first cull starts from. */
export function fullShortlist(o: Occluders): Shortlist {
  const list = makeShortlist(o);
  list.wallCount = list.wallId.length;
  for (let w = 0; w < list.wallCount; w++) list.wallId[w] = w;
  list.patchCount = o.loosePatch.length;
  list.patchId.set(o.loosePatch);
  list.nearCount = o.solidCount;
  for (let i = 0; i < o.solidCount; i++) list.nearId[i] = i;
  return list;
}

export function makeCuller(
  o: Occluders,
  lowest: Float64Array,
  columns: Columns,
  normal: readonly [number, number, number],
): Culler {
  const [nx, ny, nz] = normal;
  const solidReach = new Float64Array(o.solidCount).fill(-Infinity);
  for (let w = 0; w < o.wallSolid.length; w++) {
    const s = o.wallSolid[w]!;
    const r =
      nx * o.walls[w * WALL]! +
      ny * o.walls[w * WALL + 1]! +
      nz * (nz > 0 ? o.walls[w * WALL + 5]! : o.walls[w * WALL + 4]!);
    if (r > solidReach[s]!) solidReach[s] = r;
  }
  const patches = o.patchCorner.length - 1;
  const patchReach = new Float64Array(patches).fill(-Infinity);
  for (let p = 0; p < patches; p++) {
    for (let i = o.patchCorner[p]!; i < o.patchCorner[p + 1]!; i++) {
      const r = nx * o.corners[3 * i]! + ny * o.corners[3 * i + 1]! + nz * o.corners[3 * i + 2]!;
      if (r > patchReach[p]!) patchReach[p] = r;
    }
  }
  return {
    occluders: o,
    columns,
    normal,
    solidReach,
    patchReach,
    lowest,
    hidden: new Float64Array(columns.count),
    span: new Float64Array(Math.max(o.wallSolid.length, 1) * SPAN),
    key: new Float64Array(Math.max(o.wallSolid.length, 1)),
    range: new Float64Array(2),
    near: new Uint8Array(o.solidCount),
  };
}

/** Shortens a list for the receptors of a box. `from` and `to` must be different lists. */
export function cull(k: Culler, from: Shortlist, box: ReceptorBox, to: Shortlist): void {
  k.hidden.set(k.lowest);
  pickNear(k, from, box, to);
  const kept = boundWalls(k, from, box, to);
  to.patchCount = 0;
  pickWalls(k, box, kept, to);
  for (let i = 0; i < from.patchCount; i++) {
    const p = from.patchId[i]!;
    if (patchMatters(k, p, box)) to.patchId[to.patchCount++] = p;
  }
  for (let i = 0; i < to.nearCount; i++) k.near[to.nearId[i]!] = 0;
}

/** First pass: bounds of every wall that faces the box; raises what is hidden from all of it. @returns how many walls are left */
function boundWalls(k: Culler, from: Shortlist, box: ReceptorBox, to: Shortlist): number {
  const o = k.occluders;
  const [nx, ny, nz] = k.normal;
  const { x0, x1, y0, y1, z0, z1 } = box;
  let kept = 0;
  for (let i = 0; i < from.wallCount; i++) {
    const w = from.wallId[i]!;
    const at = w * WALL;
    const top = o.walls[at + 5]!;
    if (top <= z0 || k.solidReach[o.wallSolid[w]!]! <= box.plane + IN_FRONT_m) continue;
    const ax = o.walls[at]!;
    const ay = o.walls[at + 1]!;
    const bx = o.walls[at + 2]!;
    const by = o.walls[at + 3]!;
    const base = o.walls[at + 4]!;
    const ra = nx * ax + ny * ay;
    const rb = nx * bx + ny * by;
    if (Math.max(ra, rb) + nz * (nz > 0 ? top : base) < box.plane - TOUCHING_m) continue;
    const ex = bx - ax;
    const ey = by - ay;
    const run = Math.sqrt(ex * ex + ey * ey);
    // Distance in front of the wall (outwards): least and most over the box.
    const px = ey / run;
    const py = -ex / run;
    const wall = px * ax + py * ay;
    const near = (px > 0 ? px * x0 : px * x1) + (py > 0 ? py * y0 : py * y1) - wall;
    const far = (px > 0 ? px * x1 : px * x0) + (py > 0 ? py * y1 : py * y0) - wall;
    if (far < -TOUCHING_m) continue;
    const s = kept * SPAN;
    to.wallId[kept++] = w;
    k.span[s + 4] = Infinity;
    if (near < TOUCHING_m || k.near[o.wallSolid[w]!] === 1) continue;
    // Turns between which any receptor sees it, and those between which all do: anticlockwise from corner b to corner a.
    turnRange(k.range, bx - x1, bx - x0, by - y1, by - y0);
    const bLeast = k.range[0]!;
    const bMost = k.range[1]!;
    turnRange(k.range, ax - x1, ax - x0, ay - y1, ay - y0);
    const wrap = k.range[0]! < bLeast - 1e-9 ? 4 : 0;
    const aLeast = k.range[0]! + wrap;
    const aMost = k.range[1]! + wrap;
    k.span[s] = bLeast;
    k.span[s + 1] = aMost;
    const lift = (top - z0) / near;
    k.span[s + 2] = -px * lift;
    k.span[s + 3] = -py * lift;
    k.span[s + 4] = lift;
    // A wall is seen under less than half a circle.
    if (base <= z0 && top > z1 && aLeast < bMost + 2) {
      const least = (top - z1) / far;
      raiseHidden(k.hidden, k.columns, bMost, aLeast, -px * least, -py * least);
    }
  }
  return kept;
}

/** Second pass: keeps the walls that may rise above what is hidden, the highest first; those that float over the box as patches. */
function pickWalls(k: Culler, box: ReceptorBox, bounded: number, to: Shortlist): void {
  const o = k.occluders;
  const { span, key } = k;
  let kept = 0;
  for (let i = 0; i < bounded; i++) {
    const w = to.wallId[i]!;
    const s = i * SPAN;
    const peak = span[s + 4]!;
    if (peak < Infinity && !mayRise(k.hidden, k.columns, span[s]!, span[s + 1]!, span[s + 2]!, span[s + 3]!)) continue;
    if (o.walls[w * WALL + 4]! > box.z0) {
      to.patchId[to.patchCount++] = o.wallPatch[w]!;
      continue;
    }
    to.wallId[kept] = w;
    key[kept++] = peak;
  }
  sortByKey(to.wallId, key, kept);
  for (let i = 0; i < kept; i++) {
    const at = to.wallId[i]! * WALL;
    const l = i * LISTED;
    to.walls[l] = o.walls[at]!;
    to.walls[l + 1] = o.walls[at + 1]!;
    to.walls[l + 2] = o.walls[at + 2]!;
    to.walls[l + 3] = o.walls[at + 3]!;
    to.walls[l + 4] = o.walls[at + 5]!;
  }
  to.wallCount = kept;
}

/** Sorts numbers by falling key, in place; a shell sort, for lists of tens to hundreds without any allocation. */
function sortByKey(id: Uint32Array, key: Float64Array, n: number): void {
  for (let gap = n >> 1; gap > 0; gap = gap === 2 ? 1 : Math.floor(gap / 2.2)) {
    for (let i = gap; i < n; i++) {
      const v = id[i]!;
      const kv = key[i]!;
      let j = i;
      while (j >= gap && key[j - gap]! < kv) {
        id[j] = id[j - gap]!;
        key[j] = key[j - gap]!;
        j -= gap;
      }
      id[j] = v;
      key[j] = kv;
    }
  }
}

/** Whether a patch stands in front of the box and may rise above what is hidden anyway. */
function patchMatters(k: Culler, p: number, box: ReceptorBox): boolean {
  const { patchDisc, patchExtent } = k.occluders;
  const top = patchDisc[p * DISC + 3]!;
  if (top <= box.z0 || k.patchReach[p]! <= box.plane + IN_FRONT_m) return false;
  // From the box to the patch: the differences lie in one box again, and where that holds the origin the patch may be overhead.
  const at = p * EXTENT;
  const dx0 = patchExtent[at]! - box.x1;
  const dx1 = patchExtent[at + 1]! - box.x0;
  const dy0 = patchExtent[at + 2]! - box.y1;
  const dy1 = patchExtent[at + 3]! - box.y0;
  if (dx0 <= TOUCHING_m && dx1 >= -TOUCHING_m && dy0 <= TOUCHING_m && dy1 >= -TOUCHING_m) return true;
  const gapX = dx0 > 0 ? dx0 : dx1 < 0 ? -dx1 : 0;
  const gapY = dy0 > 0 ? dy0 : dy1 < 0 ? -dy1 : 0;
  turnRange(k.range, dx0, dx1, dy0, dy1);
  return mayStand(k.hidden, k.columns, k.range[0]!, k.range[1]!, (top - box.z0) / Math.sqrt(gapX * gapX + gapY * gapY));
}

/** Solids that may contain a receptor of the box, or touch one. */
function pickNear(k: Culler, from: Shortlist, box: ReceptorBox, to: Shortlist): void {
  const o = k.occluders;
  to.nearCount = 0;
  for (let i = 0; i < from.nearCount; i++) {
    const s = from.nearId[i]!;
    if (o.solidBase[s]! > box.z1 || o.solidTop[s]! <= box.z0) continue;
    if (k.solidReach[s]! <= box.plane + IN_FRONT_m) continue;
    let x0 = Infinity;
    let x1 = -Infinity;
    let y0 = Infinity;
    let y1 = -Infinity;
    for (let w = o.solidWall[s]!; w < o.solidWall[s + 1]!; w++) {
      const x = o.walls[w * WALL]!;
      const y = o.walls[w * WALL + 1]!;
      if (x < x0) x0 = x;
      if (x > x1) x1 = x;
      if (y < y0) y0 = y;
      if (y > y1) y1 = y;
    }
    if (x0 > box.x1 + IN_FRONT_m || x1 < box.x0 - IN_FRONT_m || y0 > box.y1 + IN_FRONT_m || y1 < box.y0 - IN_FRONT_m)
      continue;
    to.nearId[to.nearCount++] = s;
    k.near[s] = 1;
  }
}
