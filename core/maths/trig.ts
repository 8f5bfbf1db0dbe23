/** π/2 in three parts: the first two have 33 bits each, so that up to 2²⁰ times either is a double without rounding. */
const HALF_PI_1 = 1.5707963267341256;
const HALF_PI_2 = 6.077100506303966e-11;
const HALF_PI_3 = 2.0222662487959506e-21;
const PER_HALF_PI = 2 / Math.PI;
/** Beyond this many quarter turns the parts above are no longer enough; whole turns are taken off first. */
const MOST_QUARTERS = 2 ** 20;

/** The rest of an angle within ± π/4 of a quarter turn, and what a double of it leaves out; kept in place, so that no call allocates. */
const left = new Float64Array(2);

/** Takes the quarter turns off an angle; leaves the rest above. @returns how many, of which only the last two bits matter */
function quarters(x_rad: number): number {
  let n = Math.round(x_rad * PER_HALF_PI);
  let x = x_rad;
  if (n > MOST_QUARTERS || n < -MOST_QUARTERS) {
    x = x_rad % (2 * Math.PI);
    n = Math.round(x * PER_HALF_PI);
  }
  const first = x - n * HALF_PI_1;
  const second = n * HALF_PI_2;
  const between = first - second;
  // What the subtraction rounded away, and the third part.
  const tail = n * HALF_PI_3 - (first - between - second);
  const rest = between - tail;
  left[0] = rest;
  left[1] = between - rest - tail;
  return n;
}

/** sin(y + t) for |y| ≤ π/4 and a tail t, by Taylor's series to y¹⁷: what is left out is below 1e-19 of the value. */
function sineOf(y: number, tail: number): number {
  const z = y * y;
  const z2 = z * z;
  const low = -1 / 6 + z * (1 / 120) + z2 * (-1 / 5040 + z * (1 / 362880));
  const high = -1 / 39916800 + z * (1 / 6227020800) + z2 * (-1 / 1307674368000 + z * (1 / 355687428096000));
  return y + (tail * (1 - 0.5 * z) + y * z * (low + z2 * z2 * high));
}

/** cos(y + t), likewise, to y¹⁶. */
function cosineOf(y: number, tail: number): number {
  const z = y * y;
  const z2 = z * z;
  const low = 1 / 24 + z * (-1 / 720) + z2 * (1 / 40320 + z * (-1 / 3628800));
  const high = 1 / 479001600 + z * (-1 / 87178291200) + z2 * (1 / 20922789888000);
  const half = 0.5 * z;
  const most = 1 - half;
  // 1 − z/2 rounds; what it lost is put back before the small terms.
  return most + (1 - most - half + (z2 * (low + z2 * z2 * high) - y * tail));
}

/** Sine. @param x_rad any finite angle; beyond a million radians with its own rounding only @returns within 1 unit in the last place */
export function sin(x_rad: number): number {
  // Zero keeps its sign.
  if (x_rad === 0) return x_rad;
  const n = quarters(x_rad);
  const value = n & 1 ? cosineOf(left[0]!, left[1]!) : sineOf(left[0]!, left[1]!);
  return n & 2 ? -value : value;
}

/** Cosine, likewise. */
export function cos(x_rad: number): number {
  const n = quarters(x_rad);
  const value = n & 1 ? sineOf(left[0]!, left[1]!) : cosineOf(left[0]!, left[1]!);
  return (n + 1) & 2 ? -value : value;
}

/** Tangent, likewise, within 2 units in the last place. */
export function tan(x_rad: number): number {
  if (x_rad === 0) return x_rad;
  const n = quarters(x_rad);
  const s = sineOf(left[0]!, left[1]!);
  const c = cosineOf(left[0]!, left[1]!);
  return n & 1 ? -c / s : s / c;
}
