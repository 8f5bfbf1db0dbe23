import { LEVELS, type PlaneLight } from './exposure-light.ts';
import type { Columns } from './skyline-columns.ts';

/**
 * The skyline of one receptor over the columns of one plane's light, and which samples it hides.
 *
 * What is exact: each sample is hidden or not by the same half-space tests that a ray cast would make, in double
 * precision. The table decides only which samples need no test of their own. In each column two altitudes are kept: `sure`,
 * below which walls that span the whole column hide everything, and `may`, above which no wall reaches. Samples between the
 * two (at a step of the skyline, or where it slopes) are tested one by one. Nothing is interpolated.
 *
 * Numbers of one wall handed to it: x and y of both corners relative to nothing (drawing axes), and its top.
 */
export type Skyline = {
  readonly light: PlaneLight;
  readonly columns: Columns;
  readonly sure: Float64Array;
  readonly may: Float64Array;
  /** Samples of a column below rank `floor` are hidden, and those from rank `ceiling` on. */
  readonly floor: Uint32Array;
  readonly ceiling: Uint32Array;
  /** Samples whose own mark counts: ranks `openFrom` to `openTo` (exclusive); `mark` is stale elsewhere. */
  readonly openFrom: Uint32Array;
  readonly openTo: Uint32Array;
  readonly mark: Uint8Array;
  /** Walls that raised `may`, for the tests one by one: eight numbers each. */
  readonly raised: Float64Array;
};

/** Numbers of one wall in a list that `raiseWalls` reads: x, y of its corners, top. */
export const LISTED = 5;
const RAISED = 8;
/** Relative slack between the table and the tests one by one, far above rounding and far below any angle that matters. */
export const SLACK = 1e-9;

/** Room for a skyline of up to `walls` listed walls over this light. */
export function makeSkyline(light: PlaneLight, columns: Columns, walls: number): Skyline {
  const n = columns.count;
  return {
    light,
    columns,
    sure: new Float64Array(n),
    may: new Float64Array(n),
    floor: new Uint32Array(n),
    ceiling: new Uint32Array(n),
    openFrom: new Uint32Array(n),
    openTo: new Uint32Array(n),
    mark: new Uint8Array(light.tan.length),
    raised: new Float64Array(walls * RAISED),
  };
}

/** Rank of the first sample of column c, from `from` on, whose altitude reaches a tangent. */
export function rankOf(light: PlaneLight, c: number, tan: number): number {
  const { start, level } = light;
  const tans = light.tan;
  const end = start[c + 1]!;
  if (!(tan > 0)) return start[c]!;
  const l = tan < 1e9 ? ((tan / (1 + tan)) * LEVELS) | 0 : LEVELS;
  let i = level[c * (LEVELS + 1) + l]!;
  while (i < end && tans[i]! < tan) i++;
  return i;
}

/**
 * Works out which samples walls that stand at or below the receptor's height hide. Fills `floor`, `ceiling` and the marks.
 * @param walls  listed walls, `LISTED` numbers each
 * @param n      how many
 */
export function raiseWalls(s: Skyline, walls: Float64Array, n: number, x: number, y: number, z: number): void {
  const { light, columns, sure, may, raised } = s;
  const { count, ux, uy, bulge } = columns;
  const quarter = count / 4;
  sure.set(light.lowest);
  may.fill(0);
  let kept = 0;
  for (let w = 0; w < n; w++) {
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
    let first = ((by >= 0 ? 1 - fb : 3 + fb) * quarter) | 0;
    let last = ((ay >= 0 ? 1 - fa : 3 + fa) * quarter) | 0;
    if (first >= count) first = 0;
    if (last >= count) last = 0;
    let raises = false;
    const turns = last < first ? 2 : 1;
    for (let part = 0; part < turns; part++) {
      const from = part === 0 ? first : 0;
      const to = part === 0 && turns === 2 ? count - 1 : last;
      let t0 = kx * ux[from]! + ky * uy[from]!;
      for (let c = from; c <= to; c++) {
        const t1 = kx * ux[c + 1]! + ky * uy[c + 1]!;
        const high = Math.max(t0, t1) * bulge;
        if (high > sure[c]!) {
          raises = true;
          if (high > may[c]!) may[c] = high;
          if (c !== first && c !== last) {
            const low = Math.min(t0, t1);
            if (low > sure[c]!) sure[c] = low;
          }
        }
        t0 = t1;
      }
    }
    if (raises) {
      const r = kept * RAISED;
      raised[r] = kx;
      raised[r + 1] = ky;
      raised[r + 2] = ax;
      raised[r + 3] = ay;
      raised[r + 4] = bx;
      raised[r + 5] = by;
      raised[r + 6] = first;
      raised[r + 7] = last;
      kept++;
    }
  }
  if (rankColumns(s) > 0) testRaised(s, kept);
}

/** Turns altitudes into ranks, column by column. @returns how many samples need a test of their own */
function rankColumns(s: Skyline): number {
  const { light, sure, may, floor, ceiling, openFrom, openTo, mark } = s;
  const { start, tan, count, level } = light;
  let open = 0;
  for (let c = 0; c < count; c++) {
    const end = start[c + 1]!;
    ceiling[c] = end;
    openTo[c] = 0;
    const low = sure[c]! * (1 - SLACK);
    let i: number;
    if (start[c] === end) i = end;
    else {
      const l = low < 1e9 ? ((low / (1 + low)) * LEVELS) | 0 : LEVELS;
      i = level[c * (LEVELS + 1) + l]!;
      while (i < end && tan[i]! < low) i++;
    }
    floor[c] = i;
    const high = may[c]! * (1 + SLACK);
    let j = i;
    while (j < end && tan[j]! <= high) mark[j++] = 0;
    if (j > i) {
      openFrom[c] = i;
      openTo[c] = j;
      open += j - i;
    }
  }
  return open;
}

