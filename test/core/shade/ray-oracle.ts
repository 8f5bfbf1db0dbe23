import type { Panel, Shader, Solid } from '../../../core/form/model.ts';
import { pointOn } from '../../../core/form/panel.ts';
import { contains } from '../../../core/plane/ring.ts';
import { cross, dot, minus, type Point, type Vec3 } from '../../../core/plane/vec.ts';

/**
 * 121 393 points spread as a Fibonacci lattice: no two share a row or a column, so that thin strips along a window (the
 * shadow of a blade at low sun) are sampled as fairly as any other shape, where a square grid would meet them by rows.
 */
const RAYS = 121_393;
const STRIDE = 75_025;

/**
 * Sun or no sun by following single rays through the whole outlines of solids (no convex pieces, no projection, no clipping):
 * slow, simple, and sharing nothing with the code under test.
 */
export function sampledFraction(
  panel: Panel,
  reveal_m: number,
  shaders: readonly Shader[],
  solids: readonly Solid[],
  sun: Vec3,
): number {
  const out = dot(sun, panel.normal);
  if (sun[2] <= 0 || out <= 0) return 0;
  let lit = 0;
  for (let i = 0; i < RAYS; i++) {
    const x = ((i + 0.5) / RAYS) * panel.width_m;
    const y = ((((i * STRIDE) % RAYS) + 0.5) / RAYS) * panel.height_m;
    // Through the opening, which lies `reveal_m` in front of the glass?
    const t = reveal_m / out;
    const xo = x + t * dot(sun, panel.right);
    const yo = y + t * dot(sun, panel.up);
    if (xo < 0 || xo > panel.width_m || yo < 0 || yo > panel.height_m) continue;
    const from = pointOn(panel, xo, yo, 0);
    if (shaders.some((s) => hitsPolygon(from, sun, s.corners))) continue;
    if (solids.some((s) => hitsSolid(from, sun, s))) continue;
    lit++;
  }
  return lit / RAYS;
}

function hitsPolygon(from: Vec3, ray: Vec3, corners: readonly Vec3[]): boolean {
  const [a, b, c] = corners as [Vec3, Vec3, Vec3];
  const normal = cross(minus(b, a), minus(c, a));
  const speed = dot(ray, normal);
  if (Math.abs(speed) < 1e-12) return false;
  const t = dot(minus(a, from), normal) / speed;
  if (t <= 1e-9) return false;
  const p: Vec3 = [from[0] + t * ray[0], from[1] + t * ray[1], from[2] + t * ray[2]];
  const sides = corners.map((q, i) =>
    dot(normal, cross(minus(corners[(i + 1) % corners.length] as Vec3, q), minus(p, q))),
  );
  return sides.every((s) => s >= 0) || sides.every((s) => s <= 0);
}

/** Between the heights of the solid, does the ray pass through its outline? */
export function hitsSolid(from: Vec3, ray: Vec3, solid: Solid): boolean {
  const start = Math.max(1e-7, (solid.base_m - from[2]) / ray[2]);
  const end = (solid.top_m - from[2]) / ray[2];
  if (!(end > start)) return false;
  const at = (t: number): Point => [from[0] + t * ray[0], from[1] + t * ray[1]];
  const [p, q] = [at(start), at(end)];
  if (contains(solid.outline, p[0], p[1]) || contains(solid.outline, q[0], q[1])) return true;
  return solid.outline.some((a, i) => {
    const b = solid.outline[(i + 1) % solid.outline.length] as Point;
    const side = (u: Point, v: Point, w: Point) => (v[0] - u[0]) * (w[1] - u[1]) - (v[1] - u[1]) * (w[0] - u[0]);
    return side(p, q, a) * side(p, q, b) < 0 && side(a, b, p) * side(a, b, q) < 0;
  });
}
