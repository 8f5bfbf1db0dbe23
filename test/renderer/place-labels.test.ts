import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { placeLabels } from '../../renderer/year-strip/place-labels.ts';
import { seedOf } from '../helpers/property-seed.ts';

const span = (at: number, width: number, anchor: string | null): readonly [number, number] => {
  const from = at - (anchor === 'middle' ? width / 2 : anchor === 'end' ? width : 0);
  return [from, from + width];
};

describe('labels of marks on a line', () => {
  it('stand over their marks where there is room, and turn away from one another where there is little', () => {
    expect(
      placeLabels(
        [
          { at: 100, width: 50 },
          { at: 300, width: 50 },
        ],
        0,
        400,
      ),
    ).toEqual(['middle', 'middle']);
    expect(
      placeLabels(
        [
          { at: 180, width: 48 },
          { at: 202, width: 68 },
        ],
        0,
        400,
      ),
    ).toEqual(['end', 'start']);
  });

  it('are left out rather than printed over one another: an equinox, a clock change and a solstice on a narrow strip', () => {
    const marks = [
      { at: 425, width: 48 },
      { at: 474, width: 75 },
      { at: 535, width: 55 },
    ];
    const anchors = placeLabels(marks, 0, 578);
    expect(anchors.filter((anchor) => anchor === null).length).toBeLessThanOrEqual(1);
  });

  it('never overlap and never leave the line', () => {
    const mark = fc.record({ at: fc.integer({ min: 0, max: 500 }), width: fc.integer({ min: 20, max: 90 }) });
    fc.assert(
      fc.property(fc.array(mark, { maxLength: 7 }), (marks) => {
        const sorted = marks.toSorted((a, b) => a.at - b.at);
        const anchors = placeLabels(sorted, 0, 500);
        expect(anchors.length).toBe(sorted.length);
        const spans = sorted.flatMap((m, i) => (anchors[i] ? [span(m.at, m.width, anchors[i] ?? null)] : []));
        let end = 0;
        for (const [from, to] of spans) {
          expect(from).toBeGreaterThanOrEqual(end);
          end = to;
        }
        expect(end).toBeLessThanOrEqual(500);
      }),
      { seed: seedOf(71) },
    );
  });
});
