import type { Hiders } from './hiders.ts';

/**
 * The outline of the shadow that one hider throws on its panel's plane: the hull of its polygon, projected along the ray, at
 * both ends of the sweep. It is found without sorting: walking round the polygon anticlockwise, an edge whose outer side
 * looks along the sweep belongs to the far end, any other to the near end, and a corner between two of different kind gives
 * two corners of the hull.
 * @param a, b  slopes of the ray (see `Hiders`)
 * @param outX, outY  receive the corners, anticlockwise; room for two more than the polygon has
 * @returns how many corners
 */
export function castOutline(
  h: Hiders,
  i: number,
  a: number,
  b: number,
  outX: Float64Array,
  outY: Float64Array,
): number {
  const { start, corners, sweep, facing } = h;
  const from = start[i]!;
  const n = start[i + 1]! - from;
  const vx = sweep[3 * i]! - a * sweep[3 * i + 2]!;
  const vy = sweep[3 * i + 1]! - b * sweep[3 * i + 2]!;
  // Seen along the ray the polygon keeps its direction or is turned over: the sign of its projected area.
  const forward = facing[3 * i]! * a + facing[3 * i + 1]! * b + facing[3 * i + 2]! >= 0;
  const step = forward ? 3 : -3;
  const last = 3 * (from + n - 1);
  let c = forward ? 3 * from : last;
  const z0 = corners[c + 2]!;
  const x0 = corners[c]! - a * z0;
  const y0 = corners[c + 1]! - b * z0;
  const previous = forward ? last : 3 * from;
  const zp = corners[previous + 2]!;
  let far = (x0 - corners[previous]! + a * zp) * vy - (y0 - corners[previous + 1]! + b * zp) * vx < 0;
  let x = x0;
  let y = y0;
  let m = 0;
  for (let k = 0; k < n; k++) {
    let xn = x0;
    let yn = y0;
    if (k < n - 1) {
      c += step;
      const z = corners[c + 2]!;
      xn = corners[c]! - a * z;
      yn = corners[c + 1]! - b * z;
    }
    const next = (xn - x) * vy - (yn - y) * vx < 0;
    if (far) {
      outX[m] = x + vx;
      outY[m++] = y + vy;
      if (!next) {
        outX[m] = x;
        outY[m++] = y;
      }
    } else {
      outX[m] = x;
      outY[m++] = y;
      if (next) {
        outX[m] = x + vx;
        outY[m++] = y + vy;
      }
    }
    far = next;
    x = xn;
    y = yn;
  }
  return m;
}
