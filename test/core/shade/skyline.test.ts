import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Shader, Solid } from '../../../core/form/model.ts';
import { convexPieces } from '../../../core/plane/convex-pieces.ts';
import type { Point, Ring, Vec3 } from '../../../core/plane/vec.ts';
import { seenSamples, sunOnReceptors } from '../../../core/shade/exposure.ts';
import { facing } from '../../../core/shade/exposure-grid.ts';
import { columnsFor, type Light, sortLight } from '../../../core/shade/exposure-light.ts';
import type { Receptors } from '../../../core/shade/skyline-groups.ts';
import { makeOccluders } from '../../../core/shade/skyline-occluders.ts';
import { blockField, box, fieldReceptors, prism } from '../../helpers/block-field.ts';
import { nearEdge } from '../../helpers/near-edge.ts';
import { isHidden, meshOf } from '../../helpers/ray-casts.ts';
import { yearLight } from '../../helpers/year-light.ts';
import { hitsSolid } from './ray-oracle.ts';
import { seedOf } from '../../helpers/property-seed.ts';

const WITHIN_deg = 0.25;

type Tally = { samples: number; differ: number; far: number };

/** Compares every sample in front of some receptors with a ray cast of three-mesh-bvh. */
function compare(
  solids: readonly Solid[],
  shaders: readonly Shader[],
  light: Light,
  r: Receptors,
  rows: number[],
): Tally {
  const occluders = makeOccluders(solids, shaders);
  const columns = sortLight(light, columnsFor(light.sx.length));
  const covered = sunOnReceptors(occluders, columns, r).covered;
  const mesh = meshOf(solids, shaders);
  const tally: Tally = { samples: 0, differ: 0, far: 0 };
  for (const row of rows) {
    const seen = seenSamples(occluders, columns, r, row);
    const p: Vec3 = [r.x[row]!, r.y[row]!, r.z[row]!];
    const n: Vec3 = [r.nx[row]!, r.ny[row]!, r.nz[row]!];
    for (let i = 0; i < light.sx.length; i++) {
      const s: Vec3 = [light.sx[i]!, light.sy[i]!, light.sz[i]!];
      if (n[0] * s[0] + n[1] * s[1] + n[2] * s[2] <= 0) {
        expect(seen[i]).toBe(0);
        continue;
      }
      tally.samples++;
      const hidden = covered[row] === 1 || isHidden(mesh, p, n, s);
      if ((seen[i] === 1) !== hidden) continue;
      tally.differ++;
      if (!nearEdge(mesh, p, n, s, WITHIN_deg)) tally.far++;
    }
  }
  return tally;
}

describe('against a ray cast for every sample (three-mesh-bvh, single precision)', () => {
  for (const detailed of [false, true]) {
    it(`a field of 200 blocks${detailed ? ' with overhangs, fins and floating blocks' : ''}, every third day at 15 min`, () => {
      const field = blockField(7, 200, detailed);
      const days = Array.from({ length: 122 }, (_, i) => 3 * i + 1);
      const r = fieldReceptors(field, 300, 3);
      const rows = Array.from({ length: 60 }, (_, i) => 5 * i);
      const tally = compare(field.solids, field.shaders, yearLight(51.5, 15, days), r, rows);
      expect(tally.samples).toBeGreaterThan(150_000);
      expect(tally.differ / tally.samples).toBeLessThan(0.0005);
      expect(tally.far).toBe(0);
    });
  }

  it('random schemes: turned, overlapping, floating and L-shaped blocks, tilted shaders, receptors that face anywhere', () => {
    const total: Tally = { samples: 0, differ: 0, far: 0 };
    fc.assert(
      fc.property(scheme, ({ solids, shaders, points }) => {
        const light = yearLight(40, 20, [10, 80, 172, 250, 355]);
        for (const { at, normal } of points) {
          if (touches(at, solids, shaders)) continue;
          const tally = compare(solids, shaders, light, facing([at], normal), [0]);
          total.samples += tally.samples;
          total.differ += tally.differ;
          expect(tally.far).toBe(0);
        }
      }),
      { seed: seedOf(20250321), numRuns: 400 },
    );
    // How many points stand free is up to the seed: 96 000 to 130 000 samples. Half of that would say that something is amiss.
    expect(total.samples).toBeGreaterThan(50_000);
    expect(total.differ / total.samples).toBeLessThan(0.001);
  });
});

