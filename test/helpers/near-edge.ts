import type { MeshBVH } from 'three-mesh-bvh';
import { isHidden } from './ray-casts.ts';

/**
 * Whether a ray cast turns over within some angle of a direction: then the direction lies that near to an edge of what it
 * meets. Looks along rings of 24 directions.
 */
export function nearEdge(
  mesh: MeshBVH,
  p: readonly number[],
  n: readonly number[],
  s: readonly [number, number, number],
  within_deg: number,
): boolean {
  const hidden = isHidden(mesh, p, n, s);
  const side = Math.abs(s[2]) < 0.9 ? ([0, 0, 1] as const) : ([1, 0, 0] as const);
  const u = unit([s[1] * side[2] - s[2] * side[1], s[2] * side[0] - s[0] * side[2], s[0] * side[1] - s[1] * side[0]]);
  const v = [s[1] * u[2] - s[2] * u[1], s[2] * u[0] - s[0] * u[2], s[0] * u[1] - s[1] * u[0]] as const;
  for (const share of [0.02, 0.1, 0.3, 0.6, 1]) {
    const r = Math.tan((within_deg * share * Math.PI) / 180);
    for (let k = 0; k < 24; k++) {
      const a = r * Math.cos((k * Math.PI) / 12);
      const b = r * Math.sin((k * Math.PI) / 12);
      const d = unit([s[0] + a * u[0] + b * v[0], s[1] + a * u[1] + b * v[1], s[2] + a * u[2] + b * v[2]]);
      if (isHidden(mesh, p, n, d) !== hidden) return true;
    }
  }
  return false;
}

function unit(a: readonly [number, number, number]): [number, number, number] {
  const n = Math.hypot(a[0], a[1], a[2]);
  return [a[0] / n, a[1] / n, a[2] / n];
}
