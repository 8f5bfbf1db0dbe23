import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { differenceOf, intersectionOf, unionOf } from '../../../core/plane/boolean.ts';
import { regionArea } from '../../../core/plane/region.ts';
import { signedArea } from '../../../core/plane/ring.ts';
import type { Point, Ring } from '../../../core/plane/vec.ts';

const square = (x: number, y: number, size: number): Ring => [
  [x, y],
  [x + size, y],
  [x + size, y + size],
  [x, y + size],
];
const turned = fc
  .record({
    x: fc.double({ min: -20, max: 20, noNaN: true }),
    y: fc.double({ min: -20, max: 20, noNaN: true }),
    w: fc.double({ min: 0.5, max: 15, noNaN: true }),
    d: fc.double({ min: 0.5, max: 15, noNaN: true }),
    turn: fc.double({ min: 0, max: 3, noNaN: true }),
  })
  .map(({ x, y, w, d, turn }): Ring => {
    const [c, s] = [Math.cos(turn), Math.sin(turn)];
    return (
      [
        [0, 0],
        [w, 0],
        [w, d],
        [0, d],
      ] as Point[]
    ).map(([u, v]): Point => [x + c * u - s * v, y + s * u + c * v]);
  });
const rings = fc.array(turned, { minLength: 1, maxLength: 6 });

describe('boolean operations', () => {
  it('union of overlapping squares is one region from its lowest leftmost corner, anticlockwise', () => {
    expect(unionOf([square(0, 0, 2), [...square(1, 1, 2)].reverse()])).toEqual([
      {
        outer: [
          [0, 0],
          [2, 0],
          [2, 1],
          [3, 1],
          [3, 3],
          [1, 3],
          [1, 2],
          [0, 2],
        ],
        holes: [],
      },
    ]);
  });
  it('a ring inside another is part of it; taken away, it is a clockwise hole', () => {
    expect(unionOf([square(0, 0, 6), square(2, 2, 1)])).toEqual([{ outer: square(0, 0, 6), holes: [] }]);
    const [region, ...others] = differenceOf([square(0, 0, 6)], [square(2, 2, 1)]);
    expect(others).toEqual([]);
    expect(region?.holes).toEqual([
      [
        [2, 2],
        [2, 3],
        [3, 3],
        [3, 2],
      ],
    ]);
    expect(signedArea(region?.holes[0] as Ring)).toBe(-1);
    expect(regionArea(differenceOf([square(0, 0, 6)], [square(2, 2, 1)]))).toBe(35);
  });
  it('keeps an island inside a hole apart, and its hole when it is cut again', () => {
    const rim = differenceOf([square(0, 0, 10)], [square(1, 1, 8)]);
    const both = [...rim, ...unionOf([square(4, 4, 2)])];
    expect(regionArea(differenceOf(both, [square(0, 0, 1)]))).toBeCloseTo(100 - 64 + 4 - 1, 9);
  });
  it('gives plain coordinates on the grid of a tenth of a millimetre, without stray fields', () => {
    const [region] = unionOf([square(1000.3, -2000.7, 0.1)]);
    expect(region?.outer).toEqual([
      [1000.3, -2000.7],
      [1000.4, -2000.7],
      [1000.4, -2000.6],
      [1000.3, -2000.6],
    ]);
  });
  it('of nothing, of lines and of points is nothing', () => {
    expect(unionOf([])).toEqual([]);
    expect(
      unionOf([
        [
          [0, 0],
          [1, 1],
          [2, 2],
        ],
      ]),
    ).toEqual([]);
    expect(
      unionOf([
        [
          [0, 0],
          [1, 0],
          [2, 0],
        ],
      ]),
    ).toEqual([]);
    expect(differenceOf([square(0, 0, 1)], [square(0, 0, 1)])).toEqual([]);
  });
  it('refuses corners that are not numbers', () => {
    expect(() =>
      unionOf([
        [
          [0, 0],
          [Number.NaN, 0],
          [0, 1],
        ],
      ]),
    ).toThrow(RangeError);
    expect(() =>
      unionOf([
        [
          [0, 0],
          [Infinity, 0],
          [0, 1],
        ],
      ]),
    ).toThrow(RangeError);
  });
  it('takes shapes 1000 km wide on a coarser grid, to a thousandth of their area', () => {
    const long: Ring = [
      [0, 0],
      [1e6, 0],
      [1e6, 50],
      [0, 50],
    ];
    expect(regionArea(unionOf([long, square(-10, 0, 50)])) / (50 * (1e6 + 10))).toBeCloseTo(1, 3);
  });
  it('areas of union and intersection add up (inclusion and exclusion)', () => {
    fc.assert(
      fc.property(rings, rings, (a, b) => {
        const [areaA, areaB] = [regionArea(unionOf(a)), regionArea(unionOf(b))];
        const union = regionArea(unionOf([...a, ...b]));
        const common = regionArea(intersectionOf(a, b));
        // Each crossing is rounded to the grid: a tenth of a millimetre along at most a few hundred metres of outline.
        expect(Math.abs(areaA + areaB - union - common)).toBeLessThan(0.01);
        expect(Math.abs(areaA - common - regionArea(differenceOf(a, b)))).toBeLessThan(0.01);
      }),
      { numRuns: 150 },
    );
  });
  it('does not depend on the order of rings', () => {
    fc.assert(
      fc.property(rings, (a) => {
        const [one, two] = [unionOf(a), unionOf([...a].reverse())];
        expect(Math.abs(regionArea(one) - regionArea(two))).toBeLessThan(0.01);
        expect(one.length).toBe(two.length);
      }),
      { numRuns: 100 },
    );
  });
});
