import { signedArea } from './ring.ts';
import type { Point, Ring } from './vec.ts';

/** A region of the plane: an outer ring (anticlockwise) with its holes (clockwise), in metres. */
export type Region = { readonly outer: Ring; readonly holes: readonly Ring[] };

/** Area of regions that do not overlap one another: outer rings less their holes [m²]. */
export function regionArea(regions: readonly Region[]): number {
  let sum = 0;
  for (const region of regions) {
    sum += Math.abs(signedArea(region.outer));
    for (const hole of region.holes) sum -= Math.abs(signedArea(hole));
  }
  return sum;
}

/** The ring turned so that it starts at its lowest leftmost corner: equal rings then have equal corners. */
export function fromFirstCorner(ring: Ring): Ring {
  let first = 0;
  for (let i = 1; i < ring.length; i++) {
    const p = ring[i] as Point;
    const q = ring[first] as Point;
    if (p[0] < q[0] || (p[0] === q[0] && p[1] < q[1])) first = i;
  }
  return first === 0 ? ring : [...ring.slice(first), ...ring.slice(0, first)];
}
