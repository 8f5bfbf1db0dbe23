import { IN_FRONT_m } from '../units/tolerance.ts';
import { LISTED } from './skyline.ts';
import { type Columns, turnOf } from './skyline-columns.ts';
import { type Occluders, WALL } from './skyline-occluders.ts';

/**
 * Which occluders can matter to a group of receptors that lie in one box and share a plane's direction. Dropped is what
 * stands behind their plane or below them, what turns its back to all of them, and what cannot rise, seen from any of them,
 * above what others hide from all of them. The last is judged in bands of azimuth, from both sides: the least that a wall
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
  readonly patchTop: Float64Array;
  /** Bands: every `stride` columns one. */
  readonly stride: number;
  readonly bulge: number;
  /** Per band: the lowest sample (tangent); and the least that is hidden from all receptors of the box. */
  readonly lowest: Float64Array;
  readonly hidden: Float64Array;
  /** Per wall of the list at hand: first and last turn, slopes of the upper bound along x and y, its peak. */
  readonly span: Float64Array;
  readonly key: Float64Array;
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
  const patchTop = new Float64Array(patches).fill(-Infinity);
  for (let p = 0; p < patches; p++) {
    for (let i = o.patchCorner[p]!; i < o.patchCorner[p + 1]!; i++) {
      const z = o.corners[3 * i + 2]!;
      const r = nx * o.corners[3 * i]! + ny * o.corners[3 * i + 1]! + nz * z;
      if (r > patchReach[p]!) patchReach[p] = r;
      if (z > patchTop[p]!) patchTop[p] = z;
    }
  }
  const stride = columns.count >= 64 ? 4 : 1;
  const bands = columns.count / stride;
  const lowestInBand = new Float64Array(bands).fill(Infinity);
  for (let c = 0; c < columns.count; c++) {
    const b = Math.floor(c / stride);
    if (lowest[c]! < lowestInBand[b]!) lowestInBand[b] = lowest[c]!;
  }
  return {
    occluders: o,
    columns,
    normal,
    solidReach,
    patchReach,
    patchTop,
    stride,
    bulge: 1 / Math.cos(stride * Math.acos(1 / columns.bulge)),
    lowest: lowestInBand,
    hidden: new Float64Array(bands),
    span: new Float64Array(Math.max(o.wallSolid.length, 1) * SPAN),
    key: new Float64Array(Math.max(o.wallSolid.length, 1)),
    near: new Uint8Array(o.solidCount),
  };
}

/** The turn of `turn`, brought to within half a circle of `near`. */
const unwrap = (turn: number, near: number): number =>
  turn - near > 2 ? turn - 4 : turn - near < -2 ? turn + 4 : turn;

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
    if ((ra > rb ? ra : rb) + nz * (nz > 0 ? top : base) < box.plane - TOUCHING_m) continue;
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
    const b0 = turnOf(bx - x0, by - y0);
    const b1 = unwrap(turnOf(bx - x1, by - y0), b0);
    const b2 = unwrap(turnOf(bx - x0, by - y1), b0);
    const b3 = unwrap(turnOf(bx - x1, by - y1), b0);
    const a0 = turnOf(ax - x0, ay - y0);
    const a1 = unwrap(turnOf(ax - x1, ay - y0), a0);
    const a2 = unwrap(turnOf(ax - x0, ay - y1), a0);
    const a3 = unwrap(turnOf(ax - x1, ay - y1), a0);
    const wrap = a0 < b0 ? 4 : 0;
    k.span[s] = Math.min(b0, b1, b2, b3);
    k.span[s + 1] = Math.max(a0, a1, a2, a3) + wrap;
    const lift = (top - z0) / near;
    k.span[s + 2] = -px * lift;
    k.span[s + 3] = -py * lift;
    k.span[s + 4] = lift;
    if (base <= z0 && top > z1) {
      const least = (top - z1) / far;
      raiseHidden(k, Math.max(b0, b1, b2, b3), Math.min(a0, a1, a2, a3) + wrap, -px * least, -py * least);
    }
  }
  return kept;
}

