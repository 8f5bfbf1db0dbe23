import type { Model, Panel, WindowForm } from '../form/model.ts';
import { dot, minus } from '../plane/vec.ts';
import type { ExposureGrid } from '../shade/exposure-grid.ts';
import { cividis } from './cividis.ts';
import { NEVER } from './colour-key.ts';
import type { Hatch, Mark, Mm } from './drawing.ts';
import { EXISTING_LINE, FINE, INK, SOFT, WHITE } from './ink.ts';
import { line, rect, words } from './marks.ts';
import { measure, READ, SMALL } from './measure.ts';
import { fixed } from './numerals.ts';

/** A map over one wall, seen from outside. */
export type ElevationMap = {
  /** Such as `Infill, wall 2, faces west`. */
  readonly title: string;
  /** The rectangle that the grid covers. */
  readonly panel: Panel;
  readonly grid: ExposureGrid;
  /** One value a cell of the grid, in the unit of the sheet. */
  readonly value: Float64Array;
  /** 1 where the cell is built over; null: none is. */
  readonly covered: Uint8Array | null;
};

/** Where there is no wall to the air. */
const BUILT_OVER = '#ffffff';
const BUILT_OVER_HATCH: Hatch = { angle_deg: 45, spacing: 3, stroke: { colour: SOFT, width: 0.13 } };

/** Cells reach this far under their neighbours, more than a dot of a screen, so that viewers show no seams between them. */
const UNDER: Mm = 0.5;
/** Figures on the map stand at least so far apart. */
const FIGURE_SPACE: Mm = 11;

/** One elevation at a scale, its lower left corner at a place on the page. @param most  what the end of the scale stands for */
export function elevation(
  map: ElevationMap,
  model: Model,
  x: Mm,
  bottom: Mm,
  scale: number,
  most: number,
): readonly Mark[] {
  const k = 1000 / scale;
  const { grid, panel } = map;
  const [cw, ch] = [grid.cell_m[0] * k, grid.cell_m[1] * k];
  const marks: Mark[] = [];
  grid.cell.forEach((cell, i) => {
    const [column, row] = [cell % grid.across, Math.floor(cell / grid.across)];
    const fill = cellColour(map, i, most);
    const hatch = map.covered?.[i] === 1 ? { hatch: BUILT_OVER_HATCH } : {};
    marks.push(rect(x + column * cw, bottom - (row + 1) * ch, cw + UNDER, ch + UNDER, { fill, ...hatch }));
  });
  const [width, height] = [panel.width_m * k, panel.height_m * k];
  marks.push(
    rect(x + width, bottom - height - 1, 1, height + 2, { fill: WHITE }),
    rect(x, bottom, width + 1, 1, { fill: WHITE }),
  );
  const frames: Frame[] = [];
  for (const w of windowsOn(panel, model.windows)) {
    const [wx, wy] = [x + w.x * k, bottom - (w.y + w.window.height_m) * k];
    const [ww, wh] = [w.window.width_m * k, w.window.height_m * k];
    frames.push([wx, wy, wx + ww, wy + wh]);
    marks.push(rect(wx, wy, ww, wh, { stroke: { colour: WHITE, width: 0.5 } }), rect(wx, wy, ww, wh, { stroke: FINE }));
  }
  marks.push(...figures(map, x, bottom, k, most, frames));
  marks.push(rect(x, bottom - height, width, height, { stroke: EXISTING_LINE }));
  marks.push(line(x - 3, bottom, x + width + 3, bottom, { colour: INK, width: 0.5 }));
  return [{ kind: 'group', label: map.title, marks }];
}

function cellColour(map: ElevationMap, i: number, most: number): string {
  if (map.covered?.[i] === 1) return BUILT_OVER;
  const value = map.value[i] as number;
  return value > 0 ? cividis(value / most) : NEVER;
}

/** A window on the page: left, top, right, bottom. */
type Frame = readonly [Mm, Mm, Mm, Mm];

/** Whether a box crosses the outline of a frame: it neither lies wholly inside nor wholly outside. */
function cutsLine([left, top, right, bottom]: Frame, x0: Mm, y0: Mm, x1: Mm, y1: Mm): boolean {
  const isApart = x1 < left || x0 > right || y1 < top || y0 > bottom;
  const isInside = x0 > left && x1 < right && y0 > top && y1 < bottom;
  return !isApart && !isInside;
}

/** Values as figures on a coarser grid: the map is to be read without its colours too. */
function figures(
  map: ElevationMap,
  x: Mm,
  bottom: Mm,
  k: number,
  most: number,
  frames: readonly Frame[],
): readonly Mark[] {
  const { grid } = map;
  const [cw, ch] = [grid.cell_m[0] * k, grid.cell_m[1] * k];
  const [stepX, stepY] = [Math.max(1, Math.ceil(FIGURE_SPACE / cw)), Math.max(1, Math.ceil(FIGURE_SPACE / 1.6 / ch))];
  const size = Math.min(cw * stepX, 1.6 * ch * stepY) >= FIGURE_SPACE * 1.2 ? READ : SMALL;
  const marks: Mark[] = [];
  grid.cell.forEach((cell, i) => {
    const [column, row] = [cell % grid.across, Math.floor(cell / grid.across)];
    if (column % stepX !== Math.floor(stepX / 2) || row % stepY !== Math.floor(stepY / 2) || map.covered?.[i] === 1)
      return;
    const value = map.value[i] as number;
    const text = fixed(value, most >= 20 ? 0 : 1);
    const half = measure(text, size) / 2 + 0.4;
    if ((column + 0.5) * cw < half || (grid.across - column - 0.5) * cw < half) return;
    if ((row + 0.5) * ch < size * 0.5 || (grid.up - row - 0.5) * ch < size * 0.5) return;
    const [cx, cy] = [x + (column + 0.5) * cw, bottom - (row + 0.5) * ch];
    if (frames.some((f) => cutsLine(f, cx - half, cy - size * 0.45, cx + half, cy + size * 0.45))) return;
    const dark = value > 0 && value / most < 0.5;
    marks.push(words(text, cx, cy + size * 0.35, { size, anchor: 'middle', colour: dark ? WHITE : INK }));
  });
  return marks;
}

/** The windows that lie in a wall, by their lower left corners along and up it [m]. */
function windowsOn(
  panel: Panel,
  windows: readonly WindowForm[],
): readonly { readonly window: WindowForm; readonly x: number; readonly y: number }[] {
  return windows.flatMap((window) => {
    if (dot(window.normal, panel.normal) < 0.999) return [];
    const v = minus(window.origin, panel.origin);
    if (Math.abs(dot(v, panel.normal)) > 0.01) return [];
    const [x, y] = [dot(v, panel.right), dot(v, panel.up)];
    const inside =
      x > -0.01 &&
      y > -0.01 &&
      x + window.width_m < panel.width_m + 0.01 &&
      y + window.height_m < panel.height_m + 0.01;
    return inside ? [{ window, x, y }] : [];
  });
}
