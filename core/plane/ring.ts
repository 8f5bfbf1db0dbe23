import type { Point, Ring } from './vec.ts';

/** Signed area of a ring: positive when it runs anticlockwise [m²]. */
export function signedArea(ring: Ring): number {
  let twice = 0;
  for (let i = 0; i < ring.length; i++) {
    const a = ring[i] as Point;
    const b = ring[(i + 1) % ring.length] as Point;
    twice += a[0] * b[1] - b[0] * a[1];
  }
  return twice / 2;
}

/** Length of a ring's outline [m]. */
export function perimeter(ring: Ring): number {
  let sum = 0;
  for (let i = 0; i < ring.length; i++) {
    const a = ring[i] as Point;
    const b = ring[(i + 1) % ring.length] as Point;
    sum += Math.hypot(b[0] - a[0], b[1] - a[1]);
  }
  return sum;
}

/** The ring running anticlockwise, as it is or reversed. */
export const anticlockwise = (ring: Ring): Ring => (signedArea(ring) < 0 ? [...ring].reverse() : ring);

/** Whether a point lies inside a ring or on its outline (even-odd rule; points on an edge may fall either way by round-off). */
export function contains(ring: Ring, x: number, y: number): boolean {
  let inside = false;
  for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
    const a = ring[i] as Point;
    const b = ring[j] as Point;
    if (a[1] > y !== b[1] > y && x < ((b[0] - a[0]) * (y - a[1])) / (b[1] - a[1]) + a[0]) inside = !inside;
  }
  return inside;
}

/** Distance from a point to the nearest place on a ring's outline [m]. */
export function distanceToOutline(ring: Ring, x: number, y: number): number {
  let best = Infinity;
  for (let i = 0; i < ring.length; i++) {
    const a = ring[i] as Point;
    const b = ring[(i + 1) % ring.length] as Point;
    const dx = b[0] - a[0];
    const dy = b[1] - a[1];
    const span = dx * dx + dy * dy;
    const t = span > 0 ? Math.min(1, Math.max(0, ((x - a[0]) * dx + (y - a[1]) * dy) / span)) : 0;
    best = Math.min(best, Math.hypot(x - a[0] - t * dx, y - a[1] - t * dy));
  }
  return best;
}

/** Centre of area of a ring; of a ring without area, the mean of its corners. */
export function centroid(ring: Ring): Point {
  const area = signedArea(ring);
  let x = 0;
  let y = 0;
  if (Math.abs(area) < 1e-12) {
    for (const p of ring) {
      x += p[0] / ring.length;
      y += p[1] / ring.length;
    }
    return [x, y];
  }
  for (let i = 0; i < ring.length; i++) {
    const a = ring[i] as Point;
    const b = ring[(i + 1) % ring.length] as Point;
    const k = a[0] * b[1] - b[0] * a[1];
    x += (a[0] + b[0]) * k;
    y += (a[1] + b[1]) * k;
  }
  return [x / (6 * area), y / (6 * area)];
}

/**
 * The first two edges of a ring that cross or touch away from a shared corner.
 * @returns their numbers (edge n runs from corner n to corner n + 1), or null for a simple outline
 */
export function crossingEdges(ring: Ring): readonly [number, number] | null {
  const n = ring.length;
  const side = (p: Point, q: Point, r: Point): number => (q[0] - p[0]) * (r[1] - p[1]) - (q[1] - p[1]) * (r[0] - p[0]);
  const onSegment = (p: Point, q: Point, r: Point): boolean =>
    Math.min(p[0], q[0]) <= r[0] &&
    r[0] <= Math.max(p[0], q[0]) &&
    Math.min(p[1], q[1]) <= r[1] &&
    r[1] <= Math.max(p[1], q[1]);
  for (let i = 0; i < n; i++) {
    const a = ring[i] as Point;
    const b = ring[(i + 1) % n] as Point;
    for (let j = i + 1; j < n; j++) {
      if (j === i || (i + 1) % n === j || (j + 1) % n === i) continue;
      const c = ring[j] as Point;
      const d = ring[(j + 1) % n] as Point;
      const s1 = side(a, b, c);
      const s2 = side(a, b, d);
      const s3 = side(c, d, a);
      const s4 = side(c, d, b);
      if (s1 * s2 < 0 && s3 * s4 < 0) return [i, j];
      if ((s1 === 0 && onSegment(a, b, c)) || (s2 === 0 && onSegment(a, b, d))) return [i, j];
      if ((s3 === 0 && onSegment(c, d, a)) || (s4 === 0 && onSegment(c, d, b))) return [i, j];
    }
  }
  return null;
}
