import type { Finding } from '../limits/finding.ts';
import type { Ways } from '../sizing/ways.ts';

/** The ways that were worked out for a finding. */
export const waysOf = (all: readonly Ways[], f: Finding): Ways | null =>
  all.find((w) => w.finding.room === f.room && w.finding.limit === f.limit) ?? null;

/** The changes of which each brings a finding within by itself, in one line; null when none were looked for. */
export function choiceOfWays(all: readonly Ways[], f: Finding): string | null {
  const ways = waysOf(all, f);
  if (!ways) return null;
  const texts = ways.ways.flatMap((w) => (w.passes ? [w.text] : []));
  return texts.length > 0 ? `${texts.join('; or ')}.` : 'no single change of those tried brings it within.';
}
