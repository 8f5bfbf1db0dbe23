import { describe, expect, it } from 'vitest';
import type { Shader } from '../../../core/form/model.ts';
import type { Vec3 } from '../../../core/plane/vec.ts';
import { facing } from '../../../core/shade/exposure-grid.ts';
import { makeOccluders } from '../../../core/shade/skyline-occluders.ts';
import { domeOnReceptors, groundOnReceptors, mirroredOccluders } from '../../../core/shade/sky-view.ts';
import { pointSky, shadingMask } from '../../../core/shade/sky-view-mask.ts';
import { makeSkyRays, RAYS_OF_A_MAP } from '../../../core/shade/sky-view-trace.ts';
import { blockField, box, fieldReceptors } from '../../helpers/block-field.ts';
import { isHidden, meshOf } from '../../helpers/ray-casts.ts';

const DEG = Math.PI / 180;
const SOUTH: Vec3 = [0, -1, 0];
const UP: Vec3 = [0, 0, 1];

/** A long block that stands at a profile angle before a point at (0, 0, 2). */
const opposite = (angle_deg: number) => box('O', 0, -10.5, 200_000, 1, 0, 2 + 10 * Math.tan(angle_deg * DEG));

describe('an upright point before a long parallel obstruction (closed forms, methods dossier 3.2)', () => {
  // VSC (3/14)(1 − sin Θ) + (4/7π) cos²Θ; uniform (1 − sin Θ)/2; level point (3/7π)[(π/2)(1 + cos Θ) + (4/3)(π − Θ + sin Θ cos Θ)].
  const table = [
    [0, 39.618, 50.0, 100.0],
    [5, 37.612, 45.642, 99.91],
    [10, 35.348, 41.318, 99.61],
    [15, 32.853, 37.059, 99.055],
    [20, 30.161, 32.899, 98.204],
    [25, 27.313, 28.869, 97.023],
    [30, 24.356, 25.0, 95.481],
    [35, 21.343, 21.321, 93.56],
    [40, 18.328, 17.861, 91.245],
    [45, 15.371, 14.645, 88.533],
    [50, 12.529, 11.698, 85.429],
    [55, 9.859, 9.042, 81.948],
    [60, 7.418, 6.699, 78.114],
    [65, 5.256, 4.685, 73.959],
  ] as const;
  for (const [angle, vsc, uniform, level] of table) {
    it(`${angle}°: ${vsc} %, uniform ${uniform} %, level ${level} %`, () => {
      const o = makeOccluders(angle === 0 ? [] : [opposite(angle)], []);
      const wall = pointSky(o, [0, 0, 2], SOUTH);
      expect(100 * wall.skyComponent).toBeCloseTo(vsc, 2);
      expect(100 * wall.skyView).toBeCloseTo(uniform, 2);
      expect(100 * pointSky(o, [0, 0, 2], UP).skyComponent).toBeCloseTo(level, 2);
    });
  }
});

describe('under an overhang (closed forms, methods dossier 5)', () => {
  // Edge of a long overhang at profile angle Γ, obstruction at Θ: (sin Γ − sin Θ)/2.
  const overhang = (edge_deg: number): Shader => {
    const out = 1 / Math.tan(edge_deg * DEG);
    const far = 100_000;
    return {
      device: 'D',
      kind: 'overhang',
      corners: [
        [-far, 0, 3],
        [far, 0, 3],
        [far, -out, 3],
        [-far, -out, 3],
      ],
    };
  };

  it('the edge at 60°, the obstruction at 25°: 0.22170', () => {
    const o = makeOccluders([opposite(25)], [overhang(60)]);
    expect(pointSky(o, [0, 0, 2], SOUTH).skyView).toBeCloseTo(0.2217, 4);
  });

  it('an obstruction above the edge leaves nothing', () => {
    expect(pointSky(makeOccluders([opposite(62)], [overhang(60)]), [0, 0, 2], SOUTH).skyView).toBeCloseTo(0, 6);
  });

  it('mean over a window 1.5 m high under an overhang of 0.8 m: 0.30000, with a gap of 0.3 m 0.37179 (crossed strings)', () => {
    for (const [gap, mean] of [
      [0, 0.3],
      [0.3, 0.37179],
    ] as const) {
      const far = 100_000;
      const z = 1.5 + gap;
      const plate: Shader = {
        device: 'D',
        kind: 'overhang',
        corners: [
          [-far, 0, z],
          [far, 0, z],
          [far, -0.8, z],
          [-far, -0.8, z],
        ],
      };
      const points = Array.from({ length: 200 }, (_, i): Vec3 => [0, 0, ((i + 0.5) * 1.5) / 200]);
      const share = domeOnReceptors(makeOccluders([], [plate]), makeSkyRays(720), facing(points, SOUTH), 'uniform');
      expect(share.reduce((a, b) => a + b, 0) / 200).toBeCloseTo(mean, 4);
    }
  });
});

