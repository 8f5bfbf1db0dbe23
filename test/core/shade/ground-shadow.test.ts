import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Solid } from '../../../core/form/model.ts';
import { solidsAt } from '../../../core/form/stands.ts';
import { differenceOf, intersectionOf } from '../../../core/plane/boolean.ts';
import { regionArea } from '../../../core/plane/region.ts';
import { contains, signedArea } from '../../../core/plane/ring.ts';
import { shadowChange } from '../../../core/shade/ground-shadow.ts';
import type { ShadowChange } from '../../../core/shade/shadow.ts';
import { hitsSolid } from './ray-oracle.ts';
import { box, solid, sunAt } from './small-scheme.ts';

const shadowAfter = (solids: readonly Solid[], azimuth: number, altitude: number, level = 0) =>
  shadowChange(solids, sunAt(azimuth, altitude), level).after;
const farthest = (shadow: ShadowChange['after']) => {
  const points = shadow.regions.flatMap((r) => r.outer);
  return {
    east: Math.max(...points.map((p) => p[0])),
    west: Math.min(...points.map((p) => p[0])),
    north: Math.max(...points.map((p) => p[1])),
    south: Math.min(...points.map((p) => p[1])),
  };
};

describe('ground shadow: closed forms', () => {
  it('1c: a height of 10 m at 30° throws 17.3205 m, away from the sun', () => {
    const shadow = shadowAfter([solid('b', box(0, 0, 4, 4), 0, 10)], 180, 30);
    expect(farthest(shadow).north - 4).toBeCloseTo(17.3205, 4);
    expect(farthest(shadowAfter([solid('b', box(0, 0, 4, 4), 0, 10)], 90, 30)).west).toBeCloseTo(-17.3205, 4);
  });
  it('1d: box 20 × 10 × 15 m, altitude 35°, azimuth 150°: 478.1548 m² outside its footprint', () => {
    const shadow = shadowAfter([solid('b', box(0, 0, 20, 10), 0, 15)], 150, 35);
    expect(Math.abs(shadow.area_m2 - 478.1548)).toBeLessThan(0.005);
    expect(shadow.regions).toHaveLength(1);
    // The tip of the north-west corner (0, 10): shifted by E −10.7111, N 18.5522.
    expect(farthest(shadow).west).toBeCloseTo(-10.7111, 3);
    expect(farthest(shadow).north).toBeCloseTo(28.5522, 3);
  });
  it('an upright box: L·(a·|cos ψ| + b·|sin ψ|) outside its footprint, for any sun and turn', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 359, noNaN: true }),
        fc.double({ min: 3, max: 85, noNaN: true }),
        fc.double({ min: 0, max: 90, noNaN: true }),
        (azimuth, altitude, turn) => {
          const [a, b, h] = [12, 7, 9];
          const L = h / Math.tan((altitude * Math.PI) / 180);
          // ψ from the normal of side a: wall 0 of a box turned clockwise by `turn` faces 180° + turn.
          const psi = ((azimuth - 180 - turn) * Math.PI) / 180;
          const expected = L * (a * Math.abs(Math.cos(psi)) + b * Math.abs(Math.sin(psi)));
          const shadow = shadowAfter([solid('b', box(3, -8, a, b, turn), 0, h)], azimuth, altitude);
          expect(Math.abs(shadow.area_m2 - expected)).toBeLessThan(1e-4 * (2 * L + 40));
        },
      ),
    );
  });
  it('a floating slab throws its own outline, and the ground beneath it is ground', () => {
    const slab = solid('s', box(0, 0, 5, 3), 6, 6.5);
    expect(shadowAfter([slab], 180, 89.999999).area_m2).toBeCloseTo(15, 3);
    const shadow = shadowAfter([slab], 180, 45);
    expect(shadow.area_m2).toBeCloseTo(5 * 3.5, 3);
    expect(farthest(shadow).south).toBeCloseTo(6, 3);
  });
  it('ground under a building is no ground, also in the shadow of its neighbour', () => {
    const tall = solid('tall', box(0, 0, 10, 10), 0, 30);
    const low = solid('low', box(0, 15, 10, 10), 0, 1);
    // Sun due south at 45°: shadow 10 × 30 behind the tall block, less the low block’s 100, plus what that throws further on.
    expect(shadowAfter([tall, low], 180, 45).area_m2).toBeCloseTo(300 - 100, 2);
    expect(shadowAfter([tall, { ...low, base_m: 3, top_m: 4 }], 180, 45).area_m2).toBeCloseTo(300, 2);
  });
  it('only what rises above the level counts', () => {
    const block = solid('b', box(0, 0, 4, 4), 0, 10);
    expect(shadowAfter([block], 180, 45, 6).area_m2).toBeCloseTo(4 * 4, 3);
    expect(shadowAfter([block], 180, 45, 10)).toEqual({ regions: [], area_m2: 0 });
    expect(shadowAfter([block], 180, 45, 12)).toEqual({ regions: [], area_m2: 0 });
    expect(shadowAfter([{ ...block, base_m: -4 }], 180, 45).area_m2).toBeCloseTo(4 * 10, 3);
  });
  it('no sun, no shadow; and no NaN at sunset, at the zenith or for shapes without volume', () => {
    const block = solid('b', box(0, 0, 4, 4), 0, 10);
    for (const altitude of [0, -3, -90, Number.NaN])
      expect(shadowAfter([block], 180, altitude)).toEqual({ regions: [], area_m2: 0 });
    expect(shadowAfter([block], 180, 90).area_m2).toBeLessThan(1e-2);
    // 0.01° above the horizon the shadow is 57 km long, on a grid of 1 mm.
    const long = shadowAfter([block], 180, 0.01).area_m2;
    expect(Math.abs(long / ((4 * 10) / Math.tan((0.01 * Math.PI) / 180)) - 1)).toBeLessThan(1e-3);
    expect(Number.isFinite(shadowAfter([block], 200, 1e-4).area_m2)).toBe(true);
    const odd = [
      solid('flat', box(9, 9, 2, 2), 3, 3),
      solid(
        'needle',
        [
          [0, 0],
          [1, 0],
          [2, 0],
        ],
        0,
        9,
      ),
      solid('under', box(20, 0, 3, 3), -5, -1),
    ];
    expect(shadowAfter(odd, 180, 30)).toEqual({ regions: [], area_m2: 0 });
    expect(shadowAfter([block, { ...block, id: 'again' }], 150, 35).area_m2).toBeCloseTo(
      shadowAfter([block], 150, 35).area_m2,
      6,
    );
  });
});

