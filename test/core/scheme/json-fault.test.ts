import fc from 'fast-check';
import { expect, test } from 'vitest';
import { jsonFaultAt, lineAndColumn } from '../../../core/scheme/json-fault.ts';

const parses = (text: string): boolean => {
  try {
    JSON.parse(text);
    return true;
  } catch {
    return false;
  }
};

test('agrees with the engine about what is JSON, on sound text and on text with one character changed', () => {
  fc.assert(
    fc.property(
      fc.json(),
      fc.nat(),
      fc.constantFrom('', ',', '}', ']', '"', 'N', '\\', '1', ' ', '\u0001'),
      (text, at, char) => {
        expect(jsonFaultAt(text)).toBe(-1);
        const k = at % (text.length + 1);
        const bent = text.slice(0, k) + char + text.slice(k + 1);
        expect(jsonFaultAt(bent) === -1).toBe(parses(bent));
      },
    ),
    { numRuns: 500 },
  );
});

test('names the place', () => {
  const text = '{\n  "a": 1,\n  "b": NaN\n}';
  expect(lineAndColumn(text, jsonFaultAt(text))).toBe('line 3, column 8');
  expect(jsonFaultAt('{"a":1} x')).toBe(8);
  expect(jsonFaultAt('')).toBe(0);
});

test('deep nesting is walked, not recursed', () => {
  expect(jsonFaultAt('['.repeat(500_000))).toBe(500_000);
});
