import type { Point, Ring } from '../plane/vec.ts';
import { DRAWN_m } from '../units/tolerance.ts';
import { type Edge, edgeOf } from './panel.ts';

/**
 * The face of its block in which a wall of a room lies: the edge of the block's outline that runs the same way, within
 * drawing round-off, over at least part of the wall.
 *
 * Windows are put in the block's face, not in the room's wall: a wall drawn half a millimetre inside its block would
 * otherwise be shaded by its own block for good.
 * @returns the part of the block's edge that lies over the wall from its start to its end, or null for an inside wall
 */
export function outsideFace(wall: Edge, block: Ring): Edge | null {
  const run = Math.hypot(wall.end[0] - wall.start[0], wall.end[1] - wall.start[1]);
  if (!(run > 0)) return null;
  for (let n = 0; n < block.length; n++) {
    const face = edgeOf(block, n);
    const reach = Math.hypot(face.end[0] - face.start[0], face.end[1] - face.start[1]);
    if (!(reach > 0)) continue;
    const dx = (face.end[0] - face.start[0]) / reach;
    const dy = (face.end[1] - face.start[1]) / reach;
    const off = (p: Point): number => (p[0] - face.start[0]) * dy - (p[1] - face.start[1]) * dx;
    const on = (p: Point): number => (p[0] - face.start[0]) * dx + (p[1] - face.start[1]) * dy;
    if (Math.abs(off(wall.start)) > DRAWN_m || Math.abs(off(wall.end)) > DRAWN_m) continue;
    const [s, e] = [on(wall.start), on(wall.end)];
    if (e - s < run / 2 || Math.min(e, reach) - Math.max(s, 0) <= DRAWN_m) continue;
    const at = (t: number): Point => [face.start[0] + t * dx, face.start[1] + t * dy];
    return { start: at(s), end: at(e) };
  }
  return null;
}
