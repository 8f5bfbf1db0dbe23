import { ShapeUtils, Vector2 } from 'three';
import type { Model, Solid } from '../../core/form/model.ts';
import type { Point, Vec3 } from '../../core/plane/vec.ts';
import type { FaceShadow } from '../../core/shade/face-shadow.ts';
import { Faces } from './faces.ts';
import { mix, type Palette, type Rgb } from './palette.ts';
import { tintsOf, wallCorners, wallTint } from './solids-layer.ts';

/** How much of the shadow's tint a shaded face takes on. */
const DEPTH = 0.42;

/** A simple polygon that lies in a wall or a level plane, as triangles. */
function fill(polygon: readonly Vec3[], isLevel: boolean, along: Point, colour: Rgb, faces: Faces): void {
  const flat = polygon.map((p) =>
    isLevel ? new Vector2(p[0], p[1]) : new Vector2(p[0] * along[0] + p[1] * along[1], p[2]),
  );
  for (const [a, b, c] of ShapeUtils.triangulateShape(flat, []) as [number, number, number][]) {
    faces.triangle(polygon[a] as Vec3, polygon[b] as Vec3, polygon[c] as Vec3, colour, null);
  }
}

/** No polygons and yet shaded: the face is turned from the sun, and wholly shaded. */
function shadeRoof(shadow: FaceShadow, solid: Solid, tint: Rgb, faces: Faces): void {
  for (const polygon of shadow.polygons) fill(polygon, true, [1, 0], tint, faces);
  if (shadow.polygons.length > 0) return;
  for (const piece of solid.pieces)
    faces.convex(
      piece.map(([x, y]): Vec3 => [x, y, solid.top_m]),
      tint,
      null,
    );
}

function shadeWall(shadow: FaceShadow, solid: Solid, tintOf: (nx: number, ny: number) => Rgb, faces: Faces): void {
  const corners = wallCorners(solid, shadow.wall);
  const [a, b] = corners as [Vec3, Vec3];
  const span = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1;
  const along: Point = [(b[0] - a[0]) / span, (b[1] - a[1]) / span];
  const tint = tintOf(along[1], -along[0]);
  for (const polygon of shadow.polygons) fill(polygon, false, along, tint, faces);
  if (shadow.polygons.length === 0) faces.convex(corners, tint, null);
}

/** The shaded parts of roofs and walls, in the tint of the face that they lie on. */
export function faceShadowLayer(shadows: readonly FaceShadow[], model: Model, palette: Palette): Faces {
  const faces = new Faces();
  const solids = new Map(model.solids.map((s) => [s.id, s]));
  for (const shadow of shadows) {
    const solid = solids.get(shadow.solid);
    if (solid === undefined || shadow.shaded_m2 <= 0) continue;
    const tints = tintsOf(solid.standing, palette);
    if (shadow.face === 'roof') shadeRoof(shadow, solid, mix(tints.roof, palette.shadow, DEPTH), faces);
    else shadeWall(shadow, solid, (nx, ny) => mix(wallTint(tints, nx, ny), palette.shadow, DEPTH), faces);
  }
  return faces;
}