describe('level points in the open middle of things', () => {
  it('on the middle line of a long street the sky view factor is cos Θ, tan Θ = height over half the width', () => {
    // An infinite canyon, two parallel walls: e.g. Johnson & Watson 1984, J. Climate Appl. Meteor. 23, 329 (from memory).
    for (const [height, width] of [
      [5, 20],
      [10, 20],
      [20, 20],
      [30, 12],
    ] as const) {
      const side = (s: number) => box(`S${s}`, 0, s * (width / 2 + 5), 40_000, 10, 0, height);
      const { skyView } = pointSky(makeOccluders([side(1), side(-1)], []), [0, 0, 0], UP);
      expect(skyView).toBeCloseTo(Math.cos(Math.atan2(height, width / 2)), 4);
    }
  });

  it('a round court of 40 walls at 30° keeps cos² 30° = 0.75 of an even dome', () => {
    // Level: ∫ over altitudes above γ of sin γ cos γ, doubled: cos²γ. Walls tangent to the circle, so a little more is hidden at the corners.
    const sides = 40;
    const outline = Array.from({ length: sides }, (_, i) => {
      const a = (2 * Math.PI * i) / sides;
      return [10 * Math.cos(a), 10 * Math.sin(a)] as const;
    });
    const walls = outline.map((a, i) => {
      const b = outline[(i + 1) % sides] as readonly [number, number];
      return {
        device: 'D',
        kind: 'fin' as const,
        corners: [
          [...a, 0],
          [...b, 0],
          [...b, 5.7735],
          [...a, 5.7735],
        ] as Vec3[],
      };
    });
    expect(pointSky(makeOccluders([], walls), [0, 0, 0], UP).skyView).toBeCloseTo(0.75, 2);
  });

  it('under a large disc of a roof sees what is left round its edge: 1 − sin² of its half angle', () => {
    const sides = 72;
    const corners = Array.from({ length: sides }, (_, i): Vec3 => {
      const a = (2 * Math.PI * i) / sides;
      return [6 * Math.cos(a), 6 * Math.sin(a), 6];
    });
    const sky = pointSky(makeOccluders([], [{ corners }]), [0, 0, 0], UP);
    expect(sky.skyView).toBeCloseTo(0.5, 2);
  });
});

describe('against rays of three-mesh-bvh', () => {
  it('sky and overcast shares of a detailed field agree with 40 000 rays to 0.004', () => {
    const field = blockField(5, 49, true);
    const r = fieldReceptors(field, 90, 2);
    const o = makeOccluders(field.solids, field.shaders);
    const mesh = meshOf(field.solids, field.shaders);
    for (let row = 1; row < 90; row += 9) {
      const p: Vec3 = [r.x[row]!, r.y[row]!, r.z[row]!];
      const n: Vec3 = [r.nx[row]!, r.ny[row]!, r.nz[row]!];
      let uniform = 0;
      let overcast = 0;
      const count = 40_000;
      // Directions spread evenly over the upper half of the sphere (golden-angle spiral).
      for (let i = 0; i < count; i++) {
        const z = (i + 0.5) / count;
        const a = i * Math.PI * (3 - Math.sqrt(5));
        const s: Vec3 = [Math.sqrt(1 - z * z) * Math.cos(a), Math.sqrt(1 - z * z) * Math.sin(a), z];
        const cos = n[0] * s[0] + n[1] * s[1] + n[2] * s[2];
        if (cos <= 0 || isHidden(mesh, p, n, s)) continue;
        uniform += (2 * cos) / count;
        overcast += (6 * cos * (1 + 2 * z)) / (7 * count);
      }
      const inside = pointSky(o, p, n);
      if (inside.skyView === 0) continue;
      expect(Math.abs(inside.skyView - uniform)).toBeLessThan(0.004);
      expect(Math.abs(inside.skyComponent - overcast)).toBeLessThan(0.004);
      const map = domeOnReceptors(o, makeSkyRays(RAYS_OF_A_MAP), facing([p], n), 'uniform')[0]!;
      expect(Math.abs(map - uniform)).toBeLessThan(0.006);
    }
  });
});

