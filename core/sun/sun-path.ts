import * as maths from '../maths/maths.ts';
import { DEG } from '../units/angle.ts';
import { civilOf, clockChanges, dayBounds, resolveCivil } from './civil.ts';
import type { Observer } from './position.ts';
import { sunTable } from './sun-table.ts';

/** A run of sun positions in columns: clockwise from true north, and true altitude above 0. */
export type PathRun = {
  readonly instant_ms: Float64Array;
  readonly azimuth_rad: Float64Array;
  readonly altitude_rad: Float64Array;
};

/** The way of the sun on one date, sunrise to sunset: more than one run where it sets and rises again within a civil day. */
export type DateLine = { readonly date: string; readonly runs: readonly PathRun[] };

/**
 * Where the sun stands at one hour of the clock through the year: a figure of eight, broken where the clocks change and while
 * the sun is down. `time` is what the clock on the wall shows, daylight saving included.
 */
export type HourLine = { readonly time: string; readonly runs: readonly PathRun[] };

export type SunPath = {
  readonly year: number;
  readonly dates: readonly DateLine[];
  readonly hours: readonly HourLine[];
};

const DATE_STEP_min = 5;
const MONTH_DAYS = [
  '06-21',
  '07-21',
  '08-21',
  '09-21',
  '10-21',
  '11-21',
  '12-21',
  '01-21',
  '02-21',
  '03-21',
  '04-21',
  '05-21',
];

/** The rows of a table where the sun is up, cut where it is down and after each row named in `breakAfter`. */
function upRuns(instant_ms: Float64Array, observer: Observer, breakAfter: ReadonlySet<number>): PathRun[] {
  const table = sunTable(instant_ms, observer);
  const runs: PathRun[] = [];
  let from = 0;
  const close = (to: number) => {
    if (to - from < 2) return;
    runs.push({
      instant_ms: instant_ms.slice(from, to),
      azimuth_rad: table.azimuth_rad.slice(from, to),
      altitude_rad: table.altitude_rad.slice(from, to),
    });
  };
  for (let i = 0; i < instant_ms.length; i++) {
    if (!(table.altitude_rad[i]! > 0)) {
      close(i);
      from = i + 1;
    } else if (breakAfter.has(i)) {
      close(i + 1);
      from = i + 1;
    }
  }
  close(instant_ms.length);
  return runs;
}

/** The sun's way on one date, in five-minute steps of the whole civil day. */
function dateLine(date: string, zone: string, observer: Observer): DateLine {
  const { start_ms, end_ms } = dayBounds(date, zone);
  const count = Math.floor((end_ms - start_ms) / (DATE_STEP_min * 60_000)) + 1;
  const instants = Float64Array.from({ length: count }, (_, i) => start_ms + i * DATE_STEP_min * 60_000);
  return { date, runs: upRuns(instants, observer, new Set()) };
}

function hourLine(
  hour: number,
  dates: readonly string[],
  changeDates: ReadonlySet<string>,
  zone: string,
  observer: Observer,
): HourLine {
  const time = `${String(hour).padStart(2, '0')}:00`;
  const instants = Float64Array.from(dates, (date) => resolveCivil(date, time, zone).instant_ms);
  const breaks = new Set<number>();
  // From the day of a change on the hour belongs to the new clock, so the line ends on the day before.
  dates.forEach((date, i) => {
    if (changeDates.has(date) && i > 0) breaks.add(i - 1);
  });
  return { time, runs: upRuns(instants, observer, breaks) };
}

/**
 * The lines of a sun-path drawing: the sun's way on the 21st of each month, and where it stands at each hour of the clock
 * through the year.
 * @param observer place; refraction plays no part, altitudes are true
 * @param zone     IANA zone of the clock
 * @param year     1900 to 2100
 * @returns positions with the sun above the horizon only
 */
export function sunPath(observer: Observer, zone: string, year: number): SunPath {
  const first = Date.UTC(year, 0, 1);
  const count = Math.round((Date.UTC(year + 1, 0, 1) - first) / 86_400_000);
  const dates = Array.from({ length: count }, (_, i) => new Date(first + i * 86_400_000).toISOString().slice(0, 10));
  const changes = clockChanges(first - 86_400_000, first + (count + 1) * 86_400_000, zone);
  const changeDates = new Set(changes.map((c) => civilOf(c.instant_ms, zone).date));
  return {
    year,
    dates: MONTH_DAYS.map((day) => dateLine(`${year}-${day}`, zone, observer)),
    hours: Array.from({ length: 24 }, (_, hour) => hourLine(hour, dates, changeDates, zone, observer)).filter(
      (line) => line.runs.length > 0,
    ),
  };
}

/**
 * Stereographic projection of the sky on a disc of radius 1, horizon on the rim, zenith in the middle, north up and east to
 * the right, as on a plan. Circles on the sky stay circles.
 * @see J. P. Snyder, Map Projections: A Working Manual, USGS Professional Paper 1395 (1987), pp. 154–163
 */
export function stereographic(azimuth_rad: number, altitude_rad: number): readonly [number, number] {
  const r = maths.tan((90 * DEG - altitude_rad) / 2);
  return [r * maths.sin(azimuth_rad), r * maths.cos(azimuth_rad)];
}
