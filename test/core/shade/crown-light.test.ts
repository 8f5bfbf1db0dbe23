import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { unit, type Vec3 } from '../../../core/plane/vec.ts';
import type { Tree } from '../../../core/scheme/schema.ts';
import { crownColumns } from '../../../core/shade/crown-light.ts';
import { crownOnRay } from '../../../core/shade/crown-sky.ts';
import { facing } from '../../../core/shade/exposure-grid.ts';
import { columnsFor, type Light, sortLight } from '../../../core/shade/exposure-light.ts';
import { sunOnReceptors } from '../../../core/shade/exposure.ts';
import { pointSun } from '../../../core/shade/point-sun.ts';
import { domeOnReceptors, groundOnReceptors, mirroredOccluders } from '../../../core/shade/sky-view.ts';
import { makeSkyRays } from '../../../core/shade/sky-view-trace.ts';
import { makeOccluders } from '../../../core/shade/skyline-occluders.ts';
import { box } from '../../helpers/block-field.ts';
import { yearLight } from '../../helpers/year-light.ts';

const UP: Vec3 = [0, 0, 1];
const SOUTH: Vec3 = [0, -1, 0];
const rays = makeSkyRays(1440);

/** A tree whose crown is an ellipsoid about a point. */
const tree = (id: string, middle: Vec3, radius: number, rise: number, transmittance: number | number[]): Tree => ({
  id,
  name: '',
  at: [middle[0], middle[1]],
  base: middle[2] - rise - 1,
  trunk: 1,
  height: 2 * rise + 1,
  spread: 2 * radius,
  transmittance: typeof transmittance === 'number' ? Array.from({ length: 12 }, () => transmittance) : transmittance,
});

const sum = (values: Float64Array): number => values.reduce((a, b) => a + b, 0);

