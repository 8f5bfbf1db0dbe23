import { type Columns, turnOf } from './skyline-columns.ts';
import { DISC, type Occluders } from './skyline-occluders.ts';
import { openRun, rankOf, SLACK, type Skyline } from './skyline.ts';

/**
 * What a flat convex patch in space hides: undersides and walls of floating solids, overhangs, fins, blades. Seen from a
 * point its edges are great circles, so over azimuth their altitudes are cosines, and in one column of azimuth a patch hides
 * one stretch of altitude. Where the patch spans a column, the samples that certainly lie inside or outside are found by
 * altitude; the few between are tested one by one against the planes through the point and the patch's edges. Exact, as in
 * `raiseWalls`.
 */
export type PatchScratch = {
  /** Per edge of a column: lowest and highest altitude (tangent) of the patch there, and how many of its edges pass. */
  readonly low: Float64Array;
  readonly high: Float64Array;
  readonly passes: Uint8Array;
  /** Per column: lowest and highest corner in it. */
  readonly cornerLow: Float64Array;
  readonly cornerHigh: Float64Array;
  readonly touched: Uint8Array;
  readonly list: Uint32Array;
  /** Per band of columns, what walls hide for certain (tangent). */
  readonly shelter: Float64Array;
  /** Corners relative to the receptor, and the normals of the planes through it and each edge; grown as needed. */
  relative: Float64Array;
  planes: Float64Array;
  /** Whether the point straight above, or straight below, lies behind the patch, so that it stands all round. */
  zenith: boolean;
  nadir: boolean;
};

export function makePatchScratch(columns: number): PatchScratch {
  return {
    low: new Float64Array(columns + 1),
    high: new Float64Array(columns + 1),
    passes: new Uint8Array(columns + 1),
    cornerLow: new Float64Array(columns),
    cornerHigh: new Float64Array(columns),
    touched: new Uint8Array(columns),
    list: new Uint32Array(columns),
    shelter: new Float64Array(columns / BAND),
    relative: new Float64Array(3 * 16),
    planes: new Float64Array(3 * 16),
    zenith: false,
    nadir: false,
  };
}

/** Nearer to the plane of a patch than this share of its size, a receptor sees it edge-on, and it hides nothing. */
const EDGE_ON = 1e-9;

/** Hides the samples behind one patch. To be called after `raiseWalls`. */
function hidePatch(
  s: Skyline,
  p: PatchScratch,
  corners: Float64Array,
  from: number,
  to: number,
  x: number,
  y: number,
  z: number,
): void {
  const touched = tracePatch(s.columns, p, corners, from, to, x, y, z);
  for (let k = 0; k < touched; k++) hideInColumn(s, p, to - from, p.list[k]!);
  clearTrace(s.columns, p, touched);
}

/**
 * Where a patch passes the columns' edges, seen from a point: fills `low`, `high`, `passes` for the edges and the corners'
 * altitudes for the columns in between. To be followed by `clearTrace`.
 * @returns how many columns of `list` are touched; 0 where nothing of the patch is above the point, or it is seen edge-on
 */
export function tracePatch(
  columns: Columns,
  p: PatchScratch,
  corners: Float64Array,
  from: number,
  to: number,
  x: number,
  y: number,
  z: number,
): number {
  const n = to - from;
  if (p.relative.length < 3 * n) {
    p.relative = new Float64Array(6 * n);
    p.planes = new Float64Array(6 * n);
  }
  const { relative } = p;
  let above = false;
  for (let i = 0; i < n; i++) {
    const o = 3 * (from + i);
    relative[3 * i] = corners[o]! - x;
    relative[3 * i + 1] = corners[o + 1]! - y;
    relative[3 * i + 2] = corners[o + 2]! - z;
    if (relative[3 * i + 2]! > 0) above = true;
  }
  if (n < 3 || !above || orient(p, n) === 0) return 0;
  p.zenith = true;
  p.nadir = true;
  for (let i = 0; i < n; i++) {
    const mz = p.planes[3 * i + 2]!;
    if (mz < 0) p.zenith = false;
    if (mz > 0) p.nadir = false;
  }
  return traceEdges(columns, p, n);
}

/** Planes through the receptor and each edge, turned so that directions inside the patch lie in front of all. @returns 0 when seen edge-on */
function orient(p: PatchScratch, n: number): number {
  const { relative, planes } = p;
  let nx = 0;
  let ny = 0;
  let nz = 0;
  let size = 0;
  for (let i = 0; i < n; i++) {
    const a = 3 * i;
    const b = 3 * ((i + 1) % n);
    const ax = relative[a]!;
    const ay = relative[a + 1]!;
    const az = relative[a + 2]!;
    const bx = relative[b]!;
    const by = relative[b + 1]!;
    const bz = relative[b + 2]!;
    planes[a] = ay * bz - az * by;
    planes[a + 1] = az * bx - ax * bz;
    planes[a + 2] = ax * by - ay * bx;
    nx += planes[a]!;
    ny += planes[a + 1]!;
    nz += planes[a + 2]!;
    size = Math.max(size, Math.abs(ax) + Math.abs(ay) + Math.abs(az));
  }
  // The sum of the edges' planes is twice the area times the normal: the receptor's own offset cancels round the outline.
  const offset = nx * relative[0]! + ny * relative[1]! + nz * relative[2]!;
  if (!(Math.abs(offset) > EDGE_ON * size * (Math.abs(nx) + Math.abs(ny) + Math.abs(nz)))) return 0;
  const sign = offset > 0 ? 1 : -1;
  if (sign < 0) for (let i = 0; i < 3 * n; i++) planes[i] = -planes[i]!;
  return sign;
}

