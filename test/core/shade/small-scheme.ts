import { buildModel } from '../../../core/form/build-model.ts';
import type { Model, Solid, WindowForm } from '../../../core/form/model.ts';
import { convexPieces } from '../../../core/plane/convex-pieces.ts';
import type { Point, Ring } from '../../../core/plane/vec.ts';
import { Scheme } from '../../../core/scheme/schema.ts';
import { sunVector } from '../../../core/shade/sun-vector.ts';
import { DEG } from '../../../core/units/angle.ts';

/** Sun by true azimuth and altitude in degrees, drawing north up unless told. */
export const sunAt = (azimuth: number, altitude: number, north = 0) =>
  sunVector(azimuth * DEG, altitude * DEG, north * DEG);

/** A solid without a scheme round it. */
export const solid = (
  id: string,
  outline: Ring,
  base_m: number,
  top_m: number,
  standing: Solid['standing'] = 'context',
): Solid => ({
  id,
  name: '',
  standing,
  outline,
  pieces: convexPieces(outline),
  base_m,
  top_m,
});

export const box = (x: number, y: number, width: number, depth: number, turn = 0): Ring => {
  const [c, s] = [Math.cos(turn * DEG), Math.sin(turn * DEG)];
  return (
    [
      [0, 0],
      [width, 0],
      [width, depth],
      [0, depth],
    ] as const
  ).map(([u, v]): Point => [x + u * c + v * s, y - u * s + v * c]);
};

type Parts = {
  window?: object;
  devices?: readonly object[];
  blocks?: readonly object[];
  turn?: number;
  north?: number;
  trees?: readonly object[];
};

/**
 * A house of 12 × 8 × 9 m with its corner at the origin, and one window in its south wall (before turning), its lower left
 * corner 4 m along and 3 m up.
 */
export function house({ window = {}, devices = [], blocks = [], turn = 0, north = 0, trees = [] }: Parts = {}): {
  model: Model;
  window: WindowForm;
} {
  const model = buildModel(
    Scheme.parse({
      format: 'shadewright',
      version: 1,
      site: { latitude: 51, longitude: 0, zone: 'Europe/London', north },
      blocks: [{ id: 'H', standing: 'proposed', box: { at: [0, 0], width: 12, depth: 8, turn }, height: 9 }, ...blocks],
      rooms: [
        { id: 'R', use: 'living', block: 'H', box: { at: [0, 0], width: 12, depth: 8, turn }, floor: 2, height: 6 },
      ],
      windows: [
        {
          id: 'W',
          room: 'R',
          wall: 0,
          from: 4,
          sill: 1,
          width: 2,
          height: 1.5,
          glass: 'G',
          devices: devices.map((_, i) => `D${i}`),
          ...window,
        },
      ],
      glass: [{ id: 'G', g: 0.6, u: 1.2, light: 0.7 }],
      devices: devices.map((d, i) => ({ id: `D${i}`, ...d })),
      trees: trees.map((t, i) => ({ id: `T${i}`, ...t })),
    }),
  );
  return { model, window: model.windows[0] as WindowForm };
}