describe('against rays followed in double precision', () => {
  it('random schemes: every single sample equal', () => {
    let samples = 0;
    fc.assert(
      fc.property(scheme, ({ solids, shaders, points }) => {
        const light = yearLight(40, 20, [10, 80, 172, 250, 355]);
        const columns = sortLight(light, columnsFor(light.sx.length));
        const occluders = makeOccluders(solids, shaders);
        for (const { at, normal } of points) {
          if (touches(at, solids, shaders)) continue;
          const seen = seenSamples(occluders, columns, facing([at], normal), 0);
          for (let i = 0; i < light.sx.length; i++) {
            const s: Vec3 = [light.sx[i]!, light.sy[i]!, light.sz[i]!];
            const front = normal[0] * s[0] + normal[1] * s[1] + normal[2] * s[2] > 0;
            const hidden = () =>
              solids.some((b) => hitsSolid(at, s, b)) || shaders.some((d) => hitsPatch(at, s, d.corners));
            expect(seen[i]).toBe(front && !hidden() ? 1 : 0);
            samples++;
          }
        }
      }),
      { seed: seedOf(20250621), numRuns: 700 },
    );
    expect(samples).toBeGreaterThan(200_000);
  });
});

/** Whether a ray meets a flat convex polygon: it passes all edges on the same side, and the plane lies ahead. */
function hitsPatch(at: Vec3, s: Vec3, corners: readonly Vec3[]): boolean {
  const from = (p: Vec3): Vec3 => [p[0] - at[0], p[1] - at[1], p[2] - at[2]];
  const triple = (a: Vec3, b: Vec3): number =>
    s[0] * (a[1] * b[2] - a[2] * b[1]) + s[1] * (a[2] * b[0] - a[0] * b[2]) + s[2] * (a[0] * b[1] - a[1] * b[0]);
  const sides = corners.map((p, i) => triple(from(p), from(corners[(i + 1) % corners.length] as Vec3)));
  return (sides.every((v) => v > 0) || sides.every((v) => v < 0)) && meets(at, s, corners);
}

/** Whether the plane of a polygon lies ahead on a ray. */
function meets(at: Vec3, s: Vec3, [a, b, c]: readonly Vec3[]): boolean {
  if (!a || !b || !c) return false;
  const u = [b[0] - a[0], b[1] - a[1], b[2] - a[2]] as const;
  const v = [c[0] - a[0], c[1] - a[1], c[2] - a[2]] as const;
  const n = [u[1] * v[2] - u[2] * v[1], u[2] * v[0] - u[0] * v[2], u[0] * v[1] - u[1] * v[0]] as const;
  const along = n[0] * s[0] + n[1] * s[1] + n[2] * s[2];
  const off = n[0] * (a[0] - at[0]) + n[1] * (a[1] - at[1]) + n[2] * (a[2] - at[2]);
  return along !== 0 && off / along > 0;
}

/**
 * Whether a point lies so near to the plane of something that the ray cast, which starts a millimetre off in single
 * precision, is no judge: within 1 cm. What is right there is asked one by one further below.
 */