describe('the ground’s share', () => {
  const rays = makeSkyRays(720);
  const share = (solids: Parameters<typeof mirroredOccluders>[0], at: Vec3, n: Vec3) =>
    groundOnReceptors(mirroredOccluders(solids, []), rays, facing([at], n))[0]!;

  it('in the open: (1 − cos β)/2, for an upright, a level, a tilted and a down-looking plane', () => {
    expect(share([], [0, 0, 3], SOUTH)).toBeCloseTo(0.5, 5);
    expect(share([], [0, 0, 3], UP)).toBeCloseTo(0, 9);
    expect(share([], [0, 0, 3], [0, -Math.sin(0.7), Math.cos(0.7)])).toBeCloseTo((1 - Math.cos(0.7)) / 2, 4);
    expect(share([], [0, 0, 3], [0, 0, -1])).toBeCloseTo(1, 6);
  });

  it('before a long block at 10 m, from 2 m up: only the strip between, (1 − sin δ)/2 with tan δ = 2/10', () => {
    expect(share([opposite(25)], [0, 0, 2], SOUTH)).toBeCloseTo((1 - Math.sin(Math.atan(0.2))) / 2, 4);
  });

  it('a cellar under the block changes nothing', () => {
    const deep = { ...opposite(25), base_m: -5 };
    expect(share([deep], [0, 0, 2], SOUTH)).toBeCloseTo(share([opposite(25)], [0, 0, 2], SOUTH), 9);
  });
});

describe('the shading mask', () => {
  it('gives the altitude of a wall’s edge at each true azimuth, with north turned', () => {
    const north = 20 * DEG;
    const mask = shadingMask(makeOccluders([box('O', 0, 10.5, 8, 1, 0, 5)], []), [0, 0, 0], north, 720);
    expect(mask.azimuths).toHaveLength(720);
    for (const { azimuth_deg, hidden } of mask.azimuths) {
      const bearing = (azimuth_deg + 20) * DEG;
      const ahead = Math.cos(bearing) > 0 && Math.abs(Math.tan(bearing)) < 0.4;
      if (!ahead) expect(hidden).toEqual([]);
      else {
        expect(hidden).toHaveLength(1);
        expect(hidden[0]![0]).toBe(0);
        expect(hidden[0]![1]).toBeCloseTo(Math.atan(0.5 * Math.cos(bearing)) / DEG, 9);
      }
    }
  });

  it('gives two stretches where something floats over a wall, and all inside a solid', () => {
    const wall = box('O', 0, 10.5, 80, 1, 0, 5);
    const over = box('F', 0, 10.5, 80, 1, 10, 20);
    const north = shadingMask(makeOccluders([wall, over], []), [0, 0, 0], 0).azimuths[0]!;
    expect(north.azimuth_deg).toBeCloseTo(0, 9);
    expect(north.hidden.map((h) => h.map((v) => Number(v.toFixed(6))))).toEqual([
      [0, Number((Math.atan(0.5) / DEG).toFixed(6))],
      [Number((Math.atan(10 / 11) / DEG).toFixed(6)), Number((Math.atan(2) / DEG).toFixed(6))],
    ]);
    const inside = shadingMask(makeOccluders([wall], []), [0, 10.5, 1], 0);
    expect(inside.azimuths.every((a) => a.hidden.length === 1 && a.hidden[0]![1] === 90)).toBe(true);
  });
});
