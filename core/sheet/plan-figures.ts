import type { Model, Stage } from '../form/model.ts';
import { contains } from '../plane/ring.ts';
import type { Point } from '../plane/vec.ts';
import type { Mark, Mm } from './drawing.ts';
import { INK, WHITE } from './ink.ts';
import { cornerOf, type LevelMap, valuesByCell } from './level-map.ts';
import { words } from './marks.ts';
import { measure, READ, SMALL } from './measure.ts';
import { fixed } from './numerals.ts';
import { inFrame, onPage, type PlanView } from './plan-view.ts';

/** The ground and the roofs that stand at one stage. */
export type PlanStage = {
  readonly stage: Stage;
  readonly ground: LevelMap;
  readonly roofs: readonly (LevelMap & { readonly block: string })[];
};

/** Figures on the map stand at least so far apart. */
const FIGURE_SPACE: Mm = 13;

const figure = (value: number, most: number): string => fixed(value, most >= 20 ? 0 : 1);
const inkOn = (value: number, most: number): string => (value > 0 && value / most < 0.5 ? WHITE : INK);

/** Values on a coarser grid, where no building stands in the way: the map is to be read without its colours too. */
export function groundFigures(view: PlanView, standing: Model['solids'], map: LevelMap, most: number): readonly Mark[] {
  const { grid } = map;
  const value = valuesByCell(map);
  const [left, bottom] = cornerOf(map.outline);
  const k = 1000 / view.scale;
  const [stepX, stepY] = grid.cell_m.map((c) => Math.max(1, Math.ceil(FIGURE_SPACE / (c * k)))) as [number, number];
  const marks: Mark[] = [];
  for (let row = Math.floor(stepY / 2); row < grid.up; row += stepY) {
    for (let column = Math.floor(stepX / 2); column < grid.across; column += stepX) {
      const v = value[row * grid.across + column] as number;
      if (Number.isNaN(v)) continue;
      const at: Point = [left + (column + 0.5) * grid.cell_m[0], bottom + (row + 0.5) * grid.cell_m[1]];
      const text = figure(v, most);
      const [half, up] = [(measure(text, SMALL) / 2 + 0.6) / k, (SMALL * 0.5) / k];
      const corners = [-1, 0, 1].flatMap((i) => [-1, 1].map((j) => [at[0] + i * half, at[1] + j * up] as const));
      const isFree = corners.every(
        ([px, py]) => contains(map.outline, px, py) && !standing.some((s) => contains(s.outline, px, py)),
      );
      const [x, y] = onPage(view, at);
      // A figure that would lie half on dark and half on pale is left out: in neither ink could all of it be read.
      const reach = Math.ceil(half / grid.cell_m[0]);
      const across = value.subarray(
        row * grid.across + Math.max(0, column - reach),
        row * grid.across + column + reach + 1,
      );
      const inks = new Set([...across].filter((n) => !Number.isNaN(n)).map((n) => inkOn(n, most)));
      if (isFree && inks.size === 1)
        marks.push(words(text, x, y + SMALL * 0.35, { size: SMALL, anchor: 'middle', colour: inkOn(v, most) }));
    }
  }
  return marks;
}

/** The mean of each roof, written on it where it is large enough and not under a higher block. */
export function roofFigures(
  view: PlanView,
  standing: Model['solids'],
  stage: PlanStage,
  most: number,
): readonly Mark[] {
  const k = 1000 / view.scale;
  return stage.roofs.flatMap((roof) => {
    const solid = standing.find((s) => s.id === roof.block);
    if (!solid) return [];
    const values = [...roof.value].filter((_, i) => roof.covered[i] !== 1);
    if (values.length === 0) return [];
    const mean = values.reduce((a, b) => a + b, 0) / values.length;
    const text = figure(mean, most);
    const higher = standing.filter((s) => s.top_m > solid.top_m);
    const at = middleOf(roof);
    for (const size of [READ, SMALL]) {
      const [half, up] = [(measure(text, size, 'semibold') / 2 + 0.5) / k, (size * 0.45) / k];
      const fits = [-1, 0, 1]
        .flatMap((i) => [-1, 1].map((j) => [at[0] + i * half, at[1] + j * up] as const))
        .every(([px, py]) => contains(solid.outline, px, py) && !higher.some((s) => contains(s.outline, px, py)));
      const [x, y] = onPage(view, at);
      if (fits && inFrame(view, [x, y])) {
        const colour = inkOn(nearest(roof, at), most);
        return [words(text, x, y + size * 0.35, { size, anchor: 'middle', face: 'semibold' as const, colour })];
      }
    }
    return [];
  });
}

/** The receptor nearest to the middle of all that are not built over. */
function middleOf(map: LevelMap): Point {
  const { x, y } = map.grid.receptors;
  let [sx, sy, n] = [0, 0, 0];
  for (let i = 0; i < x.length; i++) {
    if (map.covered[i] === 1) continue;
    sx += x[i]!;
    sy += y[i]!;
    n++;
  }
  return [sx / n, sy / n];
}

function nearest(map: LevelMap, at: Point): number {
  const { x, y } = map.grid.receptors;
  let [best, value] = [Number.POSITIVE_INFINITY, 0];
  for (let i = 0; i < x.length; i++) {
    const away = Math.hypot(x[i]! - at[0], y[i]! - at[1]);
    if (map.covered[i] === 1 || away >= best) continue;
    [best, value] = [away, map.value[i] as number];
  }
  return value;
}
