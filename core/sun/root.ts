/**
 * Where a function changes its sign between two places, by halving: slow and sure.
 * @param f         one change of sign between `a` and `b`
 * @param tolerance how near, in the unit of the places
 * @throws {RangeError} when both ends have the same sign
 */
export function rootBetween(f: (x: number) => number, a: number, b: number, tolerance: number): number {
  let low = a;
  let high = b;
  const rises = f(high) > 0;
  if (f(low) > 0 === rises) throw new RangeError('no change of sign between the two places');
  while (Math.abs(high - low) > tolerance) {
    const middle = (low + high) / 2;
    if (f(middle) > 0 === rises) high = middle;
    else low = middle;
  }
  return (low + high) / 2;
}

const GOLDEN = (Math.sqrt(5) - 1) / 2;

/**
 * Where a function is lowest between two places, by the golden section.
 * @param f         falls, then rises between `a` and `b`; where it only falls or only rises the answer is that end
 * @param tolerance how near, in the unit of the places
 * @see J. Kiefer, Proc. American Mathematical Society 4 (1953) 502–506
 */
export function lowestBetween(f: (x: number) => number, a: number, b: number, tolerance: number): number {
  let low = a;
  let high = b;
  let left = high - GOLDEN * (high - low);
  let right = low + GOLDEN * (high - low);
  let atLeft = f(left);
  let atRight = f(right);
  while (high - low > tolerance) {
    if (atLeft < atRight) {
      high = right;
      right = left;
      atRight = atLeft;
      left = high - GOLDEN * (high - low);
      atLeft = f(left);
    } else {
      low = left;
      left = right;
      atLeft = atRight;
      right = low + GOLDEN * (high - low);
      atRight = f(right);
    }
  }
  return (low + high) / 2;
}
