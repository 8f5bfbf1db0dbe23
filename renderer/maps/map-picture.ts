import type { Panel, Stage } from '../../core/form/model.ts';
import type { ExposureGrid } from '../../core/shade/exposure-grid.ts';
import type { Exposure } from '../../core/shade/exposure-slice.ts';
import type { Surface } from '../../core/study/exposure-map.ts';

/** A surface of a map with its cells. `panel` is the rectangle of a wall; null for what is level. */
export type MapSurface = {
  readonly surface: Surface;
  readonly panel: Panel | null;
  readonly grid: ExposureGrid;
  readonly there: { readonly [S in Stage]: boolean };
};

/** The numbers of one surface at one stage. Cells that are not worked out yet hold NaN. */
export type Values = Pick<Exposure, 'minutes' | 'beam' | 'sky' | 'ground' | 'covered'>;

/** What a cell is coloured and read by: hours of direct sun, or energy on its plane [Wh/m²]. */
export type Quantity = 'sun' | 'energy';
/** What stands, or what the proposal changes. */
export type Side = Stage | 'change';

/** A map as it grows tile by tile. */
export type MapPicture = {
  readonly surfaces: readonly MapSurface[];
  /** One entry a surface; null where it is not there at that stage. */
  readonly values: { readonly [S in Stage]: readonly (Values | null)[] };
};

function blank(cells: number): Values {
  const unknown = (): Float64Array => new Float64Array(cells).fill(NaN);
  return {
    minutes: unknown(),
    beam: unknown(),
    sky: unknown(),
    ground: unknown(),
    covered: new Uint8Array(cells),
  };
}

/** A map of which nothing is known yet. */
export const blankPicture = (surfaces: readonly MapSurface[]): MapPicture => {
  const at = (stage: Stage): (Values | null)[] =>
    surfaces.map((s) => (s.there[stage] ? blank(s.grid.cell.length) : null));
  return { surfaces, values: { before: at('before'), after: at('after') } };
};

/** Puts a tile in its place. @param from the first of the surface's cells that it is for */
export function fillIn(
  picture: MapPicture,
  surface: number,
  stages: readonly Stage[],
  from: number,
  tile: Values,
): void {
  for (const stage of stages) {
    const values = picture.values[stage][surface];
    if (!values) continue;
    for (const key of ['minutes', 'beam', 'sky', 'ground', 'covered'] as const) values[key].set(tile[key], from);
  }
}

/** What a cell reads: hours or Wh/m². @returns null where it is not there, built over, or not worked out yet */
export function valueAt(
  picture: MapPicture,
  quantity: Quantity,
  side: Side,
  surface: number,
  cell: number,
): number | null {
  if (side !== 'change') return stageValue(picture.values[side][surface], quantity, cell);
  const was = stageValue(picture.values.before[surface], quantity, cell);
  const is = stageValue(picture.values.after[surface], quantity, cell);
  return was === null || is === null ? null : is - was;
}

function stageValue(values: Values | null | undefined, quantity: Quantity, cell: number): number | null {
  if (!values || values.covered[cell] === 1) return null;
  const value =
    quantity === 'sun' ? values.minutes[cell]! / 60 : values.beam[cell]! + values.sky[cell]! + values.ground[cell]!;
  return Number.isNaN(value) ? null : value;
}

/** Whether any number of a surface is there for what is shown, judged by its first, middle and last cell. */
export function hasArrived(picture: MapPicture, side: Side, surface: number): boolean {
  const stages: readonly Stage[] = side === 'change' ? ['before', 'after'] : [side];
  return stages.every((stage) => {
    const minutes = picture.values[stage][surface]?.minutes;
    if (!minutes) return false;
    const last = minutes.length - 1;
    return [0, last >> 1, last].some((i) => !Number.isNaN(minutes[i]!));
  });
}

/** Whether a cell is inside a solid at what is shown. */
export function isBuiltOver(picture: MapPicture, side: Side, surface: number, cell: number): boolean {
  const covered = (stage: Stage): boolean => picture.values[stage][surface]?.covered[cell] === 1;
  return side === 'change' ? covered('before') || covered('after') : covered(side);
}

/** Least, mean and most of a surface; null while no cell of it is known. */
export type Spread = { readonly least: number; readonly mean: number; readonly most: number };

/** @param surfaces those that count; absent: all of them */
export function spreadOf(
  picture: MapPicture,
  quantity: Quantity,
  side: Side,
  surfaces: readonly number[] = picture.surfaces.map((_, i) => i),
): Spread | null {
  let [least, most, sum, area] = [Infinity, -Infinity, 0, 0];
  for (const s of surfaces) {
    const { cell, cell_m } = (picture.surfaces[s] as MapSurface).grid;
    const m2 = cell_m[0] * cell_m[1];
    for (let i = 0; i < cell.length; i++) {
      const value = valueAt(picture, quantity, side, s, i);
      if (value === null) continue;
      if (value < least) least = value;
      if (value > most) most = value;
      sum += value * m2;
      area += m2;
    }
  }
  return area > 0 ? { least, mean: sum / area, most } : null;
}
