import { describe, expect, it } from 'vitest';
import type { Shader, Solid } from '../../../core/form/model.ts';
import { convexPieces } from '../../../core/plane/convex-pieces.ts';
import type { Point, Ring, Vec3 } from '../../../core/plane/vec.ts';
import { sunOnReceptors } from '../../../core/shade/exposure.ts';
import { facing } from '../../../core/shade/exposure-grid.ts';
import { columnsFor, sortLight } from '../../../core/shade/exposure-light.ts';
import { makeOccluders } from '../../../core/shade/skyline-occluders.ts';
import { pointSky } from '../../../core/shade/sky-view-mask.ts';
import { box, prism } from '../../helpers/block-field.ts';
import { seeded } from '../../helpers/seeded.ts';
import { yearLight } from '../../helpers/year-light.ts';

const light = yearLight(51.5, 10, [20, 80, 172, 265, 355]);
const columns = sortLight(light, columnsFor(light.sx.length));
const UP: Vec3 = [0, 0, 1];

function sun(solids: readonly Solid[], at: Vec3, normal: Vec3, shaders: readonly Shader[] = []) {
  const r = sunOnReceptors(makeOccluders(solids, shaders), columns, facing([at], normal));
  return { minutes: r.minutes[0]!, beam: r.beam[0]!, covered: r.covered[0] === 1 };
}
const open = (normal: Vec3) => sun([], [0, 0, 0], normal).minutes;
const square: Ring = [
  [0, 0],
  [10, 0],
  [10, 10],
  [0, 10],
];
const tower = prism('T', square, 0, 30);

describe('a receptor in, on and under solids', () => {
  it('inside sees nothing, and says so', () => {
    expect(sun([tower], [5, 5, 3], UP)).toEqual({ minutes: 0, beam: 0, covered: true });
    expect(sun([tower], [5, 5, 0], UP).covered).toBe(true);
    expect(pointSky(makeOccluders([tower], []), [5, 5, 3], UP)).toEqual({ skyView: 0, skyComponent: 0 });
  });

  it('on the roof, at its height or above, sees everything', () => {
    for (const z of [30, 30.001, 50]) expect(sun([tower], [5, 5, z], UP).minutes).toBe(open(UP));
  });

  it('on the face of a wall is not hidden by its own block', () => {
    expect(sun([tower], [5, 0, 3], [0, -1, 0])).toMatchObject({ minutes: open([0, -1, 0]), covered: false });
    expect(sun([tower], [10, 5, 3], [1, 0, 0]).minutes).toBe(open([1, 0, 0]));
  });

  it('at the foot of a wall, on the line itself, loses what the wall hides: the same as a hand’s breadth away to a few samples', () => {
    const on = sun([tower], [5, 0, 0], UP).minutes;
    const off = sun([tower], [5, -0.01, 0], UP).minutes;
    expect(on).toBeGreaterThan(0);
    expect(Math.abs(on - off)).toBeLessThanOrEqual(30);
  });

  it('at the very corner of a block sees past both its walls', () => {
    const corner = sun([tower], [0, 0, 0], UP).minutes;
    const off = sun([tower], [-0.01, -0.01, 0], UP).minutes;
    expect(Math.abs(corner - off)).toBeLessThanOrEqual(30);
    expect(corner).toBeGreaterThan(sun([tower], [5, 0, 0], UP).minutes);
  });

  it('between two blocks that share a wall sees nothing below their tops', () => {
    const twin = prism(
      'U',
      square.map(([x, y]): Point => [x, y - 10]),
      0,
      30,
    );
    expect(sun([tower, twin], [5, 0, 3], [0, -1, 0]).minutes).toBe(0);
    expect(sun([tower, prism('U', twin.outline, 0, 2)], [5, 0, 3], [0, -1, 0]).minutes).toBe(open([0, -1, 0]));
  });

  it('in the re-entrant corner of an L sees only the open quarter', () => {
    const outline: Ring = [
      [0, 0],
      [10, 0],
      [10, 10],
      [5, 10],
      [5, 5],
      [0, 5],
    ];
    const ell = { ...prism('L', outline, 0, 300), pieces: convexPieces(outline) };
    const at = sun([ell], [5, 5, 0], UP).minutes;
    const near = sun([ell], [4.99, 5.01, 0], UP).minutes;
    expect(Math.abs(at - near)).toBeLessThanOrEqual(40);
    expect(sun([ell], [5, 7, 2], [-1, 0, 0]).minutes).toBeLessThan(open([-1, 0, 0]));
  });

  it('under a floating block sees low sun only, and on its underside none above', () => {
    const floating = box('F', 0, 0, 20, 20, 4, 8);
    const under = sun([floating], [0, 0, 0], UP);
    expect(under.covered).toBe(false);
    // The edge of the underside stands at atan(4/10) = 21.8° at the least and atan(4/14.1) = 15.8° at the corners.
    let low = 0;
    let corner = 0;
    for (let i = 0; i < light.sz.length; i++) {
      const t = light.sz[i]! / Math.hypot(light.sx[i]!, light.sy[i]!);
      if (t < 4 / Math.hypot(10, 10)) corner += 10;
      if (t < 0.4) low += 10;
    }
    expect(under.minutes).toBeGreaterThan(corner);
    expect(under.minutes).toBeLessThan(low);
    expect(sun([floating], [0, 0, 4], UP).covered).toBe(true);
  });

  it('straight under the edge, corner or seam of something overhead, gives whole numbers', () => {
    const floating = box('F', 0, 0, 20, 20, 4, 8);
    for (const at of [
      [10, 0, 0],
      [10, 10, 0],
      [0, 10, 1],
      [-10, 3, 2],
    ] as const) {
      const { minutes, beam } = sun([floating], at, UP);
      expect(Number.isFinite(minutes) && Number.isFinite(beam)).toBe(true);
      const beside = sun([floating], [at[0] * 1.0001, at[1] * 1.0001, at[2]], UP).minutes;
      expect(Math.abs(minutes - beside)).toBeLessThanOrEqual(40);
    }
    const plate: Shader = {
      device: 'O',
      kind: 'overhang',
      corners: [
        [-1, 0, 3],
        [1, 0, 3],
        [1, -1, 3],
        [-1, -1, 3],
      ],
    };
    for (const x of [-1, 0, 1]) {
      const at = sun([], [x, 0, 1], [0, -1, 0], [plate]).minutes;
      const beside = sun([], [x, -1e-5, 1], [0, -1, 0], [plate]).minutes;
      expect(Math.abs(at - beside)).toBeLessThanOrEqual(10);
    }
  });
});

