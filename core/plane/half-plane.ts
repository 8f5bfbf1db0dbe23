import type { Point, Ring } from './vec.ts';

/**
 * The part of a convex ring on one side of a straight line.
 * @param height  signed distance of a point from the line, positive on the side kept; must be linear in x and y
 * @returns       what is kept, corners in the order given; empty when nothing is
 * @see I. E. Sutherland, G. W. Hodgman, Commun. ACM 17, 32–42 (1974)
 */
export function keepSide(ring: Ring, height: (p: Point) => number): Ring {
  const out: Point[] = [];
  for (let i = 0; i < ring.length; i++) {
    const a = ring[i] as Point;
    const b = ring[(i + 1) % ring.length] as Point;
    const ha = height(a);
    const hb = height(b);
    if (ha >= 0) out.push(a);
    if ((ha > 0 && hb < 0) || (ha < 0 && hb > 0)) {
      const t = ha / (ha - hb);
      out.push([a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])]);
    }
  }
  return out;
}
