import { convexPieces } from '../plane/convex-pieces.ts';
import { contains } from '../plane/ring.ts';
import type { Point, Ring } from '../plane/vec.ts';
import type { ExposureGrid } from '../shade/exposure-grid.ts';
import { cividis } from './cividis.ts';
import { NEVER } from './colour-key.ts';
import type { Mark } from './drawing.ts';
import { onPage, type PlanView } from './plan-view.ts';

/** A map over something level: a roof, or the ground. */
export type LevelMap = {
  readonly outline: Ring;
  readonly grid: ExposureGrid;
  /** One value a receptor of the grid, in the unit of the sheet. */
  readonly value: Float64Array;
  /** 1 where the receptor lies inside a solid. */
  readonly covered: Uint8Array;
};

/** Colours of a plan: more steps than the eye tells apart, few enough that neighbours join into one patch. */
const STEPS = 40;

/** The colour of a value. @param most what the end of the scale stands for */
export const mapColour = (value: number, most: number): string =>
  value > 0 ? cividis((Math.min(STEPS - 1, Math.floor((value / most) * STEPS)) + 0.5) / STEPS) : NEVER;

/**
 * The cells of a map in their colours, cut at its outline. A cell whose middle lies outside the outline, or under a building, has
 * no value of its own; what shows of it takes that of a neighbour, so that no white teeth stand along an edge.
 * @param most what the end of the scale stands for
 */
export function levelMapMarks(view: PlanView, map: LevelMap, most: number): readonly Mark[] {
  const { grid, outline } = map;
  const value = valuesByCell(map);
  const [left, bottom] = cornerOf(outline);
  const [dx, dy] = grid.cell_m;
  const pieces = convexPieces(outline);
  const patches = new Map<string, (readonly (readonly [number, number])[])[]>();
  const put = (colour: string, ring: Ring): void => {
    const runs = patches.get(colour) ?? [];
    runs.push(ring.map((p) => onPage(view, p)));
    patches.set(colour, runs);
  };
  for (let row = 0; row < grid.up; row++) {
    const y = bottom + row * dy;
    let run: { readonly colour: string; readonly from: number } | null = null;
    const close = (to: number): void => {
      if (run) put(run.colour, box(left + run.from * dx, y, left + to * dx, y + dy));
      run = null;
    };
    for (let column = 0; column < grid.across; column++) {
      const near = nearValue(value, grid, column, row);
      const x = left + column * dx;
      const cell = box(x, y, x + dx, y + dy);
      const colour = near === null ? null : mapColour(near, most);
      const isWhole = colour !== null && cell.every(([cx, cy]) => contains(outline, cx, cy));
      const before = run as { readonly colour: string } | null;
      if (before !== null && (!isWhole || before.colour !== colour)) close(column);
      if (colour === null) continue;
      if (isWhole) run ??= { colour, from: column };
      else for (const piece of pieces) put(colour, cutTo(cell, piece));
    }
    close(grid.across);
  }
  const ground = mapColour(meanOf(map), most);
  const base: Mark = { kind: 'path', runs: [outline.map((p) => onPage(view, p))], closed: true, fill: ground };
  const cells = [...patches].map(([fill, runs]) => ({
    kind: 'path' as const,
    runs: runs.filter((r) => r.length > 2),
    closed: true,
    fill,
    stroke: { colour: fill, width: 0.3 },
  }));
  return [base, ...cells];
}

/** The mean of what is not built over; it lies under the cells, so that viewers show no white seams between them. */
function meanOf(map: LevelMap): number {
  const values = [...map.value].filter((_, i) => map.covered[i] !== 1);
  return values.reduce((a, b) => a + b, 0) / Math.max(1, values.length);
}

const box = (x0: number, y0: number, x1: number, y1: number): Ring => [
  [x0, y0],
  [x1, y0],
  [x1, y1],
  [x0, y1],
];

/** The lower left corner of the box round an outline, from which a grid's cells are counted. */
export function cornerOf(outline: Ring): Point {
  return [Math.min(...outline.map((p) => p[0])), Math.min(...outline.map((p) => p[1]))];
}

/** Values by the number of the cell; NaN where there is none. */
export function valuesByCell(map: LevelMap): Float64Array {
  const { grid } = map;
  const value = new Float64Array(grid.across * grid.up).fill(Number.NaN);
  grid.cell.forEach((cell, i) => {
    if (map.covered[i] !== 1) value[cell] = map.value[i] as number;
  });
  return value;
}

/** A cell's own value, or that of the first of its neighbours that has one; null where none has. */
function nearValue(value: Float64Array, grid: ExposureGrid, column: number, row: number): number | null {
  for (const [i, j] of NEAR) {
    const [c, r] = [column + i, row + j];
    if (c < 0 || r < 0 || c >= grid.across || r >= grid.up) continue;
    const found = value[r * grid.across + c] as number;
    if (!Number.isNaN(found)) return found;
  }
  return null;
}
const NEAR: readonly (readonly [number, number])[] = [
  [0, 0],
  [-1, 0],
  [1, 0],
  [0, -1],
  [0, 1],
  [-1, -1],
  [1, -1],
  [-1, 1],
  [1, 1],
];

/**
 * What of a ring lies inside a convex anticlockwise one.
 * @see I. E. Sutherland, G. W. Hodgman, Communications of the ACM 17, 32–42 (1974)
 */
function cutTo(ring: Ring, convex: Ring): Ring {
  let left: Point[] = [...ring];
  convex.forEach((a, i) => {
    const b = convex[(i + 1) % convex.length] as Point;
    const side = (p: Point): number => (b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0]);
    left = left.flatMap((p, k) => {
      const q = left[(k + 1) % left.length] as Point;
      const [sp, sq] = [side(p), side(q)];
      const t = sp / (sp - sq);
      const cross: Point[] = sp >= 0 === sq >= 0 ? [] : [[p[0] + t * (q[0] - p[0]), p[1] + t * (q[1] - p[1])]];
      return sp >= 0 ? [p, ...cross] : cross;
    });
  });
  return left;
}
