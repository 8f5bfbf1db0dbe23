import { BufferAttribute, BufferGeometry, DoubleSide, Ray, Vector3 } from 'three';
import { MeshBVH } from 'three-mesh-bvh';
import type { Hider } from '../exposure.ts';
import type { TriangleMesh } from './triangle-mesh.ts';

/** A ray starts this far on its way to the sun, so that a receptor on a face of the mesh is not hidden by that face [m]. */
const START_m = 1e-3;

/**
 * A large mesh as a hider: one ray a sample through a tree of boxes (three-mesh-bvh). Positions are held in single
 * precision round the middle of the mesh, so near an edge a sample may fall either way by a millimetre on a site 10 km
 * across. Slower than anything else here: about a million samples a second.
 * @throws {RangeError} for corners that are not finite, or an index past the last corner
 */
export function meshHider(mesh: TriangleMesh): Hider {
  const { positions, index } = mesh;
  const corners = positions.length / 3;
  if (index.length === 0) return () => false;
  if (!positions.every(Number.isFinite)) throw new RangeError('a corner of the mesh is not a finite number');
  if (index.length % 3 !== 0 || index.some((i) => i >= corners))
    throw new RangeError('the index of the mesh names a corner that it does not have');
  const middle = [0, 1, 2].map((axis) => {
    let low = Infinity;
    let high = -Infinity;
    for (let i = axis; i < positions.length; i += 3) {
      low = Math.min(low, positions[i]!);
      high = Math.max(high, positions[i]!);
    }
    return (low + high) / 2;
  }) as [number, number, number];
  const geometry = new BufferGeometry();
  geometry.setAttribute(
    'position',
    new BufferAttribute(
      Float32Array.from(positions, (v, i) => v - middle[i % 3]!),
      3,
    ),
  );
  geometry.setIndex(new BufferAttribute(Uint32Array.from(index), 1));
  const tree = new MeshBVH(geometry);
  const ray = new Ray(new Vector3(), new Vector3());
  return (x, y, z, sx, sy, sz) => {
    ray.origin.set(x - middle[0] + START_m * sx, y - middle[1] + START_m * sy, z - middle[2] + START_m * sz);
    ray.direction.set(sx, sy, sz);
    return tree.raycastFirst(ray, DoubleSide) !== null;
  };
}
