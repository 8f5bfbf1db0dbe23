import { expect, test } from 'vitest';
import { countTests, plainLine } from '../../helpers/plain-line-reporter.ts';

type Module = Parameters<typeof countTests>[0][number];

const module = (states: readonly string[], errors = 0): Module =>
  ({
    errors: () => Array.from({ length: errors }),
    children: { allTests: () => states.map((state) => ({ result: () => ({ state }) })) },
  }) as unknown as Module;

test('the line has the form that scripts read', () => {
  expect(plainLine({ passed: 12, failed: 0, skipped: 0 })).toBe('12 passed, 0 failed');
  expect(plainLine({ passed: 1, failed: 2, skipped: 3 })).toBe('1 passed, 2 failed, 3 skipped');
});

test('every test counts once; a file that does not load and an error outside any test count as failures', () => {
  expect(countTests([module(['passed', 'passed', 'failed']), module(['skipped', 'pending'])], 0)).toEqual({
    passed: 2,
    failed: 1,
    skipped: 2,
  });
  expect(countTests([module([], 1), module(['passed'])], 1)).toEqual({ passed: 1, failed: 2, skipped: 0 });
});
