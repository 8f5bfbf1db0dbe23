import type { Cells } from '../maps/map-cells.ts';

/** Where the cells of one surface lie in the picture that is laid over all of them [pixels]; a border of one runs round each. */
type Slot = { readonly x: number; readonly y: number; readonly cells: Cells };

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
    slots[i] = { x: x + 1, y: y + 1, cells };
    x += cells.across + 2;
    high = Math.max(high, cells.up + 2);
  }
  const height = y + high;
  return width > MOST_px || height > MOST_px ? null : { width, height: Math.max(1, height), slots };
}

/** Rings of cells that take their neighbours' colour: what a slanting outline cuts is never farther from a middle inside it. */
const RINGS = 2;

/**
 * The entries of the colour table for the cells of a surface. A cell whose middle lies outside the outline, or inside a block
 * that stands on the ground, has no number; the part of it that can be seen takes the colour of a cell beside it.
 */
function shadesOf({ across, up, rowOf }: Cells, shade: (row: number) => number): Uint8Array {
  let shades = Uint8Array.from(rowOf, (row) => (row < 0 ? 0 : shade(row)));
  const at = (i: number, j: number): number => (i < 0 || j < 0 || i >= across || j >= up ? 0 : shades[j * across + i]!);
  for (let ring = 0; ring < RINGS; ring++) {
    const next = shades.slice();
    for (let j = 0; j < up; j++)
      for (let i = 0; i < across; i++)
        if (shades[j * across + i] === 0)
          next[j * across + i] = at(i - 1, j) || at(i + 1, j) || at(i, j - 1) || at(i, j + 1);
    shades = next;
  }
  return shades;
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
): Uint8Array<ArrayBuffer> {
  const pixels = new Uint8Array(width * height * 4);
  slots.forEach(({ x, y, cells }, s) => {
    const { across, up } = cells;
    const shades = shadesOf(cells, (row) => shade(s, row));
    for (let j = -1; j <= up; j++)
      for (let i = -1; i <= across; i++) {
        const cell = Math.min(up - 1, Math.max(0, j)) * across + Math.min(across - 1, Math.max(0, i));
        const from = 4 * shades[cell]!;
        const to = 4 * ((y + j) * width + x + i);
        for (let k = 0; k < 4; k++) pixels[to + k] = table[from + k]!;
      }
  });
  return pixels;
}

/** Where a place of a surface, across and up 0..1, lies in the picture, 0..1. */
export function inAtlas(atlas: Atlas, surface: number, u: number, v: number): readonly [number, number] {
  const { x, y, cells } = atlas.slots[surface] as Slot;
  return [(x + u * cells.across) / atlas.width, (y + v * cells.up) / atlas.height];
}