describe('ground shadow: before and after', () => {
  const row = (standing: Solid['standing'], x: number, height: number, depth = 10) =>
    solid(`${standing}${x}`, box(x, 0, 10, depth), 0, height, standing);
  it('a proposed block adds its own shadow and takes none', () => {
    const change = shadowChange([row('context', 0, 10), row('proposed', 40, 10)], sunAt(180, 45), 0);
    expect(change.before.area_m2).toBeCloseTo(100, 3);
    expect(change.after.area_m2).toBeCloseTo(200, 3);
    expect(change.added.area_m2).toBeCloseTo(100, 3);
    expect(change.gained).toEqual({ regions: [], area_m2: 0 });
  });
  it('shadow on shadow is not added', () => {
    const change = shadowChange(
      [
        row('context', 0, 20),
        { ...row('proposed', 0, 12, 2), outline: box(0, 10.5, 10, 2), pieces: [box(0, 10.5, 10, 2)] },
      ],
      sunAt(180, 45),
      0,
    );
    // Existing shadow reaches y = 30; the new block stands in it at 10.5..12.5 and reaches 24.5.
    expect(change.added.area_m2).toBeCloseTo(0, 6);
    expect(change.after.area_m2).toBeCloseTo(change.before.area_m2 - 20, 3);
  });
  it('ground that a removed block covered counts neither as gained nor as added', () => {
    // Removed 10 × 10 × 10; proposed in the same place, twice as high.
    const change = shadowChange([row('removed', 0, 10), row('proposed', 0, 20)], sunAt(180, 45), 0);
    expect(change.added.area_m2).toBeCloseTo(100, 3);
    expect(change.gained.area_m2).toBe(0);
    // Removed and replaced by a block further south, whose shadow falls where the old one stood.
    const moved = { ...row('proposed', 0, 15), outline: box(0, -12, 10, 10), pieces: [box(0, -12, 10, 10)] };
    const other = shadowChange([row('removed', 0, 10), moved], sunAt(180, 45), 0);
    // New shadow from y −2 to 13; 0..10 was building, 10..13 was in shadow: added is −2..0 only.
    expect(other.added.area_m2).toBeCloseTo(20, 3);
    // Old shadow 10..20: gained is 13..20.
    expect(other.gained.area_m2).toBeCloseTo(70, 3);
    // After, the old place is ground, and lies in shadow.
    expect(other.after.area_m2).toBeCloseTo(150, 3);
  });
  it('an existing block stands at both stages', () => {
    const change = shadowChange([row('existing', 0, 10)], sunAt(180, 45), 0);
    expect(change.before).toEqual(change.after);
    expect([change.added.area_m2, change.gained.area_m2]).toEqual([0, 0]);
  });

  const blocks = fc
    .array(
      fc.record({
        x: fc.integer({ min: -40, max: 40 }),
        y: fc.integer({ min: -40, max: 40 }),
        w: fc.integer({ min: 2, max: 15 }),
        d: fc.integer({ min: 2, max: 15 }),
        turn: fc.integer({ min: 0, max: 89 }),
        base: fc.constantFrom(0, 0, 0, -2, 4),
        rise: fc.integer({ min: 3, max: 25 }),
        wings: fc.boolean(),
        standing: fc.constantFrom('existing', 'proposed', 'removed', 'context'),
      }),
      { minLength: 1, maxLength: 9 },
    )
    .map((list) =>
      list.map((b, i) => {
        const whole = box(b.x, b.y, b.w, b.d, b.turn);
        // An L: the first third of two sides, by cutting the far corner off to the middle.
        const [p, q, r, s] = whole as [
          readonly [number, number],
          readonly [number, number],
          readonly [number, number],
          readonly [number, number],
        ];
        const mid = (a: readonly [number, number], c: readonly [number, number]): [number, number] => [
          (a[0] + c[0]) / 2,
          (a[1] + c[1]) / 2,
        ];
        const outline = b.wings ? [p, q, mid(q, r), mid(p, r), mid(r, s), s] : whole;
        return solid(`${i}`, outline, b.base, b.base + b.rise, b.standing as Solid['standing']);
      }),
    );
  const sun = fc.record({ azimuth: fc.integer({ min: 0, max: 359 }), altitude: fc.integer({ min: 4, max: 80 }) });

  it('adds up: after = before + added − gained, but for ground that is building at one stage only', () => {
    fc.assert(
      fc.property(blocks, sun, (solids, { azimuth, altitude }) => {
        const { before, after, added, gained } = shadowChange(solids, sunAt(azimuth, altitude), 0);
        const feet = (stage: 'before' | 'after') =>
          solidsAt(solids, stage)
            .filter((s) => s.base_m <= 0)
            .map((s) => s.outline);
        const covered = regionArea(intersectionOf(before.regions, feet('after')));
        const freed = regionArea(intersectionOf(after.regions, feet('before')));
        // Corners are rounded to 0.1 mm, and outlines here are at most some hundred metres long in all.
        expect(
          Math.abs(after.area_m2 - (before.area_m2 + added.area_m2 - gained.area_m2 - covered + freed)),
        ).toBeLessThan(0.15);
        expect(regionArea(intersectionOf(added.regions, before.regions))).toBeLessThan(0.05);
        expect(regionArea(intersectionOf(gained.regions, after.regions))).toBeLessThan(0.05);
        expect(regionArea(differenceOf(added.regions, after.regions))).toBeLessThan(0.05);
      }),
      { numRuns: 150 },
    );
  });
  it('keeps a hole that touches its outer ring at a corner a hole (found by a fresh seed)', () => {
    const flat = (id: string, standing: Solid['standing'], outline: [number, number][], top_m: number): Solid => ({
      id,
      name: '',
      standing,
      outline,
      pieces: [outline],
      base_m: 0,
      top_m,
    });
    // The last one's shadow closes a gap between its own and the next building's to a triangle of 0.26 m².
    const solids = [
      flat(
        '0',
        'existing',
        [
          [-5, 8],
          [-3.1328391470055967, 7.283264100909399],
          [-2.416103247914996, 9.150424953903803],
          [-4.283264100909399, 9.867160852994404],
        ],
        24,
      ),
      flat(
        '1',
        'existing',
        [
          [-20, 0],
          [-19.687131069919538, -1.9753766811902755],
          [-16.724066048134123, -1.506073286069583],
          [-17.036934978214585, 0.46930339512069275],
        ],
        3,
      ),
      flat(
        '2',
        'existing',
        [
          [-32, 4],
          [-21.482779073125684, -3.641208279802151],
          [-17.368282307078374, 2.021910680822481],
          [-27.88550323395269, 9.663118960624633],
        ],
        3,
      ),
      flat(
        '3',
        'proposed',
        [
          [0, 0],
          [3.656768508095852, -3.4099918003124925],
          [5.020765228220849, -1.9472843970741516],
          [1.363996720124997, 1.462707403238341],
        ],
        3,
      ),
    ];
    const { before, after, added } = shadowChange(solids, sunAt(63, 57), 0);
    expect(Math.abs(after.area_m2 - before.area_m2 - added.area_m2)).toBeLessThan(0.01);
  });

  it('agrees with rays followed from points on the ground', () => {
    fc.assert(
      fc.property(blocks, sun, (solids, { azimuth, altitude }) => {
        const direction = sunAt(azimuth, altitude);
        const { after } = shadowChange(solids, direction, 0);
        const standing = solidsAt(solids, 'after');
        let wrong = 0;
        for (let k = 0; k < 400; k++) {
          const [x, y] = [120 * (((k * 0.6180339887) % 1) - 0.5), 120 * (((k * 0.7548776662) % 1) - 0.5)];
          const isBuilding = standing.some((s) => s.base_m <= 0 && contains(s.outline, x, y));
          const shaded = !isBuilding && standing.some((s) => hitsSolid([x, y, 0], direction, s));
          const drawn = after.regions.some((r) => contains(r.outer, x, y) && !r.holes.some((h) => contains(h, x, y)));
          if (shaded !== drawn) wrong++;
        }
        // A point within 0.1 mm of an edge may fall either way: one in 400 would be bad luck already.
        expect(wrong).toBeLessThanOrEqual(1);
      }),
      { numRuns: 100 },
    );
  });
  it('regions run anticlockwise round clockwise holes, and do not depend on the order of blocks', () => {
    fc.assert(
      fc.property(blocks, sun, (solids, { azimuth, altitude }) => {
        const one = shadowChange(solids, sunAt(azimuth, altitude), 0);
        const two = shadowChange([...solids].reverse(), sunAt(azimuth, altitude), 0);
        for (const key of ['before', 'after', 'added', 'gained'] as const) {
          expect(Math.abs(one[key].area_m2 - two[key].area_m2)).toBeLessThan(0.05);
          for (const region of one[key].regions) {
            expect(signedArea(region.outer)).toBeGreaterThan(0);
            for (const hole of region.holes) expect(signedArea(hole)).toBeLessThan(0);
          }
        }
      }),
      { numRuns: 80 },
    );
  });
});
