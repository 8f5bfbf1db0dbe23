import type { RoomForm } from '../form/model.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import type { GainRun } from './gain-run.ts';
import { PARTS, type Part, type RoomDay, type WindowDay } from './series.ts';
import { gridRows } from './weather-run.ts';

/** Energy of one window in one month by part [kWh]. */
export type MonthParts = { readonly [P in Part]: number };

/** What a room takes in over a year of weather: sums by month, window and part, the room's every row, and its highest one in full. */
export type RoomYear = {
  readonly room: string;
  readonly step_min: number;
  /** January first. */
  readonly windows: readonly { readonly window: string; readonly months: readonly MonthParts[] }[];
  /** Watts of the whole room, row by row, January to December. */
  readonly total_W: Float64Array;
  /** The row in which most comes in; null where nothing ever does. Grid and day hold that one row. */
  readonly peak: { readonly grid: DayGrid; readonly day: RoomDay } | null;
};

function monthParts(day: WindowDay, step_min: number): MonthParts {
  const sums = { beam: 0, circumsolar: 0, sky: 0, horizon: 0, ground: 0 };
  for (const part of PARTS) {
    let sum = 0;
    for (const watts of day.parts[part]) sum += watts;
    sums[part] = (sum * step_min) / 60_000;
  }
  return sums;
}

/** One row of a window's month. */
function rowOf(day: WindowDay, row: number): WindowDay {
  const pick = (column: Float64Array): Float64Array => column.slice(row, row + 1);
  const { parts } = day;
  return {
    ...day,
    sunlit: pick(day.sunlit),
    cosIncidence: pick(day.cosIncidence),
    blind: pick(day.blind),
    parts: {
      beam: pick(parts.beam),
      circumsolar: pick(parts.circumsolar),
      sky: pick(parts.sky),
      horizon: pick(parts.horizon),
      ground: pick(parts.ground),
    },
    total_W: pick(day.total_W),
  };
}

/** @param run of the twelve months of a weather year */
export function roomYear(run: GainRun, room: RoomForm): RoomYear {
  const { windows, days } = run.roomGain(room);
  const step_min = run.grids[0]?.step_min ?? 60;
  const total_W = new Float64Array(days.reduce((rows, day) => rows + day.total_W.length, 0));
  let offset = 0;
  let best = { watts: 0, month: 0, row: 0 };
  for (const [month, day] of days.entries()) {
    total_W.set(day.total_W, offset);
    offset += day.total_W.length;
    for (let row = 0; row < day.total_W.length; row++)
      if (day.total_W[row]! > best.watts) best = { watts: day.total_W[row]!, month, row };
  }
  return {
    room: room.id,
    step_min,
    windows: windows.map((w, k) => ({
      window: w.id,
      months: days.map((day) => monthParts(day.windows[k] as WindowDay, step_min)),
    })),
    total_W,
    peak: best.watts > 0 ? peakOf(run.grids[best.month] as DayGrid, days[best.month] as RoomDay, best.row) : null,
  };
}

const peakOf = (grid: DayGrid, day: RoomDay, row: number): RoomYear['peak'] => ({
  grid: gridRows(grid, [row], grid),
  day: {
    ...day,
    total_W: day.total_W.slice(row, row + 1),
    windows: day.windows.map((w) => rowOf(w, row)),
  },
});

/** Energy of a room's year, or of some months of it, by window [kWh]. @param months 1..12; absent: all */
export function yearSums(
  year: RoomYear,
  months?: readonly number[],
): readonly { readonly window: string; readonly parts: MonthParts }[] {
  return year.windows.map(({ window, months: all }) => {
    const parts = { beam: 0, circumsolar: 0, sky: 0, horizon: 0, ground: 0 };
    for (const [i, month] of all.entries()) {
      if (months !== undefined && !months.includes(i + 1)) continue;
      for (const part of PARTS) parts[part] += month[part];
    }
    return { window, parts };
  });
}
