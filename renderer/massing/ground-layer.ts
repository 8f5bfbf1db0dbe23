import { ShapeUtils, Vector2 } from 'three';
import type { Region } from '../../core/plane/region.ts';
import type { Point, Ring, Vec3 } from '../../core/plane/vec.ts';
import { hatchLines } from '../../core/sheet/hatch.ts';
import type { Faces } from './faces.ts';
import type { Rgb } from './palette.ts';
import type { Strokes } from './strokes.ts';

const flat = (p: Vector2, z: number): Vec3 => [p.x, p.y, z];

/** Fills regions of the ground, holes left out. */
export function fillRegions(regions: readonly Region[], z: number, colour: Rgb, faces: Faces): void {
  for (const { outer, holes } of regions) {
    const contour = outer.map(([x, y]) => new Vector2(x, y));
    const inner = holes.map((ring) => ring.map(([x, y]) => new Vector2(x, y)));
    const corners = [...contour, ...inner.flat()];
    for (const [a, b, c] of ShapeUtils.triangulateShape(contour, inner) as [number, number, number][]) {
      faces.triangle(
        flat(corners[a] as Vector2, z),
        flat(corners[b] as Vector2, z),
        flat(corners[c] as Vector2, z),
        colour,
        null,
      );
    }
  }
}

/** Outlines of regions on the ground. */
export function outlineRegions(regions: readonly Region[], z: number, colour: Rgb, strokes: Strokes): void {
  for (const { outer, holes } of regions) for (const ring of [outer, ...holes]) outlineRing(ring, z, colour, strokes);
}

export function outlineRing(ring: Ring, z: number, colour: Rgb, strokes: Strokes): void {
  strokes.loop(
    ring.map(([x, y]: Point): Vec3 => [x, y, z]),
    colour,
  );
}

/** Lines at a spacing inside regions, as on the sheets: they tell the added shadow without colour. */
export function hatchRegions(
  regions: readonly Region[],
  spacing_m: number,
  z: number,
  colour: Rgb,
  strokes: Strokes,
): void {
  for (const { outer, holes } of regions) {
    for (const [x1, y1, x2, y2] of hatchLines([outer, ...holes], {
      angle_deg: 45,
      spacing: spacing_m,
      stroke: { colour: '', width: 0 },
    })) {
      strokes.add([x1, y1, z], [x2, y2, z], colour);
    }
  }
}

/** A hatch spacing on the ground that stays readable at a scale: a power of two of a metre, so that it changes seldom [m]. */
export const hatchSpacing = (pixelsPerMetre: number): number => 2 ** Math.round(Math.log2(9 / pixelsPerMetre));
