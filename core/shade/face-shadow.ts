import type { Panel, Solid } from '../form/model.ts';
import { edgeOf, levelPanel, pointOn, wallPanel } from '../form/panel.ts';
import { Patches } from '../plane/patches.ts';
import { signedArea } from '../plane/ring.ts';
import { dot, type Point, type Ring, type Vec3 } from '../plane/vec.ts';
import { cutShadows } from './cut-shadows.ts';
import { hidersOf } from './hiders.ts';
import { sunwardOf } from './sunward.ts';

/** The shadow on one face of a solid at one moment. */
export type FaceShadow = {
  readonly solid: string;
  readonly face: 'roof' | 'wall';
  /** Edge n of the outline; −1 for the roof. */
  readonly wall: number;
  /** What lies in shadow: convex polygons that do not overlap, in drawing axes, anticlockwise seen from outside. */
  readonly polygons: readonly (readonly Vec3[])[];
  readonly area_m2: number;
  readonly shaded_m2: number;
};

/** A face that makes less than this with the ray [sine] is turned away from it. */
const GRAZING = 1e-9;

/** Scratch: nothing that is called while it is in use could call this module again. */
const patches = new Patches();

/**
 * Shadows on every roof and wall of solids that stand together: exact polygons, by cutting the shadow of every convex
 * piece in front off the face. Solid after solid, each with its walls in order and then its roof.
 *
 * A face turned away from the sun, or any face with the sun at or below the horizon, is shaded as a whole: it has no
 * polygons, and `shaded_m2` is its area. A roof on which another block stands counts as shaded there. Trees are left out.
 * @param solids  those that stand at one stage; a solid without area has no faces
 * @param sun     unit vector towards the sun in drawing axes
 */
export function faceShadows(solids: readonly Solid[], sun: Vec3): FaceShadow[] {
  const out: FaceShadow[] = [];
  const up = sun[2] > 0;
  const sunward = up ? sunwardOf(solids, sun) : () => [];
  solids.forEach((solid, i) => {
    const height = solid.top_m - solid.base_m;
    if (!(height > 0) || solid.pieces.length === 0) return;
    const near = sunward(i);
    solid.outline.forEach((p, wall) => {
      const q = solid.outline[(wall + 1) % solid.outline.length] as Point;
      const run = Math.hypot(q[0] - p[0], q[1] - p[1]);
      if (!(run > 0)) return;
      const panel = wallPanel(edgeOf(solid.outline, wall), 0, solid.base_m, run, height);
      const area_m2 = run * height;
      const rest = up ? shadowOn(panel, null, near, sun, area_m2) : { polygons: [], shaded_m2: area_m2 };
      out.push({ solid: solid.id, face: 'wall', wall, area_m2, ...rest });
    });
    const panel = levelPanel(solid.outline, solid.top_m);
    const area_m2 = Math.abs(signedArea(solid.outline));
    const rest = up ? shadowOn(panel, solid.pieces, near, sun, area_m2) : { polygons: [], shaded_m2: area_m2 };
    out.push({ solid: solid.id, face: 'roof', wall: -1, area_m2, ...rest });
  });
  return out;
}

/** @param pieces  convex pieces of a level face in drawing axes; null for the whole rectangle of the panel */
function shadowOn(
  panel: Panel,
  pieces: readonly Ring[] | null,
  near: readonly Solid[],
  sun: Vec3,
  area_m2: number,
): { polygons: readonly (readonly Vec3[])[]; shaded_m2: number } {
  const out = dot(sun, panel.normal);
  if (!(out > GRAZING)) return { polygons: [], shaded_m2: area_m2 };
  const a = dot(sun, panel.right) / out;
  const b = dot(sun, panel.up) / out;
  patches.clear();
  if (pieces === null) patches.addRectangle(0, 0, panel.width_m, panel.height_m);
  else for (const ring of pieces) patches.addRing(ring.map((p) => [p[0] - panel.origin[0], p[1] - panel.origin[1]]));
  cutShadows(patches, hidersOf(panel, near, []), a, b, true);
  const polygons: Vec3[][] = [];
  let shaded_m2 = 0;
  for (let i = 0; i < patches.count; i++) {
    if (patches.weightOf(i) > 0) continue;
    shaded_m2 += patches.areaOf(i);
    polygons.push(patches.ringOf(i).map((p) => pointOn(panel, p[0], p[1], 0)));
  }
  return { polygons, shaded_m2 };
}
