import type { Point, Ring, Vec3 } from '../../core/plane/vec.ts';
import type { MapSurface } from './map-picture.ts';

/** Where the cells of a surface lie: its plane, and which cell of the whole rectangle each receptor stands in the middle of. */
export type Cells = {
  readonly across: number;
  readonly up: number;
  readonly corner: Vec3;
  readonly right: Vec3;
  readonly upward: Vec3;
  readonly cell_m: readonly [number, number];
  /** Row of the map's numbers for each cell of the rectangle, row by row; −1 where no receptor stands. */
  readonly rowOf: Int32Array;
};

/** @param outline  of what is level; walls do without */
export function cellsOf({ panel, grid }: MapSurface, outline: Ring): Cells {
  const rowOf = new Int32Array(grid.across * grid.up).fill(-1);
  grid.cell.forEach((cell, row) => {
    rowOf[cell] = row;
  });
  const { across, up, cell_m } = grid;
  if (panel !== null) return { across, up, cell_m, rowOf, corner: panel.origin, right: panel.right, upward: panel.up };
  const x = Math.min(...outline.map((p: Point) => p[0]));
  const y = Math.min(...outline.map((p: Point) => p[1]));
  const z = grid.receptors.z[0] ?? 0;
  return { across, up, cell_m, rowOf, corner: [x, y, z], right: [1, 0, 0], upward: [0, 1, 0] };
}

/** The cell, across and up, that a place on the surface lies in; null beside it. */
export function cellAt(cells: Cells, at: Vec3): readonly [number, number] | null {
  const d: Vec3 = [at[0] - cells.corner[0], at[1] - cells.corner[1], at[2] - cells.corner[2]];
  const along = (v: Vec3): number => d[0] * v[0] + d[1] * v[1] + d[2] * v[2];
  const i = Math.floor(along(cells.right) / cells.cell_m[0] + 1e-9);
  const j = Math.floor(along(cells.upward) / cells.cell_m[1] + 1e-9);
  return i >= 0 && j >= 0 && i < cells.across && j < cells.up ? [i, j] : null;
}

/** Row of the map's numbers for a cell; null where no receptor stands. */
export const rowAt = (cells: Cells, [i, j]: readonly [number, number]): number | null => {
  const row = cells.rowOf[j * cells.across + i] ?? -1;
  return row < 0 ? null : row;
};

/** The four corners of a cell. */
export function cornersOfCell(cells: Cells, [i, j]: readonly [number, number]): readonly Vec3[] {
  const at = (u: number, v: number): Vec3 => {
    const [x, y] = [u * cells.cell_m[0], v * cells.cell_m[1]];
    const k = (n: 0 | 1 | 2): number => cells.corner[n] + x * cells.right[n] + y * cells.upward[n];
    return [k(0), k(1), k(2)];
  };
  return [at(i, j), at(i + 1, j), at(i + 1, j + 1), at(i, j + 1)];
}
