import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { convexHull } from '../../../core/plane/convex-hull.ts';
import { convexPieces, isConvex } from '../../../core/plane/convex-pieces.ts';
import { contains, signedArea } from '../../../core/plane/ring.ts';
import type { Point, Ring } from '../../../core/plane/vec.ts';

/** A simple polygon: corners at rising angles about the origin, at any distance (a star-shaped outline). */
const star = fc
  .array(fc.double({ min: 0.5, max: 20, noNaN: true }), { minLength: 3, maxLength: 40 })
  .map(
    (r): Ring =>
      r.map((d, i) => [d * Math.cos((2 * Math.PI * i) / r.length), d * Math.sin((2 * Math.PI * i) / r.length)]),
  );
/** A comb: not star-shaped, with many right turns. */
const comb = fc
  .array(fc.double({ min: 0.2, max: 9, noNaN: true }), { minLength: 1, maxLength: 20 })
  .map((teeth): Ring => {
    const ring: Point[] = [
      [0, -1],
      [2 * teeth.length, -1],
    ];
    for (let i = teeth.length - 1; i >= 0; i--)
      ring.push([2 * i + 2, teeth[i] as number], [2 * i + 1, teeth[i] as number], [2 * i + 1, 0], [2 * i, 0]);
    return ring;
  });
const area = (rings: readonly Ring[]) => rings.reduce((sum, r) => sum + signedArea(r), 0);

describe('convexPieces', () => {
  it('leaves a convex outline whole and drops corners in a line', () => {
    expect(
      convexPieces([
        [0, 0],
        [2, 0],
        [4, 0],
        [4, 3],
        [0, 3],
      ]),
    ).toEqual([
      [
        [0, 0],
        [4, 0],
        [4, 3],
        [0, 3],
      ],
    ]);
  });
  it('cuts an L into two pieces and a plus sign into at most five', () => {
    expect(
      convexPieces([
        [0, 0],
        [6, 0],
        [6, 2],
        [2, 2],
        [2, 6],
        [0, 6],
      ]),
    ).toHaveLength(2);
    const plus: Ring = [
      [1, 0],
      [2, 0],
      [2, 1],
      [3, 1],
      [3, 2],
      [2, 2],
      [2, 3],
      [1, 3],
      [1, 2],
      [0, 2],
      [0, 1],
      [1, 1],
    ];
    const pieces = convexPieces(plus);
    expect(pieces.length).toBeLessThanOrEqual(5);
    expect(area(pieces)).toBeCloseTo(5, 12);
  });
  it('has no pieces for an outline without area', () => {
    expect(
      convexPieces([
        [0, 0],
        [1, 1],
        [2, 2],
      ]),
    ).toEqual([]);
    expect(
      convexPieces([
        [0, 0],
        [0, 0],
        [0, 0],
      ]),
    ).toEqual([]);
    expect(convexPieces([])).toEqual([]);
  });
  it('takes an outline of 2000 corners in good time', () => {
    const ring: Ring = Array.from({ length: 2000 }, (_, i): Point => {
      const r = i % 2 === 0 ? 50 : 45;
      return [r * Math.cos((2 * Math.PI * i) / 2000), r * Math.sin((2 * Math.PI * i) / 2000)];
    });
    expect(area(convexPieces(ring))).toBeCloseTo(signedArea(ring), 6);
  }, 5000);
  for (const [name, shape] of [
    ['star-shaped', star],
    ['comb', comb],
  ] as const)
    it(`covers ${name} outlines, either way round, with convex anticlockwise pieces that do not overlap`, () => {
      fc.assert(
        fc.property(shape, fc.boolean(), fc.double({ min: 0, max: 6.3, noNaN: true }), (drawn, backwards, turn) => {
          const [c, s] = [Math.cos(turn), Math.sin(turn)];
          const ring = drawn.map(([x, y]): Point => [c * x - s * y, s * x + c * y]);
          const pieces = convexPieces(backwards ? [...ring].reverse() : ring);
          const whole = signedArea(ring);
          expect(Math.abs(area(pieces) - whole)).toBeLessThan(1e-9 * whole);
          for (const piece of pieces) {
            expect(signedArea(piece)).toBeGreaterThan(0);
            expect(isConvex(piece)).toBe(true);
          }
          // Equal areas and no point in two pieces: the pieces are the outline.
          for (let k = 0; k < 40; k++) {
            const x = 30 * (((k * 0.6180339887) % 1) - 0.3);
            const y = 30 * (((k * 0.7548776662) % 1) - 0.3);
            const within = pieces.filter((piece) => contains(piece, x, y)).length;
            expect(within).toBe(contains(ring, x, y) ? 1 : 0);
          }
        }),
        { numRuns: 200 },
      );
    });
});

describe('convexHull', () => {
  it('of a square with points inside and on its edges is the square', () => {
    expect(
      convexHull([
        [1, 1],
        [0, 0],
        [2, 0],
        [2, 2],
        [0, 2],
        [1, 0],
        [2, 1],
        [0, 0],
      ]),
    ).toEqual([
      [0, 0],
      [2, 0],
      [2, 2],
      [0, 2],
    ]);
  });
  it('holds every point and is convex', () => {
    const coordinate = fc.integer({ min: -50, max: 50 });
    fc.assert(
      fc.property(fc.array(fc.tuple(coordinate, coordinate), { minLength: 3, maxLength: 60 }), (points) => {
        const hull = convexHull(points);
        if (hull.length < 3) return;
        expect(isConvex(hull)).toBe(true);
        for (const p of points)
          hull.forEach((a, i) => {
            const b = hull[(i + 1) % hull.length] as Point;
            expect((b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0])).toBeGreaterThanOrEqual(0);
          });
      }),
    );
  });
});
