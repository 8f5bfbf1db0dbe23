import { describe, expect, it } from 'vitest';
import { wallPanel } from '../../core/form/panel.ts';
import type { Ring, Vec3 } from '../../core/plane/vec.ts';
import { levelGrid, panelGrid } from '../../core/shade/exposure-grid.ts';
import { type Cells, cellAt, cellsOf, cornersOfCell, rowAt } from '../../renderer/maps/map-cells.ts';
import {
  blankPicture,
  fillIn,
  isBuiltOver,
  type MapSurface,
  spreadOf,
  valueAt,
} from '../../renderer/maps/map-picture.ts';
import { inAtlas, layOut, paint } from '../../renderer/massing/map-atlas.ts';

const ELL: Ring = [
  [10, 20],
  [18, 20],
  [18, 23],
  [13, 23],
  [13, 27],
  [10, 27],
];
const there = { before: true, after: true };
const ground: MapSurface = {
  surface: { kind: 'ground', outline: ELL, level_m: 0.5 },
  panel: null,
  grid: levelGrid(ELL, 0.5, 0.75),
  there,
};
const panel = wallPanel({ start: [3, 4], end: [9, 12] }, 0, 1.5, 10, 6);
const wall: MapSurface = { surface: { kind: 'wall', block: 'B', wall: 0 }, panel, grid: panelGrid(panel, 0.9), there };

const cellsOfAll = (): readonly [Cells, Cells] => [cellsOf(ground, ELL), cellsOf(wall, [])];

describe('the cells of a map', () => {
  it.each([
    ['level outline', 0, ground],
    ['wall', 1, wall],
  ] as const)('%s: the place of every receptor is read from its own cell', (_, which, { grid }) => {
    const cells = cellsOfAll()[which] as Cells;
    grid.cell.forEach((_cell, row) => {
      const at: Vec3 = [grid.receptors.x[row]!, grid.receptors.y[row]!, grid.receptors.z[row]!];
      const cell = cellAt(cells, at);
      expect(cell === null ? null : rowAt(cells, cell)).toBe(row);
      const corners = cornersOfCell(cells, cell ?? [0, 0]);
      for (const k of [0, 1, 2] as const) expect(corners.reduce((sum, c) => sum + c[k] / 4, 0)).toBeCloseTo(at[k], 9);
    });
  });

  it('holds nothing beside the surface, and in the notch of its outline', () => {
    const [cells, ofWall] = cellsOfAll();
    expect(cellAt(cells, [9.9, 21, 0.5])).toBeNull();
    expect(cellAt(ofWall, [3, 4, 7.6])).toBeNull();
    const notch = cellAt(cells, [17, 26, 0.5]);
    expect(notch).not.toBeNull();
    expect(rowAt(cells, notch ?? [0, 0])).toBeNull();
  });
});

