import { describe, expect, it } from 'vitest';
import type { Solid } from '../../../core/form/model.ts';
import type { Vec3 } from '../../../core/plane/vec.ts';
import { sunOnReceptors } from '../../../core/shade/exposure.ts';
import { facing, levelGrid } from '../../../core/shade/exposure-grid.ts';
import { columnsFor, type Light, sortLight } from '../../../core/shade/exposure-light.ts';
import { makeOccluders } from '../../../core/shade/skyline-occluders.ts';
import { sunlightLevel, sunlitShare } from '../../../core/shade/sunlight-hours.ts';
import { box } from '../../helpers/block-field.ts';
import { equinoxLight } from '../../helpers/equinox-light.ts';

// Closed forms of the equinox, derived in the methods dossier: in the plane of declination 0 the sun vector is
// (−sin ω, −sin φ cos ω, cos φ cos ω), so the tip of a shadow runs along a straight line H·tan φ poleward of its foot.

const sun = (solids: readonly Solid[], light: Light, points: readonly Vec3[], normal: Vec3) =>
  sunOnReceptors(makeOccluders(solids, []), sortLight(light, columnsFor(light.sx.length)), facing(points, normal));

describe('a garden north of a long 6 m wall at 52° N on the equinox', () => {
  const wall = box('W', 0, -0.5, 60_000, 1, 0, 6);
  const light = equinoxLight(52, 1);

  it('lies in shade all day to a depth of 7.6796 m and in sun all day beyond', () => {
    const { minutes } = sun(
      [wall],
      light,
      [
        [0, 7.679, 0],
        [0, 7.68, 0],
        [3, 1, 0],
        [3, 12, 0],
      ],
      [0, 0, 1],
    );
    expect([...minutes]).toEqual([0, 720, 0, 720]);
  });

  it('of 16 m depth is sunlit over 52.00 %, of 15 m over 48.80 %, by cells of 5 mm', () => {
    for (const [depth, share] of [
      [16, 0.52002],
      [15, 0.48802],
    ] as const) {
      const grid = levelGrid(
        [
          [0, 0],
          [0.005, 0],
          [0.005, depth],
          [0, depth],
        ],
        0,
        0.005,
      );
      const { minutes, covered } = sunOnReceptors(
        makeOccluders([wall], []),
        sortLight(light, columnsFor(720)),
        grid.receptors,
      );
      expect(sunlitShare(minutes, covered, 2)).toBeCloseTo(share, 3);
    }
  });
});

describe('how long the sun stands above a least altitude, 51.5° N, equinox: t = 2 acos(sin h / cos φ) / 15 h', () => {
  for (const [least, hours] of [
    [0, 12],
    [10, 9.8404],
    [11, 9.6201],
    [13, 9.1755],
  ] as const) {
    it(`${least}°: ${hours} h`, () => {
      const { minutes } = sun([], equinoxLight(51.5, 1, least), [[0, 0, 0]], [0, 0, 1]);
      // Whole minutes, sampled at their middles: at either end the count may be half a minute out.
      expect(Math.abs(minutes[0]! - hours * 60)).toBeLessThanOrEqual(1);
    });
  }
});

describe('an east window before a long obstruction, 51.5° N, equinox: t = atan(cos φ / tan Θ) / 15 h', () => {
  for (const [angle, hours, level] of [
    [15, 4.4474, 'high'],
    [25, 3.5443, 'medium'],
    [35, 2.7759, 'minimum'],
    [45, 2.1269, 'minimum'],
  ] as const) {
    it(`obstruction of ${angle}°: ${hours} h, level ${level}`, () => {
      const top = 2 + 10 * Math.tan((angle * Math.PI) / 180);
      const opposite = box('O', 10.5, 0, 1, 60_000, 0, top);
      const { minutes } = sun([opposite], equinoxLight(51.5, 1), [[0, 0, 2]], [1, 0, 0]);
      expect(Math.abs(minutes[0]! - hours * 60)).toBeLessThanOrEqual(1);
      expect(sunlightLevel(minutes[0]!)).toBe(level);
    });
  }

  it('a south window is sunlit all day if the obstruction lies under 90° − φ = 38.5°, else never', () => {
    for (const [angle, minutes] of [
      [38.4, 720],
      [38.6, 0],
    ] as const) {
      const top = 2 + 10 * Math.tan((angle * Math.PI) / 180);
      const opposite = box('O', 0, -10.5, 60_000, 1, 0, top);
      expect(sun([opposite], equinoxLight(51.5, 1), [[0, 0, 2]], [0, -1, 0]).minutes[0]).toBe(minutes);
    }
  });
});

describe('beam on a plane in the open, equinox', () => {
  // With 1 W/m² square to the sun all day: ∫ cos φ cos ω dt = cos φ · 24/π Wh on the level, sin φ · 24/π facing south,
  // ∫ sin ω dt over the morning = 12/π facing east.
  const light = equinoxLight(51.5, 1);
  const phi = (51.5 * Math.PI) / 180;
  for (const [name, normal, energy] of [
    ['level', [0, 0, 1], (Math.cos(phi) * 24) / Math.PI],
    ['facing south', [0, -1, 0], (Math.sin(phi) * 24) / Math.PI],
    ['facing east', [1, 0, 0], 12 / Math.PI],
    ['facing north', [0, 1, 0], 0],
    ['square to the noon sun', [0, -Math.sin(phi), Math.cos(phi)], 24 / Math.PI],
    ['looking down', [0, 0, -1], 0],
  ] as const) {
    it(`${name}: ${energy.toFixed(4)} Wh/m²`, () => {
      expect(sun([], light, [[0, 0, 0]], normal).beam[0]).toBeCloseTo(energy, 3);
    });
  }
});

describe('an upright box 20 × 10 × 15 m, sun at 35° from azimuth 150°', () => {
  // Shadow 478.1548 m² outside the footprint: L (a |cos ψ| + b |sin ψ|) with L = H / tan h (methods dossier 1.2, example 1d).
  it('shades that much ground, counted in cells of 0.2 m', () => {
    const h = (35 * Math.PI) / 180;
    const az = (150 * Math.PI) / 180;
    const light: Light = {
      sx: Float64Array.of(Math.cos(h) * Math.sin(az)),
      sy: Float64Array.of(Math.cos(h) * Math.cos(az)),
      sz: Float64Array.of(Math.sin(h)),
      minutes: Float64Array.of(1),
      beam: Float64Array.of(1),
    };
    const grid = levelGrid(
      [
        [-30, -20],
        [30, -20],
        [30, 40],
        [-30, 40],
      ],
      0,
      0.2,
    );
    const solid = box('B', 0, 0, 20, 10, 0, 15);
    const { minutes, covered } = sunOnReceptors(makeOccluders([solid], []), sortLight(light, 16), grid.receptors);
    let shaded = 0;
    let under = 0;
    for (let i = 0; i < minutes.length; i++) {
      if (covered[i] === 1) under++;
      else if (minutes[i] === 0) shaded++;
    }
    expect(under * 0.04).toBeCloseTo(200, 6);
    expect(Math.abs(shaded * 0.04 - 478.1548)).toBeLessThan(2);
  });
});
