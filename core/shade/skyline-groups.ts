import { IN_FRONT_m } from '../units/tolerance.ts';
import type { Columns } from './skyline-columns.ts';
import {
  type Culler,
  cull,
  fullShortlist,
  makeCuller,
  makeShortlist,
  type ReceptorBox,
  type Shortlist,
} from './skyline-cull.ts';
import { LISTED } from './skyline.ts';
import { type Occluders, WALL } from './skyline-occluders.ts';

/** Places whose sun is asked for: a point and a unit normal each, in drawing axes. */
export type Receptors = {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly z: Float64Array;
  readonly nx: Float64Array;
  readonly ny: Float64Array;
  readonly nz: Float64Array;
};

/** Rows `from` to `to` (exclusive, or the last) of receptors, as columns of their own. */
export function rowsOf(r: Receptors, from: number, to: number): Receptors {
  const rows = (column: Float64Array): Float64Array => column.slice(from, to);
  return { x: rows(r.x), y: rows(r.y), z: rows(r.z), nx: rows(r.nx), ny: rows(r.ny), nz: rows(r.nz) };
}

/** Receptors that share a shortlist at the end; and by how much a group must shrink before its list is shortened again. */
const LEAF = 16;
const SHRINK = 4;

/** What is done with each receptor of one plane. `list` holds what may hide its sky; null for a receptor inside a solid. */
export type Visit = (row: number, list: Shortlist | null) => void;

type Walk = {
  readonly occluders: Occluders;
  readonly receptors: Receptors;
  readonly normal: readonly [number, number, number];
  readonly culler: Culler;
  readonly lists: Shortlist[];
  readonly visit: Visit;
};

/**
 * Walks over receptors that look the same way, neighbours together, and hands each to `visit` with a list of the occluders
 * that can matter to it.
 * @param rows    which receptors; reordered on the way
 * @param lowest  per column, the tangent of the altitude below which nothing is asked
 */
export function visitReceptors(
  o: Occluders,
  columns: Columns,
  lowest: Float64Array,
  r: Receptors,
  rows: Uint32Array,
  visit: Visit,
): void {
  if (rows.length === 0) return;
  const first = rows[0]!;
  const normal = [r.nx[first]!, r.ny[first]!, r.nz[first]!] as const;
  const walk: Walk = {
    occluders: o,
    receptors: r,
    normal,
    culler: makeCuller(o, lowest, columns, normal),
    lists: [],
    visit,
  };
  split(walk, rows, 0, rows.length, fullShortlist(o), rows.length * SHRINK, 0);
}

/** Rows grouped by equal normals, in order of first appearance. */
export function byNormal(r: Receptors, from: number, to: number): Uint32Array[] {
  const groups = new Map<string, number[]>();
  for (let i = from; i < to; i++) {
    const key = `${r.nx[i]!},${r.ny[i]!},${r.nz[i]!}`;
    const group = groups.get(key);
    if (group) group.push(i);
    else groups.set(key, [i]);
  }
  return [...groups.values()].map((rows) => Uint32Array.from(rows));
}

/** Halves a group of receptors across its longer side until it is small, shortening the list of occluders on the way. */
function split(
  walk: Walk,
  rows: Uint32Array,
  lo: number,
  hi: number,
  list: Shortlist,
  listFor: number,
  depth: number,
): void {
  const n = hi - lo;
  const box = boxOf(walk, rows, lo, hi);
  let short = list;
  let size = listFor;
  let level = depth;
  if (n <= LEAF || n * SHRINK <= listFor) {
    walk.lists[level] ??= makeShortlist(walk.occluders);
    short = walk.lists[level]!;
    cull(walk.culler, list, box, short);
    size = n;
    level++;
  }
  if (n <= LEAF) {
    for (let i = lo; i < hi; i++) one(walk, rows[i]!, short);
    return;
  }
  const { x, y, z } = walk.receptors;
  const dx = box.x1 - box.x0;
  const dy = box.y1 - box.y0;
  const dz = box.z1 - box.z0;
  const mid = (lo + hi) >> 1;
  select(rows, dx >= dy && dx >= dz ? x : dy >= dz ? y : z, lo, hi - 1, mid);
  split(walk, rows, lo, mid, short, size, level);
  split(walk, rows, mid, hi, short, size, level);
}

function boxOf(walk: Walk, rows: Uint32Array, lo: number, hi: number): ReceptorBox {
  const { x, y, z } = walk.receptors;
  const [nx, ny, nz] = walk.normal;
  const box: ReceptorBox = {
    x0: Infinity,
    x1: -Infinity,
    y0: Infinity,
    y1: -Infinity,
    z0: Infinity,
    z1: -Infinity,
    plane: Infinity,
  };
  for (let i = lo; i < hi; i++) {
    const row = rows[i]!;
    const px = x[row]!;
    const py = y[row]!;
    const pz = z[row]!;
    if (px < box.x0) box.x0 = px;
    if (px > box.x1) box.x1 = px;
    if (py < box.y0) box.y0 = py;
    if (py > box.y1) box.y1 = py;
    if (pz < box.z0) box.z0 = pz;
    if (pz > box.z1) box.z1 = pz;
    const along = nx * px + ny * py + nz * pz;
    if (along < box.plane) box.plane = along;
  }
  return box;
}

