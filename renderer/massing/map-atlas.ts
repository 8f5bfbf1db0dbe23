import type { Cells } from '../maps/map-cells.ts';

/** Where the cells of one surface lie in the picture that is laid over all of them [pixels]; a border of one runs round each. */
type Slot = { readonly x: number; readonly y: number; readonly cells: Cells; readonly shown: Int32Array };

/** All surfaces of a map in one picture, a pixel a cell. */
export type Atlas = { readonly width: number; readonly height: number; readonly slots: readonly Slot[] };

/** The longest side that every graphics card takes [pixels]. */
const MOST_px = 8192;

/**
 * Lays the cells of surfaces out side by side, the highest first, row after row.
 * @returns null where they do not fit a picture that a graphics card takes
 */
export function layOut(surfaces: readonly Cells[]): Atlas | null {
  const area = surfaces.reduce((sum, c) => sum + (c.across + 2) * (c.up + 2), 0);
  const widest = surfaces.reduce((most, c) => Math.max(most, c.across + 2), 1);
  const width = Math.max(widest, Math.ceil(Math.sqrt(area) * 1.1));
  const order = surfaces
    .map((_, i) => i)
    .sort((a, b) => (surfaces[b] as Cells).up - (surfaces[a] as Cells).up || a - b);
  const slots: Slot[] = [];
  let [x, y, high] = [0, 0, 0];
  for (const i of order) {
    const cells = surfaces[i] as Cells;
    if (x + cells.across + 2 > width) [x, y, high] = [0, y + high, 0];
    slots[i] = { x: x + 1, y: y + 1, cells, shown: spreadOut(cells) };
    x += cells.across + 2;
    high = Math.max(high, cells.up + 2);
  }
  const height = y + high;
  return width > MOST_px || height > MOST_px ? null : { width, height: Math.max(1, height), slots };
}

/**
 * The row of numbers that each cell is coloured by. An outline cuts cells whose middle lies outside it; the part of them that
 * is inside takes the colour of the nearest cell that has a receptor, found ring by ring.
 */
function spreadOut({ across, up, rowOf }: Cells): Int32Array {
  let shown = rowOf.slice();
  for (let ring = 0; ring < 2 && shown.includes(-1); ring++) {
    const next = shown.slice();
    for (let j = 0; j < up; j++)
      for (let i = 0; i < across; i++) {
        if (shown[j * across + i] !== -1) continue;
        for (const [di, dj] of [
          [-1, 0],
          [1, 0],
          [0, -1],
          [0, 1],
        ] as const) {
          const [u, v] = [i + di, j + dj];
          if (u < 0 || v < 0 || u >= across || v >= up || shown[v * across + u] === -1) continue;
          next[j * across + i] = shown[v * across + u]!;
          break;
        }
      }
    shown = next;
  }
  return shown;
}

/**
 * Colours the picture.
 * @param shade  entry of the colour table for a surface and a row of its numbers
 * @param table  four bytes an entry
 */
export function paint(
  { width, height, slots }: Atlas,
  shade: (surface: number, row: number) => number,
  table: Uint8Array,
  into = new Uint8Array(width * height * 4),
): Uint8Array<ArrayBuffer> {
  slots.forEach(({ x, y, cells, shown }, s) => {
    for (let j = -1; j <= cells.up; j++)
      for (let i = -1; i <= cells.across; i++) {
        const u = Math.min(cells.across - 1, Math.max(0, i));
        const v = Math.min(cells.up - 1, Math.max(0, j));
        const row = shown[v * cells.across + u]!;
        const from = 4 * (row < 0 ? 0 : shade(s, row));
        const to = 4 * ((y + j) * width + x + i);
        for (let k = 0; k < 4; k++) into[to + k] = table[from + k]!;
      }
  });
  return into;
}

/** Where a place of a surface, across and up 0..1, lies in the picture, 0..1. */
export function inAtlas(atlas: Atlas, surface: number, u: number, v: number): readonly [number, number] {
  const { x, y, cells } = atlas.slots[surface] as Slot;
  return [(x + u * cells.across) / atlas.width, (y + v * cells.up) / atlas.height];
}
