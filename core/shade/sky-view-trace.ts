import * as maths from '../maths/maths.ts';
import { LISTED } from './skyline.ts';
import { type Columns, makeColumns } from './skyline-columns.ts';
import type { Shortlist } from './skyline-cull.ts';
import { DISC, type Occluders } from './skyline-occluders.ts';
import { clearTrace, makePatchScratch, type PatchScratch, tracePatch } from './skyline-patch-trace.ts';
import { fillShelter, isSheltered, makeShelter, type Shelter } from './skyline-shelter.ts';

/**
 * The dome cut by upright half-planes through a point, one an azimuth ray. On each ray the stretches of altitude that stand
 * open are exact; between rays the dome is taken to be as on the nearest one. So a share of the dome errs by what happens
 * between two rays: for a step in the skyline, by half a ray's width at most, and with either sign.
 */
export type SkyRays = {
  readonly columns: Columns;
  /** Angle of the dome that a ray stands for [rad]; together 2π. */
  readonly width_rad: Float64Array;
};

/** Rays enough that one stray step in the skyline shifts a share by less than 0.0002: for single points. */
export const RAYS_OF_A_POINT = 2880;
/** For maps, where a thousand receptors want an answer at once: a step may shift a share by 0.001. */
export const RAYS_OF_A_MAP = 480;

export function makeSkyRays(count: number): SkyRays {
  const columns = makeColumns(count);
  const { ux, uy } = columns;
  const width_rad = new Float64Array(count);
  for (let c = 0; c < count; c++) {
    const w = maths.atan2(ux[c]! * uy[c + 1]! - uy[c]! * ux[c + 1]!, ux[c]! * ux[c + 1]! + uy[c]! * uy[c + 1]!);
    width_rad[c]! += w / 2;
    width_rad[(c + 1) % count]! += w / 2;
  }
  return { columns, width_rad };
}

/** What stands before one point, ray by ray. Altitudes as tangents. */
export type SkyTrace = {
  readonly rays: SkyRays;
  /** Everything below is hidden. */
  readonly horizon: Float64Array;
  /** Stretches hidden higher up: chains by ray, `head[ray]` the first, −1 for none. */
  readonly head: Int32Array;
  next: Int32Array;
  low: Float64Array;
  high: Float64Array;
  used: number;
  readonly patches: PatchScratch;
  readonly shelter: Shelter;
  /** The open stretches of the ray last asked for, from and to in turn. */
  open: Float64Array;
};

export function makeSkyTrace(rays: SkyRays): SkyTrace {
  const { count } = rays.columns;
  return {
    rays,
    horizon: new Float64Array(count),
    head: new Int32Array(count),
    next: new Int32Array(64),
    low: new Float64Array(64),
    high: new Float64Array(64),
    used: 0,
    patches: makePatchScratch(count),
    shelter: makeShelter(count),
    open: new Float64Array(16),
  };
}

/** Traces everything of a shortlist, as seen from a point. */
export function traceSky(t: SkyTrace, o: Occluders, list: Shortlist, x: number, y: number, z: number): void {
  t.horizon.fill(0);
  t.head.fill(-1);
  t.used = 0;
  traceWalls(t, list, x, y, z);
  if (list.patchCount > 0) fillShelter(t.shelter, t.horizon);
  for (let k = 0; k < list.patchCount; k++) {
    const patch = list.patchId[k]!;
    if (isSheltered(t.shelter, o.patchDisc, patch * DISC, x, y, z)) continue;
    tracePatchOnRays(t, o.corners, o.patchCorner[patch]!, o.patchCorner[patch + 1]!, x, y, z);
  }
}

function traceWalls(t: SkyTrace, list: Shortlist, x: number, y: number, z: number): void {
  const { count, ux, uy } = t.rays.columns;
  const { horizon } = t;
  const { walls } = list;
  const quarter = count / 4;
  for (let w = 0; w < list.wallCount; w++) {
    const o = w * LISTED;
    const ax = walls[o]! - x;
    const ay = walls[o + 1]! - y;
    const bx = walls[o + 2]! - x;
    const by = walls[o + 3]! - y;
    const h = walls[o + 4]! - z;
    const twice = ax * by - ay * bx;
    if (!(twice < 0 && h > 0)) continue;
    const k = h / twice;
    const kx = (by - ay) * k;
    const ky = (ax - bx) * k;
    const fb = bx / (Math.abs(bx) + Math.abs(by));
    const fa = ax / (Math.abs(ax) + Math.abs(ay));
    const first = ((by >= 0 ? 1 - fb : 3 + fb) * quarter) | 0;
    let last = ((ay >= 0 ? 1 - fa : 3 + fa) * quarter) | 0;
    if (last < first) last += count;
    for (let j = first + 1; j <= last; j++) {
      const c = j >= count ? j - count : j;
      const rise = kx * ux[c]! + ky * uy[c]!;
      if (rise > horizon[c]!) horizon[c] = rise;
    }
  }
}

function tracePatchOnRays(
  t: SkyTrace,
  corners: Float64Array,
  from: number,
  to: number,
  x: number,
  y: number,
  z: number,
): void {
  const p = t.patches;
  const touched = tracePatch(t.rays.columns, p, corners, from, to, x, y, z);
  for (let k = 0; k < touched; k++) {
    const c = p.list[k]!;
    const passes = p.passes[c]!;
    if (passes === 0) continue;
    // One pass only: the patch reaches on to the point straight above, or straight below.
    const low = passes === 1 && p.nadir ? -Infinity : p.low[c]!;
    const high = passes === 1 && p.zenith ? Infinity : p.high[c]!;
    if (high > 0) addStretch(t, c, low, high);
  }
  clearTrace(t.rays.columns, p, touched);
}

/** Adds a hidden stretch to a ray's chain, which is kept in the order of its lower ends. */
function addStretch(t: SkyTrace, c: number, low: number, high: number): void {
  if (t.used === t.next.length) {
    t.next = grow(t.next, new Int32Array(2 * t.used));
    t.low = grow(t.low, new Float64Array(2 * t.used));
    t.high = grow(t.high, new Float64Array(2 * t.used));
  }
  const at = t.used++;
  t.low[at] = low;
  t.high[at] = high;
  let before = -1;
  let after = t.head[c]!;
  while (after >= 0 && t.low[after]! < low) {
    before = after;
    after = t.next[after]!;
  }
  t.next[at] = after;
  if (before < 0) t.head[c] = at;
  else t.next[before] = at;
}

function grow<T extends Int32Array | Float64Array>(old: T, larger: T): T {
  larger.set(old);
  return larger;
}

/** The open stretches of a ray, as tangents in `t.open`, from and to in turn, lowest first. @returns how many */
export function openStretches(t: SkyTrace, c: number): number {
  let from = t.horizon[c]!;
  let n = 0;
  for (let at = t.head[c]!; at >= 0; at = t.next[at]!) {
    if (2 * n + 4 > t.open.length) t.open = grow(t.open, new Float64Array(2 * t.open.length));
    if (t.low[at]! > from) {
      t.open[2 * n] = from;
      t.open[2 * n + 1] = t.low[at]!;
      n++;
    }
    if (t.high[at]! > from) from = t.high[at]!;
  }
  if (from < Infinity) {
    t.open[2 * n] = from;
    t.open[2 * n + 1] = Infinity;
    n++;
  }
  return n;
}
