import { cross, unit, type Vec3 } from '../../core/plane/vec.ts';
import type { Tree } from '../../core/scheme/schema.ts';
import type { Faces } from './faces.ts';
import { mix, type Palette, type Rgb } from './palette.ts';
import type { Strokes } from './strokes.ts';

const ROUND = 20;
const RINGS = 10;
/** Sides of the polygon that is drawn round a crown. */
const OUTLINE = 40;

type Ellipsoid = { readonly centre: Vec3; readonly radius: number; readonly half: number };

/** A crown as its middle, its half width and its half height [m]. */
function ellipsoid(tree: Tree): Ellipsoid {
  const low = tree.base + tree.trunk;
  const top = tree.base + tree.height;
  const centre: Vec3 = [tree.at[0], tree.at[1], (low + top) / 2];
  return { centre, half: Math.max((top - low) / 2, 0.1), radius: tree.spread / 2 };
}

/**
 * The line round a crown as it is seen along a direction: where the direction grazes it. In axes in which the crown is a unit
 * sphere, that is the great circle square to the direction so scaled.
 */
export function crownOutline(tree: Tree, into: Vec3, colour: Rgb, strokes: Strokes): void {
  const { centre, radius, half } = ellipsoid(tree);
  const axis = unit([into[0] / radius, into[1] / radius, into[2] / half]);
  const side = unit(cross(axis, Math.abs(axis[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0]));
  const other = cross(axis, side);
  strokes.loop(
    Array.from({ length: OUTLINE }, (_, i): Vec3 => {
      const [c, s] = [Math.cos((2 * Math.PI * i) / OUTLINE), Math.sin((2 * Math.PI * i) / OUTLINE)];
      const at = (k: 0 | 1 | 2): number => centre[k] + (k === 2 ? half : radius) * (c * side[k] + s * other[k]);
      return [at(0), at(1), at(2)];
    }),
    colour,
  );
}

/** A tree as a faceted crown on a line of a trunk. */
export function crown(tree: Tree, palette: Palette, faces: Faces, strokes: Strokes): void {
  const { centre, radius, half } = ellipsoid(tree);
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
  strokes.add([tree.at[0], tree.at[1], tree.base], [tree.at[0], tree.at[1], centre[2] - half * 0.6], palette.soft);
}
