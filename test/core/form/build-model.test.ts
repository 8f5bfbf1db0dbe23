import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildModel } from '../../../core/form/build-model.ts';
import type { Panel } from '../../../core/form/model.ts';
import { pointOn } from '../../../core/form/panel.ts';
import { cross, dot, minus } from '../../../core/plane/vec.ts';
import { Scheme } from '../../../core/scheme/schema.ts';

type Parts = { [key: string]: unknown; site?: object };
const glass = { id: 'G', g: 0.6, u: 1.2, light: 0.7, frame: 0.2 };
const schemeOf = (parts: Parts): Scheme =>
  Scheme.parse({
    format: 'shadewright',
    version: 1,
    glass: [glass],
    ...parts,
    site: { latitude: 51, longitude: 0, zone: 'Europe/London', ...parts.site },
  });

/** One block 10 × 8 × 6 with a room filling it, and a window in a wall of choice. */
const oneWindow = (wall: number, more: Parts = {}, window: object = {}, turn = 0): Scheme =>
  schemeOf({
    blocks: [{ id: 'B', standing: 'proposed', box: { at: [0, 0], width: 10, depth: 8, turn }, base: 1, height: 6 }],
    rooms: [
      { id: 'R', use: 'living', block: 'B', box: { at: [0, 0], width: 10, depth: 8, turn }, floor: 1, height: 3 },
    ],
    windows: [{ id: 'W', room: 'R', wall, from: 1, sill: 0.9, width: 2, height: 1.5, glass: 'G', ...window }],
    ...more,
  });
const near = (a: readonly number[], b: readonly number[]) =>
  a.forEach((v, i) => {
    expect(v).toBeCloseTo(b[i] as number, 9);
  });

