import { IN_FRONT_m } from '../units/tolerance.ts';
import { type LightColumns, lightOnPlane, type PlaneLight } from './exposure-light.ts';
import { LISTED, listSeen, makeSkyline, raiseWalls, type Skyline, sumSeen } from './skyline.ts';
import { makeColumns } from './skyline-columns.ts';
import {
  type Culler,
  cull,
  fullShortlist,
  makeCuller,
  makeShortlist,
  type ReceptorBox,
  type Shortlist,
} from './skyline-cull.ts';
import { type Occluders, WALL } from './skyline-occluders.ts';
import { hidePatches, makePatchScratch, type PatchScratch } from './skyline-patches.ts';

/** Places whose sun is asked for: a point and a unit normal each, in drawing axes. */
export type Receptors = {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly z: Float64Array;
  readonly nx: Float64Array;
  readonly ny: Float64Array;
  readonly nz: Float64Array;
};

/** Sun on each receptor: columns, one row a receptor. */
export type SunOnReceptors = {
  readonly minutes: Float64Array;
  /** Beam on the receptor's plane [Wh/m²]. */
  readonly beam: Float64Array;
  /** 1 where the receptor lies inside a solid, and so sees nothing. */
  readonly covered: Uint8Array;
};

/** Receptors that share a shortlist at the end; and by how much a group must shrink before its list is shortened again. */
const LEAF = 32;
const SHRINK = 6;

/**
 * Sun time and beam on receptors, each sample exactly hidden or seen (see `skyline.ts`). The result of a receptor does not
 * depend on which others are asked for, so any cut of a long list gives the same numbers.
 * @param from, to  rows to work out, `to` exclusive
 */
export function sunOnReceptors(
  o: Occluders,
  light: LightColumns,
  r: Receptors,
  from = 0,
  to = r.x.length,
): SunOnReceptors {
  const out: SunOnReceptors = {
    minutes: new Float64Array(to - from),
    beam: new Float64Array(to - from),
    covered: new Uint8Array(to - from),
  };
  for (const rows of byNormal(r, from, to)) {
    const first = rows[0]!;
    const job = makeJob(o, light, r, [r.nx[first]!, r.ny[first]!, r.nz[first]!], (row, s) => {
      if (s === null) out.covered[row - from] = 1;
      else {
        sumSeen(s, job.sums, 0);
        out.minutes[row - from] = job.sums[0]!;
        out.beam[row - from] = job.sums[1]!;
      }
    });
    split(job, rows, 0, rows.length, job.full, rows.length * SHRINK, 0);
  }
  return out;
}

/** Which samples of the light one receptor sees: 1 or 0 for each row of the light before it was sorted. */
export function seenSamples(o: Occluders, light: LightColumns, r: Receptors, row: number): Uint8Array {
  const seen = new Uint8Array(light.sx.length);
  const job = makeJob(o, light, r, [r.nx[row]!, r.ny[row]!, r.nz[row]!], (_, s) => {
    if (s !== null) listSeen(s, seen);
  });
  split(job, Uint32Array.of(row), 0, 1, job.full, SHRINK, 0);
  return seen;
}

type Job = {
  readonly occluders: Occluders;
  readonly receptors: Receptors;
  readonly normal: readonly [number, number, number];
  readonly light: PlaneLight;
  readonly skyline: Skyline;
  readonly patches: PatchScratch;
  readonly culler: Culler;
  readonly full: Shortlist;
  readonly lists: Shortlist[];
  readonly sums: Float64Array;
  /** Called for each receptor with its skyline; null for one inside a solid. */
  readonly done: (row: number, s: Skyline | null) => void;
};

function makeJob(
  o: Occluders,
  light: LightColumns,
  r: Receptors,
  normal: readonly [number, number, number],
  done: Job['done'],
): Job {
  const columns = makeColumns(light.count);
  const plane = lightOnPlane(light, normal);
  return {
    occluders: o,
    receptors: r,
    normal,
    light: plane,
    skyline: makeSkyline(plane, columns, o.wallSolid.length),
    patches: makePatchScratch(light.count),
    culler: makeCuller(o, plane, columns, normal),
    full: fullShortlist(o),
    lists: [],
    sums: new Float64Array(2),
    done,
  };
}

/** Rows grouped by equal normals, in order of first appearance. */
function byNormal(r: Receptors, from: number, to: number): Uint32Array[] {
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
  job: Job,
  rows: Uint32Array,
  lo: number,
  hi: number,
  list: Shortlist,
  listFor: number,
  depth: number,
): void {
  const n = hi - lo;
  const box = boxOf(job, rows, lo, hi);
  let short = list;
  let size = listFor;
  let level = depth;
  if (n <= LEAF || n * SHRINK <= listFor) {
    job.lists[level] ??= makeShortlist(job.occluders);
    short = job.lists[level]!;
    cull(job.culler, list, box, short);
    size = n;
    level++;
  }
  if (n <= LEAF) {
    for (let i = lo; i < hi; i++) one(job, rows[i]!, short);
    return;
  }
  const { x, y, z } = job.receptors;
  const dx = box.x1 - box.x0;
  const dy = box.y1 - box.y0;
  const dz = box.z1 - box.z0;
  const mid = (lo + hi) >> 1;
  select(rows, dx >= dy && dx >= dz ? x : dy >= dz ? y : z, lo, hi - 1, mid);
  split(job, rows, lo, mid, short, size, level);
  split(job, rows, mid, hi, short, size, level);
}

function boxOf(job: Job, rows: Uint32Array, lo: number, hi: number): ReceptorBox {
  const { x, y, z } = job.receptors;
  const [nx, ny, nz] = job.normal;
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

/** One receptor: its skyline from a shortlist. */
function one(job: Job, row: number, list: Shortlist): void {
  const { skyline, occluders, receptors } = job;
  const x = receptors.x[row]!;
  const y = receptors.y[row]!;
  const z = receptors.z[row]!;
  let moved = 0;
  for (let i = 0; i < list.nearCount; i++) {
    const s = list.nearId[i]!;
    if (occluders.solidBase[s]! > z || occluders.solidTop[s]! <= z) continue;
    const touch = touching(occluders, s, x, y);
    if (touch === 'inside') {
      restore(occluders, list, moved);
      job.done(row, null);
      return;
    }
    if (touch !== null) {
      shift(occluders, list, s, touch[0], touch[1]);
      moved++;
    }
  }
  raiseWalls(skyline, list.walls, list.wallCount, x, y, z);
  if (list.patchCount > 0) hidePatches(skyline, job.patches, occluders, list.patchId, list.patchCount, x, y, z);
  restore(occluders, list, moved);
  job.done(row, skyline);
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

/** Moves the listed walls of one solid. */
function shift(o: Occluders, list: Shortlist, s: number, dx: number, dy: number): void {
  for (let i = 0; i < list.wallCount; i++) {
    if (o.wallSolid[list.wallId[i]!] !== s) continue;
    const l = i * LISTED;
    list.walls[l]! += dx;
    list.walls[l + 1]! += dy;
    list.walls[l + 2]! += dx;
    list.walls[l + 3]! += dy;
  }
}

/** Puts the listed walls back where they stand. */
function restore(o: Occluders, list: Shortlist, moved: number): void {
  if (moved === 0) return;
  for (let i = 0; i < list.wallCount; i++) {
    const at = list.wallId[i]! * WALL;
    for (let k = 0; k < 4; k++) list.walls[i * LISTED + k] = o.walls[at + k]!;
  }
}