/** Brings the k-th smallest of rows lo..hi by a coordinate to its place, smaller ones before it (Hoare's selection). */
function select(rows: Uint32Array, by: Float64Array, lo: number, hi: number, k: number): void {
  while (lo < hi) {
    const pivot = by[rows[(lo + hi) >> 1]!]!;
    let i = lo;
    let j = hi;
    while (i <= j) {
      while (by[rows[i]!]! < pivot) i++;
      while (by[rows[j]!]! > pivot) j--;
      if (i <= j) {
        const t = rows[i]!;
        rows[i] = rows[j]!;
        rows[j] = t;
        i++;
        j--;
      }
    }
    if (k <= j) hi = j;
    else if (k >= i) lo = i;
    else return;
  }
}

/** One receptor: whether it lies in or on a solid, then what is to be done with it. */
function one(walk: Walk, row: number, list: Shortlist): void {
  const { occluders, receptors } = walk;
  const x = receptors.x[row]!;
  const y = receptors.y[row]!;
  const z = receptors.z[row]!;
  const listed = list.wallCount;
  let moved = false;
  let inside = false;
  for (let i = 0; i < list.nearCount && !inside; i++) {
    const s = list.nearId[i]!;
    if (occluders.solidBase[s]! > z || occluders.solidTop[s]! <= z) continue;
    const touch = touching(occluders, s, x, y);
    if (touch === 'inside') inside = true;
    else if (touch !== null) {
      shift(occluders, list, s, touch[0], touch[1]);
      moved = true;
    }
  }
  walk.visit(row, inside ? null : list);
  if (moved) restore(occluders, list, listed);
}

/**
 * Whether a point lies inside a solid's outline, or on it. On it, it counts as standing just outside: the answer is the way
 * in which the solid has to be moved, away from the point, for that to be so.
 */
function touching(o: Occluders, s: number, x: number, y: number): 'inside' | readonly [number, number] | null {
  let inside = false;
  let px = 0;
  let py = 0;
  let on = false;
  for (let w = o.solidWall[s]!; w < o.solidWall[s + 1]!; w++) {
    const at = w * WALL;
    const ax = o.walls[at]!;
    const ay = o.walls[at + 1]!;
    const bx = o.walls[at + 2]!;
    const by = o.walls[at + 3]!;
    const ex = bx - ax;
    const ey = by - ay;
    if (ay > y !== by > y && x < (ex * (y - ay)) / ey + ax) inside = !inside;
    const run2 = ex * ex + ey * ey;
    const t = Math.min(1, Math.max(0, ((x - ax) * ex + (y - ay) * ey) / run2));
    if (Math.hypot(x - ax - t * ex, y - ay - t * ey) <= IN_FRONT_m) {
      const run = Math.sqrt(run2);
      px += ey / run;
      py -= ex / run;
      on = true;
    }
  }
  if (!on) return inside ? 'inside' : null;
  const n = Math.hypot(px, py);
  return n > 1e-9 ? [(-2 * IN_FRONT_m * px) / n, (-2 * IN_FRONT_m * py) / n] : null;
}

/**
 * Moves the walls of one solid in the list. Where they are not listed, because the solid floats over other receptors of the
 * box, they are added: this receptor touches them.
 */
function shift(o: Occluders, list: Shortlist, s: number, dx: number, dy: number): void {
  let listed = false;
  for (let i = 0; i < list.wallCount; i++) {
    if (o.wallSolid[list.wallId[i]!] !== s) continue;
    listed = true;
    placeWall(o, list, i, dx, dy);
  }
  if (listed) return;
  for (let w = o.solidWall[s]!; w < o.solidWall[s + 1]!; w++) {
    list.wallId[list.wallCount] = w;
    placeWall(o, list, list.wallCount++, dx, dy);
  }
}

/** Writes one wall into the list, moved. */
function placeWall(o: Occluders, list: Shortlist, i: number, dx: number, dy: number): void {
  const at = list.wallId[i]! * WALL;
  const l = i * LISTED;
  list.walls[l] = o.walls[at]! + dx;
  list.walls[l + 1] = o.walls[at + 1]! + dy;
  list.walls[l + 2] = o.walls[at + 2]! + dx;
  list.walls[l + 3] = o.walls[at + 3]! + dy;
  list.walls[l + 4] = o.walls[at + 5]!;
}

/** Puts the listed walls back where they stand, and takes added ones out. */
function restore(o: Occluders, list: Shortlist, count: number): void {
  list.wallCount = count;
  for (let i = 0; i < count; i++) placeWall(o, list, i, 0, 0);
}