describe('walls and windows', () => {
  // Design conventions: wall 0 of a box is the −y side, 1 the +x side, 2 the +y side, 3 the −x side.
  const sides = [
    { wall: 0, origin: [1, 0, 1.9], right: [1, 0, 0], bearing: 180 },
    { wall: 1, origin: [10, 1, 1.9], right: [0, 1, 0], bearing: 90 },
    { wall: 2, origin: [9, 8, 1.9], right: [-1, 0, 0], bearing: 0 },
    { wall: 3, origin: [0, 7, 1.9], right: [0, -1, 0], bearing: 270 },
  ];
  for (const side of sides)
    it(`wall ${side.wall} of a box faces ${side.bearing}° and runs left to right seen from outside`, () => {
      const window = buildModel(oneWindow(side.wall)).windows[0] as Panel & { bearing_deg: number; tilt_deg: number };
      near(window.origin, side.origin);
      near(window.right, side.right);
      near(window.up, [0, 0, 1]);
      near(window.normal, cross(window.right, window.up));
      expect(window.bearing_deg).toBeCloseTo(side.bearing, 9);
      expect(window.tilt_deg).toBe(90);
      // A point just outside along the normal lies outside the block, one just inside within it.
      const middle = pointOn(window, 1, 0.75, 0.01);
      expect(middle[0] > 0 && middle[0] < 10 && middle[1] > 0 && middle[1] < 8).toBe(false);
    });
  it('a true bearing is the drawing bearing less north, and a turn clockwise adds to it', () => {
    // site.north 12: true north lies 12° clockwise from +y, so a wall that faces +y faces 348° true.
    expect(buildModel(oneWindow(2, { site: { north: 12 } })).windows[0]?.bearing_deg).toBeCloseTo(348, 9);
    expect(buildModel(oneWindow(0, {}, {}, 30)).windows[0]?.bearing_deg).toBeCloseTo(210, 9);
    expect(buildModel(oneWindow(0, { site: { north: 30 } }, {}, 30)).windows[0]?.bearing_deg).toBeCloseTo(180, 9);
  });
  it('an outline drawn clockwise has its walls facing outwards all the same', () => {
    const outline = [
      [0, 0],
      [0, 8],
      [10, 8],
      [10, 0],
    ];
    const scheme = oneWindow(0, {
      blocks: [{ id: 'B', standing: 'proposed', outline, base: 1, height: 6 }],
      rooms: [{ id: 'R', use: 'living', block: 'B', outline, floor: 1, height: 3 }],
    });
    for (const wall of buildModel(scheme).rooms[0]?.walls ?? []) {
      const out = pointOn(wall, wall.width_m / 2, 1, 0.01);
      expect(out[0] > 0 && out[0] < 10 && out[1] > 0 && out[1] < 8).toBe(false);
    }
  });
  it('knows outside walls from inside ones', () => {
    const scheme = oneWindow(0, {
      rooms: [{ id: 'R', use: 'living', block: 'B', box: { at: [0, 0], width: 4, depth: 8 }, floor: 1, height: 3 }],
    });
    const room = buildModel(scheme).rooms[0];
    expect(room?.walls.map((w) => w.outside)).toEqual([true, false, true, true]);
    expect(room?.floor_m2).toBe(32);
    expect(room?.volume_m3).toBe(96);
    expect(room?.windows).toEqual(['W']);
  });
  it('puts a window in the face of its block when the room was drawn a little inside it', () => {
    const scheme = oneWindow(0, {
      rooms: [
        { id: 'R', use: 'living', block: 'B', box: { at: [0.5, 0.0008], width: 9, depth: 7 }, floor: 1, height: 3 },
      ],
    });
    near(buildModel(scheme).windows[0]?.origin ?? [], [1.5, 0, 1.9]);
  });
  it('areas: the opening, and the glass less its frame', () => {
    const window = buildModel(oneWindow(0)).windows[0];
    expect(window?.opening_m2).toBe(3);
    expect(window?.glass_m2).toBeCloseTo(2.4, 12);
  });
  it('a rooflight lies in the roof of its block and looks straight up', () => {
    const window = buildModel(oneWindow(0, {}, { wall: undefined, roof: { at: [2, 3], turn: 90 }, reveal: 0.2 }))
      .windows[0];
    expect(window?.origin).toEqual([2, 3, 7]);
    near(window?.normal ?? [], [0, 0, 1]);
    // A box turned 90° clockwise about its corner: its width runs along −y, its depth along +x.
    near(window?.right ?? [], [0, -1, 0]);
    near(window?.up ?? [], [1, 0, 0]);
    expect([window?.tilt_deg, window?.bearing_deg]).toEqual([0, 0]);
  });
  it('a broken reference is a fault of ours', () => {
    expect(() => buildModel(oneWindow(0, {}, { glass: 'none' }))).toThrow(RangeError);
    expect(() => buildModel(oneWindow(0, {}, { devices: ['none'] }))).toThrow(RangeError);
    expect(() => buildModel(oneWindow(7))).toThrow(RangeError);
  });
});

