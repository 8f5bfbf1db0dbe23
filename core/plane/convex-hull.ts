import type { Point, Ring } from './vec.ts';

/**
 * Convex hull, anticlockwise, without corners that lie on its edges.
 * @param points  any finite points [m]; repeated ones do no harm
 * @returns       the hull; fewer than three corners when all points lie in a line
 * @see A. M. Andrew, Inf. Process. Lett. 9, 216–219 (1979), "monotone chain"
 */
export function convexHull(points: readonly Point[]): Ring {
  const sorted = [...points].sort((p, q) => p[0] - q[0] || p[1] - q[1]);
  if (sorted.length < 3) return sorted;
  const chain = (run: readonly Point[]): Point[] => {
    const out: Point[] = [];
    for (const p of run) {
      while (out.length >= 2 && turn(out[out.length - 2] as Point, out[out.length - 1] as Point, p) <= 0) out.pop();
      out.push(p);
    }
    out.pop();
    return out;
  };
  return [...chain(sorted), ...chain(sorted.reverse())];
}

/** Twice the area of the triangle a, b, c: positive when it turns left at b. */
const turn = (a: Point, b: Point, c: Point): number => (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);
