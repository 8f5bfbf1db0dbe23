import { describe, expect, it } from 'vitest';
import type { Solid } from '../../../../core/form/model.ts';
import type { Point } from '../../../../core/plane/vec.ts';
import { seenSamples, sunOnReceptors } from '../../../../core/shade/exposure.ts';
import { facing } from '../../../../core/shade/exposure-grid.ts';
import { columnsFor, sortLight } from '../../../../core/shade/exposure-light.ts';
import { meshHider } from '../../../../core/shade/mesh/mesh-hider.ts';
import { type TriangleMesh, trianglesAsPatches } from '../../../../core/shade/mesh/triangle-mesh.ts';
import { domeOnReceptors } from '../../../../core/shade/sky-view.ts';
import { makeSkyRays } from '../../../../core/shade/sky-view-trace.ts';
import { makeOccluders } from '../../../../core/shade/skyline-occluders.ts';
import { blockField, fieldReceptors } from '../../../helpers/block-field.ts';
import { yearLight } from '../../../helpers/year-light.ts';

/** Boxes as a mesh: walls, undersides and roofs. */
function meshOfBoxes(solids: readonly Solid[]): TriangleMesh {
  const positions: number[] = [];
  const index: number[] = [];
  for (const s of solids) {
    const at = positions.length / 3;
    for (const z of [s.base_m, s.top_m]) for (const p of s.outline) positions.push(p[0], p[1], z);
    for (let i = 0; i < 4; i++) {
      const j = (i + 1) % 4;
      index.push(at + i, at + j, at + 4 + j, at + i, at + 4 + j, at + 4 + i);
    }
    for (const z of [0, 4]) index.push(at + z, at + z + 1, at + z + 2, at + z, at + z + 2, at + z + 3);
  }
  return { positions: Float64Array.from(positions), index: Uint32Array.from(index) };
}

const field = blockField(21, 30, true);
const solids = field.solids;
const mesh = meshOfBoxes(solids);
const bare = fieldReceptors(field, 240, 8);
// A receptor on a face of the mesh stands a centimetre before it, for a mesh has no inside that could be told from outside.
const receptors = {
  ...bare,
  x: bare.x.map((v, i) => v + 0.01 * bare.nx[i]!),
  y: bare.y.map((v, i) => v + 0.01 * bare.ny[i]!),
  z: bare.z.map((v, i) => v + 0.01 * bare.nz[i]!),
};
const light = yearLight(51.5, 10, [5, 80, 172, 240, 300]);
const columns = sortLight(light, columnsFor(light.sx.length));
const asSolids = makeOccluders(solids, []);
const none = makeOccluders([], []);
const outside = Array.from({ length: 240 }, (_, i) => i).filter(
  (i) => sunOnReceptors(asSolids, columns, receptors, i, i + 1).covered[0] === 0,
);

describe('the same town as solids and as a mesh', () => {
  it('through rays: 99.9 % of samples equal', () => {
    const hider = meshHider(mesh);
    let equal = 0;
    let all = 0;
    for (const row of outside) {
      const a = seenSamples(asSolids, columns, receptors, row);
      const b = seenSamples(none, columns, receptors, row, hider);
      for (let i = 0; i < a.length; i++) if (a[i] === b[i]) equal++;
      all += a.length;
    }
    expect(outside.length).toBeGreaterThan(150);
    expect(equal / all).toBeGreaterThan(0.999);
  });

  it('as patches: the same minutes to a sample in a thousand, and the same sky', () => {
    const patches = makeOccluders([], trianglesAsPatches(mesh));
    const a = sunOnReceptors(asSolids, columns, receptors);
    const b = sunOnReceptors(patches, columns, receptors);
    let apart = 0;
    let sum = 0;
    const rays = makeSkyRays(240);
    const skyA = domeOnReceptors(asSolids, rays, receptors, 'uniform');
    const skyB = domeOnReceptors(patches, rays, receptors, 'uniform');
    for (const row of outside) {
      apart += Math.abs(a.minutes[row]! - b.minutes[row]!);
      sum += a.minutes[row]!;
      expect(Math.abs(skyA[row]! - skyB[row]!)).toBeLessThan(2e-3);
    }
    expect(apart / sum).toBeLessThan(0.001);
  });

  it('beside solids: half the town as solids and half as a mesh', () => {
    const hider = meshHider(meshOfBoxes(solids.filter((_, i) => i % 2 === 0)));
    const rest = makeOccluders(
      solids.filter((_, i) => i % 2 === 1),
      [],
    );
    const whole = sunOnReceptors(asSolids, columns, receptors).minutes;
    const mixed = sunOnReceptors(rest, columns, receptors, 0, 240, hider).minutes;
    let apart = 0;
    for (const row of outside) apart += Math.abs(whole[row]! - mixed[row]!);
    expect(apart / outside.reduce((sum, row) => sum + whole[row]!, 0)).toBeLessThan(0.002);
  });
});

describe('meshes that are not right', () => {
  const square: Point[] = [
    [0, 0],
    [1, 0],
    [0, 1],
  ];
  const positions = Float64Array.from(square.flatMap((p) => [...p, 2]));

  it('are refused, or hide nothing', () => {
    expect(() => meshHider({ positions, index: Uint32Array.of(0, 1, 7) })).toThrow(RangeError);
    expect(() => meshHider({ positions: positions.map(() => Number.NaN), index: Uint32Array.of(0, 1, 2) })).toThrow(
      RangeError,
    );
    expect(meshHider({ positions, index: new Uint32Array(0) })(0, 0, 0, 0, 0, 1)).toBe(false);
    expect(trianglesAsPatches({ positions, index: Uint32Array.of(0, 0, 1) })).toEqual([]);
    const r = sunOnReceptors(
      none,
      columns,
      facing([[0.2, 2.2, 0]], [0, 0, 1]),
      0,
      1,
      meshHider({ positions, index: Uint32Array.of(0, 1, 2) }),
    );
    expect(r.minutes[0]).toBeLessThan(sunOnReceptors(none, columns, facing([[0.2, 2.2, 0]], [0, 0, 1])).minutes[0]!);
  });
});