/** Bands between two turns that a wall covers from end to end hide at least what it hides at their edges. */
function raiseHidden(k: Culler, from: number, to: number, kx: number, ky: number): void {
  const { hidden, stride } = k;
  const { ux, uy } = k.columns;
  const bands = hidden.length;
  const first = Math.ceil((from * bands) / 4);
  const last = Math.floor((to * bands) / 4);
  for (let b = first; b < last; b++) {
    const c = ((b % bands) + bands) % bands;
    const t0 = kx * ux[c * stride]! + ky * uy[c * stride]!;
    const t1 = kx * ux[(c + 1) * stride]! + ky * uy[(c + 1) * stride]!;
    const low = t0 < t1 ? t0 : t1;
    if (low > hidden[c]!) hidden[c] = low;
  }
}

/** Whether anything between two turns that rises to a cosine over azimuth may stand above what is hidden anyway. */
function mayRise(k: Culler, from: number, to: number, kx: number, ky: number): boolean {
  const { hidden, stride, bulge } = k;
  const { ux, uy } = k.columns;
  const bands = hidden.length;
  const first = Math.floor((from * bands) / 4);
  const last = Math.floor((to * bands) / 4);
  for (let b = first; b <= last; b++) {
    const c = ((b % bands) + bands) % bands;
    const t0 = kx * ux[c * stride]! + ky * uy[c * stride]!;
    const t1 = kx * ux[(c + 1) * stride]! + ky * uy[(c + 1) * stride]!;
    if ((t0 > t1 ? t0 : t1) * bulge > hidden[c]!) return true;
  }
  return false;
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
    if (peak < Infinity && !mayRise(k, span[s]!, span[s + 1]!, span[s + 2]!, span[s + 3]!)) continue;
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
  const top = k.patchTop[p]!;
  if (top <= box.z0 || k.patchReach[p]! <= box.plane + IN_FRONT_m) return false;
  const { corners, patchCorner } = k.occluders;
  let x0 = Infinity;
  let x1 = -Infinity;
  let y0 = Infinity;
  let y1 = -Infinity;
  for (let i = patchCorner[p]!; i < patchCorner[p + 1]!; i++) {
    const x = corners[3 * i]!;
    const y = corners[3 * i + 1]!;
    if (x < x0) x0 = x;
    if (x > x1) x1 = x;
    if (y < y0) y0 = y;
    if (y > y1) y1 = y;
  }
  // From the box to the patch: the differences lie in one box again, and where that holds the origin the patch may be overhead.
  const dx0 = x0 - box.x1;
  const dx1 = x1 - box.x0;
  const dy0 = y0 - box.y1;
  const dy1 = y1 - box.y0;
  if (dx0 <= TOUCHING_m && dx1 >= -TOUCHING_m && dy0 <= TOUCHING_m && dy1 >= -TOUCHING_m) return true;
  const gapX = dx0 > 0 ? dx0 : dx1 < 0 ? -dx1 : 0;
  const gapY = dy0 > 0 ? dy0 : dy1 < 0 ? -dy1 : 0;
  const t0 = turnOf(dx0, dy0);
  const t1 = unwrap(turnOf(dx1, dy0), t0);
  const t2 = unwrap(turnOf(dx0, dy1), t0);
  const t3 = unwrap(turnOf(dx1, dy1), t0);
  const lift = (top - box.z0) / Math.sqrt(gapX * gapX + gapY * gapY);
  return mayStand(k, Math.min(t0, t1, t2, t3), Math.max(t0, t1, t2, t3), lift);
}

/** Whether anything between two turns that rises to one altitude may stand above what is hidden anyway. */
function mayStand(k: Culler, from: number, to: number, tan: number): boolean {
  const bands = k.hidden.length;
  const first = Math.floor((from * bands) / 4);
  const last = Math.floor((to * bands) / 4);
  for (let b = first; b <= last; b++) if (tan > k.hidden[((b % bands) + bands) % bands]!) return true;
  return false;
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
