import { square } from '../../maths/maths.ts';
import * as maths from '../../maths/maths.ts';
import type { Fault } from '../../scheme/fault.ts';
import type { Observer } from '../../sun/position.ts';
import { sunTable } from '../../sun/sun-table.ts';
import type { WeatherYear } from './weather-year.ts';

/** How far the clock is tried to either side, and how finely [min]. */
const WIDEST_min = 720;
const STEP_min = 30;
/** One day of so many is looked at: a clock is wrong all year or not at all. */
const EVERY_DAYS = 5;

/** A label taken for the wrong end of an hour is an hour out at most; more is another place or another zone [h]. */
const FAR_h = 2;
/** Code of a clock so far out that sums over the year would be nonsense: midday light under a low sun. */
export const FAR_CLOCK = 'far-clock';

/**
 * Whether sunlight and sun agree: the rows' sunlight must fall in their daytime, and global must be beam on the level and
 * diffuse. A wrong time zone, a label taken for the wrong end of its hour or the wrong place shows here, and nowhere else so
 * plainly. Shifts of half hours are tried; the best is named.
 */
export function checkClock(weather: WeatherYear, observer: Observer): readonly Fault[] {
  const perDay = 1440 / weather.step_min;
  const rows = Array.from({ length: weather.rows }, (_, i) => i).filter(
    (i) => Math.floor(i / perDay) % EVERY_DAYS === 0,
  );
  const middle_ms = Float64Array.from(rows, (i) => (weather.start_ms[i]! + weather.end_ms[i]!) / 2);
  const misfit = (shift_min: number): number => misfitOf(weather, rows, middle_ms, observer, shift_min);
  const now = misfit(0);
  let best = { shift_min: 0, misfit: now };
  for (let shift_min = -WIDEST_min; shift_min <= WIDEST_min; shift_min += STEP_min) {
    const m = misfit(shift_min);
    if (m < best.misfit * 0.999) best = { shift_min, misfit: m };
  }
  // Half an hour's error misfits several times as much as the truth does; noise moves the best by less than that.
  if (best.shift_min === 0 || best.misfit > 0.7 * now) return [];
  const hours = Math.abs(best.shift_min) / 60;
  return [
    {
      level: 'warning',
      code: hours >= FAR_h ? FAR_CLOCK : 'clock',
      place: '',
      message: `sunlight and sun do not agree: they would with every row ${hours} h ${best.shift_min > 0 ? 'later' : 'earlier'}`,
      cure: 'check which end of its interval a row is labelled by, the hours from UTC, and the place',
    },
  ];
}

/** Mean square of what closure leaves [W/m²]², or, without the three parts, sunlight that falls while the sun is down. */
function misfitOf(
  weather: WeatherYear,
  rows: readonly number[],
  middle_ms: Float64Array,
  observer: Observer,
  shift_min: number,
): number {
  const { global_Wm2: global, beamNormal_Wm2: beam, diffuse_Wm2: diffuse } = weather.columns;
  const { altitude_rad } = sunTable(
    middle_ms.map((t) => t + shift_min * 60_000),
    observer,
  );
  let sum = 0;
  rows.forEach((i, k) => {
    const up = Math.max(0, maths.sin(altitude_rad[k]!));
    if (global && beam && diffuse) sum += square(global[i]! - diffuse[i]! - beam[i]! * up);
    else if (up === 0) sum += (global ?? diffuse)?.[i] ?? 0;
  });
  return sum / rows.length;
}
