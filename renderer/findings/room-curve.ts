import type { RoomDay } from '../../core/gain/series.ts';
import type { DayGrid } from '../../core/sky/day-grid.ts';

/** A room's gain through a day, split as it is drawn: stacked from the ground part up [W/m² of floor]. */
export type RoomCurve = {
  readonly day: string;
  readonly clock_min: Float64Array;
  readonly ground: Float64Array;
  readonly sky: Float64Array;
  readonly beam: Float64Array;
  readonly most: number;
  /** Clock minutes between which anything comes in. */
  readonly from_min: number;
  readonly to_min: number;
};

/** @param floor_m2 over which the watts are spread */
export function roomCurve(grid: DayGrid, day: RoomDay, floor_m2: number): RoomCurve {
  const n = grid.clock_min.length;
  const [ground, sky, beam] = [new Float64Array(n), new Float64Array(n), new Float64Array(n)];
  let most = 0;
  let [first, last] = [n, -1];
  for (let i = 0; i < n; i++) {
    for (const { parts } of day.windows) {
      ground[i] = ground[i]! + parts.ground[i]! / floor_m2;
      sky[i] = sky[i]! + (parts.sky[i]! + parts.horizon[i]!) / floor_m2;
      beam[i] = beam[i]! + (parts.beam[i]! + parts.circumsolar[i]!) / floor_m2;
    }
    const sum = ground[i]! + sky[i]! + beam[i]!;
    most = Math.max(most, sum);
    if (sum > 0) {
      first = Math.min(first, i);
      last = i;
    }
  }
  const from_min = last < 0 ? 0 : grid.clock_min[first]!;
  const to_min = last < 0 ? 1440 : grid.clock_min[last]!;
  return { day: grid.name, clock_min: grid.clock_min, ground, sky, beam, most, from_min, to_min };
}

/** A round number at or above a value, for the top of an axis, and how many steps lead to it. */
export function axisTop(value: number): { readonly top: number; readonly step: number } {
  const power = 10 ** Math.floor(Math.log10(Math.max(value, 1e-9)));
  const step = [0.2, 0.5, 1, 2, 5].map((k) => k * power).find((s) => value / s <= 4) ?? power * 5;
  return { top: Math.ceil(value / step - 1e-9) * step, step };
}
