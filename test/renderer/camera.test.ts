import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cross, dot, length, type Vec3 } from '../../core/plane/vec.ts';
import {
  axesOf,
  barLength,
  type Camera,
  framed,
  orbit,
  PLAN,
  pan,
  project,
  zoomAt,
} from '../../renderer/massing/camera.ts';

const size = { width: 900, height: 480 };
const cameras: fc.Arbitrary<Camera> = fc.record({
  centre: fc.tuple(
    fc.double({ min: -200, max: 200, noNaN: true }),
    fc.double({ min: -200, max: 200, noNaN: true }),
    fc.constant(0),
  ),
  turn_rad: fc.double({ min: -6, max: 6, noNaN: true }),
  tilt_rad: fc.double({ min: 0.25, max: Math.PI / 2, noNaN: true }),
  scale: fc.double({ min: 0.5, max: 50, noNaN: true }),
});
const points: fc.Arbitrary<Vec3> = fc.tuple(
  fc.double({ min: -100, max: 100, noNaN: true }),
  fc.double({ min: -100, max: 100, noNaN: true }),
  fc.double({ min: 0, max: 60, noNaN: true }),
);

describe('the camera', () => {
  it('has axes that are square to one another, of unit length and right-handed', () => {
    fc.assert(
      fc.property(cameras, (camera) => {
        const { right, up, into } = axesOf(camera);
        for (const axis of [right, up, into]) expect(length(axis)).toBeCloseTo(1, 12);
        const back = cross(right, up);
        expect(dot(back, into)).toBeCloseTo(-1, 12);
      }),
    );
  });

  it('shows a plan with the drawing north up and true to scale', () => {
    const camera = { centre: [0, 0, 0] as const, ...PLAN, scale: 10 };
    const [x, y] = project(camera, size, [3, 4, 25]);
    expect(x).toBeCloseTo(450 + 30, 9);
    expect(y).toBeCloseTo(240 - 40, 9);
  });

  it('keeps the ground under the pointer when it zooms', () => {
    fc.assert(
      fc.property(cameras, points, fc.double({ min: 0.5, max: 2, noNaN: true }), (camera, p, factor) => {
        const ground: Vec3 = [p[0], p[1], 0];
        const [x, y] = project(camera, size, ground);
        const [x2, y2] = project(zoomAt(camera, size, factor, x, y), size, ground);
        expect(x2).toBeCloseTo(x, 4);
        expect(y2).toBeCloseTo(y, 4);
      }),
    );
  });

  it('moves the ground with the hand', () => {
    fc.assert(
      fc.property(
        cameras,
        points,
        fc.integer({ min: -200, max: 200 }),
        fc.integer({ min: -200, max: 200 }),
        (camera, p, dx, dy) => {
          const ground: Vec3 = [p[0], p[1], 0];
          const [x, y] = project(camera, size, ground);
          const [x2, y2] = project(pan(camera, dx, dy), size, ground);
          expect(x2 - x).toBeCloseTo(dx, 5);
          expect(y2 - y).toBeCloseTo(dy, 5);
        },
      ),
    );
  });

  it('frames points inside the room it is given, touching it in one direction', () => {
    const room = { top: 50, right: 20, bottom: 40, left: 30 };
    fc.assert(
      fc.property(cameras, fc.array(points, { minLength: 3, maxLength: 20 }), (camera, list) => {
        const view = framed(camera, size, list, room);
        const at = list.map((p) => project(view, size, p));
        const [left, right] = [Math.min(...at.map((p) => p[0])), Math.max(...at.map((p) => p[0]))];
        const [top, bottom] = [Math.min(...at.map((p) => p[1])), Math.max(...at.map((p) => p[1]))];
        expect(left).toBeGreaterThanOrEqual(room.left - 1e-6);
        expect(right).toBeLessThanOrEqual(size.width - room.right + 1e-6);
        expect(top).toBeGreaterThanOrEqual(room.top - 1e-6);
        expect(bottom).toBeLessThanOrEqual(size.height - room.bottom + 1e-6);
        expect(view.centre[2]).toBeCloseTo(0, 6);
      }),
    );
  });

  it('stays above the ground however far it is tilted', () => {
    fc.assert(
      fc.property(cameras, fc.double({ min: -10, max: 10, noNaN: true }), (camera, tilt) => {
        const { tilt_rad } = orbit(camera, 0, tilt);
        expect(tilt_rad).toBeGreaterThan(0);
        expect(tilt_rad).toBeLessThanOrEqual(Math.PI / 2);
      }),
    );
  });

  it('gives a scale bar a round length that fits', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 500, noNaN: true }), (scale) => {
        const bar = barLength(scale, 120);
        expect(bar * scale).toBeLessThanOrEqual(120 * (1 + 1e-9));
        expect(bar * scale).toBeGreaterThan(120 / 2.5 - 1e-6);
        expect(['1', '2', '5']).toContain(bar.toExponential(6)[0]);
      }),
    );
  });
});
