import { daysInMonth, monthKey, warmMonths } from '../gain/check-days.ts';
import { clockMinutes, inClockWindow } from '../gain/clock-window.ts';
import { PARTS, type Part, type RoomDay } from '../gain/series.ts';
import { type RoomYear, yearSums } from '../gain/room-year.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import { needsWeather } from './metric.ts';
import type { MetricId } from './metric-id.ts';
import type { DayFacts, RoomFacts } from './room-facts.ts';

/** What is asked of a room: a metric, and the days and hours it looks at. */
export type Question = {
  readonly metric: MetricId;
  readonly days?: readonly string[] | undefined;
  readonly clock?: readonly [string, string] | undefined;
  /** Threshold of hours-above [W/m²]. */
  readonly above?: number | undefined;
};

/** A metric of a room, and what it came from. */
export type Reading = {
  /** In the metric's unit. */
  readonly value: number;
  /** Key of the day it was read on; null where it is of no single day. */
  readonly day: string | null;
  /** The step of the day, for a peak; null otherwise. */
  readonly step: number | null;
  readonly through: { readonly window: string; readonly share: number } | null;
  /** Shares of the parts, summing to 1; all 0 where nothing comes in. */
  readonly parts: { readonly [P in Part]: number };
};

/** Watts (or watt-hours) of one window by part. */
type Sums = { readonly window: string; readonly parts: { [P in Part]: number }; total: number };

const noParts = (): { [P in Part]: number } => ({ beam: 0, circumsolar: 0, sky: 0, horizon: 0, ground: 0 });

/** The days a question looks at; the hottest design day where it names none. */
export const daysOf = (question: Question): readonly string[] => question.days ?? ['hottest'];

/** Whether a step counts towards a mean over clock hours; without hours every step does. */
export function stepsCounted(grid: DayGrid, clock: readonly [string, string] | undefined): readonly number[] {
  const from = clock ? (clockMinutes(clock[0]) ?? 0) : 0;
  const to = clock ? (clockMinutes(clock[1]) ?? 1440) : 1440;
  const steps: number[] = [];
  for (let i = 0; i < grid.clock_min.length; i++) if (inClockWindow(grid.clock_min[i]!, from, to)) steps.push(i);
  return steps;
}

/** The step of a day with the highest gain; the first of equals. */
export function peakStep(day: RoomDay): number {
  let best = 0;
  for (let i = 1; i < day.total_W.length; i++) if (day.total_W[i]! > day.total_W[best]!) best = i;
  return best;
}

/** Watts of a column over some steps. */
function columnSum(column: Float64Array, steps: readonly number[]): number {
  let sum = 0;
  for (let k = 0; k < steps.length; k++) sum += column[steps[k] as number]!;
  return sum;
}

function sumsOver(day: RoomDay, steps: readonly number[], weight: number): Sums[] {
  return day.windows.map((w) => {
    const parts = noParts();
    for (const part of PARTS) parts[part] = columnSum(w.parts[part], steps) * weight;
    return { window: w.window, parts, total: columnSum(w.total_W, steps) * weight };
  });
}

/** Shares of window and parts behind a sum. */
function shares(sums: readonly Sums[]): Pick<Reading, 'through' | 'parts'> {
  let total = 0;
  for (const s of sums) total += s.total;
  const parts = noParts();
  if (!(total > 0)) return { through: null, parts };
  let most = sums[0] as Sums;
  for (const s of sums) {
    if (s.total > most.total) most = s;
    for (const part of PARTS) parts[part] += s.parts[part] / total;
  }
  return { through: { window: most.window, share: most.total / total }, parts };
}

const totalOf = (sums: readonly Sums[]): number => sums.reduce((sum, s) => sum + s.total, 0);

/** One day's reading of a metric that looks at days. */
function dayReading(question: Question, facts: RoomFacts, day: RoomDay, grid: DayGrid): Reading {
  const floor = facts.room.floor_m2;
  if (question.metric === 'peak-gain') {
    const step = peakStep(day);
    return { value: day.total_W[step]! / floor, day: day.day, step, ...shares(sumsOver(day, [step], 1)) };
  }
  const steps = stepsCounted(grid, question.metric === 'mean-gain' ? question.clock : undefined);
  const weight = question.metric === 'mean-gain' ? 1 / Math.max(1, steps.length) : grid.step_min / 60;
  const sums = sumsOver(day, steps, weight);
  return { value: totalOf(sums) / floor, day: day.day, step: null, ...shares(sums) };
}

