/** The whole number n for which 10ⁿ ≤ |x| < 10ⁿ⁺¹, exact at the powers themselves, where a logarithm may round. @param x finite, not 0 */
export const decadeOf = (x: number): number => Number(x.toExponential().split('e')[1]);

/** 10ⁿ as the double nearest to it. @param n whole, −300 to 300 */
export const tenTo = (n: number): number => Number(`1e${n}`);
