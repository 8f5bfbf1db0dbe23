import { type Columns, turnOf } from './skyline-columns.ts';

// Bounds on what groups of receptors see between two turns. Turns may run past 4, or start below 0; columns wrap.

/**
 * The least and the most turn of the directions in a box that does not hold the origin; the most may pass 4. In one quarter
 * two corners decide, else all four are asked.
 */
export function turnRange(range: Float64Array, dx0: number, dx1: number, dy0: number, dy1: number): void {
  if ((dx0 > 0 || dx1 < 0) && (dy0 > 0 || dy1 < 0)) {
    // Anticlockwise is towards −x above the x axis and towards +x below it, towards +y right of the y axis and −y left of it.
    const least = turnOf(dy0 > 0 ? dx1 : dx0, dx0 > 0 ? dy0 : dy1);
    range[0] = least;
    range[1] = turnOf(dy0 > 0 ? dx0 : dx1, dx0 > 0 ? dy1 : dy0);
    return;
  }
  const t0 = turnOf(dx0, dy0);
  const t1 = unwrap(turnOf(dx1, dy0), t0);
  const t2 = unwrap(turnOf(dx0, dy1), t0);
  const t3 = unwrap(turnOf(dx1, dy1), t0);
  const least = Math.min(t0, t1, t2, t3);
  const up = least < 0 ? 4 : 0;
  range[0] = least + up;
  range[1] = Math.max(t0, t1, t2, t3) + up;
}

/** The turn of `turn`, brought to within half a circle of `near`. */
const unwrap = (turn: number, near: number): number =>
  turn - near > 2 ? turn - 4 : turn - near < -2 ? turn + 4 : turn;

/** Columns between two turns that a wall covers from end to end hide at least what it hides at their edges. */
export function raiseHidden(
  hidden: Float64Array,
  columns: Columns,
  from: number,
  to: number,
  kx: number,
  ky: number,
): void {
  const { count, ux, uy } = columns;
  const first = Math.ceil((from * count) / 4);
  const n = Math.floor((to * count) / 4) - first;
  let c = first - count * Math.floor(first / count);
  for (let i = 0; i < n; i++) {
    const low = Math.min(kx * ux[c]! + ky * uy[c]!, kx * ux[c + 1]! + ky * uy[c + 1]!);
    if (low > hidden[c]!) hidden[c] = low;
    if (++c === count) c = 0;
  }
}

/** Whether anything between two turns that rises to a cosine over azimuth may stand above what is hidden anyway. */
export function mayRise(
  hidden: Float64Array,
  columns: Columns,
  from: number,
  to: number,
  kx: number,
  ky: number,
): boolean {
  const { count, ux, uy, bulge } = columns;
  const first = Math.floor((from * count) / 4);
  const n = Math.min(count, Math.floor((to * count) / 4) - first + 1);
  let c = first - count * Math.floor(first / count);
  for (let i = 0; i < n; i++) {
    if (Math.max(kx * ux[c]! + ky * uy[c]!, kx * ux[c + 1]! + ky * uy[c + 1]!) * bulge > hidden[c]!) return true;
    if (++c === count) c = 0;
  }
  return false;
}

/** Whether anything between two turns that rises to one altitude may stand above what is hidden anyway. */
export function mayStand(hidden: Float64Array, columns: Columns, from: number, to: number, tan: number): boolean {
  const { count } = columns;
  const first = Math.floor((from * count) / 4);
  const n = Math.min(count, Math.floor((to * count) / 4) - first + 1);
  let c = first - count * Math.floor(first / count);
  for (let i = 0; i < n; i++) {
    if (tan > hidden[c]!) return true;
    if (++c === count) c = 0;
  }
  return false;
}