/** The warm half-year from the clear 21st of each of its months. */
function seasonReading(facts: RoomFacts, days: DayFacts): Reading | null {
  const sums = facts.windows.map((w): Sums => ({ window: w.id, parts: noParts(), total: 0 }));
  for (const month of warmMonths(days.latitude_deg)) {
    const at = days.grids.findIndex((g) => g.key === monthKey(month));
    const grid = days.grids[at];
    const day = facts.days[at];
    if (!grid || !day) return null;
    const weight = ((grid.step_min / 60) * daysInMonth(Number(grid.date.slice(0, 4)), month)) / 1000;
    for (const [k, s] of sumsOver(day, stepsCounted(grid, undefined), weight).entries()) {
      const into = sums[k] as Sums;
      for (const part of PARTS) into.parts[part] += s.parts[part];
      into.total += s.total;
    }
  }
  return { value: totalOf(sums) / facts.room.floor_m2, day: null, step: null, ...shares(sums) };
}

/** A year of weather: its sum, that of its warm half, its highest row, or its rows above a threshold. */
function yearReading(question: Question, facts: RoomFacts, year: RoomYear, days: DayFacts): Reading {
  const floor = facts.room.floor_m2;
  if (question.metric === 'year-peak') {
    const { peak } = year;
    if (peak === null) return { value: 0, day: null, step: null, ...shares([]) };
    const grid = days.grids.find((g) => g.key === peak.grid.key);
    const step = grid?.instant_ms.indexOf(peak.grid.instant_ms[0]!) ?? -1;
    return {
      value: peak.day.total_W[0]! / floor,
      day: peak.grid.key,
      step: step < 0 ? null : step,
      ...shares(sumsOver(peak.day, [0], 1)),
    };
  }
  const months = question.metric === 'warm-gain' ? warmMonths(days.latitude_deg) : undefined;
  const sums = yearSums(year, months).map(({ window, parts }): Sums => {
    return { window, parts: { ...parts }, total: PARTS.reduce((sum, p) => sum + parts[p], 0) };
  });
  if (question.metric === 'hours-above') {
    const above_W = (question.above ?? 0) * floor;
    let rows = 0;
    for (const watts of year.total_W) if (watts > above_W) rows++;
    return { value: (rows * year.step_min) / 60, day: null, step: null, ...shares(sums) };
  }
  return { value: totalOf(sums) / floor, day: null, step: null, ...shares(sums) };
}

function glazingReading(facts: RoomFacts): Reading {
  const openings = facts.windows.map((w) => w.opening_m2);
  const total = openings.reduce((a, b) => a + b, 0);
  const most = openings.indexOf(Math.max(...openings));
  const through =
    total > 0 ? { window: facts.windows[most]?.id ?? '', share: (openings[most] as number) / total } : null;
  return { value: (100 * total) / facts.room.floor_m2, day: null, step: null, through, parts: noParts() };
}

/**
 * What a room answers to a question: the worst of the days it looks at.
 * @param worst whether the highest or the lowest of several days counts
 * @returns null when a day that the question needs was not run, or the room has no floor
 */
export function readMetric(
  question: Question,
  facts: RoomFacts,
  days: DayFacts,
  worst: 'highest' | 'lowest' = 'highest',
): Reading | null {
  if (!(facts.room.floor_m2 > 0)) return null;
  if (question.metric === 'glazing-to-floor') return glazingReading(facts);
  if (question.metric === 'season-gain') return seasonReading(facts, days);
  if (needsWeather(question.metric)) return facts.year ? yearReading(question, facts, facts.year, days) : null;
  let found: Reading | null = null;
  for (const key of daysOf(question)) {
    const at = days.grids.findIndex((g) => g.key === key);
    const grid = days.grids[at];
    const day = facts.days[at];
    if (!grid || !day) return null;
    const reading = dayReading(question, facts, day, grid);
    if (!found || (worst === 'highest' ? reading.value > found.value : reading.value < found.value)) found = reading;
  }
  return found;
}
