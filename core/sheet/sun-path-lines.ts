import { seasons } from '../sun/seasons.ts';
import type { DateLine, HourLine, PathRun, SunPath } from '../sun/sun-path.ts';
import { DEG, toDegrees, wrap180 } from '../units/angle.ts';
import type { Mark, Stroke } from './drawing.ts';
import { ACCENT, INK } from './ink.ts';
import { type PagePoint, type SkyView, skyLines, thinned } from './sun-path-view.ts';

/** From the December to the June solstice lines are whole, from June to December broken. */
export const DATE_STROKE: Stroke = { colour: INK, width: 0.25 };
const DATE_STROKE_LATER: Stroke = { colour: INK, width: 0.2, dash: [1.4, 1] };
export const HOUR_STROKE: Stroke = { colour: ACCENT, width: 0.2 };
export const HOUR_STROKE_LATER: Stroke = { colour: ACCENT, width: 0.2, dash: [1, 0.8] };

/** A line may stray so far from the sun's path where points are left out [mm]. */
const FLAT = 0.02;

/** The sun's way on a date. Dates of one family run within half a degree of each other. */
export type DateOnPage = {
  readonly name: string;
  readonly month: number;
  readonly family: string;
  readonly lines: readonly PagePoint[][];
};

/** One clock's stretch of an hour: the parts of the year on either side of the new year belong together. */
export type HourStretch = {
  readonly hour: string;
  readonly runs: readonly PathRun[];
  readonly lines: readonly PagePoint[][];
};

const MONTHS = 'Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec'.split(' ');

/** Months whose 21st comes near the same sun: those as far from the June solstice on either side. The solstices choose first. */
const FAMILIES: readonly (readonly number[])[] = [[6], [12], [3, 9], [4, 8], [2, 10], [5, 7], [1, 11]];

/** Where a run of three columns would meet the horizon one step farther on, or null where it does not end there. */
function horizonEnd(
  end: readonly [number, number],
  before: readonly [number, number],
): readonly [number, number] | null {
  const fall = before[1] - end[1];
  if (!(fall > 0) || end[1] > fall) return null;
  const turn = wrap180(toDegrees(end[0] - before[0])) * DEG;
  return [end[0] + (turn * end[1]) / fall, 0];
}

/** A run on the page, carried on to the horizon where its next step would have been below it. */
function pageLines(view: SkyView, run: PathRun): PagePoint[][] {
  const rows = Array.from(run.azimuth_rad, (azimuth, i) => [azimuth, run.altitude_rad[i] as number] as const);
  const [first, second] = rows;
  const [last, secondLast] = [rows.at(-1), rows.at(-2)];
  if (first === undefined || second === undefined || last === undefined || secondLast === undefined) return [];
  const ends = [horizonEnd(first, second), horizonEnd(last, secondLast)];
  const all = [...(ends[0] ? [ends[0]] : []), ...rows, ...(ends[1] ? [ends[1]] : [])];
  return skyLines(
    view,
    Float64Array.from(all, (row) => row[0]),
    Float64Array.from(all, (row) => row[1]),
  );
}

const monthOf = (line: DateLine): number => Number(line.date.slice(5, 7));

/** The dates of a path, in the order in which they are to be named. */
export function datesOnPage(view: SkyView, path: SunPath): readonly DateOnPage[] {
  return FAMILIES.flatMap((months) =>
    months.flatMap((month) => {
      const line = path.dates.find((d) => monthOf(d) === month);
      const lines = line?.runs.flatMap((r) => pageLines(view, r)) ?? [];
      return lines.length === 0 ? [] : [{ name: `21 ${MONTHS[month - 1]}`, month, family: months.join(), lines }];
    }),
  );
}

/** The dates as marks. */
export function dateMarks(view: SkyView, path: SunPath): readonly Mark[] {
  return path.dates.map((date) => ({
    kind: 'path',
    runs: date.runs.flatMap((run) => pageLines(view, run).map((l) => thinned(l, FLAT))),
    closed: false,
    stroke: monthOf(date) > 6 && monthOf(date) < 12 ? DATE_STROKE_LATER : DATE_STROKE,
  }));
}

const part = (run: PathRun, from: number, to: number): PathRun => ({
  instant_ms: run.instant_ms.subarray(from, to),
  azimuth_rad: run.azimuth_rad.subarray(from, to),
  altitude_rad: run.altitude_rad.subarray(from, to),
});

/** The hours as marks: one path for each half of the year. */
export function hourMarks(view: SkyView, path: SunPath): readonly Mark[] {
  const { juneSolstice_ms: june, decemberSolstice_ms: december } = seasons(path.year);
  const whole: PagePoint[][] = [];
  const broken: PagePoint[][] = [];
  for (const run of path.hours.flatMap((hour) => hour.runs)) {
    const after = (t: number): number => {
      const at = run.instant_ms.findIndex((instant) => instant > t);
      return at < 0 ? run.instant_ms.length : at;
    };
    const [j, d] = [after(june), after(december)];
    // Each part takes the first point of the next along, so that no gap shows at the solstices.
    for (const [into, piece] of [
      [whole, part(run, 0, j + 1)],
      [broken, part(run, j, d + 1)],
      [whole, part(run, d, run.instant_ms.length)],
    ] as const) {
      if (piece.instant_ms.length > 1) into.push(...pageLines(view, piece).map((l) => thinned(l, FLAT)));
    }
  }
  return [
    { kind: 'path', runs: whole, closed: false, stroke: HOUR_STROKE },
    { kind: 'path', runs: broken, closed: false, stroke: HOUR_STROKE_LATER },
  ];
}

/** Within two days: the last run of December and the first of January are one, on the same clock. */
const NEAR_ms = 2 * 86_400_000;

/** The stretches of the hours, each of which is named once. */
export function hourStretches(view: SkyView, path: SunPath): readonly HourStretch[] {
  const start = Date.UTC(path.year, 0, 1);
  const end = Date.UTC(path.year + 1, 0, 1);
  return path.hours.flatMap((hour) => {
    const groups: PathRun[][] = hour.runs.map((run) => [run]);
    const [first, last] = [groups[0]?.[0], groups.at(-1)?.[0]];
    if (groups.length > 1 && first !== undefined && last !== undefined) {
      const isRound =
        (first.instant_ms[0] ?? end) - start < NEAR_ms && end - (last.instant_ms.at(-1) ?? start) < NEAR_ms;
      if (isRound) groups.splice(0, groups.length, [last, first], ...groups.slice(1, -1));
    }
    return groups.map((runs) => stretch(view, hour, runs));
  });
}

const stretch = (view: SkyView, hour: HourLine, runs: readonly PathRun[]): HourStretch => ({
  hour: String(Number(hour.time.slice(0, 2))),
  runs,
  lines: runs.flatMap((run) => pageLines(view, run)),
});
