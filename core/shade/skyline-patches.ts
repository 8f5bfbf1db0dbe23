import { openRun, rankOf, SLACK, type Skyline } from './skyline.ts';
import { DISC, type Occluders } from './skyline-occluders.ts';
import { clearTrace, type PatchScratch, tracePatch } from './skyline-patch-trace.ts';
import { fillShelter, isSheltered, type Shelter } from './skyline-shelter.ts';

/**
 * What a flat convex patch in space hides: undersides and walls of floating solids, overhangs, fins, blades. Seen from a
 * point its edges are great circles, so over azimuth their altitudes are cosines, and in one column of azimuth a patch hides
 * one stretch of altitude. Where the patch spans a column, the samples that certainly lie inside or outside are found by
 * altitude; the few between are tested one by one against the planes through the point and the patch's edges. Exact, as in
 * `raiseWalls`, after which this is to be called.
 *
 * @param list  numbers of patches; those below what walls hide anyway are passed over
 */
export function hidePatches(
  s: Skyline,
  p: PatchScratch,
  shelter: Shelter,
  o: Occluders,
  list: Uint32Array,
  n: number,
  x: number,
  y: number,
  z: number,
): void {
  fillShelter(shelter, s.sure);
  for (let k = 0; k < n; k++) {
    const patch = list[k]!;
    if (isSheltered(shelter, o.patchDisc, patch * DISC, x, y, z)) continue;
    hidePatch(s, p, o.corners, o.patchCorner[patch]!, o.patchCorner[patch + 1]!, x, y, z);
  }
}

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
