import type { Shader } from '../../form/model.ts';
import type { Vec3 } from '../../plane/vec.ts';

/** Any triangles that stand round a site, closed or not, in drawing axes [m]. */
export type TriangleMesh = {
  /** Three numbers a corner. */
  readonly positions: Float64Array;
  /** Three corners a triangle; either way round. */
  readonly index: Uint32Array;
};

/** Up to so many triangles the exact way is also the quicker one (`trianglesAsPatches`); above, rays are (`meshHider`). */
export const MOST_PATCHES = 20_000;

/**
 * The triangles as flat shaders, for `makeOccluders`: exact in double precision, for sun and sky alike. Triangles without
 * area are left out.
 */
export function trianglesAsPatches(mesh: TriangleMesh): Pick<Shader, 'corners'>[] {
  const { positions, index } = mesh;
  const corner = (i: number): Vec3 => [positions[3 * i]!, positions[3 * i + 1]!, positions[3 * i + 2]!];
  const patches: Pick<Shader, 'corners'>[] = [];
  for (let t = 0; t + 2 < index.length; t += 3) {
    const corners = [corner(index[t]!), corner(index[t + 1]!), corner(index[t + 2]!)] as const;
    if (area2(...corners) > 0) patches.push({ corners });
  }
  return patches;
}

/** Twice the area of a triangle [m²]. */
function area2(a: Vec3, b: Vec3, c: Vec3): number {
  const [ux, uy, uz] = [b[0] - a[0], b[1] - a[1], b[2] - a[2]];
  const [vx, vy, vz] = [c[0] - a[0], c[1] - a[1], c[2] - a[2]];
  return Math.hypot(uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx);
}
