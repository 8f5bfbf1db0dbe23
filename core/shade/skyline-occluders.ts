import type { Shader, Solid } from '../form/model.ts';
import { signedArea } from '../plane/ring.ts';
import type { Point } from '../plane/vec.ts';
import type { Tree } from '../scheme/schema.ts';
import { crownColumns, type Crowns } from './crown-light.ts';

/** Numbers of one wall in `Occluders.walls`: x and y of its two corners, base, top. */
export const WALL = 6;

/**
 * Everything that can hide the sun at one stage, as plain columns that go to a worker as they are. Walls are the outside
 * faces of solids, each with level edges; seen from outside they run clockwise. Patches are flat convex polygons in space:
 * undersides of solids, overhangs, fins, blades, and walls once more, for whoever stands below them.
 */
export type Occluders = {
  readonly walls: Float64Array;
  /** Number of the solid that a wall belongs to. */
  readonly wallSolid: Uint32Array;
  /** The same wall as a patch, for receptors below its base. */
  readonly wallPatch: Uint32Array;
  readonly solidCount: number;
  readonly solidBase: Float64Array;
  readonly solidTop: Float64Array;
  /** Walls of solid s: `solidWall[s]` to `solidWall[s + 1]` (exclusive), in the order of its outline. */
  readonly solidWall: Uint32Array;
  /** Patches that are no wall: undersides first, then shaders. */
  readonly loosePatch: Uint32Array;
  /** Corners of patch p: `patchCorner[p]` to `patchCorner[p + 1]`, three numbers each in `corners`. */
  readonly patchCorner: Uint32Array;
  readonly corners: Float64Array;
  /** An upright cylinder round each patch, `DISC` numbers: x and y of its axis, radius, top. */
  readonly patchDisc: Float64Array;
  /** Upright boxes round patches, `EXTENT` numbers each: least and most x, least and most y. */
  readonly patchExtent: Float64Array;
  /** What weakens the sun without hiding it. */
  readonly crowns: Crowns;
};

export const DISC = 4;
export const EXTENT = 4;

/**
 * The occluders of solids and flat shaders, and the crowns of trees. The order of any changes nothing but the order of the columns.
 * @throws {RangeError} for a corner that is not finite
 */
export function makeOccluders(
  solids: readonly Solid[],
  shaders: readonly Pick<Shader, 'corners'>[],
  trees: readonly Tree[] = [],
): Occluders {
  const walls: number[] = [];
  const wallSolid: number[] = [];
  const wallPatch: number[] = [];
  const loosePatch: number[] = [];
  const solidWall = new Uint32Array(solids.length + 1);
  const corners: number[] = [];
  const patchCorner: number[] = [0];
  const finish = (): number => patchCorner.push(corners.length / 3) - 2;
  solids.forEach((solid, s) => {
    const { outline, base_m, top_m } = solid;
    outline.forEach((a, i) => {
      const b = outline[(i + 1) % outline.length] as Point;
      if (a[0] === b[0] && a[1] === b[1]) return;
      walls.push(a[0], a[1], b[0], b[1], base_m, top_m);
      wallSolid.push(s);
      corners.push(a[0], a[1], base_m, b[0], b[1], base_m, b[0], b[1], top_m, a[0], a[1], top_m);
      wallPatch.push(finish());
    });
    solidWall[s + 1] = wallSolid.length;
    for (const piece of solid.pieces) {
      if (signedArea(piece) <= 0) continue;
      for (const p of piece) corners.push(p[0], p[1], base_m);
      loosePatch.push(finish());
    }
  });
  for (const shader of shaders) {
    for (const p of shader.corners) corners.push(p[0], p[1], p[2]);
    loosePatch.push(finish());
  }
  const result: Occluders = {
    walls: Float64Array.from(walls),
    wallSolid: Uint32Array.from(wallSolid),
    wallPatch: Uint32Array.from(wallPatch),
    loosePatch: Uint32Array.from(loosePatch),
    solidCount: solids.length,
    solidBase: Float64Array.from(solids, (s) => s.base_m),
    solidTop: Float64Array.from(solids, (s) => s.top_m),
    solidWall,
    patchCorner: Uint32Array.from(patchCorner),
    corners: Float64Array.from(corners),
    ...roundPatches(corners, patchCorner),
    crowns: crownColumns(trees),
  };
  if (![...result.walls, ...result.corners].every(Number.isFinite))
    throw new RangeError('a corner is not a finite number');
  return result;
}

/** Upright boxes round patches, and cylinders about the middle of the boxes. */
function roundPatches(
  corners: readonly number[],
  patchCorner: readonly number[],
): Pick<Occluders, 'patchDisc' | 'patchExtent'> {
  const extents = new Float64Array((patchCorner.length - 1) * EXTENT);
  const discs = new Float64Array((patchCorner.length - 1) * DISC);
  for (let p = 0; p + 1 < patchCorner.length; p++) {
    const from = 3 * patchCorner[p]!;
    const to = 3 * patchCorner[p + 1]!;
    const [low, high] = [
      [Infinity, Infinity],
      [-Infinity, -Infinity],
    ] as [[number, number], [number, number]];
    let top = -Infinity;
    for (let i = from; i < to; i += 3) {
      for (const axis of [0, 1] as const) {
        low[axis] = Math.min(low[axis], corners[i + axis]!);
        high[axis] = Math.max(high[axis], corners[i + axis]!);
      }
      top = Math.max(top, corners[i + 2]!);
    }
    const x = (low[0] + high[0]) / 2;
    const y = (low[1] + high[1]) / 2;
    let radius = 0;
    for (let i = from; i < to; i += 3) radius = Math.max(radius, Math.hypot(corners[i]! - x, corners[i + 1]! - y));
    discs.set([x, y, radius, top], p * DISC);
    extents.set([low[0], high[0], low[1], high[1]], p * EXTENT);
  }
  return { patchDisc: discs, patchExtent: extents };
}
