import { describe, expect, test } from 'vitest';
import { scriptRuns, startsRtl, visualRuns } from '../../../core/sheet/text-runs.ts';

/** A line as the eye meets it from left to right: right-to-left stretches turned round letter by letter. */
const seen = (text: string, rtl: boolean): string =>
  visualRuns(text, rtl)
    .map((r) => (r.rtl ? [...r.text].reverse().join('') : r.text))
    .join('');

describe('scripts', () => {
  test('every letter goes to a font that has it', () => {
    expect(scriptRuns('Łódź 東京 ⌀').map((r) => [r.text, r.script])).toEqual([
      ['Łódź ', 'house'],
      ['東京', 'cjk'],
      [' ', 'house'],
      ['⌀', 'missing'],
    ]);
  });

  test('put together again the runs are the text', () => {
    for (const text of ['a', 'חצר 12 (ab) ג', 'ساحة، 12', '東 1', ''])
      expect(
        scriptRuns(text)
          .map((r) => r.text)
          .join(''),
      ).toBe(text);
  });

  test('the first letter with a direction gives the line its own (UAX #9, P2 and P3)', () => {
    expect(startsRtl('12 חצר')).toBe(true);
    expect(startsRtl('Yard חצר')).toBe(false);
    expect(startsRtl('12 – 3')).toBe(false);
  });
});

/**
 * Worked by hand by the rules of Unicode Standard Annex 9 (revision 48); upper case in the comments stands for right-to-left
 * letters, as in the annex's own examples.
 */
describe('order on the line', () => {
  test('a left-to-right line with a right-to-left word: car is THE CAR in arabic', () => {
    // "car means CAR." is seen as "car means RAC."
    expect(seen('car means חצר.', false)).toBe('car means רצח.');
  });

  test('a right-to-left line with a left-to-right word', () => {
    // "CAR means car" in a right-to-left line is seen as "car means RAC".
    expect(seen('חצר car means', true)).toBe('car means רצח');
  });

  test('figures in a right-to-left line keep their order', () => {
    // "YARD 12 HOUSE" is seen as "ESUOH 12 DRAY".
    expect(seen('חצר 12 בית', true)).toBe('תיב 12 רצח');
  });

  test('brackets in a right-to-left line are turned round', () => {
    // "YARD (12)" is seen as "(12) DRAY".
    expect(seen('חצר (12)', true)).toBe('(12) רצח');
  });
});
