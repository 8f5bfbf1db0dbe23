import type { DayGrid } from '../sky/day-grid.ts';

/**
 * A year of weather as twelve long days, one a month: what changes from month to month (crowns of trees, reflectance of the
 * ground) is then the same throughout each, and everything that works on a day works on it.
 */
export type WeatherMonths = {
  /** Names the content: file, place and zone. Two that share it are the same. */
  readonly key: string;
  /** January first. Rows keep the order of the file. */
  readonly months: readonly DayGrid[];
};

/** Key of a month's grid, 1..12. */
export const weatherMonthKey = (month: number): string => `weather-${month}`;

const MONTHS = 'January February March April May June July August September October November December'.split(' ');

/** The rows of one month. */
function rowsOf(month: Uint8Array, wanted: number): readonly number[] {
  const rows: number[] = [];
  for (let i = 0; i < month.length; i++) if (month[i] === wanted) rows.push(i);
  return rows;
}

/** The year with no rows but those of some months: what looks at a season alone need not run the rest. @param months 1..12 */
export const onlyMonths = (year: WeatherMonths, months: readonly number[]): WeatherMonths => ({
  key: `${year.key} ${months.join(',')}`,
  months: year.months.map((grid, i) => (months.includes(i + 1) ? grid : gridRows(grid, [], grid))),
});

/** Some rows of a grid, under a key and a name of their own. */
export function gridRows(grid: DayGrid, rows: readonly number[], as: Pick<DayGrid, 'key' | 'name' | 'date'>): DayGrid {
  const pick = (column: Float64Array): Float64Array => Float64Array.from(rows, (i) => column[i]!);
  return {
    ...as,
    step_min: grid.step_min,
    instant_ms: pick(grid.instant_ms),
    clock_min: pick(grid.clock_min),
    azimuth_rad: pick(grid.azimuth_rad),
    altitude_rad: pick(grid.altitude_rad),
    beamNormal_Wm2: pick(grid.beamNormal_Wm2),
    diffuse_Wm2: pick(grid.diffuse_Wm2),
    global_Wm2: pick(grid.global_Wm2),
    extraterrestrial_Wm2: pick(grid.extraterrestrial_Wm2),
    airMass: pick(grid.airMass),
    tAir_C: pick(grid.tAir_C),
  };
}

/**
 * @param grid   a year of weather at the site
 * @param month  month of the date printed in each row, 1 = January
 * @param key    names its content
 */
export function weatherMonths(grid: DayGrid, month: Uint8Array, key: string): WeatherMonths {
  const year = grid.date.slice(0, 4);
  return {
    key,
    months: MONTHS.map((name, i) =>
      gridRows(grid, rowsOf(month, i + 1), {
        key: weatherMonthKey(i + 1),
        name: `${name} of the weather year`,
        date: `${year}-${String(i + 1).padStart(2, '0')}-15`,
      }),
    ),
  };
}
