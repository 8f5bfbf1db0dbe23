import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { convexHull } from '../../../core/plane/convex-hull.ts';
import { differenceOf } from '../../../core/plane/boolean.ts';
import { Patches } from '../../../core/plane/patches.ts';
import { regionArea } from '../../../core/plane/region.ts';
import { signedArea } from '../../../core/plane/ring.ts';
import type { Ring } from '../../../core/plane/vec.ts';

function cutWith(patches: Patches, ring: Ring, factor: number, keep = false): void {
  ring.forEach((p, i) => {
    patches.cutX[i] = p[0];
    patches.cutY[i] = p[1];
  });
  patches.cut(ring.length, factor, keep);
}
const coordinate = fc.double({ min: -2, max: 12, noNaN: true });
const hull = fc.array(fc.tuple(coordinate, coordinate), { minLength: 3, maxLength: 9 }).map((p) => convexHull(p));

describe('Patches', () => {
  it('leaves a pane in one piece when an outline misses it, whatever its edges would split', () => {
    const patches = new Patches();
    patches.addRectangle(0, 0, 4, 4);
    cutWith(
      patches,
      [
        [5, -1],
        [9, 3],
        [5, 7],
      ],
      0,
    );
    cutWith(
      patches,
      [
        [3.9, -3],
        [8, -3],
        [8, 0.05],
      ],
      0,
    );
    expect(patches.count).toBe(1);
    expect(patches.area()).toBe(16);
  });
  it('takes a window out of the middle, and nothing when the outline has no area', () => {
    const patches = new Patches();
    patches.addRectangle(0, 0, 4, 4);
    cutWith(
      patches,
      [
        [1, 1],
        [3, 1],
        [3, 3],
        [1, 3],
      ],
      0,
    );
    expect(patches.area()).toBe(12);
    for (const flat of [
      [
        [0, 0],
        [4, 4],
        [2, 2],
      ],
      [
        [2, 0.5],
        [2, 0.5],
        [2, 0.5],
      ],
      [
        [0, 3.5],
        [4, 3.5],
      ],
    ] as Ring[])
      cutWith(patches, flat, 0);
    expect(patches.area()).toBeCloseTo(12, 12);
  });
  it('is used up when it is wholly covered', () => {
    const patches = new Patches();
    patches.addRectangle(0, 0, 4, 4);
    cutWith(
      patches,
      [
        [-1, -1],
        [9, -1],
        [-1, 9],
      ],
      0,
    );
    expect(patches.count).toBe(0);
    expect(patches.area()).toBe(0);
  });
  it('weights multiply where outlines lie over each other', () => {
    const patches = new Patches();
    patches.addRectangle(0, 0, 4, 4);
    cutWith(
      patches,
      [
        [0, 0],
        [3, 0],
        [3, 4],
        [0, 4],
      ],
      0.5,
    );
    cutWith(
      patches,
      [
        [1, 0],
        [4, 0],
        [4, 4],
        [1, 4],
      ],
      0.2,
    );
    expect(patches.area()).toBeCloseTo(4 * (1 * 0.5 + 2 * 0.1 + 1 * 0.2), 12);
  });
  it('kept parts and the rest are the whole, and are convex', () => {
    fc.assert(
      fc.property(fc.array(hull, { maxLength: 8 }), (rings) => {
        const patches = new Patches();
        patches.addRectangle(0, 0, 10, 7);
        for (const ring of rings) if (ring.length >= 3) cutWith(patches, ring, 0, true);
        let whole = 0;
        for (let i = 0; i < patches.count; i++) whole += patches.areaOf(i);
        expect(whole).toBeCloseTo(70, 9);
        for (let i = 0; i < patches.count; i++)
          expect(signedArea(convexHull(patches.ringOf(i)))).toBeCloseTo(patches.areaOf(i), 9);
      }),
      { numRuns: 300 },
    );
  });
  it('agrees with the boolean difference on the grid', () => {
    fc.assert(
      fc.property(fc.array(hull, { maxLength: 8 }), (rings) => {
        const patches = new Patches();
        patches.addRectangle(0, 0, 10, 7);
        for (const ring of rings) if (ring.length >= 3) cutWith(patches, ring, 0);
        const grid = regionArea(
          differenceOf(
            [
              [
                [0, 0],
                [10, 0],
                [10, 7],
                [0, 7],
              ],
            ],
            rings,
          ),
        );
        // The grid is a tenth of a millimetre; outlines are some tens of metres long.
        expect(Math.abs(patches.area() - grid)).toBeLessThan(0.01);
      }),
      { numRuns: 300 },
    );
  });
  it('grows as needed: a thousand small squares out of one pane', () => {
    const patches = new Patches();
    patches.addRectangle(0, 0, 50, 50);
    for (let i = 0; i < 32; i++)
      for (let j = 0; j < 32; j++) {
        const [x, y] = [1 + 1.5 * i, 1 + 1.5 * j];
        cutWith(
          patches,
          [
            [x, y],
            [x + 0.5, y],
            [x + 0.5, y + 0.5],
            [x, y + 0.5],
          ],
          0,
        );
      }
    expect(patches.area()).toBeCloseTo(2500 - 1024 * 0.25, 8);
    patches.clear();
    expect(patches.area()).toBe(0);
  });
});
