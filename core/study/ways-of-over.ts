import type { CheckMemo } from '../gain/gain-memo.ts';
import type { WeatherMonths } from '../gain/weather-run.ts';
import type { Finding } from '../limits/finding.ts';
import type { Scheme } from '../scheme/schema.ts';
import type { Ways } from '../sizing/ways.ts';
import { waysToPass } from '../sizing/ways-to-pass.ts';
import type { CheckResult } from './check-result.ts';
import type { Pulse } from './job.ts';

/** The worst finding of every room that is over, in the order of the findings. */
export function worstOver(findings: readonly Finding[]): readonly Finding[] {
  const seen = new Set<string>();
  return findings.filter((f) => f.verdict === 'over' && !seen.has(f.room) && seen.add(f.room));
}

/**
 * Ways to pass for the worst finding of every room that is over: what the report prints.
 * @param pulse called between rooms
 * @param weather the year that the check was given, where it was
 * @returns null when `pulse` said stop; nothing where the check had no limits
 */
export async function waysOfOver(
  result: CheckResult,
  scheme: Scheme,
  memo: CheckMemo,
  pulse: Pulse,
  weather: WeatherMonths | null = null,
): Promise<readonly Ways[] | null> {
  const { limitSet, skyModel } = result;
  const ways: Ways[] = [];
  const worst = limitSet === null ? [] : worstOver(result.findings);
  for (const finding of worst) {
    if (limitSet === null) break;
    ways.push(waysToPass(scheme, limitSet, finding.room, finding, memo, { skyModel, weather }));
    if ((await pulse(ways.length, worst.length)) === 'stop') return null;
  }
  return ways;
}