describe('odd blocks', () => {
  it('below the ground, or of no height, take no sun from the ground', () => {
    for (const solid of [box('C', 0, -5, 8, 8, -4, 0), box('C', 0, -5, 8, 8, -4, -1), box('C', 0, -5, 8, 8, 0, 0)])
      expect(sun([solid], [0, 0, 0], UP).minutes).toBe(open(UP));
  });

  it('that start below the ground hide as if they started on it', () => {
    expect(sun([box('C', 0, -9, 8, 8, -4, 6)], [0, 0, 0], UP)).toEqual(
      sun([box('C', 0, -9, 8, 8, 0, 6)], [0, 0, 0], UP),
    );
  });

  it('without thickness hide as a screen does, from both sides', () => {
    const screen: Solid = {
      ...prism(
        'S',
        [
          [-5, -4],
          [5, -4],
        ],
        0,
        6,
      ),
      pieces: [],
    };
    const thin = box('S', 0, -4.0005, 10, 0.001, 0, 6);
    for (const at of [
      [0, 0, 0],
      [0, -8, 0],
    ] as const)
      expect(Math.abs(sun([screen], at, UP).minutes - sun([thin], at, UP).minutes)).toBeLessThanOrEqual(10);
    const flat: Solid = {
      ...prism(
        'S',
        [
          [-5, -4],
          [5, -4],
          [0, -4],
        ],
        0,
        6,
      ),
      pieces: [],
    };
    expect(sun([flat], [0, 0, 0], UP)).toEqual(sun([screen], [0, 0, 0], UP));
  });

  it('twice in the same place count once', () => {
    const a = box('A', 0, -9, 8, 8, 0, 12);
    expect(sun([a, { ...a, id: 'B' }], [0, 0, 0], UP)).toEqual(sun([a], [0, 0, 0], UP));
  });

  it('on a site 10 km across, far from the origin, hide the same', () => {
    const far = (d: number) =>
      sun([box('A', d, d - 9, 8, 8, 0, 12), box('B', d - 10_000, d, 10, 10, 0, 40)], [d, d, 0], UP);
    expect(Math.abs(far(90_000).minutes - far(0).minutes)).toBeLessThanOrEqual(10);
  });

  it('hide the sun at the zenith only from what is under them', () => {
    const noon = sortLight(
      {
        sx: Float64Array.of(0),
        sy: Float64Array.of(0),
        sz: Float64Array.of(1),
        minutes: Float64Array.of(5),
        beam: Float64Array.of(80),
      },
      16,
    );
    const o = makeOccluders([box('F', 0, 0, 4, 4, 3, 4)], []);
    const r = sunOnReceptors(
      o,
      noon,
      facing(
        [
          [0, 0, 0],
          [3, 0, 0],
        ],
        UP,
      ),
    );
    expect([...r.minutes]).toEqual([0, 5]);
    expect(r.beam[1]).toBe(80);
  });
});

describe('no number that is not one', () => {
  it('whatever whole-metre places are asked, on lines, corners and in planes of blocks and shaders', () => {
    const next = seeded(99);
    const whole = (n: number): number => Math.floor(next() * n);
    for (let run = 0; run < 300; run++) {
      const solids = Array.from({ length: 4 }, () => {
        const [x, y, base] = [whole(6), whole(6), whole(4) - 1];
        const [w, d] = [1 + whole(3), 1 + whole(3)];
        return prism(
          'B',
          [
            [x, y],
            [x + w, y],
            [x + w, y + d],
            [x, y + d],
          ],
          base,
          base + 1 + whole(4),
        );
      });
      const [x, y, z] = [whole(6), whole(6), whole(5)];
      const shaders: Shader[] = [
        {
          device: 'D',
          kind: 'fin',
          corners: [
            [x, y, z],
            [x + 1, y, z],
            [x + 1, y, z + 2],
            [x, y, z + 2],
          ],
        },
        {
          device: 'D',
          kind: 'overhang',
          corners: [
            [x, y, z],
            [x + 2, y, z],
            [x + 2, y + 1, z],
            [x, y + 1, z],
          ],
        },
      ];
      const at: Vec3 = [whole(8), whole(8), whole(5)];
      for (const normal of [UP, [0, -1, 0], [1, 0, 0], [0, 0, -1]] as const) {
        const { minutes, beam } = sun(solids, at, normal, shaders);
        expect(minutes >= 0 && minutes <= 24 * 60 * 5 && beam >= 0).toBe(true);
        const sky = pointSky(makeOccluders(solids, shaders), at, normal);
        expect(sky.skyView >= 0 && sky.skyView <= 1 && sky.skyComponent >= 0 && sky.skyComponent <= 1).toBe(true);
      }
    }
  });
});
