import { type Columns, columnOf } from './skyline-columns.ts';

/** Working memory for one patch at a time, seen from one point. */
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
    relative: new Float64Array(3 * 16),
    planes: new Float64Array(3 * 16),
    zenith: false,
    nadir: false,
  };
}

/** Nearer to the plane of a patch than this share of its size, a receptor sees it edge-on, and it hides nothing. */
const EDGE_ON = 1e-9;

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
  for (let i = 0; i < n; i++) {
    const a = 3 * i;
    const b = 3 * ((i + 1) % n);
    const ax = relative[a]!;
    const ay = relative[a + 1]!;
    const bx = relative[b]!;
    const by = relative[b + 1]!;
    const reach = Math.sqrt(ax * ax + ay * ay);
    if (reach > 0) {
      const c = columnOf(count, ax, ay);
      const t = relative[a + 2]! / reach;
      touch(c);
      if (t < cornerLow[c]!) cornerLow[c] = t;
      if (t > cornerHigh[c]!) cornerHigh[c] = t;
    }
    const turn = ax * by - ay * bx;
    if (turn === 0 || reach === 0 || (bx === 0 && by === 0)) continue;
    // Anticlockwise from the first column to the last.
    const first = turn > 0 ? columnOf(count, ax, ay) : columnOf(count, bx, by);
    const last = turn > 0 ? columnOf(count, bx, by) : columnOf(count, ax, ay);
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
