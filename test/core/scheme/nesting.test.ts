import { expect, test } from 'vitest';
import { parseLimitSet } from '../../../core/limits/load-limits.ts';
import { loadScheme } from '../../../core/scheme/load.ts';
import { MOST_NESTED, nestsTooDeep } from '../../../core/scheme/nesting.ts';

const nested = (levels: number): string => '['.repeat(levels) + ']'.repeat(levels);

test('so many levels are allowed and not one more', () => {
  expect(nestsTooDeep(JSON.parse(nested(MOST_NESTED)))).toBe(false);
  expect(nestsTooDeep(JSON.parse(nested(MOST_NESTED + 1)))).toBe(true);
  expect(nestsTooDeep({ a: [1, { b: JSON.parse(nested(MOST_NESTED)) }] })).toBe(true);
});

test.each([3000, 200_000])(
  'a field of %i levels is refused in a scheme and in a limit set, and uses up no stack',
  (n) => {
    for (const read of [
      loadScheme(`{"format":"shadewright","note":${nested(n)}}`),
      parseLimitSet(`{"format":"shadewright-limits","note":${nested(n)}}`),
    ]) {
      expect(read.ok).toBe(false);
      expect(read.ok ? '' : read.faults[0]?.code).toBe('too-deep');
    }
  },
);
