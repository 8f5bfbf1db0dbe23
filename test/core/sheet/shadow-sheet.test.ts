import { describe, expect, test } from 'vitest';
import { bestScale, chooseScale } from '../../../core/sheet/scale.ts';
import { shadowSheet } from '../../../core/sheet/shadow-sheet.ts';
import { pageToSvg } from '../../../core/sheet/svg.ts';
import { displayList } from '../../helpers/display-list.ts';
import { shadowMoments } from '../../../core/study/shadow-moments.ts';
import { drawnMoments, smallYard } from '../../helpers/drawn-moments.ts';
import { demoScheme, modelOf } from '../../helpers/demo-scheme.ts';

const DATES = ['2025-03-21', '2025-06-21', '2025-12-21'];
const TIMES = ['09:00', '12:00', '15:00'];

const sheet = (key: string, more: Partial<Parameters<typeof shadowSheet>[0]> = {}, dates = DATES, times = TIMES) => {
  const scheme = demoScheme(key);
  const model = modelOf(scheme);
  return shadowSheet({
    scheme,
    model,
    moments: shadowMoments(scheme, model, dates, times),
    scale: 1000,
    paper: 'A3',
    landscape: true,
    drawn: '2026-03-02',
    engine: '0.1.0',
    hash: '0123456789abcdef',
    ...more,
  });
};

test('nine diagrams of the demo stand on one A3 sheet at 1:1000', () => {
  const made = sheet('tannery-yard');
  if (!made.ok) throw new Error(JSON.stringify(made.faults));
  expect(made.value.pages.length).toBe(1);
});

test('a sheet with every kind of mark, as it was drawn and looked at', async () => {
  const scheme = smallYard();
  const made = shadowSheet({
    scheme,
    model: modelOf(scheme),
    moments: drawnMoments(),
    scale: 1000,
    paper: 'A3',
    landscape: true,
    number: 'SH-01',
    drawn: '2026-03-02',
    engine: '0.1.0',
    hash: '0123456789abcdef',
  });
  if (!made.ok) throw new Error(JSON.stringify(made.faults));
  await expect(displayList(made.value)).toMatchFileSnapshot('../../golden/shadow-sheet-a3.txt');
});

test('a scheme larger than its frames is refused, and the fault says which scale fits', () => {
  const made = sheet('two-hundred-blocks', { scale: 500 });
  expect(made.ok).toBe(false);
  if (made.ok) return;
  expect(made.faults[0]?.code).toBe('scale-too-large');
  const named = /1:(\d+) fits/u.exec(made.faults[0]?.cure ?? '')?.[1];
  expect(sheet('two-hundred-blocks', { scale: Number(named) }).ok).toBe(true);
});

test('nothing to draw is a fault, not an empty sheet', () => {
  expect(sheet('tannery-yard', {}, [], [])).toMatchObject({ ok: false, faults: [{ code: 'nothing-to-draw' }] });
});

test('no diagram is lost and none stands twice, however many go on a page', () => {
  for (const perPage of [1, 2, 3, 4, 5, 9]) {
    for (const landscape of [true, false]) {
      const made = sheet('tannery-yard', { scale: null, perPage, landscape });
      if (!made.ok) throw new Error(JSON.stringify(made.faults));
      const labels = made.value.pages.flatMap((p) =>
        p.marks.flatMap((m) => (m.kind === 'group' && m.label?.includes('UTC') ? [m.label] : [])),
      );
      expect(labels.length).toBe(9);
      expect(new Set(labels).size).toBe(9);
    }
  }
});

describe('scales', () => {
  test('best fit is the largest standard scale that fits', () => {
    // 100 m at 1:500 are 200 mm.
    expect(bestScale([100, 50], [200, 100])).toBe(500);
    expect(bestScale([100.1, 50], [200, 100])).toBe(1000);
    expect(bestScale([1e7, 1], [200, 100])).toBeNull();
  });

  test('what is only wanted costs one step at most', () => {
    expect(chooseScale(null, [100, 50], [100, 50], [200, 100], 'A3')).toBe(500);
    expect(chooseScale(null, [100, 50], [900, 50], [200, 100], 'A3')).toBe(1000);
    expect(chooseScale(250, [100, 50], [100, 50], [200, 100], 'A3')).toMatchObject({
      cure: expect.stringContaining('1:500 fits'),
    });
  });
});

test('the SVG states its size in millimetres and one unit is one millimetre', () => {
  const made = sheet('tannery-yard');
  if (!made.ok) throw new Error('does not draw');
  const svg = pageToSvg(made.value.pages[0] as (typeof made.value.pages)[number]);
  expect(svg).toContain('width="420mm" height="297mm" viewBox="0 0 420 297"');
  expect(svg).not.toMatch(/NaN|undefined|Infinity/u);
});
