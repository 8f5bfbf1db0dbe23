import { rowAt } from '../maps/map-cells.ts';
import { cursor, shownMap } from '../maps/map-shown.ts';
import { faceOf } from '../state/faces.ts';
import { leadOf } from '../state/selection.ts';
import { laidMap } from './laid-map.ts';

const MOVES: { readonly [key: string]: readonly [number, number] } = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, 1],
  ArrowDown: [0, -1],
};

/** The surface that reading begins on: the selected face, else the first. */
function firstSurface(): number {
  const id = leadOf('face');
  if (id === null) return 0;
  const face = faceOf(id);
  const found = shownMap
    .peek()
    ?.picture.surfaces.findIndex(
      ({ surface: s }) =>
        s.kind === face.kind &&
        s.block === face.block &&
        (face.kind === 'roof' || (s.kind === 'wall' && s.wall === face.wall)),
    );
  return Math.max(0, found ?? 0);
}

/** Puts the cursor on the middle cell of a surface that has one. */
function beginOn(surface: number): void {
  const cells = laidMap.peek()?.cells[surface];
  if (cells === undefined) return;
  const middle: readonly [number, number] = [Math.floor(cells.across / 2), Math.floor(cells.up / 2)];
  const first = cells.rowOf.findIndex((row) => row >= 0);
  const cell =
    rowAt(cells, middle) !== null ? middle : ([first % cells.across, Math.floor(first / cells.across)] as const);
  cursor.value = { surface, cell };
}

/**
 * Reading the map by keyboard: R begins and ends, arrows go from cell to cell, brackets from surface to surface.
 * @returns whether the key meant something here
 */
export function pressReadingKey(event: KeyboardEvent): boolean {
  if (event.ctrlKey || event.metaKey || event.altKey || laidMap.peek() === null) return false;
  const at = cursor.peek();
  const key = event.key.toLowerCase();
  if (at === null) {
    if (key !== 'r') return false;
    beginOn(firstSurface());
    return true;
  }
  if (key === 'r' || key === 'escape') {
    cursor.value = null;
    return true;
  }
  if (key === '[' || key === ']') {
    const count = laidMap.peek()?.cells.length ?? 1;
    beginOn((at.surface + (key === ']' ? 1 : count - 1)) % count);
    return true;
  }
  const move = MOVES[event.key];
  if (move === undefined) return false;
  const cells = laidMap.peek()?.cells[at.surface];
  if (cells === undefined) return true;
  // Over what has no cells, such as the ground beside an outline, on to the next that has one.
  let cell = at.cell;
  do cell = [cell[0] + move[0], cell[1] + move[1]];
  while (isInside(cell, cells) && rowAt(cells, cell) === null);
  if (isInside(cell, cells)) cursor.value = { surface: at.surface, cell };
  return true;
}

const isInside = ([i, j]: readonly [number, number], { across, up }: { across: number; up: number }): boolean =>
  i >= 0 && j >= 0 && i < across && j < up;
