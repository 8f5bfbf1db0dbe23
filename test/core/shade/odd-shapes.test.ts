import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Solid } from '../../../core/form/model.ts';
import type { Ring } from '../../../core/plane/vec.ts';
import { Tree } from '../../../core/scheme/schema.ts';
import { areaShade, areaSunlit } from '../../../core/shade/area-sunlit.ts';
import { faceShadows } from '../../../core/shade/face-shadow.ts';
import { shadowChange } from '../../../core/shade/ground-shadow.ts';
import { windowSkies, windowSky } from '../../../core/shade/sky-share.ts';
import { openShare, openShares, sunlitFraction, windowShade } from '../../../core/shade/sunlit-fraction.ts';
import { seedOf } from '../../helpers/property-seed.ts';
import { house, solid, sunAt } from './small-scheme.ts';

/**
 * Shapes that nobody means to draw and everybody does: no thickness, faces that coincide or almost do, corners repeated or
 * in a line, blocks under the ground or inside one another, sun on the horizon, along a wall, overhead. Whole numbers from a
 * small range make such coincidences common; tiny doubles make near misses.
 */
const few = fc.oneof(
  fc.integer({ min: -3, max: 14 }),
  fc.double({ min: -1e-6, max: 1e-6, noNaN: true }),
  fc.double({ min: -3, max: 14, noNaN: true }),
);
const corner = fc.tuple(few, few);
const rectangle = fc.tuple(few, few, few, few).map(
  ([x, y, w, d]): Ring => [
    [x, y],
    [x + w, y],
    [x + w, y + d],
    [x, y + d],
  ],
);
const triangle = fc.tuple(corner, corner, corner).map((t): Ring => t);
const blocks = fc
  .array(
    fc.record({
      outline: fc.oneof(rectangle, triangle),
      base: few,
      top: few,
      standing: fc.constantFrom('existing', 'proposed', 'removed', 'context'),
    }),
    { maxLength: 6 },
  )
  .map((list) => list.map((b, i) => solid(`${i}`, b.outline, b.base, b.top, b.standing as Solid['standing'])));
const angle = fc.oneof(fc.constantFrom(0, 90, 180, 270, 45, -90), fc.double({ min: -180, max: 360, noNaN: true }));
const altitude = fc.oneof(fc.constantFrom(0, 90, 1e-9, 1e-5, -1, 45), fc.double({ min: -5, max: 90, noNaN: true }));
const devices = [
  { kind: 'overhang', depth: 0.6 },
  { kind: 'fin', depth: 0.3 },
  { kind: 'louvres', count: 3, spacing: 0.5, depth: 0.2, tilt: 90 },
];
const tree = Tree.parse({ id: 'T', at: [5, -1], height: 6, trunk: 0, spread: 5, transmittance: Array(12).fill(0.4) });

describe('odd shapes', () => {
  it('never give NaN, nor a share outside 0..1', () => {
    const share = (v: number) => expect(v >= 0 && v <= 1, `${v}`).toBe(true);
    const { window } = house({ devices });
    const { window: rooflight } = house({ window: { wall: undefined, roof: { at: [2, 2] } } });
    fc.assert(
      fc.property(blocks, angle, altitude, few, (solids, azimuth, high, level) => {
        const sun = sunAt(azimuth, high);
        for (const w of [window, rooflight]) share(sunlitFraction(windowShade(w, solids, [tree]), sun, 6));
        for (const shape of solids) share(areaSunlit(areaShade(shape.outline, level, solids, [tree]), sun, 6).share);
        for (const f of faceShadows(solids, sun)) {
          expect(f.shaded_m2 >= 0 && f.shaded_m2 <= f.area_m2 * (1 + 1e-9) + 1e-12, JSON.stringify(f)).toBe(true);
          for (const p of f.polygons.flat(2)) expect(Number.isFinite(p)).toBe(true);
        }
        const change = shadowChange(solids, sun, level);
        for (const part of [change.before, change.after, change.added, change.gained]) {
          expect(part.area_m2 >= 0 && Number.isFinite(part.area_m2)).toBe(true);
          for (const r of part.regions)
            for (const p of [r.outer, ...r.holes].flat(2)) expect(Number.isFinite(p)).toBe(true);
        }
      }),
      { numRuns: 600 },
    );
  });
  it('and a window sees of twelve months at once what it sees of each by itself, to the last bit', () => {
    const { window } = house({ devices });
    const changing = { ...tree, transmittance: tree.transmittance.map((_, m) => (m % 3 === 0 ? 0.7 : m / 20)) };
    const months = Array.from({ length: 13 }, (_, m) => m);
    const slope = fc.double({ min: -3, max: 3, noNaN: true });
    let differing = 0;
    fc.assert(
      fc.property(blocks, slope, slope, (solids, a, b) => {
        const shade = windowShade(window, solids, [changing]);
        const together = new Float64Array(months.length);
        openShares(shade, a, b, months, together);
        expect([...together]).toEqual(months.map((m) => openShare(shade, a, b, m)));
        if (new Set(together).size > 1) differing++;
      }),
      { seed: seedOf(20251201), numRuns: 400 },
    );
    // Otherwise the tree stood in nobody's way, and nothing was compared.
    expect(differing).toBeGreaterThan(0);
    const shade = windowShade(window, [], [changing]);
    expect(windowSkies(shade, months)).toEqual(months.map((m) => windowSky(shade, m)));
    expect(new Set(windowSkies(shade, months).map((seen) => seen.sky)).size).toBeGreaterThan(1);
  });
  it('nor in the sky that windows see', () => {
    const { window } = house({ devices });
    const { window: rooflight } = house({ window: { wall: undefined, roof: { at: [2, 2] } } });
    fc.assert(
      fc.property(blocks, (solids) => {
        for (const w of [window, rooflight])
          for (const v of Object.values(windowSky(windowShade(w, solids, [tree]))))
            expect(v >= 0 && v <= 1, `${v}`).toBe(true);
      }),
      { numRuns: 40 },
    );
  });
});
