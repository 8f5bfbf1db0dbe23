import { ShapeUtils, Vector2 } from 'three';
import type { Ring, Vec3 } from '../../core/plane/vec.ts';
import { type Cells, cellsOf } from '../maps/map-cells.ts';
import { outlineOf } from '../maps/map-ask.ts';
import { hasArrived, type Side } from '../maps/map-picture.ts';
import type { ShownMap } from '../maps/map-state.ts';
import { type Atlas, inAtlas, layOut } from './map-atlas.ts';

/** Triangles that carry a piece of the map's picture, with their places in it. */
export type Laid = { readonly positions: Float32Array; readonly places: Float32Array };

/** Where the cells of a map lie, and the picture that they are painted in. */
export type LaidMap = {
  readonly cells: readonly Cells[];
  /** Null where the map has more cells in a row than a graphics card takes. */
  readonly atlas: Atlas | null;
  readonly outlines: readonly Ring[];
};

/** What carries a map: triangles on the ground, and on walls and roofs. */
export type CarriedMap = { readonly ground: Laid; readonly faces: Laid };

class Carrier {
  readonly #positions: number[] = [];
  readonly #places: number[] = [];

  readonly #atlas: Atlas;

  constructor(atlas: Atlas) {
    this.#atlas = atlas;
  }

  triangle(surface: number, cells: Cells, corners: readonly [Vec3, Vec3, Vec3]): void {
    const wide = cells.across * cells.cell_m[0];
    const high = cells.up * cells.cell_m[1];
    for (const p of corners) {
      const d: Vec3 = [p[0] - cells.corner[0], p[1] - cells.corner[1], p[2] - cells.corner[2]];
      const along = (v: Vec3): number => d[0] * v[0] + d[1] * v[1] + d[2] * v[2];
      this.#positions.push(...p);
      this.#places.push(...inAtlas(this.#atlas, surface, along(cells.right) / wide, along(cells.upward) / high));
    }
  }

  level(surface: number, cells: Cells, outline: Ring): void {
    const z = cells.corner[2];
    const flat = outline.map(([x, y]) => new Vector2(x, y));
    const at = (i: number): Vec3 => [(flat[i] as Vector2).x, (flat[i] as Vector2).y, z];
    for (const [a, b, c] of ShapeUtils.triangulateShape(flat, []) as [number, number, number][])
      this.triangle(surface, cells, [at(a), at(b), at(c)]);
  }

  upright(surface: number, cells: Cells): void {
    const at = (u: number, v: number): Vec3 => {
      const [x, y] = [u * cells.across * cells.cell_m[0], v * cells.up * cells.cell_m[1]];
      const k = (n: 0 | 1 | 2): number => cells.corner[n] + x * cells.right[n] + y * cells.upward[n];
      return [k(0), k(1), k(2)];
    };
    this.triangle(surface, cells, [at(0, 0), at(1, 0), at(1, 1)]);
    this.triangle(surface, cells, [at(0, 0), at(1, 1), at(0, 1)]);
  }

  laid(): Laid {
    return { positions: new Float32Array(this.#positions), places: new Float32Array(this.#places) };
  }
}

/** Lays a map out over its surfaces. */
export function layMap({ model, picture }: ShownMap): LaidMap {
  const outlines = picture.surfaces.map(({ surface }) => outlineOf(model, surface));
  const cells = picture.surfaces.map((surface, i) => cellsOf(surface, outlines[i] as Ring));
  return { cells, atlas: layOut(cells), outlines };
}

/** The surfaces of a map that have anything to show; the others keep the tints that they have without it. */
export function carryMap({ cells, atlas, outlines }: LaidMap, { picture }: ShownMap, side: Side): CarriedMap | null {
  if (atlas === null) return null;
  const [ground, faces] = [new Carrier(atlas), new Carrier(atlas)];
  picture.surfaces.forEach(({ surface }, i) => {
    if (!hasArrived(picture, side, i)) return;
    if (surface.kind === 'wall') faces.upright(i, cells[i] as Cells);
    else (surface.kind === 'ground' ? ground : faces).level(i, cells[i] as Cells, outlines[i] as Ring);
  });
  return { ground: ground.laid(), faces: faces.laid() };
}
