import type { Vec3 } from '../../core/plane/vec.ts';
import type { Tree } from '../../core/scheme/schema.ts';
import type { Faces } from './faces.ts';
import { mix, type Palette } from './palette.ts';
import type { Strokes } from './strokes.ts';

const ROUND = 12;
const RINGS = 6;

/** A tree as a faceted crown on a line of a trunk. */
export function crown(tree: Tree, palette: Palette, faces: Faces, strokes: Strokes): void {
  const low = tree.base + tree.trunk;
  const top = tree.base + tree.height;
  const centre: Vec3 = [tree.at[0], tree.at[1], (low + top) / 2];
  const half = Math.max((top - low) / 2, 0.1);
  const radius = tree.spread / 2;
  const at = (i: number, j: number): Vec3 => {
    const up = Math.PI * (i / RINGS - 0.5);
    const round = (2 * Math.PI * j) / ROUND;
    const r = radius * Math.cos(up);
    return [centre[0] + r * Math.cos(round), centre[1] + r * Math.sin(round), centre[2] + half * Math.sin(up)];
  };
  for (let i = 0; i < RINGS; i++) {
    const tint = mix(palette.crown, palette.ink, 0.14 * (1 - (i + 0.5) / RINGS));
    for (let j = 0; j < ROUND; j++) faces.convex([at(i, j), at(i, j + 1), at(i + 1, j + 1), at(i + 1, j)], tint, null);
  }
  strokes.add([tree.at[0], tree.at[1], tree.base], [tree.at[0], tree.at[1], low + half * 0.4], palette.soft);
}
