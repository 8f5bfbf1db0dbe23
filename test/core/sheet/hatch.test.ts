import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { hatchLines } from '../../../core/sheet/hatch.ts';

const stroke = { colour: '#000000', width: 0.1 };
const square = (x: number, y: number, side: number) =>
  [
    [x, y],
    [x + side, y],
    [x + side, y + side],
    [x, y + side],
  ] as const;
const total = (lines: ReturnType<typeof hatchLines>): number =>
  lines.reduce((sum, [a, b, c, d]) => sum + Math.hypot(c - a, d - b), 0);

describe('hatch', () => {
  test('lines times spacing are the area, holes left out', () => {
    for (const angle_deg of [0, 30, 45, 90, 135]) {
      const lines = hatchLines([square(10, 10, 50), square(20, 20, 10)], { angle_deg, spacing: 0.05, stroke });
      expect((total(lines) * 0.05) / (2500 - 100)).toBeCloseTo(1, 2);
    }
  });

  test('angles run anticlockwise as the page is seen', () => {
    // At 45° a line rises to the right, and y runs down the page.
    for (const [x1, y1, x2, y2] of hatchLines([square(0, 0, 10)], { angle_deg: 45, spacing: 2, stroke })) {
      expect((y2 - y1) / (x2 - x1)).toBeCloseTo(-1, 9);
    }
  });

  test('a region cut in two hatches as it did whole: lines lie where the page says', () => {
    fc.assert(
      fc.property(fc.double({ min: 1, max: 39, noNaN: true }), fc.integer({ min: 0, max: 179 }), (cut, angle_deg) => {
        const hatch = { angle_deg, spacing: 1.7, stroke };
        const whole = hatchLines(
          [
            [
              [3, 5],
              [43, 5],
              [43, 25],
              [3, 25],
            ],
          ],
          hatch,
        );
        const left = hatchLines(
          [
            [
              [3, 5],
              [3 + cut, 5],
              [3 + cut, 25],
              [3, 25],
            ],
          ],
          hatch,
        );
        const right = hatchLines(
          [
            [
              [3 + cut, 5],
              [43, 5],
              [43, 25],
              [3 + cut, 25],
            ],
          ],
          hatch,
        );
        // A line that runs along the cut itself may fall to either side: the height of the region at most.
        expect(Math.abs(total(left) + total(right) - total(whole))).toBeLessThan(angle_deg === 90 ? 20.001 : 1e-6);
      }),
    );
  });

  test('a spacing that makes no sense gives no lines, and no endless loop', () => {
    for (const spacing of [0, -1, Number.NaN])
      expect(hatchLines([square(0, 0, 10)], { angle_deg: 45, spacing, stroke })).toEqual([]);
    expect(hatchLines([], { angle_deg: 45, spacing: 1, stroke })).toEqual([]);
  });
});