/** Writes where edges and corners of the patch pass the columns. @returns how many columns are touched */
function traceEdges(columns: Columns, p: PatchScratch, n: number): number {
  const { count, ux, uy } = columns;
  const { relative, planes, low, high, passes, cornerLow, cornerHigh, touched, list } = p;
  let kept = 0;
  const touch = (c: number): void => {
    if (touched[c] === 1) return;
    touched[c] = 1;
    cornerLow[c] = Infinity;
    cornerHigh[c] = -Infinity;
    list[kept++] = c;
  };
  const columnOf = (x: number, y: number): number => {
    const f = x / (Math.abs(x) + Math.abs(y));
    const c = ((y >= 0 ? 1 - f : 3 + f) * (count / 4)) | 0;
    return c < count ? c : 0;
  };
  for (let i = 0; i < n; i++) {
    const a = 3 * i;
    const b = 3 * ((i + 1) % n);
    const ax = relative[a]!;
    const ay = relative[a + 1]!;
    const bx = relative[b]!;
    const by = relative[b + 1]!;
    const reach = Math.sqrt(ax * ax + ay * ay);
    if (reach > 0) {
      const c = columnOf(ax, ay);
      const t = relative[a + 2]! / reach;
      touch(c);
      if (t < cornerLow[c]!) cornerLow[c] = t;
      if (t > cornerHigh[c]!) cornerHigh[c] = t;
    }
    const turn = ax * by - ay * bx;
    if (turn === 0 || reach === 0 || (bx === 0 && by === 0)) continue;
    // Anticlockwise from the first column to the last.
    const first = turn > 0 ? columnOf(ax, ay) : columnOf(bx, by);
    const last = turn > 0 ? columnOf(bx, by) : columnOf(ax, ay);
    const steps = last >= first ? last - first : last - first + count;
    if (steps > count / 2 + 1) continue;
    const kx = -planes[a]! / planes[a + 2]!;
    const ky = -planes[a + 1]! / planes[a + 2]!;
    let c = first;
    touch(c);
    for (let j = 0; j < steps; j++) {
      if (++c === count) c = 0;
      touch(c);
      const t = kx * ux[c]! + ky * uy[c]!;
      if (passes[c] === 0) {
        low[c] = t;
        high[c] = t;
      } else if (t < low[c]!) low[c] = t;
      else if (t > high[c]!) high[c] = t;
      passes[c]!++;
    }
  }
  return kept;
}

/** Leaves the trace clean for the next patch. */
export function clearTrace(columns: Columns, p: PatchScratch, touched: number): void {
  const { count } = columns;
  for (let k = 0; k < touched; k++) {
    const c = p.list[k]!;
    p.touched[c] = 0;
    p.passes[c] = 0;
    p.passes[c + 1 === count ? 0 : c + 1] = 0;
  }
}

/** Hides what a patch hides in one column. */
function hideInColumn(s: Skyline, p: PatchScratch, n: number, c: number): void {
  const { zenith, nadir } = p;
  const { light, floor, ceiling } = s;
  const start = floor[c]!;
  const end = ceiling[c]!;
  if (start >= end) return;
  const { count, bulge } = s.columns;
  const e = c + 1 === count ? 0 : c + 1;
  const round = zenith || nadir;
  // What passes a column's edge: the bottom and the top of the patch; only one of them where it stands all round.
  const want = round ? 1 : 2;
  const whole = p.passes[c] === want && p.passes[e] === want;
  const odd = (p.passes[c] !== 0 && p.passes[c] !== want) || (p.passes[e] !== 0 && p.passes[e] !== want);
  let lowMost = p.cornerLow[c]!;
  let highMost = p.cornerHigh[c]!;
  if (p.passes[c]! > 0) {
    if (p.low[c]! < lowMost) lowMost = p.low[c]!;
    if (p.high[c]! > highMost) highMost = p.high[c]!;
  }
  if (p.passes[e]! > 0) {
    if (p.low[e]! < lowMost) lowMost = p.low[e]!;
    if (p.high[e]! > highMost) highMost = p.high[e]!;
  }
  if (odd || nadir || (round && !whole)) lowMost = -Infinity;
  if (odd || zenith || (round && !whole)) highMost = Infinity;
  const reach = highMost * bulge * (1 + 2 * SLACK);
  const hiddenTo = s.sure[c]! * (1 - SLACK);
  if (!(reach > hiddenTo)) return;
  const { tan } = light;
  const mayFrom = lowMost <= hiddenTo ? start : clamp(rankOf(light, c, lowMost * (1 - SLACK)), start, end);
  const mayTo = reach === Infinity ? end : clamp(rankOf(light, c, reach), start, end);
  if (mayFrom >= mayTo) return;
  let sureFrom = mayTo;
  let sureTo = mayTo;
  if (whole) {
    // Both bounds lie a few samples inside the others: a step or two finds them.
    const low = nadir ? 0 : Math.max(p.low[c]!, p.low[e]!) * bulge * (1 + SLACK);
    const high = zenith ? Infinity : Math.min(p.high[c]!, p.high[e]!) * (1 - SLACK);
    let from = mayFrom;
    while (from < mayTo && tan[from]! < low) from++;
    let to = mayTo;
    while (to > from && tan[to - 1]! >= high) to--;
    if (to > from) {
      sureFrom = from;
      sureTo = to;
    }
  }
  hideRun(s, c, sureFrom, sureTo);
  testRun(s, p, n, c, mayFrom, sureFrom);
  testRun(s, p, n, c, sureTo, mayTo);
}

