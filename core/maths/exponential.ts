/** ln 2 in two parts: up to 2¹¹ times the first is a double without rounding. */
const LN2_1 = 0.6931471803691238;
const LN2_2 = 1.9082149292705877e-10;
const PER_LN2 = 1 / Math.LN2;
/** Above this the result is no double any more, below the other it is nothing. */
const LARGEST = 709.782712893384;
const SMALLEST = -745.2;

/** A double and its bits; the order of the bytes is said at each use, so that it is the same on every machine. */
const bits = new DataView(new ArrayBuffer(8));

/** 2ⁿ for −1022 ≤ n ≤ 1023. */
function powerOfTwo(n: number): number {
  bits.setInt32(0, (n + 1023) << 20);
  bits.setInt32(4, 0);
  return bits.getFloat64(0);
}

/**
 * e to the power of x, within 1 unit in the last place: x = k ln 2 + r with |r| ≤ ln 2 / 2, and Taylor's series of the rest to r¹³,
 * which leaves out less than 1e-17.
 */
export function exp(x: number): number {
  if (Number.isNaN(x)) return x;
  if (x > LARGEST) return Number.POSITIVE_INFINITY;
  if (x < SMALLEST) return 0;
  const k = Math.round(x * PER_LN2);
  const high = x - k * LN2_1;
  const low = k * LN2_2;
  const r = high - low;
  // What the subtraction rounded away.
  const tail = high - r - low;
  const z = r * r;
  const even = 1 / 2 + z * (1 / 24 + z * (1 / 720 + z * (1 / 40320 + z * (1 / 3628800 + z * (1 / 479001600)))));
  const odd = 1 / 6 + z * (1 / 120 + z * (1 / 5040 + z * (1 / 362880 + z * (1 / 39916800 + z * (1 / 6227020800)))));
  const rest = 1 + (r + (tail + (z * even + z * r * odd)));
  if (k >= -1022 && k <= 1023) return rest * powerOfTwo(k);
  const half = Math.trunc(k / 2);
  return rest * powerOfTwo(half) * powerOfTwo(k - half);
}

/** What a double of the last logarithm leaves out; kept in place, so that no call allocates. */
const logTail = new Float64Array(1);

/**
 * Natural logarithm of x > 0 and finite, its tail left above: x = 2ᵉ m with √½ ≤ m < √2, and ln m = 2 atanh s with s = (m − 1)/(m + 1),
 * by its series to s²¹, which leaves out less than 1e-17 of the value.
 */
function logOf(x: number): number {
  bits.setFloat64(0, x);
  let high = bits.getInt32(0);
  let e = (high >>> 20) - 1023;
  let m = x;
  if (e === -1023) {
    // A number so small that it has no leading bit.
    bits.setFloat64(0, x * 2 ** 54);
    high = bits.getInt32(0);
    e = (high >>> 20) - 1077;
  }
  bits.setInt32(0, (high & 0xfffff) | 0x3ff00000);
  m = bits.getFloat64(0);
  if (m > Math.SQRT2) {
    m *= 0.5;
    e += 1;
  }
  const f = m - 1;
  const s = f / (2 + f);
  const z = s * s;
  const low = 1 / 3 + z * (1 / 5 + z * (1 / 7 + z * (1 / 9 + z * (1 / 11))));
  const up = 1 / 13 + z * (1 / 15 + z * (1 / 17 + z * (1 / 19 + z * (1 / 21))));
  const z5 = z * z * z * z * z;
  // 2s = f − s f, and f is exact: the rounding of the quotient counts only in the small terms.
  const small = s * (f - 2 * z * (low + z5 * up));
  const whole = e * LN2_1;
  const sum = whole + f;
  const lost = whole === 0 ? 0 : f - (sum - whole);
  const rest = lost + (e * LN2_2 - small);
  const value = sum + rest;
  logTail[0] = sum - value + rest;
  return value;
}

/** Natural logarithm, within 1 unit in the last place; −∞ of 0, NaN below it. */
export function log(x: number): number {
  if (Number.isNaN(x) || x < 0) return Number.NaN;
  if (x === 0) return Number.NEGATIVE_INFINITY;
  return x === Number.POSITIVE_INFINITY ? x : logOf(x);
}

/**
 * x to the power of y for x ≥ 0, by exp(y ln x): within |y ln x| + 2 units in the last place, which for the powers of the methods here
 * (|y ln x| below 10) is some 1e-15 of the value.
 */
export function pow(x: number, y: number): number {
  if (y === 0) return 1;
  if (Number.isNaN(x) || x < 0) return Number.NaN;
  if (x === 0) return y > 0 ? 0 : Number.POSITIVE_INFINITY;
  if (x === Number.POSITIVE_INFINITY) return y > 0 ? x : 0;
  const l = logOf(x);
  return exp(y * l) * (1 + y * logTail[0]!);
}
