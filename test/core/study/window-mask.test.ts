import { expect, test } from 'vitest';
import { buildModel } from '../../../core/form/build-model.ts';
import { Scheme } from '../../../core/scheme/schema.ts';
import { windowMask } from '../../../core/study/window-mask.ts';
import { DEG } from '../../../core/units/angle.ts';

/** A house with one south window, its middle at x 5, z 2 in the wall y = 0; a long wall 10 m high stands 20 m south of it. */
const model = (north: number) =>
  buildModel(
    Scheme.parse({
      format: 'shadewright',
      version: 1,
      site: { latitude: 50, longitude: 0, zone: 'UTC', north },
      blocks: [
        { id: 'H', name: '', standing: 'proposed', box: { at: [0, 0], width: 10, depth: 8 }, base: 0, height: 3 },
        {
          id: 'W',
          name: '',
          standing: 'context',
          box: { at: [-495, -21], width: 1000, depth: 1 },
          base: 0,
          height: 10,
        },
        {
          id: 'R',
          name: '',
          standing: 'removed',
          box: { at: [-495, -10], width: 1000, depth: 1 },
          base: 0,
          height: 30,
        },
      ],
      rooms: [
        { id: 'r', name: '', use: 'living', block: 'H', box: { at: [0, 0], width: 10, depth: 8 }, floor: 0, height: 3 },
      ],
      glass: [{ id: 'g', name: '', g: 0.6, u: 1.2, light: 0.7, panes: 2, frame: 0.2 }],
      receptors: [
        { id: 'p', kind: 'point', at: [5, -0.01, 2], normal: [0, -1, 0] },
        { id: 'n', kind: 'window', block: 'H', wall: 0, from: 4, sill: 1, width: 2, height: 2 },
        {
          id: 'a',
          kind: 'area',
          outline: [
            [20, 0],
            [24, 0],
            [24, 4],
            [20, 4],
          ],
        },
      ],
      windows: [{ id: 'w', room: 'r', wall: 0, from: 4, sill: 1, width: 2, height: 2, glass: 'g' }],
    }),
  );

const hiddenAt = (north: number, azimuth: number): number => {
  const mask = windowMask(model(north), 'w');
  const column = mask?.azimuths.find((a) => Math.abs(a.azimuth_deg - azimuth) < 0.3);
  return column?.hidden[0]?.[1] ?? 0;
};

test('a long wall hides atan((top − z)·cos(azimuth)/distance), closed form; what is taken down hides nothing', () => {
  for (const off of [0, 30, 60]) {
    const expected = Math.atan((8 * Math.cos(off * DEG)) / 19.99) / DEG;
    expect(Math.abs(hiddenAt(0, 180 + off) - expected)).toBeLessThan(0.15);
    expect(Math.abs(hiddenAt(20, 180 + off - 20) - expected)).toBeLessThan(0.15);
  }
});

test('behind the window its own wall hides the sky up to nearly the zenith', () => {
  expect(hiddenAt(0, 0.5)).toBeGreaterThan(89);
});

test('a point and a neighbour’s window where a window stands see the same sky as it', () => {
  const [window, point, neighbour] = ['w', 'p', 'n'].map((id) => windowMask(model(0), id));
  expect(point).toEqual(window);
  expect(neighbour).toEqual(window);
});

test('an area has no one place to look from', () => {
  expect(windowMask(model(0), 'a')).toBeNull();
});

test('no such window, no mask', () => {
  expect(windowMask(model(0), 'x')).toBeNull();
});
