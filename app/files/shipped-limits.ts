import { readdirSync, readFileSync } from 'node:fs';
import { checkLimitSet, parseLimitSet } from '../../core/limits/load-limits.ts';
import type { LimitSet } from '../../core/limits/limit-set.ts';
import type { Checked } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { shipped } from './shipped.ts';

/** Ids of the limit sets that ship with the program. */
export const shippedLimitIds = (): readonly string[] =>
  readdirSync(shipped('assets', 'limits'))
    .filter((name) => name.endsWith('.json'))
    .map((name) => name.slice(0, -'.json'.length))
    .sort();

/** The limit set that a scheme has chosen: a shipped one by id, one of its own, or null for none. */
export function limitsOfScheme(scheme: Scheme): Checked<LimitSet | null> {
  if (scheme.limits === null) return { ok: true, value: null, notes: [] };
  if (typeof scheme.limits !== 'string') return checkLimitSet(scheme.limits, 'limits');
  const known = shippedLimitIds();
  if (!known.includes(scheme.limits)) {
    const fault = {
      level: 'error' as const,
      code: 'unknown-limits',
      place: 'limits',
      message: `no limit set is called ${JSON.stringify(scheme.limits)}`,
      cure: `known: ${known.join(', ')}; or give a file with --limits`,
    };
    return { ok: false, faults: [fault] };
  }
  return parseLimitSet(readFileSync(shipped('assets', 'limits', `${scheme.limits}.json`), 'utf8'));
}
