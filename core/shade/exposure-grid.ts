import type { Panel, Solid } from '../form/model.ts';
import { edgeOf, pointOn, wallPanel } from '../form/panel.ts';
import { centroid, contains } from '../plane/ring.ts';
import type { Ring, Vec3 } from '../plane/vec.ts';
import type { Receptors } from './skyline-groups.ts';

/** Receptors spread over one surface. Each stands for an equal share of it. */
export type ExposureGrid = {
  readonly receptors: Receptors;
  /** Size of a cell along and up the surface [m]; each receptor is the middle of its cell. */
  readonly cell_m: readonly [number, number];
  /** Cells along and up; over an outline, only those whose middle lies in it are kept. */
  readonly across: number;
  readonly up: number;
  /** Number of each receptor's cell, row by row from the surface's lower left corner. */
  readonly cell: Uint32Array;
};

/** How many cells a length is cut into: cells of about the spacing, and always whole ones. */
const cells = (length_m: number, spacing_m: number): number => Math.max(1, Math.round(length_m / spacing_m));

/** How many receptors a level outline asks for at most; cheap, so that too many can be refused before any is made. */
export function cellsOfOutline(outline: Ring, spacing_m: number): number {
  const [x0, y0, x1, y1] = boundsOf(outline);
  return cells(x1 - x0, spacing_m) * cells(y1 - y0, spacing_m);
}

/** How many receptors a rectangle asks for. */
export const cellsOfPanel = (width_m: number, height_m: number, spacing_m: number): number =>
  cells(width_m, spacing_m) * cells(height_m, spacing_m);

function boundsOf(outline: Ring): readonly [number, number, number, number] {
  let [x0, y0, x1, y1] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const p of outline) {
    x0 = Math.min(x0, p[0]);
    y0 = Math.min(y0, p[1]);
    x1 = Math.max(x1, p[0]);
    y1 = Math.max(y1, p[1]);
  }
  return [x0, y0, x1, y1];
}

/**
 * A grid on a level outline: ground or a flat roof, looking up. An outline so narrow that no cell's middle lies in it gets
 * one receptor at its centre of area.
 */
export function levelGrid(outline: Ring, level_m: number, spacing_m: number): ExposureGrid {
  const [x0, y0, x1, y1] = boundsOf(outline);
  const across = cells(x1 - x0, spacing_m);
  const up = cells(y1 - y0, spacing_m);
  const dx = (x1 - x0) / across;
  const dy = (y1 - y0) / up;
  const points: Vec3[] = [];
  const cell: number[] = [];
  for (let j = 0; j < up; j++) {
    for (let i = 0; i < across; i++) {
      const x = x0 + (i + 0.5) * dx;
      const y = y0 + (j + 0.5) * dy;
      if (!contains(outline, x, y)) continue;
      points.push([x, y, level_m]);
      cell.push(j * across + i);
    }
  }
  if (points.length === 0) {
    const c = centroid(outline);
    points.push([c[0], c[1], level_m]);
    cell.push(0);
  }
  return { receptors: facing(points, [0, 0, 1]), cell_m: [dx, dy], across, up, cell: Uint32Array.from(cell) };
}

/** A grid on a rectangle: a wall, a window. */
export function panelGrid(panel: Panel, spacing_m: number): ExposureGrid {
  const across = cells(panel.width_m, spacing_m);
  const up = cells(panel.height_m, spacing_m);
  const du = panel.width_m / across;
  const dv = panel.height_m / up;
  const points: Vec3[] = [];
  for (let j = 0; j < up; j++) {
    for (let i = 0; i < across; i++) points.push(pointOn(panel, (i + 0.5) * du, (j + 0.5) * dv, 0));
  }
  const cell = Uint32Array.from(points, (_, i) => i);
  return { receptors: facing(points, panel.normal), cell_m: [du, dv], across, up, cell };
}

/** Wall n of a solid as a panel, seen from outside; null where it has no length or no height. */
export function solidWall(solid: Solid, wall: number): Panel | null {
  const edge = edgeOf(solid.outline, wall);
  const run = Math.hypot(edge.end[0] - edge.start[0], edge.end[1] - edge.start[1]);
  const height = solid.top_m - solid.base_m;
  return run > 0 && height > 0 ? wallPanel(edge, 0, solid.base_m, run, height) : null;
}

/** Points that all look one way. */
export function facing(points: readonly Vec3[], normal: Vec3): Receptors {
  const n = points.length;
  return {
    x: Float64Array.from(points, (p) => p[0]),
    y: Float64Array.from(points, (p) => p[1]),
    z: Float64Array.from(points, (p) => p[2]),
    nx: new Float64Array(n).fill(normal[0]),
    ny: new Float64Array(n).fill(normal[1]),
    nz: new Float64Array(n).fill(normal[2]),
  };
}

/** Several sets of receptors as one, in order. */
export function joined(sets: readonly Receptors[]): Receptors {
  const n = sets.reduce((sum, s) => sum + s.x.length, 0);
  const column = (key: keyof Receptors): Float64Array => {
    const all = new Float64Array(n);
    let at = 0;
    for (const s of sets) {
      all.set(s[key], at);
      at += s[key].length;
    }
    return all;
  };
  return { x: column('x'), y: column('y'), z: column('z'), nx: column('nx'), ny: column('ny'), nz: column('nz') };
}
