/** A point or direction in drawing axes: x east, y north of the drawing, z up [m]. */
export type Vec3 = readonly [number, number, number];
/** A point on the ground plan or in the plane of a face [m]. */
export type Point = readonly [number, number];
/** A closed outline without a repeated last corner. Outer outlines run anticlockwise, holes clockwise. */
export type Ring = readonly Point[];

/** a · b. */
export const dot = (a: Vec3, b: Vec3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/** a × b, right-handed. */
export const cross = (a: Vec3, b: Vec3): Vec3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

/** a + k·b. */
export const along = (a: Vec3, b: Vec3, k: number): Vec3 => [a[0] + k * b[0], a[1] + k * b[1], a[2] + k * b[2]];

/** a − b. */
export const minus = (a: Vec3, b: Vec3): Vec3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];

/** Length of a vector, in its own unit. */
export const length = (a: Vec3): number => Math.hypot(a[0], a[1], a[2]);

/** The unit vector along a. @throws {RangeError} for a vector without length */
export const unit = (a: Vec3): Vec3 => {
  const n = length(a);
  if (!(n > 0)) throw new RangeError('a direction needs a length above 0');
  return [a[0] / n, a[1] / n, a[2] / n];
};
