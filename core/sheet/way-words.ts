import type { Finding } from '../limits/finding.ts';
import type { Way, Ways, WayThatPasses } from '../sizing/ways.ts';
import { quantity } from './finding-words.ts';

/** The ways that were worked out for a finding. */
export const waysOf = (all: readonly Ways[], f: Finding): Ways | null =>
  all.find((w) => w.finding.room === f.room && w.finding.limit === f.limit) ?? null;

const passes = (w: Way): w is WayThatPasses => w.passes;

/** A way to pass in a sentence: what is done, and where the finding then stands. */
export const wayWords = (way: WayThatPasses): string =>
  `${way.text}: ${quantity(way.after.value, way.after.unit)} then, limit ${way.after.limitValue === null ? '–' : quantity(way.after.limitValue, way.after.unit)}`;

/** The first way that passes for a finding, in words; null when none was worked out or none passes. */
export function bestWay(all: readonly Ways[], f: Finding): string | null {
  const ways = waysOf(all, f);
  if (!ways) return null;
  const first = ways.ways.find(passes);
  return first ? wayWords(first) : 'no single change of those tried brings it within.';
}
