import type { Stage } from '../form/model.ts';
import type { Exposure } from '../shade/exposure-slice.ts';
import type { MapPlace, MapPlan } from './exposure-map.ts';
import { partOf } from './exposure.ts';
import type { TileDone } from './tile-pool.ts';

/** A piece of a map that is done: some points of one surface, at the stages that it holds for. */
export type MapTile = {
  /** Number of the surface in what was asked, and the surface with its grid. */
  readonly surface: number;
  readonly place: MapPlace;
  readonly stages: readonly Stage[];
  /** The first of the points, of the surface's grid, that the values are for. */
  readonly from: number;
  readonly values: Exposure;
};

/** A tile of a map's jobs, taken apart by surface. */
export function mapTiles(plan: MapPlan, done: TileDone): MapTile[] {
  const stages = plan.stages[done.job] as readonly Stage[];
  const end = done.from + done.values.minutes.length;
  const tiles: MapTile[] = [];
  let start = 0;
  plan.places.forEach((place, surface) => {
    if (!place.there[stages[0] as Stage]) return;
    const next = start + place.grid.cell.length;
    const from = Math.max(start, done.from);
    const to = Math.min(next, end);
    if (from < to) {
      const values = partOf(done.values, from - done.from, to - done.from);
      tiles.push({ surface, place, stages, from: from - start, values });
    }
    start = next;
  });
  return tiles;
}
