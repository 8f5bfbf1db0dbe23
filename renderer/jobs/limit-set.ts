import type { LimitSet } from '../../core/limits/limit-set.ts';
import { checkLimitSet } from '../../core/limits/load-limits.ts';
import { faultLine } from '../../core/scheme/fault.ts';
import type { Scheme } from '../../core/scheme/schema.ts';

const shipped: Record<string, unknown> = import.meta.glob('../../assets/limits/*.json', {
  eager: true,
  import: 'default',
});

/** The sets that ship with the program, by name. @throws {Error} when one of them has faults, which tests would have told */
export function shippedLimits(): readonly LimitSet[] {
  const sets = Object.values(shipped).map((set) => {
    const checked = checkLimitSet(set);
    if (!checked.ok) throw new Error(checked.faults.map(faultLine).join(' · '));
    return checked.value;
  });
  return sets.toSorted((a, b) => a.name.localeCompare(b.name));
}

/**
 * The limit set that a scheme has chosen: one that ships with the program, by id, or its own.
 * @returns null when it has chosen none
 * @throws {Error} with what a user can do, when it names a set that is not there or its own set has faults
 */
export function limitSetOf(scheme: Scheme): LimitSet | null {
  if (scheme.limits === null) return null;
  const named = typeof scheme.limits === 'string' ? scheme.limits : null;
  const found = named === null ? scheme.limits : Object.values(shipped).find((set) => isSet(set, named));
  if (found === undefined) {
    const known = Object.values(shipped).map((set) => (set as LimitSet).id);
    throw new Error(`the scheme asks for the limit set “${named}”, which is not here; there are ${known.join(', ')}`);
  }
  const checked = checkLimitSet(found, 'limits');
  if (!checked.ok) throw new Error(`the limit set has faults: ${checked.faults.map(faultLine).join(' · ')}`);
  return checked.value;
}

const isSet = (set: unknown, id: string): boolean => (set as { id?: unknown }).id === id;
