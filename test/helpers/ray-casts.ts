import { BufferAttribute, BufferGeometry, DoubleSide, Ray, Vector3 } from 'three';
import { MeshBVH } from 'three-mesh-bvh';
import type { Shader, Solid } from '../../core/form/model.ts';
import type { Point } from '../../core/plane/vec.ts';

/** Solids and flat shaders as one triangle mesh in a bounding-volume tree of three-mesh-bvh: the independent check of every shade. */
export function meshOf(solids: readonly Solid[], shaders: readonly Shader[]): MeshBVH {
  const v: number[] = [];
  const quad = (a: readonly number[], b: readonly number[], c: readonly number[], d: readonly number[]): void => {
    v.push(...a, ...b, ...c, ...a, ...c, ...d);
  };
  for (const s of solids) {
    s.outline.forEach((a, i) => {
      const b = s.outline[(i + 1) % s.outline.length] as Point;
      quad([a[0], a[1], s.base_m], [b[0], b[1], s.base_m], [b[0], b[1], s.top_m], [a[0], a[1], s.top_m]);
    });
    for (const piece of s.pieces) {
      for (let i = 1; i + 1 < piece.length; i++) {
        const [a, b, c] = [piece[0] as Point, piece[i] as Point, piece[i + 1] as Point];
        for (const z of [s.base_m, s.top_m]) v.push(a[0], a[1], z, b[0], b[1], z, c[0], c[1], z);
      }
    }
  }
  for (const s of shaders) {
    for (let i = 1; i + 1 < s.corners.length; i++)
      v.push(...(s.corners[0] ?? []), ...(s.corners[i] ?? []), ...(s.corners[i + 1] ?? []));
  }
  const geometry = new BufferGeometry();
  geometry.setAttribute('position', new BufferAttribute(Float32Array.from(v), 3));
  return new MeshBVH(geometry, {});
}

const ray = new Ray(new Vector3(), new Vector3());

/** Whether anything of the mesh stands between a point and the sun. The ray starts `lift` metres along the receptor's normal. */
export function isHidden(
  mesh: MeshBVH,
  p: readonly number[],
  n: readonly number[],
  s: readonly number[],
  lift = 1e-3,
): boolean {
  ray.origin.set(p[0]! + lift * n[0]!, p[1]! + lift * n[1]!, p[2]! + lift * n[2]!);
  ray.direction.set(s[0]!, s[1]!, s[2]!);
  return mesh.raycastFirst(ray, DoubleSide) !== null;
}
