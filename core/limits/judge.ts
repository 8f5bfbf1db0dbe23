import { civilOf } from '../sun/civil.ts';
import type { Finding, Verdict } from './finding.ts';
import type { Limit, LimitSet } from './limit-set.ts';
import { METRICS } from './metric.ts';
import type { MetricId } from './metric-id.ts';
import { type Reading, readMetric } from './reading.ts';
import { reasonOf } from './reason.ts';
import { type DayFacts, mostGlazed, type RoomFacts } from './room-facts.ts';
import { validityNotes } from './validity.ts';

/** Hours of the mean that is shown where no limit set says which. */
export const SHOWN_CLOCK: readonly [string, string] = ['07:30', '17:30'];

/** What is shown of every room when the scheme has chosen no limit set. */
const SHOWN: readonly MetricId[] = ['peak-gain', 'mean-gain', 'day-gain', 'glazing-to-floor'];

/** And of every room where there is a year of weather. */
const SHOWN_OF_YEAR: readonly MetricId[] = ['year-gain', 'warm-gain', 'year-peak'];

/**
 * The value a limit sets for a room: that of its step of openings to floor, where the limit has steps; by bearing of its most
 * glazed wall where it says so, the strictest of equals; the plain value for a room with rooflights alone.
 */
export function limitValueFor(limit: Limit, facts: RoomFacts): number {
  const openings = facts.windows.reduce((sum, w) => sum + w.opening_m2, 0);
  const share = (100 * openings) / facts.room.floor_m2;
  const { value, byBearing } = limit.byGlazing?.find((step) => share <= step.upTo) ?? limit;
  const values = mostGlazed(facts.windows).map((q) => byBearing?.[q] ?? value);
  if (!byBearing || values.length === 0) return value;
  return limit.comparison === 'at-most' ? Math.min(...values) : Math.max(...values);
}

/** Value minus limit for an upper limit, limit minus value for a lower one: above 0 is over. */
export const marginOf = (value: number, limitValue: number, comparison: Limit['comparison']): number =>
  comparison === 'at-most' ? value - limitValue : limitValue - value;

/** @param close width of the band that counts as close, as a share of the limit */
export function verdictOf(value: number, limitValue: number, comparison: Limit['comparison'], close: number): Verdict {
  const margin = marginOf(value, limitValue, comparison);
  if (margin > 0) return 'over';
  return margin > -close * limitValue ? 'close' : 'within';
}

/** Whether a limit applies to a room: the room has a window, and its use is named where uses are. */
export const appliesTo = (limit: Limit, facts: RoomFacts): boolean =>
  facts.windows.length > 0 && (limit.uses === undefined || limit.uses.includes(facts.room.use));

type Judged = { readonly limit: Limit; readonly value: number; readonly close: number };

function findingOf(
  facts: RoomFacts,
  days: DayFacts,
  reading: Reading,
  metricId: MetricId,
  clock: readonly [string, string] | null,
  judged: Judged | null,
): Finding {
  const metric = METRICS[metricId];
  const grid = days.grids.find((g) => g.key === reading.day);
  const instant_ms = grid && reading.step !== null ? grid.instant_ms[reading.step]! : null;
  const when =
    instant_ms !== null && grid ? { instant_ms, text: civilOf(instant_ms, days.zone).text, day: grid.key } : null;
  const comparison = judged?.limit.comparison ?? 'at-most';
  return {
    room: facts.room.id,
    roomName: facts.room.name,
    limit: judged?.limit.id ?? metricId,
    metric: metricId,
    metricName: judged?.limit.name || metric.name,
    unit: metric.unit,
    value: reading.value,
    limitValue: judged?.value ?? null,
    comparison,
    margin: judged ? marginOf(reading.value, judged.value, comparison) : null,
    verdict: judged ? verdictOf(reading.value, judged.value, comparison, judged.close) : null,
    when,
    day: reading.day,
    clock,
    through: reading.through,
    parts: reading.parts,
    reason: reasonOf({ facts, days, reading, metric: metricId, clock, judged }),
    notes: validityNotes(facts, days, reading),
  };
}

/** Margin as a share of the limit; for a limit of 0, which has no shares, the margin itself. */
const weightOf = (f: Finding): number =>
  f.margin === null || f.limitValue === null ? 0 : f.limitValue > 0 ? f.margin / f.limitValue : f.margin;

const byText = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);

/** Worst first: by margin as a share of the limit, then by room and limit. */
export const worstFirst = (a: Finding, b: Finding): number =>
  weightOf(b) - weightOf(a) || byText(a.room, b.room) || byText(a.limit, b.limit);

/** One limit applied to one room; null when it does not apply, or a day that it needs was not run. */
export function judgeRoom(limit: Limit, close: number, facts: RoomFacts, days: DayFacts): Finding | null {
  if (!appliesTo(limit, facts)) return null;
  const clock = limit.metric === 'mean-gain' ? (limit.clock ?? SHOWN_CLOCK) : null;
  const question = { metric: limit.metric, days: limit.days, clock: clock ?? undefined, above: limit.above };
  const reading = readMetric(question, facts, days, limit.comparison === 'at-most' ? 'highest' : 'lowest');
  if (!reading) return null;
  return findingOf(facts, days, reading, limit.metric, clock, { limit, value: limitValueFor(limit, facts), close });
}

/**
 * Every limit of a set applied to every room it is meant for, worst first. Without a set: what the rooms take in, and no verdict.
 */
export function findingsOf(rooms: readonly RoomFacts[], days: DayFacts, set: LimitSet | null): readonly Finding[] {
  const findings: Finding[] = [];
  for (const facts of rooms) {
    if (facts.windows.length === 0) continue;
    for (const limit of set?.limits ?? []) {
      const finding = judgeRoom(limit, set?.close ?? 0, facts, days);
      if (finding) findings.push(finding);
    }
    if (set) continue;
    for (const metric of facts.year ? [...SHOWN, ...SHOWN_OF_YEAR] : SHOWN) {
      const clock = metric === 'mean-gain' ? SHOWN_CLOCK : null;
      const reading = readMetric({ metric, clock: clock ?? undefined }, facts, days);
      if (reading) findings.push(findingOf(facts, days, reading, metric, clock, null));
    }
  }
  return findings.sort(worstFirst);
}

const RANK: { readonly [V in Verdict]: number } = { over: 2, close: 1, within: 0 };

/** Rooms by their worst verdict; rooms that no limit applies to are in none. */
export function countRooms(findings: readonly Finding[]): { over: number; close: number; within: number } {
  const worst = new Map<string, Verdict>();
  for (const f of findings) {
    if (f.verdict === null) continue;
    const before = worst.get(f.room);
    if (before === undefined || RANK[f.verdict] > RANK[before]) worst.set(f.room, f.verdict);
  }
  const counts = { over: 0, close: 0, within: 0 };
  for (const verdict of worst.values()) counts[verdict]++;
  return counts;
}
