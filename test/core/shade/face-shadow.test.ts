import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Solid } from '../../../core/form/model.ts';
import { type Edge, wallPanel } from '../../../core/form/panel.ts';
import { contains, signedArea } from '../../../core/plane/ring.ts';
import { cross, dot, minus, type Vec3 } from '../../../core/plane/vec.ts';
import { type FaceShadow, faceShadows } from '../../../core/shade/face-shadow.ts';
import { panelShade, sunlitFraction } from '../../../core/shade/sunlit-fraction.ts';
import { hitsSolid } from './ray-oracle.ts';
import { box, solid, sunAt } from './small-scheme.ts';

const face = (all: readonly FaceShadow[], id: string, wall: number) =>
  all.find((f) => f.solid === id && f.wall === wall) as FaceShadow;
const ROOF = -1;

/** Area of a flat convex polygon in space, with its sign along a direction. */
const areaAlong = (corners: readonly Vec3[], normal: Vec3) => {
  let sum = 0;
  for (let i = 2; i < corners.length; i++)
    sum +=
      dot(
        cross(minus(corners[i - 1] as Vec3, corners[0] as Vec3), minus(corners[i] as Vec3, corners[0] as Vec3)),
        normal,
      ) / 2;
  return sum;
};

describe('shadows on faces', () => {
  it('a tall block on the roof of a lower one: closed form', () => {
    // Sun due south at 45°: a block 10 m higher throws 10 m onto the roof north of it.
    const all = faceShadows(
      [solid('low', box(0, 0, 10, 20), 0, 5), solid('tall', box(2, -4, 4, 4), 0, 15)],
      sunAt(180, 45),
    );
    const roof = face(all, 'low', ROOF);
    expect(roof.area_m2).toBe(200);
    expect(roof.shaded_m2).toBeCloseTo(4 * 10, 9);
    expect(face(all, 'tall', ROOF).shaded_m2).toBe(0);
    // The south wall of the low block: covered where the tall one touches it, sunlit elsewhere.
    expect(face(all, 'low', 0).shaded_m2).toBeCloseTo(4 * 5, 9);
    // North walls are turned away: shaded as a whole, without polygons.
    expect(face(all, 'low', 2)).toMatchObject({ polygons: [], area_m2: 50, shaded_m2: 50 });
  });
  it('a balcony above a wall: the closed form of an overhang', () => {
    const slab = solid('slab', box(-50, -1.2, 120, 1.2), 4, 4.2);
    const t = Math.tan((50 * Math.PI) / 180);
    const wall = face(faceShadows([solid('house', box(0, 0, 12, 8), 0, 4), slab], sunAt(180, 50)), 'house', 0);
    expect(wall.shaded_m2).toBeCloseTo(12 * 1.2 * t, 9);
  });
  it('an L shades itself', () => {
    const L = solid(
      'L',
      [
        [0, 0],
        [12, 0],
        [12, -10],
        [16, -10],
        [16, 8],
        [0, 8],
      ],
      0,
      9,
    );
    // Sun due east at 45°: the wing at x 12..16, 9 m high, shades the south wall (edge 0) from its corner at x = 12 for as
    // far as its shadow falls at each height; due east the wall itself is edge-on, so look from 100°.
    const all = faceShadows([L], sunAt(100, 30));
    const sampled = sampledShade(L, { start: [0, 0], end: [12, 0] }, [L], sunAt(100, 30));
    expect(face(all, 'L', 0).shaded_m2 / face(all, 'L', 0).area_m2).toBeCloseTo(sampled, 2);
    expect(face(all, 'L', 0).shaded_m2).toBeGreaterThan(20);
    expect(face(all, 'L', ROOF).shaded_m2).toBe(0);
  });
  it('with the sun down every face is shaded; blocks without volume have none', () => {
    const house = solid('house', box(0, 0, 12, 8), 0, 4);
    for (const altitude of [0, -10])
      for (const f of faceShadows([house], sunAt(180, altitude))) expect(f.shaded_m2).toBe(f.area_m2);
    expect(
      faceShadows(
        [
          solid('flat', box(0, 0, 2, 2), 1, 1),
          solid(
            'needle',
            [
              [0, 0],
              [1, 0],
              [2, 0],
            ],
            0,
            3,
          ),
        ],
        sunAt(180, 30),
      ),
    ).toEqual([]);
    expect(faceShadows([house], sunAt(180, 90)).map((f) => f.shaded_m2)).toEqual([48, 32, 48, 32, 0]);
  });
  it('blocks on top of and beside each other: covered faces count as shaded, nothing is NaN', () => {
    const all = faceShadows(
      [
        solid('a', box(0, 0, 6, 6), 0, 3),
        solid('b', box(0, 0, 6, 6), 3, 6),
        solid('c', box(6, 0, 6, 6), 0, 6),
        solid('a2', box(0, 0, 6, 6), 0, 3),
      ],
      sunAt(140, 40),
    );
    expect(face(all, 'a', ROOF).shaded_m2).toBeCloseTo(36, 9);
    expect(face(all, 'a', 1).shaded_m2).toBeCloseTo(18, 9);
    for (const f of all) expect(Number.isFinite(f.shaded_m2) && f.shaded_m2 >= 0).toBe(true);
  });

  const blocks = fc
    .array(
      fc.record({
        x: fc.integer({ min: -20, max: 20 }),
        y: fc.integer({ min: -20, max: 20 }),
        w: fc.integer({ min: 2, max: 12 }),
        d: fc.integer({ min: 2, max: 12 }),
        turn: fc.integer({ min: 0, max: 89 }),
        base: fc.constantFrom(0, 0, 0, 3),
        rise: fc.integer({ min: 2, max: 20 }),
        wing: fc.boolean(),
      }),
      { minLength: 1, maxLength: 7 },
    )
    .map((list) =>
      list.map((b, i) =>
        b.wing
          ? solid(
              `${i}`,
              [
                [b.x, b.y],
                [b.x + 9, b.y],
                [b.x + 9, b.y + 3],
                [b.x + 3, b.y + 3],
                [b.x + 3, b.y + 9],
                [b.x, b.y + 9],
              ],
              b.base,
              b.base + b.rise,
            )
          : solid(`${i}`, box(b.x, b.y, b.w, b.d, b.turn), b.base, b.base + b.rise),
      ),
    );
  const sun = fc.record({ azimuth: fc.integer({ min: 0, max: 359 }), altitude: fc.integer({ min: 2, max: 85 }) });

  it('polygons add up to the shaded area, lie in their face and are wound to the outside', () => {
    fc.assert(
      fc.property(blocks, sun, (solids, { azimuth, altitude }) => {
        for (const f of faceShadows(solids, sunAt(azimuth, altitude))) {
          const s = solids.find((x) => x.id === f.solid) as Solid;
          const a = s.outline[Math.max(0, f.wall)] as readonly [number, number];
          const b = s.outline[(f.wall + 1) % s.outline.length] as readonly [number, number];
          const run = Math.hypot(b[0] - a[0], b[1] - a[1]);
          const normal: Vec3 = f.face === 'roof' ? [0, 0, 1] : [(b[1] - a[1]) / run, (a[0] - b[0]) / run, 0];
          expect(f.area_m2).toBeCloseTo(f.face === 'roof' ? signedArea(s.outline) : run * (s.top_m - s.base_m), 9);
          expect(f.shaded_m2).toBeLessThanOrEqual(f.area_m2 * (1 + 1e-9));
          if (f.polygons.length === 0) {
            expect(f.shaded_m2 === 0 || f.shaded_m2 === f.area_m2).toBe(true);
            continue;
          }
          let sum = 0;
          for (const polygon of f.polygons) {
            const area = areaAlong(polygon, normal);
            expect(area).toBeGreaterThan(0);
            sum += area;
            for (const p of polygon)
              expect(
                Math.abs(f.face === 'roof' ? p[2] - s.top_m : (p[0] - a[0]) * normal[0] + (p[1] - a[1]) * normal[1]),
              ).toBeLessThan(1e-9);
          }
          expect(Math.abs(sum - f.shaded_m2)).toBeLessThan(1e-6 * f.area_m2);
        }
      }),
      { numRuns: 100 },
    );
  });
  it('a wall keeps as much sun as a window that fills it: sunlit and shaded make up the face to 1e-6', () => {
    fc.assert(
      fc.property(blocks, sun, (solids, { azimuth, altitude }) => {
        const direction = sunAt(azimuth, altitude);
        for (const f of faceShadows(solids, direction)) {
          if (f.face === 'roof') continue;
          const s = solids.find((x) => x.id === f.solid) as Solid;
          const [start, end] = [s.outline[f.wall], s.outline[(f.wall + 1) % s.outline.length]] as [
            readonly [number, number],
            readonly [number, number],
          ];
          const run = Math.hypot(end[0] - start[0], end[1] - start[1]);
          const panel = wallPanel({ start, end }, 0, s.base_m, run, s.top_m - s.base_m);
          const lit = sunlitFraction(panelShade(panel, 0, [], solids, []), direction);
          expect(Math.abs(lit + f.shaded_m2 / f.area_m2 - 1)).toBeLessThan(1e-6);
        }
      }),
      { numRuns: 100 },
    );
  });
  it('roofs agree with rays followed from them', () => {
    fc.assert(
      fc.property(blocks, sun, (solids, { azimuth, altitude }) => {
        const direction = sunAt(azimuth, altitude);
        const all = faceShadows(solids, direction);
        for (const s of solids) {
          const roof = face(all, s.id, ROOF);
          let wrong = 0;
          for (let k = 0; k < 200; k++) {
            const x = -25 + 60 * ((k * 0.6180339887) % 1);
            const y = -25 + 60 * ((k * 0.7548776662) % 1);
            if (!contains(s.outline, x, y)) continue;
            const shaded = solids.some((o) => hitsSolid([x, y, s.top_m], direction, o));
            const drawn = roof.polygons.some((p) =>
              contains(
                p.map((c) => [c[0], c[1]] as const),
                x,
                y,
              ),
            );
            if (shaded !== drawn) wrong++;
          }
          expect(wrong).toBe(0);
        }
      }),
      { numRuns: 60 },
    );
  });
});

/** Share of an upright face in shadow, by 40 000 rays. */
function sampledShade(on: Solid, edge: Edge, solids: readonly Solid[], sun: Vec3): number {
  let hidden = 0;
  const n = 200;
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) {
      const t = (i + 0.5) / n;
      const from: Vec3 = [
        edge.start[0] + t * (edge.end[0] - edge.start[0]),
        edge.start[1] + t * (edge.end[1] - edge.start[1]),
        on.base_m + ((j + 0.5) / n) * (on.top_m - on.base_m),
      ];
      // A hair outside the wall, so that the wall itself does not count.
      const out: Vec3 = [
        from[0] + 1e-6 * (edge.end[1] - edge.start[1]),
        from[1] - 1e-6 * (edge.end[0] - edge.start[0]),
        from[2],
      ];
      if (solids.some((s) => hitsSolid(out, sun, s))) hidden++;
    }
  return hidden / (n * n);
}