describe('crowns before the sun', () => {
  const base = yearLight(51.5, 60, [20, 80, 172, 300]);
  const dated = (month: number): Light => ({ ...base, month: new Uint8Array(base.sx.length).fill(month) });
  const suns = Array.from({ length: base.sx.length }, (_, i): Vec3 => [base.sx[i]!, base.sy[i]!, base.sz[i]!]);

  it('weaken every sample as a ray cast at the ellipsoids says, behind solids and before them', () => {
    const place = fc.tuple(
      fc.double({ min: -20, max: 20, noNaN: true }),
      fc.double({ min: -20, max: 20, noNaN: true }),
      fc.double({ min: 0, max: 12, noNaN: true }),
    );
    const someTree = fc
      .tuple(
        place,
        fc.double({ min: 0.5, max: 8, noNaN: true }),
        fc.double({ min: 0.5, max: 6, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
      )
      .map(([at, radius, rise, through]) => tree('T', at, radius, rise, through));
    fc.assert(
      fc.property(
        place,
        place,
        fc.array(someTree, { maxLength: 4 }),
        fc.integer({ min: 1, max: 12 }),
        (at, towards, trees, month) => {
          const normal = unit([towards[0] + 0.01, towards[1], towards[2]]);
          const solids = [box('B', 8, -9, 6, 4, 0, 9, 0.4)];
          const o = makeOccluders(solids, [], trees);
          const light = dated(month);
          const got = sunOnReceptors(o, sortLight(light, columnsFor(suns.length)), facing([at], normal));
          const share = pointSun(o, trees, at, normal, suns, month);
          let minutes = 0;
          let beam = 0;
          share.forEach((s, i) => {
            const sun = suns[i] as Vec3;
            minutes += s * light.minutes[i]!;
            beam += s * light.beam[i]! * (normal[0] * sun[0] + normal[1] * sun[1] + normal[2] * sun[2]);
          });
          expect(got.minutes[0]).toBeCloseTo(minutes, 6);
          expect(got.beam[0]).toBeCloseTo(beam, 6);
        },
      ),
      { numRuns: 150 },
    );
  });

  it('let through what the month says, the mean of the year without one, and multiply one behind the other', () => {
    const byMonth = Array.from({ length: 12 }, (_, m) => (m === 5 ? 0.2 : 0.8));
    const over = tree('T', [0, 0, 20], 200, 15, byMonth);
    const minutes = (light: Light, trees: readonly Tree[]): number =>
      sunOnReceptors(makeOccluders([], [], trees), sortLight(light, columnsFor(suns.length)), facing([[0, 0, 6]], UP))
        .minutes[0]!;
    const free = minutes(base, []);
    expect(minutes(dated(6), [over])).toBeCloseTo(0.2 * free, 6);
    expect(minutes(dated(1), [over])).toBeCloseTo(0.8 * free, 6);
    expect(minutes(base, [over])).toBeCloseTo(0.75 * free, 6);
    expect(minutes(dated(1), [over, { ...over, id: 'U' }])).toBeCloseTo(0.64 * free, 6);
  });

  it('give no number that is not one from places in, on, under and at the rim of a crown', () => {
    const trees = [tree('T', [0, 0, 6], 4, 4, 0.5), tree('U', [0, 0, 6], 4, 4, 0), tree('V', [4, 0, 0], 2, 1, 0.2)];
    const places: Vec3[] = [
      [0, 0, 6],
      [0, 0, 2],
      [0, 0, 10],
      [4, 0, 6],
      [4, 0, 0],
      [0, -4, 1],
      [6, 0, 0],
      [4, 0, 1],
    ];
    for (const normal of [UP, SOUTH, [0, 0, -1], [1, 0, 0]] as Vec3[]) {
      const o = makeOccluders([], [], trees);
      const r = facing(places, normal);
      const { minutes, beam } = sunOnReceptors(o, sortLight(base, columnsFor(suns.length)), r);
      const sky = domeOnReceptors(o, rays, r, 'overcast');
      const ground = groundOnReceptors(mirroredOccluders([], [], trees), rays, r);
      for (const column of [minutes, beam, sky, ground])
        expect(column.every((v) => v >= 0 && Number.isFinite(v))).toBe(true);
      expect(minutes[0]).toBe(0);
    }
  });

  it('give the same bytes in whatever order the trees stand in the scheme', () => {
    const trees = [0.3, 0.7, 0.1].map((t, i) => tree(`T${i}`, [3 * i, -6, 5], 4, 4, t));
    const run = (order: readonly Tree[]): number =>
      sunOnReceptors(makeOccluders([], [], order), sortLight(base, columnsFor(suns.length)), facing([[2, 0, 1]], SOUTH))
        .beam[0]!;
    expect(run([trees[2], trees[0], trees[1]] as Tree[])).toBe(run(trees));
    expect(run(trees)).toBeLessThan(run([]));
  });
});

describe('crowns before the dome', () => {
  const dome = (trees: readonly Tree[], at: Vec3, normal: Vec3): number =>
    domeOnReceptors(makeOccluders([], [], trees), rays, facing([at], normal), 'uniform')[0]!;

  it('hide (R/d)² of a level plane’s dome when a ball stands overhead (view factor of a sphere)', () => {
    for (const [radius, d] of [
      [2, 10],
      [5, 8],
      [1, 30],
    ] as const) {
      const ball = tree('T', [0, 0, d], radius, radius, 0.25);
      expect(1 - dome([ball], [0, 0, 0], UP)).toBeCloseTo(0.75 * (radius / d) ** 2, 6);
    }
  });

  it('hide (R/d)² cos θ of it when a ball stands aside, wholly above the horizon', () => {
    const d = 20;
    for (const degrees of [20, 45, 70]) {
      const angle = (degrees * Math.PI) / 180;
      const ball = tree('T', [0, -d * Math.cos(angle), d * Math.sin(angle)], 3, 3, 0);
      expect(1 - dome([ball], [0, 0, 0], UP)).toBeCloseTo((3 / d) ** 2 * Math.sin(angle), 4);
    }
  });

  it('hide half a ball’s view factor when it stands before an upright plane at its own height, and half from the ground', () => {
    const ball = tree('T', [0, -10, 5], 3, 3, 0);
    expect(0.5 - dome([ball], [0, 0, 5], SOUTH)).toBeCloseTo(0.5 * 0.09, 4);
    const ground = groundOnReceptors(mirroredOccluders([], [], [ball]), rays, facing([[0, 0, 5]], SOUTH))[0]!;
    expect(0.5 - ground).toBeCloseTo(0.5 * 0.09, 4);
    expect(dome([ball], [0, 0, 5], [0, 1, 0])).toBe(dome([], [0, 0, 5], [0, 1, 0]));
  });

  it('take their share of each month, and only once what a wall hides anyway', () => {
    const byMonth = Array.from({ length: 12 }, (_, m) => (m < 6 ? 0 : 1));
    const ball = tree('T', [0, 0, 10], 4, 4, byMonth);
    const months = new Float64Array(13);
    months[3] = 0.25;
    months[9] = 0.75;
    const share = domeOnReceptors(makeOccluders([], [], [ball]), rays, facing([[0, 0, 0]], UP), 'uniform', months)[0]!;
    expect(1 - share).toBeCloseTo(0.25 * 0.16, 6);
    const wall = box('W', 0, -3, 400, 2, 0, 200);
    const behind = tree('T', [0, -20, 8], 4, 4, 0);
    const hidden = (trees: readonly Tree[]): number =>
      domeOnReceptors(makeOccluders([wall], [], trees), rays, facing([[0, 0, 1]], UP), 'uniform')[0]!;
    expect(hidden([behind])).toBe(hidden([]));
  });

  it('span on a ray what a scan of its altitudes finds', () => {
    const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    fc.assert(
      fc.property(
        number(-12, 12),
        number(-12, 12),
        number(-8, 14),
        number(0.5, 9),
        number(0.5, 6),
        number(0, 6.28),
        (x, y, z, radius, rise, bearing) => {
          const crowns = crownColumns([tree('T', [x, y, z], radius, rise, 0)]);
          const [ux, uy] = [Math.cos(bearing), Math.sin(bearing)];
          const stretch = new Float64Array(2);
          const isMet = crownOnRay(crowns, 0, [0, 0, 0], ux, uy, stretch);
          for (let k = 1; k < 60; k++) {
            const t = Math.tan((k / 60) * (Math.PI / 2));
            const s: Vec3 = unit([ux, uy, t]);
            const c: Vec3 = [x / radius, y / radius, z / rise];
            const v: Vec3 = [s[0] / radius, s[1] / radius, s[2] / rise];
            const along = c[0] * v[0] + c[1] * v[1] + c[2] * v[2];
            const outside = sum(Float64Array.from(c, (q) => q * q)) - 1;
            const root = along * along - sum(Float64Array.from(v, (q) => q * q)) * outside;
            if (Math.abs(root) < 1e-9) continue;
            const hits = root > 0 && (outside < 0 || along > 0);
            expect(isMet && t > stretch[0]! && t < stretch[1]!).toBe(hits);
          }
        },
      ),
      { numRuns: 300 },
    );
  });
});