function touches(at: Vec3, solids: readonly Solid[], shaders: readonly Shader[]): boolean {
  const near = (d: number): boolean => Math.abs(d) < 0.01;
  for (const s of solids) {
    if (near(at[2] - s.base_m) || near(at[2] - s.top_m)) return true;
    for (const [i, a] of s.outline.entries()) {
      const b = s.outline[(i + 1) % s.outline.length] as Point;
      if (
        near(((b[0] - a[0]) * (at[1] - a[1]) - (b[1] - a[1]) * (at[0] - a[0])) / Math.hypot(b[0] - a[0], b[1] - a[1]))
      )
        return true;
    }
  }
  return shaders.some(({ corners: [a, b, c] }) => {
    if (!a || !b || !c) return true;
    const u = [b[0] - a[0], b[1] - a[1], b[2] - a[2]] as const;
    const v = [c[0] - a[0], c[1] - a[1], c[2] - a[2]] as const;
    const m = [u[1] * v[2] - u[2] * v[1], u[2] * v[0] - u[0] * v[2], u[0] * v[1] - u[1] * v[0]] as const;
    return near((m[0] * (at[0] - a[0]) + m[1] * (at[1] - a[1]) + m[2] * (at[2] - a[2])) / Math.hypot(...m));
  });
}

/** Evenly spread along the span, without a liking for 0 and the ends: those are asked for one by one further below. */
const between = (min: number, max: number): fc.Arbitrary<number> =>
  fc.noBias(fc.integer({ min: 0, max: 1_000_003 })).map((k) => min + ((max - min) * k) / 1_000_003);
const coordinate = between(-30, 30);
const unitVector = fc
  .tuple(between(-1, 1), between(0, 2 * Math.PI))
  .map(([z, a]): Vec3 => [Math.sqrt(1 - z * z) * Math.cos(a), Math.sqrt(1 - z * z) * Math.sin(a), z]);

const block = fc
  .record({
    x: coordinate,
    y: coordinate,
    width: between(1, 15),
    depth: between(1, 15),
    base: fc.constantFrom(0, 0, 0, -2, 3, 8),
    height: between(1, 20),
    turn: between(0, 6.3),
    notched: fc.boolean(),
  })
  .map((b): Solid => {
    if (!b.notched) return box('B', b.x, b.y, b.width, b.depth, b.base, b.base + b.height, b.turn);
    const [c, s] = [Math.cos(b.turn), Math.sin(b.turn)];
    const shape: Ring = [
      [0, 0],
      [b.width, 0],
      [b.width, b.depth / 2],
      [b.width / 2, b.depth / 2],
      [b.width / 2, b.depth],
      [0, b.depth],
    ];
    const outline = shape.map(([u, v]): Point => [b.x + u * c - v * s, b.y + u * s + v * c]);
    return { ...prism('L', outline, b.base, b.base + b.height), pieces: convexPieces(outline) };
  });

const shader = fc
  .record({ at: fc.tuple(coordinate, coordinate, between(0.5, 12)), normal: unitVector })
  .map(({ at, normal }): Shader => {
    const along: Vec3 = Math.abs(normal[2]) < 0.9 ? [-normal[1], normal[0], 0] : [1, 0, -normal[0] / normal[2]];
    const n = Math.hypot(...along);
    const u: Vec3 = [along[0] / n, along[1] / n, along[2] / n];
    const v: Vec3 = [
      normal[1] * u[2] - normal[2] * u[1],
      normal[2] * u[0] - normal[0] * u[2],
      normal[0] * u[1] - normal[1] * u[0],
    ];
    const corner = (a: number, b: number): Vec3 => [
      at[0] + a * u[0] + b * v[0],
      at[1] + a * u[1] + b * v[1],
      at[2] + a * u[2] + b * v[2],
    ];
    return { device: 'D', kind: 'overhang', corners: [corner(-3, -1), corner(3, -1), corner(3, 1), corner(-3, 1)] };
  });

const scheme = fc.record({
  solids: fc.array(block, { maxLength: 6 }),
  shaders: fc.array(shader, { maxLength: 5 }),
  points: fc.array(
    fc.record({
      at: fc.tuple(coordinate, coordinate, between(0, 10)).map((p): Vec3 => p),
      normal: fc.oneof(fc.constant<Vec3>([0, 0, 1]), fc.constant<Vec3>([0, -1, 0]), unitVector),
    }),
    { minLength: 1, maxLength: 3 },
  ),
});