describe('devices', () => {
  const corners = (device: object, wall = 0) => {
    const window = buildModel(oneWindow(wall, { devices: [{ id: 'D', ...device }] }, { devices: ['D'] })).windows[0];
    const axes = window as unknown as Panel;
    return (window?.shaders ?? []).map((s) =>
      s.corners.map((c) => {
        const v = minus(c, axes.origin);
        return [dot(v, axes.right), dot(v, axes.up), dot(v, axes.normal)].map((k) => Math.round(k * 1e9) / 1e9 + 0);
      }),
    );
  };
  // Window 2 wide, 1.5 high: axes x right, y up, z out, from the lower left corner of the opening.
  it('an overhang stands above the head, runs on past the sides, and droops by its tilt', () => {
    expect(corners({ kind: 'overhang', depth: 0.8, above: 0.2, left: 0.3, right: 0.1 })).toEqual([
      [
        [-0.3, 1.7, 0],
        [2.1, 1.7, 0],
        [2.1, 1.7, 0.8],
        [-0.3, 1.7, 0.8],
      ],
    ]);
    expect(corners({ kind: 'overhang', depth: 1, tilt: 45 }, 3)[0]?.[2]).toEqual([2, 0.5, 1]);
  });
  it('fins stand beside the jambs', () => {
    const [left, right] = corners({ kind: 'fin', depth: 0.5, gap: 0.1, above: 0.2, below: 0.3 });
    expect(left).toEqual([
      [-0.1, -0.3, 0],
      [-0.1, 1.7, 0],
      [-0.1, 1.7, 0.5],
      [-0.1, -0.3, 0.5],
    ]);
    expect(right?.[0]).toEqual([2.1, -0.3, 0]);
    expect(corners({ kind: 'fin', side: 'left', depth: 0.5 })[0]?.[0]).toEqual([0, 0, 0]);
    expect(corners({ kind: 'fin', side: 'right', depth: 0.5 })[0]?.[0]).toEqual([2, 0, 0]);
    expect(corners({ kind: 'fin', side: 'right', depth: 0.5 })).toHaveLength(1);
  });
  it('louvre blades hang from the head down, each turned about its centre line', () => {
    const blades = corners({ kind: 'louvres', count: 3, spacing: 0.5, depth: 0.2, gap: 0.05, left: 0.1, right: 0.2 });
    expect(blades.map((b) => b[0])).toEqual([
      [-0.1, 1.5, 0.05],
      [-0.1, 1, 0.05],
      [-0.1, 0.5, 0.05],
    ]);
    expect(blades[0]?.[2]).toEqual([2.2, 1.5, 0.25]);
    const upright = corners({ kind: 'louvres', count: 1, spacing: 1, depth: 0.2, tilt: 90 });
    expect(upright[0]).toEqual([
      [0, 1.6, 0.1],
      [2, 1.6, 0.1],
      [2, 1.4, 0.1],
      [0, 1.4, 0.1],
    ]);
  });
  it('blinds and devices without depth are no geometry', () => {
    expect(corners({ kind: 'overhang', depth: 0 })).toEqual([]);
    expect(corners({ kind: 'fin', depth: 0 })).toEqual([]);
    expect(corners({ kind: 'fin', depth: 1, below: -2 })).toEqual([]);
    const blind = { id: 'D', kind: 'blind', place: 'external', transmittance: 0.1, reflectance: 0.5 };
    const window = buildModel(oneWindow(0, { devices: [blind] }, { devices: ['D'] })).windows[0];
    expect(window?.shaders).toEqual([]);
    expect(window?.blinds.map((b) => b.id)).toEqual(['D']);
  });
});

describe('solids, receptors and extent', () => {
  it('cuts an L into convex pieces and stands it between base and top', () => {
    const outline = [
      [0, 0],
      [6, 0],
      [6, 2],
      [2, 2],
      [2, 6],
      [0, 6],
    ];
    const [solid] = buildModel(
      schemeOf({ blocks: [{ id: 'B', standing: 'context', outline, base: -1, height: 4 }] }),
    ).solids;
    expect(solid?.pieces).toHaveLength(2);
    expect([solid?.base_m, solid?.top_m]).toEqual([-1, 3]);
  });
  it("gives a neighbour's window its panel, its sill above the base of its block", () => {
    const model = buildModel(
      oneWindow(0, {
        receptors: [{ id: 'N', kind: 'window', block: 'B', wall: 1, from: 2, sill: 1.5, width: 1, height: 1 }],
      }),
    );
    near(model.receptors[0]?.panel?.origin ?? [], [10, 2, 2.5]);
  });
  it('the extent holds blocks, trees, boundary and receptors', () => {
    const model = buildModel(
      oneWindow(0, {
        site: {
          boundary: [
            [-3, -3],
            [12, -3],
            [12, 9],
          ],
        },
        trees: [{ id: 'T', at: [20, 4], height: 8, spread: 6, transmittance: Array(12).fill(0.3) }],
        receptors: [{ id: 'P', kind: 'point', at: [5, 30, 1.6] }],
      }),
    );
    expect(model.extent).toEqual([-3, -3, 23, 30]);
    expect(buildModel(schemeOf({})).extent).toEqual([0, 0, 0, 0]);
  });
  it('panel axes stay unit and square for any turn', () => {
    fc.assert(
      fc.property(fc.double({ min: -360, max: 360, noNaN: true }), fc.integer({ min: 0, max: 3 }), (turn, wall) => {
        const w = buildModel(oneWindow(wall, {}, {}, turn)).windows[0] as Panel;
        for (const axis of [w.right, w.up, w.normal]) expect(dot(axis, axis)).toBeCloseTo(1, 12);
        expect(dot(w.right, w.normal)).toBeCloseTo(0, 12);
        near(cross(w.right, w.up), w.normal);
      }),
    );
  });
});
