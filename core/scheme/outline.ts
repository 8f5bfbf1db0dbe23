import * as maths from '../maths/maths.ts';
import { anticlockwise } from '../plane/ring.ts';
import type { Point, Ring } from '../plane/vec.ts';
import { DEG } from '../units/angle.ts';

type Shaped = {
  readonly box?: { at: readonly [number, number]; width: number; depth: number; turn: number } | undefined;
  readonly outline?: readonly (readonly [number, number])[] | undefined;
};

/**
 * The ground outline of a block or a room, anticlockwise [m]. A box starts at its corner `at`; its walls are numbered
 * 0 the −y side, 1 the +x side, 2 the +y side, 3 the −x side, before it is turned clockwise about `at`. An outline that
 * was drawn clockwise is reversed (the loader says so), so that walls always face outwards.
 */
export function outlineOf(shape: Shaped): Ring {
  const { box, outline } = shape;
  if (box) {
    const c = maths.cos(box.turn * DEG);
    const s = maths.sin(box.turn * DEG);
    const corner = (u: number, v: number): Point => [box.at[0] + u * c + v * s, box.at[1] - u * s + v * c];
    return [corner(0, 0), corner(box.width, 0), corner(box.width, box.depth), corner(0, box.depth)];
  }
  return anticlockwise(outline ?? []);
}
