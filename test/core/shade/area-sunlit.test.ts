import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Solid } from '../../../core/form/model.ts';
import { intersectionOf } from '../../../core/plane/boolean.ts';
import { regionArea } from '../../../core/plane/region.ts';
import type { Ring } from '../../../core/plane/vec.ts';
import { Tree } from '../../../core/scheme/schema.ts';
import { areaShade, areaSunlit } from '../../../core/shade/area-sunlit.ts';
import { shadowChange } from '../../../core/shade/ground-shadow.ts';
import { box, solid, sunAt } from './small-scheme.ts';

const lit = (outline: Ring, solids: readonly Solid[], azimuth: number, altitude: number, level = 0) =>
  areaSunlit(areaShade(outline, level, solids, []), sunAt(azimuth, altitude));

describe('sun on an amenity area', () => {
  // Garden north of a long wall, equinox noon at latitude 52°: the sun stands at 38°; worked number 2a (shade 7.6796 m deep).
  it('2a: garden 16 m deep behind a long 6 m wall: 52.002 % sunlit, 15 m deep: 48.802 %', () => {
    const wall = [solid('wall', box(-500, -1, 1000, 1), 0, 6)];
    expect(lit(box(0, 0, 10, 16), wall, 180, 38).share).toBeCloseTo(0.52002, 5);
    expect(lit(box(0, 0, 10, 15), wall, 180, 38).share).toBeCloseTo(0.48802, 5);
  });
  it('is whole in the open, and none with the sun down', () => {
    expect(lit(box(0, 0, 10, 16), [], 180, 10)).toEqual({ open_m2: 160, sunlit_m2: 160, share: 1 });
    expect(lit(box(0, 0, 10, 16), [], 180, 0)).toEqual({ open_m2: 160, sunlit_m2: 0, share: 0 });
    expect(lit(box(0, 0, 10, 16), [], 180, -20).share).toBe(0);
  });
  it('ground under a shed is no area; under a floating deck it is', () => {
    const shed = solid('shed', box(2, 2, 4, 4), 0, 2);
    expect(lit(box(0, 0, 10, 10), [shed], 180, 90)).toEqual({ open_m2: 84, sunlit_m2: 84, share: 1 });
    expect(lit(box(0, 0, 10, 10), [shed], 180, 45).sunlit_m2).toBeCloseTo(84 - 8, 9);
    const deck = solid('deck', box(2, 2, 4, 4), 3, 3.2);
    expect(lit(box(0, 0, 10, 10), [deck], 180, 90)).toMatchObject({ open_m2: 100, sunlit_m2: expect.closeTo(84, 9) });
    expect(lit(box(0, 0, 10, 10), [solid('all', box(-1, -1, 20, 20), 0, 3)], 180, 45)).toEqual({
      open_m2: 0,
      sunlit_m2: 0,
      share: 0,
    });
  });
  it('a terrace on a roof sees only what rises above it', () => {
    const solids = [solid('house', box(0, 0, 10, 10), 0, 6), solid('stair', box(0, -3, 10, 3), 0, 8)];
    expect(lit(box(0, 0, 10, 10), solids, 180, 45, 6).sunlit_m2).toBeCloseTo(80, 9);
  });
  it('a crown lets the month’s share through', () => {
    const tree = Tree.parse({
      id: 'T',
      at: [5, -100],
      base: -30,
      trunk: 0,
      height: 200,
      spread: 150,
      transmittance: Array(12).fill(0.25),
    });
    const shade = areaShade(box(0, 0, 10, 10), 0, [], [tree]);
    expect(areaSunlit(shade, sunAt(180, 30), 6).share).toBeCloseTo(0.25, 9);
    expect(areaSunlit(shade, sunAt(180, 30)).share).toBe(1);
  });
  it('is the area less the shadow drawn on it', () => {
    const blocks = fc
      .array(
        fc.record({
          x: fc.integer({ min: -20, max: 25 }),
          y: fc.integer({ min: -20, max: 25 }),
          w: fc.integer({ min: 1, max: 9 }),
          d: fc.integer({ min: 1, max: 9 }),
          turn: fc.integer({ min: 0, max: 89 }),
          base: fc.constantFrom(0, 0, 3),
          rise: fc.integer({ min: 1, max: 15 }),
        }),
        { maxLength: 7 },
      )
      .map((list) => list.map((b, i) => solid(`${i}`, box(b.x, b.y, b.w, b.d, b.turn), b.base, b.base + b.rise)));
    const court: Ring = [
      [0, 0],
      [14, 0],
      [14, 5],
      [6, 5],
      [6, 12],
      [0, 12],
    ];
    fc.assert(
      fc.property(
        blocks,
        fc.integer({ min: 0, max: 359 }),
        fc.integer({ min: 3, max: 85 }),
        (solids, azimuth, altitude) => {
          const sun = lit(court, solids, azimuth, altitude);
          const drawn = shadowChange(solids, sunAt(azimuth, altitude), 0).after;
          const shaded = regionArea(intersectionOf(drawn.regions, [court]));
          expect(Math.abs(sun.open_m2 - sun.sunlit_m2 - shaded)).toBeLessThan(0.03);
        },
      ),
      { numRuns: 150 },
    );
  });
});
