import * as maths from '../maths/maths.ts';
import { DEG } from '../units/angle.ts';

/**
 * Multiples of D, M, M′, F, Ω; then a, b of the longitude (a + b·T)·sin and c, d of the obliquity (c + d·T)·cos, all in
 * 0.0001″. The rows as the paper prints them.
 * @see Reda & Andreas 2004, table A4.3, after J. Meeus, Astronomical Algorithms, 2nd edition 1998, table 22.A (IAU 1980)
 */
const TERMS: readonly (readonly number[])[] = [
  [0, 0, 0, 0, 1, -171996, -174.2, 92025, 8.9],
  [-2, 0, 0, 2, 2, -13187, -1.6, 5736, -3.1],
  [0, 0, 0, 2, 2, -2274, -0.2, 977, -0.5],
  [0, 0, 0, 0, 2, 2062, 0.2, -895, 0.5],
  [0, 1, 0, 0, 0, 1426, -3.4, 54, -0.1],
  [0, 0, 1, 0, 0, 712, 0.1, -7, 0],
  [-2, 1, 0, 2, 2, -517, 1.2, 224, -0.6],
  [0, 0, 0, 2, 1, -386, -0.4, 200, 0],
  [0, 0, 1, 2, 2, -301, 0, 129, -0.1],
  [-2, -1, 0, 2, 2, 217, -0.5, -95, 0.3],
  [-2, 0, 1, 0, 0, -158, 0, 0, 0],
  [-2, 0, 0, 2, 1, 129, 0.1, -70, 0],
  [0, 0, -1, 2, 2, 123, 0, -53, 0],
  [2, 0, 0, 0, 0, 63, 0, 0, 0],
  [0, 0, 1, 0, 1, 63, 0.1, -33, 0],
  [2, 0, -1, 2, 2, -59, 0, 26, 0],
  [0, 0, -1, 0, 1, -58, -0.1, 32, 0],
  [0, 0, 1, 2, 1, -51, 0, 27, 0],
  [-2, 0, 2, 0, 0, 48, 0, 0, 0],
  [0, 0, -2, 2, 1, 46, 0, -24, 0],
  [2, 0, 0, 2, 2, -38, 0, 16, 0],
  [0, 0, 2, 2, 2, -31, 0, 13, 0],
  [0, 0, 2, 0, 0, 29, 0, 0, 0],
  [-2, 0, 1, 2, 2, 29, 0, -12, 0],
  [0, 0, 0, 2, 0, 26, 0, 0, 0],
  [-2, 0, 0, 2, 0, -22, 0, 0, 0],
  [0, 0, -1, 2, 1, 21, 0, -10, 0],
  [0, 2, 0, 0, 0, 17, -0.1, 0, 0],
  [2, 0, -1, 0, 1, 16, 0, -8, 0],
  [-2, 2, 0, 2, 2, -16, 0.1, 7, 0],
  [0, 1, 0, 0, 1, -15, 0, 9, 0],
  [-2, 0, 1, 0, 1, -13, 0, 7, 0],
  [0, -1, 0, 0, 1, -12, 0, 6, 0],
  [0, 0, 2, -2, 0, 11, 0, 0, 0],
  [2, 0, -1, 2, 1, -10, 0, 5, 0],
  [2, 0, 1, 2, 2, -8, 0, 3, 0],
  [0, 1, 0, 2, 2, 7, 0, -3, 0],
  [-2, 1, 1, 0, 0, -7, 0, 0, 0],
  [0, -1, 0, 2, 2, -7, 0, 3, 0],
  [2, 0, 0, 2, 1, -7, 0, 3, 0],
  [2, 0, 1, 0, 0, 6, 0, 0, 0],
  [-2, 0, 2, 2, 2, 6, 0, -3, 0],
  [-2, 0, 1, 2, 1, 6, 0, -3, 0],
  [2, 0, -2, 0, 1, -6, 0, 3, 0],
  [2, 0, 0, 0, 1, -6, 0, 3, 0],
  [0, -1, 1, 0, 0, 5, 0, 0, 0],
  [-2, -1, 0, 2, 1, -5, 0, 3, 0],
  [-2, 0, 0, 0, 1, -5, 0, 3, 0],
  [0, 0, 2, 2, 1, -5, 0, 3, 0],
  [-2, 0, 2, 0, 1, 4, 0, 0, 0],
  [-2, 1, 0, 2, 1, 4, 0, 0, 0],
  [0, 0, 1, -2, 0, 4, 0, 0, 0],
  [-1, 0, 1, 0, 0, -4, 0, 0, 0],
  [-2, 1, 0, 0, 0, -4, 0, 0, 0],
  [1, 0, 0, 0, 0, -4, 0, 0, 0],
  [0, 0, 1, 2, 0, 3, 0, 0, 0],
  [0, 0, -2, 2, 2, -3, 0, 0, 0],
  [-1, -1, 1, 0, 0, -3, 0, 0, 0],
  [0, 1, 1, 0, 0, -3, 0, 0, 0],
  [0, -1, 1, 2, 2, -3, 0, 0, 0],
  [2, -1, -1, 2, 2, -3, 0, 0, 0],
  [0, 0, 3, 2, 2, -3, 0, 0, 0],
  [2, -1, 0, 2, 2, -3, 0, 0, 0],
];