/** Tests the open samples against every wall that reaches above what is hidden for certain in their column. */
function testRaised(s: Skyline, kept: number): void {
  const { light, columns, sure, raised, openFrom, openTo, mark } = s;
  const { ux, uy, bulge } = columns;
  const { sx, sy, sz } = light;
  for (let w = 0; w < kept; w++) {
    const r = w * RAISED;
    const kx = raised[r]!;
    const ky = raised[r + 1]!;
    const ax = raised[r + 2]!;
    const ay = raised[r + 3]!;
    const bx = raised[r + 4]!;
    const by = raised[r + 5]!;
    const first = raised[r + 6]!;
    const last = raised[r + 7]!;
    const turns = last < first ? 2 : 1;
    for (let part = 0; part < turns; part++) {
      const to = part === 0 && turns === 2 ? columns.count - 1 : last;
      for (let c = part === 0 ? first : 0; c <= to; c++) {
        const stop = openTo[c]!;
        if (stop === 0) continue;
        const high = Math.max(kx * ux[c]! + ky * uy[c]!, kx * ux[c + 1]! + ky * uy[c + 1]!) * bulge;
        if (high <= sure[c]!) continue;
        for (let i = openFrom[c]!; i < stop; i++) {
          if (mark[i] === 1) continue;
          const px = sx[i]!;
          const py = sy[i]!;
          if (sz[i]! <= kx * px + ky * py && bx * py - by * px >= 0 && px * ay - py * ax >= 0) mark[i] = 1;
        }
      }
    }
  }
}

/** Opens ranks of a column for marks, so that a mark there counts; what was open before keeps its marks. */
export function openRun(s: Skyline, c: number, from: number, to: number): void {
  const { openFrom, openTo, mark } = s;
  if (openTo[c]! <= openFrom[c]! || openTo[c] === 0) {
    openFrom[c] = from;
    openTo[c] = to;
    for (let i = from; i < to; i++) mark[i] = 0;
    return;
  }
  for (let i = from; i < openFrom[c]!; i++) mark[i] = 0;
  for (let i = openTo[c]!; i < to; i++) mark[i] = 0;
  if (from < openFrom[c]!) openFrom[c] = from;
  if (to > openTo[c]!) openTo[c] = to;
}

/** Asks of every sample still seen whether something else hides it, and hides those. */
export function hideSeen(s: Skyline, hides: (sx: number, sy: number, sz: number) => boolean): void {
  const { light, floor, ceiling, mark } = s;
  for (let c = 0; c < light.count; c++) {
    const from = floor[c]!;
    const to = ceiling[c]!;
    if (from >= to) continue;
    openRun(s, c, from, to);
    for (let i = from; i < to; i++) {
      if (mark[i] === 0 && hides(light.sx[i]!, light.sy[i]!, light.sz[i]!)) mark[i] = 1;
    }
  }
}

/** Writes the seen samples' sums: minutes in `out[at]`, beam on the plane in `out[at + 1]`. */
export function sumSeen(s: Skyline, out: Float64Array, at: number): void {
  const { light, floor, ceiling, openFrom, openTo, mark } = s;
  const { count, minutesBefore, beamBefore } = light;
  let minutes = 0;
  let beam = 0;
  for (let c = 0; c < count; c++) {
    const from = floor[c]!;
    const to = ceiling[c]!;
    if (from >= to) continue;
    const marksTo = Math.min(openTo[c]!, to);
    if (marksTo <= from) {
      minutes += minutesBefore[to]! - minutesBefore[from]!;
      beam += beamBefore[to]! - beamBefore[from]!;
      continue;
    }
    // Runs of seen samples, each as long as it can be, so that the sums do not depend on how samples came to be hidden.
    let run = from;
    const marksFrom = Math.max(openFrom[c]!, from);
    for (let i = marksFrom; i < marksTo; i++) {
      if (mark[i] === 0) continue;
      if (i > run) {
        minutes += minutesBefore[i]! - minutesBefore[run]!;
        beam += beamBefore[i]! - beamBefore[run]!;
      }
      run = i + 1;
    }
    if (run < to) {
      minutes += minutesBefore[to]! - minutesBefore[run]!;
      beam += beamBefore[to]! - beamBefore[run]!;
    }
  }
  out[at] = minutes;
  out[at + 1] = beam;
}

/** Marks the seen samples: `seen[source] = 1` for each. Rows not touched keep what they hold. */
export function listSeen(s: Skyline, seen: Uint8Array): void {
  const { light, floor, ceiling, openFrom, openTo, mark } = s;
  for (let c = 0; c < light.count; c++) {
    for (let i = floor[c]!; i < ceiling[c]!; i++) {
      const marked = i >= openFrom[c]! && i < openTo[c]! && mark[i] === 1;
      if (!marked) seen[light.source[i]!] = 1;
    }
  }
}