const clamp = (v: number, from: number, to: number): number => (v < from ? from : Math.min(v, to));

/** Hides a run of ranks: from the bottom or the top of what is still seen by moving that end, else by marks. */
function hideRun(s: Skyline, c: number, from: number, to: number): void {
  if (from >= to) return;
  const { floor, ceiling, mark } = s;
  if (from <= floor[c]!) {
    if (to > floor[c]!) floor[c] = to;
  } else if (to >= ceiling[c]!) {
    if (from < ceiling[c]!) ceiling[c] = from;
  } else {
    openRun(s, c, from, to);
    for (let i = from; i < to; i++) mark[i] = 1;
  }
}

/** Tests ranks one by one against the planes through the patch's edges. */
function testRun(s: Skyline, p: PatchScratch, n: number, c: number, from: number, to: number): void {
  const a = Math.max(from, s.floor[c]!);
  const b = Math.min(to, s.ceiling[c]!);
  if (a >= b) return;
  const { sx, sy, sz } = s.light;
  const { planes } = p;
  let opened = false;
  for (let i = a; i < b; i++) {
    const x = sx[i]!;
    const y = sy[i]!;
    const z = sz[i]!;
    let inside = true;
    for (let k = 0; k < 3 * n && inside; k += 3) inside = planes[k]! * x + planes[k + 1]! * y + planes[k + 2]! * z >= 0;
    if (!inside) continue;
    if (!opened) {
      openRun(s, c, a, b);
      opened = true;
    }
    s.mark[i] = 1;
  }
}

/** Columns in a band of the shelter. */
const BAND = 8;
/** Columns that an angle of one radian spans at the most, as a share of a quarter: turns run fastest along the axes. */
const TURN_PER_RADIAN = 1;

/** Hides the samples behind patches of the occluders, by number. Those that lie below what walls hide anyway are passed over. */
export function hidePatches(
  s: Skyline,
  p: PatchScratch,
  o: Occluders,
  list: Uint32Array,
  n: number,
  x: number,
  y: number,
  z: number,
): void {
  shelterOf(p, s.sure);
  for (let k = 0; k < n; k++) {
    const patch = list[k]!;
    if (isSheltered(p, o.patchDisc, patch * DISC, x, y, z)) continue;
    hidePatch(s, p, o.corners, o.patchCorner[patch]!, o.patchCorner[patch + 1]!, x, y, z);
  }
}

/**
 * What is hidden for certain, band by band: the least of a band's values and of the first after it, so that it holds for
 * values at the columns' edges as for those of whole columns.
 */
export function shelterOf(p: PatchScratch, hidden: Float64Array): void {
  const { shelter } = p;
  const count = hidden.length;
  for (let b = 0; b < shelter.length; b++) {
    const after = (b + 1) * BAND;
    let least = hidden[after === count ? 0 : after]!;
    for (let c = b * BAND; c < after; c++) least = Math.min(least, hidden[c]!);
    shelter[b] = least * (1 - SLACK);
  }
}

/** Whether the cylinder round a patch, seen from the point, stands nowhere above the shelter. `at`: where its disc starts. */
export function isSheltered(
  p: PatchScratch,
  discs: Float64Array,
  at: number,
  x: number,
  y: number,
  z: number,
): boolean {
  const dx = discs[at]! - x;
  const dy = discs[at + 1]! - y;
  const radius = discs[at + 2]!;
  const away = Math.sqrt(dx * dx + dy * dy);
  if (away < 2 * radius) return false;
  const rise = (discs[at + 3]! - z) / (away - radius);
  if (!(rise > 0)) return true;
  // Half the angle that it spans is asin(r / d), which is less than 1.05 r / d from two radii on.
  const half = ((1.05 * radius) / away) * TURN_PER_RADIAN;
  const bands = p.shelter.length;
  const turn = turnOf(dx, dy);
  const first = Math.floor(((turn - half) * bands) / 4);
  const last = Math.floor(((turn + half) * bands) / 4);
  for (let b = first; b <= last; b++) {
    if (rise > p.shelter[b < 0 ? b + bands : b >= bands ? b - bands : b]!) return false;
  }
  return true;
}