const terms = Float64Array.from(TERMS.flat());
const ROW = 9;

/** Polynomials of the third degree in Julian centuries [°]: D, M, M′, F, Ω. Reda & Andreas 2004, equations 15–19. */
const ARGUMENTS: readonly (readonly [number, number, number, number])[] = [
  [297.85036, 445267.11148, -0.0019142, 1 / 189474],
  [357.52772, 35999.05034, -0.0001603, -1 / 300000],
  [134.96298, 477198.867398, 0.0086972, 1 / 56250],
  [93.27191, 483202.017538, -0.0036825, 1 / 327270],
  [125.04452, -1934.136261, 0.0020708, 1 / 450000],
];

/** Mean obliquity of the ecliptic in U, ten thousands of Julian years ["]. Reda & Andreas 2004, equation 24. */
const OBLIQUITY = [84381.448, -4680.93, -1.55, 1999.25, -51.38, -249.67, -39.05, 7.12, 27.87, 5.79, 2.45] as const;

export type Nutation = {
  readonly longitude_deg: number;
  readonly obliquity_deg: number;
};

/**
 * How far the true pole of the Earth stands from its mean place: mostly the moon's pull, up to 17″ in longitude and 9″ in
 * obliquity.
 * @param T Julian centuries of terrestrial time from J2000
 * @see Reda & Andreas 2004, equations 15–23
 */
export function nutation(T: number): Nutation {
  const [D, M, moon, F, node] = ARGUMENTS.map(([a, b, c, d]) => (a + T * (b + T * (c + T * d))) * DEG) as [
    number,
    number,
    number,
    number,
    number,
  ];
  let longitude = 0;
  let obliquity = 0;
  for (let i = 0; i < terms.length; i += ROW) {
    const angle = terms[i]! * D + terms[i + 1]! * M + terms[i + 2]! * moon + terms[i + 3]! * F + terms[i + 4]! * node;
    longitude += (terms[i + 5]! + terms[i + 6]! * T) * maths.sin(angle);
    obliquity += (terms[i + 7]! + terms[i + 8]! * T) * maths.cos(angle);
  }
  return { longitude_deg: longitude / 36e6, obliquity_deg: obliquity / 36e6 };
}

/** Mean obliquity of the ecliptic. @param T Julian centuries of terrestrial time from J2000 @returns degrees */
export function meanObliquity_deg(T: number): number {
  const U = T / 100;
  return OBLIQUITY.reduceRight((sum, c) => sum * U + c, 0) / 3600;
}
