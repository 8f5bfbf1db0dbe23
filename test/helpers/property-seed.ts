import fc from 'fast-check';
import { afterEach } from 'vitest';

/**
 * Property tests run with fixed seeds, so that a run can be repeated, and once more with a fresh one (project `fresh` of the
 * test run), so that they go on looking. Where one fails with the fresh seed, that seed is printed; `SHADEWRIGHT_SEED=n` sets it.
 */
const given = process.env['SHADEWRIGHT_SEED'];
const fresh = given === undefined || given === '' ? null : Number(given);

/** The seed of a property: its own fixed one, or one that follows from the fresh seed. */
export const seedOf = (fixed: number): number => (fresh === null ? fixed : (fresh + fixed) | 0);

fc.configureGlobal({ seed: seedOf(20250321) });

if (fresh !== null)
  afterEach(({ task }) => {
    if (task.result?.state === 'fail') console.error(`to see it again: SHADEWRIGHT_SEED=${fresh}`);
  });
