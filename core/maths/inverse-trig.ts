/** atan(k/8) for k = 0 to 8: the double, and what it leaves out. */
const AT = [
  0, 0.12435499454676144, 0.24497866312686414, 0.35877067027057225, 0.4636476090008061, 0.5585993153435624,
  0.6435011087932844, 0.7188299996216245, 0.7853981633974483,
] as const;
const AT_TAIL = [
  0, -3.1253241424539383e-18, 1.0698755618734451e-17, -2.4623815582638635e-17, 2.2698777452961687e-17,
  -5.4556305485916264e-18, 1.5834785051444286e-17, -2.1478388444456983e-17, 3.061616997868383e-17,
] as const;
const HALF_PI = Math.PI / 2;
/** What the doubles of π/2 and π leave out. */
const HALF_PI_TAIL = 6.123233995736766e-17;
const PI_TAIL = 1.2246467991473532e-16;

/** Above this eight times a number may be no double any more; both are made smaller then, which changes no angle. */
const HUGE = 1e300;
const SMALLER = 2 ** -60;

/**
 * atan(a/b) for 0 ≤ a ≤ b, b > 0. From the nearest eighth k/8 the rest is atan(t), t = (8a − kb)/(8b + ka), |t| ≤ 1/16, by its
 * series to t¹³: what is left out is below 1e-18.
 */
function eighth(a: number, b: number): number {
  const k = Math.round((8 * a) / b);
  const t = k === 0 ? a / b : (8 * a - k * b) / (8 * b + k * a);
  const z = t * t;
  const series = -1 / 3 + z * (1 / 5 + z * (-1 / 7 + z * (1 / 9 + z * (-1 / 11 + z * (1 / 13)))));
  return (AT[k] as number) + (t + (t * z * series + (AT_TAIL[k] as number)));
}

/** Angle of the direction (x, y) from the x axis [rad], −π to π, with the signs of zeros as the language's own. */
export function atan2(y: number, x: number): number {
  if (Number.isNaN(x) || Number.isNaN(y)) return Number.NaN;
  const isHuge = Math.abs(y) > HUGE || Math.abs(x) > HUGE;
  const a = Math.abs(isHuge ? y * SMALLER : y);
  const b = Math.abs(isHuge ? x * SMALLER : x);
  let angle: number;
  if (a === 0 && b === 0) angle = 0;
  else if (a === Number.POSITIVE_INFINITY && a === b) angle = AT[8];
  else if (a <= b) angle = eighth(a, b);
  else angle = HALF_PI - (eighth(b, a) - HALF_PI_TAIL);
  if (x < 0 || Object.is(x, -0)) angle = Math.PI - (angle - PI_TAIL);
  return y < 0 || Object.is(y, -0) ? -angle : angle;
}

/** atan(a) for 0 ≤ a ≤ 1: as `eighth` with b = 1, bit for bit, at the cost of one division. */
function eighthOfOne(a: number): number {
  const k = Math.round(8 * a);
  const t = (8 * a - k) / (8 + k * a);
  const z = t * t;
  const series = -1 / 3 + z * (1 / 5 + z * (-1 / 7 + z * (1 / 9 + z * (-1 / 11 + z * (1 / 13)))));
  return AT[k]! + (t + (t * z * series + AT_TAIL[k]!));
}

/** Arc tangent [rad], −π/2 to π/2. Same as `atan2(x, 1)`, without the questions that only two numbers raise. */
export function atan(x: number): number {
  if (x === 0) return x;
  const a = Math.abs(x);
  const angle = a <= 1 ? eighthOfOne(a) : HALF_PI - (eighth(1, a) - HALF_PI_TAIL);
  return x < 0 ? -angle : angle;
}

/** Arc sine [rad]; NaN outside −1 to 1. */
export const asin = (x: number): number => atan2(x, Math.sqrt((1 - x) * (1 + x)));

/** Arc cosine [rad], 0 to π; NaN outside −1 to 1. By the half angle, so that it is as good near 1 as elsewhere. */
export const acos = (x: number): number => 2 * atan2(Math.sqrt(1 - x), Math.sqrt(1 + x));