describe('the picture of a map', () => {
  it('lays surfaces side by side, each with a border of its own', () => {
    const cells = cellsOfAll();
    const atlas = layOut(cells);
    if (atlas === null) throw new Error('did not fit');
    const taken = new Set<number>();
    atlas.slots.forEach(({ x, y, cells: c }) => {
      for (let j = y - 1; j <= y + c.up; j++)
        for (let i = x - 1; i <= x + c.across; i++) {
          expect(i >= 0 && j >= 0 && i < atlas.width && j < atlas.height).toBe(true);
          expect(taken.has(j * atlas.width + i)).toBe(false);
          taken.add(j * atlas.width + i);
        }
    });
  });

  it('shows the middle of every cell in the colour of its number', () => {
    const cells = cellsOfAll();
    const atlas = layOut(cells);
    if (atlas === null) throw new Error('did not fit');
    const table = Uint8Array.from({ length: 1024 }, (_, i) => (i % 4 === 3 ? 255 : i >> 2));
    const shade = (surface: number, row: number): number => 1 + ((surface * 97 + row) % 250);
    const pixels = paint(atlas, shade, table);
    cells.forEach((c, surface) => {
      for (let j = 0; j < c.up; j++)
        for (let i = 0; i < c.across; i++) {
          const row = rowAt(c, [i, j]);
          if (row === null) continue;
          const [u, v] = inAtlas(atlas, surface, (i + 0.5) / c.across, (j + 0.5) / c.up);
          const at = 4 * (Math.floor(v * atlas.height) * atlas.width + Math.floor(u * atlas.width));
          expect(pixels[at]).toBe(shade(surface, row));
        }
    });
  });

  it('colours what an outline cuts off a cell as the cell beside it', () => {
    const slant: Ring = [
      [0, 0],
      [6, 0],
      [0, 6],
    ];
    const cells = cellsOf(
      { surface: { kind: 'roof', block: 'B' }, panel: null, grid: levelGrid(slant, 3, 1), there },
      slant,
    );
    const atlas = layOut([cells]);
    if (atlas === null) throw new Error('did not fit');
    const table = Uint8Array.from({ length: 1024 }, () => 255);
    table.set([0, 0, 0, 0], 0);
    const pixels = paint(atlas, () => 1, table);
    for (let t = 0.05; t < 1; t += 0.1) {
      const [u, v] = inAtlas(atlas, 0, t * 0.999, (1 - t) * 0.999);
      expect(pixels[4 * (Math.floor(v * atlas.height) * atlas.width + Math.floor(u * atlas.width))]).toBe(255);
    }
  });

  it('says so where a picture would be longer than a graphics card takes', () => {
    const long: Ring = [
      [0, 0],
      [9000, 0],
      [9000, 1],
      [0, 1],
    ];
    const surface: MapSurface = { ...ground, grid: levelGrid(long, 0, 1) };
    expect(layOut([cellsOf(surface, long)])).toBeNull();
  });
});

describe('the numbers of a map as they arrive', () => {
  const values = (minutes: readonly number[], covered: readonly number[] = []) => ({
    minutes: Float64Array.from(minutes),
    beam: Float64Array.from(minutes, (m) => m * 2),
    sky: Float64Array.from(minutes, () => 3),
    ground: Float64Array.from(minutes, () => 1),
    covered: Uint8Array.from(minutes, (_, i) => covered[i] ?? 0),
  });

  it('knows nothing of a cell before its tile is there, and counts only what is known', () => {
    const picture = blankPicture([wall]);
    expect(valueAt(picture, 'sun', 'after', 0, 5)).toBeNull();
    expect(spreadOf(picture, 'sun', 'after')).toBeNull();
    fillIn(picture, 0, ['after'], 4, values([60, 120, 180]));
    expect(valueAt(picture, 'sun', 'after', 0, 5)).toBe(2);
    expect(valueAt(picture, 'energy', 'after', 0, 5)).toBe(244);
    expect(spreadOf(picture, 'sun', 'after')).toEqual({ least: 1, mean: 2, most: 3 });
    expect(valueAt(picture, 'sun', 'change', 0, 5)).toBeNull();
    fillIn(picture, 0, ['before'], 5, values([180]));
    expect(valueAt(picture, 'sun', 'change', 0, 5)).toBe(-1);
  });

  it('has no number inside a block, nor where a surface does not stand', () => {
    const proposed: MapSurface = { ...wall, there: { before: false, after: true } };
    const picture = blankPicture([proposed]);
    fillIn(picture, 0, ['before', 'after'], 0, values([60, 60], [1, 0]));
    expect(valueAt(picture, 'sun', 'after', 0, 0)).toBeNull();
    expect(isBuiltOver(picture, 'after', 0, 0)).toBe(true);
    expect(valueAt(picture, 'sun', 'after', 0, 1)).toBe(1);
    expect(valueAt(picture, 'sun', 'before', 0, 1)).toBeNull();
    expect(valueAt(picture, 'sun', 'change', 0, 1)).toBeNull();
  });

  it('weighs surfaces by their cells when it takes the mean', () => {
    const picture = blankPicture([wall, ground]);
    const fill = (s: number, m: number, n: number): void =>
      fillIn(picture, s, ['after'], 0, values(Array.from({ length: n }, () => m)));
    fill(0, 60, wall.grid.cell.length);
    fill(1, 240, ground.grid.cell.length);
    const area = (m: MapSurface): number => m.grid.cell.length * m.grid.cell_m[0] * m.grid.cell_m[1];
    const mean = (area(wall) + 4 * area(ground)) / (area(wall) + area(ground));
    expect(spreadOf(picture, 'sun', 'after')?.mean).toBeCloseTo(mean, 9);
  });
});