describe('what must hold whatever stands', () => {
  const light = sortLight(yearLight(51.5, 10, [20, 80, 172, 300]), 48);
  const minutes = (solids: readonly Solid[], shaders: readonly Shader[], r: Receptors) =>
    sunOnReceptors(makeOccluders(solids, shaders), light, r);

  it('one more block never adds sun', () => {
    fc.assert(
      fc.property(scheme, block, ({ solids, shaders, points }, more) => {
        const r = facing(
          points.map((p) => p.at),
          [0, 0, 1],
        );
        const before = minutes(solids, shaders, r);
        const after = minutes([...solids, more], shaders, r);
        for (let i = 0; i < points.length; i++) {
          expect(after.minutes[i]!).toBeLessThanOrEqual(before.minutes[i]!);
          expect(after.beam[i]!).toBeLessThanOrEqual(before.beam[i]! + 1e-6);
        }
      }),
      { seed: seedOf(7), numRuns: 200 },
    );
  });

  it('the order of blocks and shaders changes no bit, nor does the company of other receptors', () => {
    const field = blockField(11, 60, true);
    const r = fieldReceptors(field, 400, 5);
    const one = minutes(field.solids, field.shaders, r);
    const turned = minutes([...field.solids].reverse(), [...field.shaders].reverse(), r);
    expect(turned).toEqual(one);
    const occluders = makeOccluders(field.solids, field.shaders);
    for (const [from, to] of [
      [0, 1],
      [37, 90],
      [300, 400],
    ] as const) {
      const part = sunOnReceptors(occluders, light, r, from, to);
      expect(part.minutes).toEqual(one.minutes.slice(from, to));
      expect(part.beam).toEqual(one.beam.slice(from, to));
    }
  });

  it('turning the site and the sky together changes nothing but round-off', () => {
    const field = blockField(13, 40, true);
    const r = fieldReceptors(field, 200, 5);
    const open = yearLight(51.5, 10, [20, 80, 172, 300]);
    const one = sunOnReceptors(makeOccluders(field.solids, field.shaders), light, r);
    for (const turn of [0.3, Math.PI / 2, 4]) {
      const [c, s] = [Math.cos(turn), Math.sin(turn)];
      const x = (px: number, py: number): number => px * c - py * s;
      const y = (px: number, py: number): number => px * s + py * c;
      const solids = field.solids.map((b) => {
        const outline = b.outline.map(([px, py]): Point => [x(px, py), y(px, py)]);
        return { ...b, outline, pieces: [outline] };
      });
      const shaders = field.shaders.map((d) => ({
        ...d,
        corners: d.corners.map((p): Vec3 => [x(p[0], p[1]), y(p[0], p[1]), p[2]]),
      }));
      const spun: Receptors = {
        x: r.x.map((v, i) => x(v, r.y[i]!)),
        y: r.y.map((v, i) => y(r.x[i]!, v)),
        z: r.z,
        nx: r.nx.map((v, i) => x(v, r.ny[i]!)),
        ny: r.ny.map((v, i) => y(r.nx[i]!, v)),
        nz: r.nz,
      };
      const sky = {
        ...open,
        sx: open.sx.map((v, i) => x(v, open.sy[i]!)),
        sy: open.sy.map((v, i) => y(open.sx[i]!, v)),
      };
      const two = sunOnReceptors(makeOccluders(solids, shaders), sortLight(sky, 48), spun);
      let moved = 0;
      for (let i = 0; i < 200; i++) if (Math.abs(two.minutes[i]! - one.minutes[i]!) > 1e-9) moved++;
      expect(moved).toBeLessThanOrEqual(2);
    }
  });
});
