import * as maths from '../maths/maths.ts';

/**
 * The horizon cut into columns of azimuth. Columns are equal in *turn*, a stand-in for the angle that needs one division
 * and no arc tangent: turn = 1 − f above the x axis and 3 + f below it, with f = x / (|x| + |y|). It grows steadily
 * anticlockwise from +x, from 0 to 4, one unit a quarter. A column is between 229°/count and 459°/count wide; nothing that
 * is computed with columns depends on their width, only how long it takes.
 */
export type Columns = {
  readonly count: number;
  /** Unit vectors of the columns' edges, anticlockwise, entry `count` repeating entry 0: column c runs from edge c to c + 1. */
  readonly ux: Float64Array;
  readonly uy: Float64Array;
  /**
   * How far a cosine may rise between the two edges of the widest column above the higher of its two ends: 1 / cos(half the
   * width). What is hidden by a straight edge is a cosine over azimuth, so end values bound a column from both sides.
   */
  readonly bulge: number;
};

/** The turn of a direction, [0, 4]; not a number for the null vector. @see Columns */
export function turnOf(x: number, y: number): number {
  const f = x / (Math.abs(x) + Math.abs(y));
  return y >= 0 ? 1 - f : 3 + f;
}

/** The column in which a direction lies. */
export function columnOf(count: number, x: number, y: number): number {
  const c = Math.floor((turnOf(x, y) * count) / 4);
  return c < count ? c : 0;
}

/** @param count number of columns, a multiple of 8 */
export function makeColumns(count: number): Columns {
  if (!(count >= 8 && count % 8 === 0)) throw new RangeError(`columns come in eights: got ${count}`);
  const ux = new Float64Array(count + 1);
  const uy = new Float64Array(count + 1);
  for (let j = 0; j <= count; j++) {
    const turn = j === count ? 0 : (4 * j) / count;
    const x = turn <= 2 ? 1 - turn : turn - 3;
    const y = turn <= 2 ? 1 - Math.abs(x) : Math.abs(x) - 1;
    const n = Math.hypot(x, y);
    ux[j] = x / n;
    uy[j] = y / n;
  }
  let widest = 0;
  for (let j = 0; j < count; j++) {
    widest = Math.max(
      widest,
      maths.atan2(ux[j]! * uy[j + 1]! - uy[j]! * ux[j + 1]!, ux[j]! * ux[j + 1]! + uy[j]! * uy[j + 1]!),
    );
  }
  return { count, ux, uy, bulge: (1 / maths.cos(widest / 2)) * (1 + 1e-12) };
}
