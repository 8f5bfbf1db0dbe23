import type { Panel } from '../form/model.ts';
import * as maths from '../maths/maths.ts';
import { convexHull } from '../plane/convex-hull.ts';
import type { Point, Vec3 } from '../plane/vec.ts';
import type { Tree } from '../scheme/schema.ts';
import { IN_FRONT_m } from '../units/tolerance.ts';
import { inPanel, isUpright } from './hiders.ts';

/**
 * The crown of a tree in front of a panel, in the panel's axes: an ellipsoid as wide as the tree's spread, from the top of
 * the clear trunk to the top of the tree. The trunk itself is left out: it hides next to nothing, and for a moment only.
 * The beam that comes through is the month's transmittance times what would come without it; two crowns in a row multiply.
 */
export type Crown = {
  readonly centre: Vec3;
  /** Half axes along x, y and z of the panel [m]. */
  readonly half: Vec3;
  /** Share of the light that comes through: the mean of the year, then January to December. */
  readonly transmittance: readonly number[];
};

/** Corners of the polygon that stands for an ellipse; it is drawn a little large, so that its area is the ellipse's own. */
const SIDES = 48;
const EQUAL_AREA = Math.sqrt((2 * Math.PI) / (SIDES * maths.sin((2 * Math.PI) / SIDES)));
const COS = Float64Array.from({ length: SIDES }, (_, i) => maths.cos((2 * Math.PI * i) / SIDES));
const SIN = Float64Array.from({ length: SIDES }, (_, i) => maths.sin((2 * Math.PI * i) / SIDES));

/** The crowns that reach in front of a panel. Trees without a crown (all trunk) are left out. */
export function crownsOf(panel: Panel, trees: readonly Tree[]): Crown[] {
  const out: Crown[] = [];
  for (const tree of trees) {
    const rise = (tree.height - tree.trunk) / 2;
    if (!(rise > 0)) continue;
    const centre = inPanel(panel, [tree.at[0], tree.at[1], tree.base + tree.trunk + rise]);
    const r = tree.spread / 2;
    const half: Vec3 = isUpright(panel) ? [r, rise, r] : [r, r, rise];
    if (centre[2] + half[2] > IN_FRONT_m) out.push({ centre, half, transmittance: withMean(tree.transmittance) });
  }
  return out;
}

const withMean = (months: readonly number[]): readonly number[] => [
  months.reduce((sum, t) => sum + t, 0) / months.length,
  ...months,
];

/**
 * The outline of a crown's shadow on the panel's plane along a ray with the slopes a and b: a polygon of 48 corners with
 * the area of the ellipse, whose outline it leaves by less than 0.2 % of the crown's size.
 * @returns how many corners were written, 0 when the shadow misses the rectangle from (x0, y0) to (x1, y1)
 */
export function crownOutline(
  crown: Crown,
  a: number,
  b: number,
  box: readonly [number, number, number, number],
  outX: Float64Array,
  outY: Float64Array,
): number {
  const [rx, ry, rz] = crown.half;
  const [cx, cy, cz] = crown.centre;
  // The image of a unit sphere under (x, y, z) → (rx·x − a·rz·z, ry·y − b·rz·z): L·Lᵀ, and a square root of it (Cholesky).
  const reachX = Math.sqrt(rx * rx + a * a * rz * rz);
  const reachY = Math.sqrt(ry * ry + b * b * rz * rz);
  const x = cx - a * cz;
  const y = cy - b * cz;
  const kx = EQUAL_AREA * reachX;
  const ky = EQUAL_AREA * reachY;
  if (x + kx <= box[0] || x - kx >= box[2] || y + ky <= box[1] || y - ky >= box[3]) return 0;
  if (cz < rz) return cutCrownOutline(crown, a, b, outX, outY);
  const skew = (a * b * rz * rz) / reachX;
  const rest = Math.sqrt(Math.max(0, reachY * reachY - skew * skew));
  for (let i = 0; i < SIDES; i++) {
    outX[i] = x + kx * COS[i]!;
    outY[i] = y + EQUAL_AREA * (skew * COS[i]! + rest * SIN[i]!);
  }
  return SIDES;
}

/**
 * The same for a crown that grows through the panel's plane, where only the part in front of it hides anything: the hull of
 * its section with the plane and of the shadow of the front part of its rim. Rare enough to allocate.
 */
function cutCrownOutline(crown: Crown, a: number, b: number, outX: Float64Array, outY: Float64Array): number {
  const [rx, ry, rz] = crown.half;
  const [cx, cy, cz] = crown.centre;
  const points: Point[] = [];
  const section = Math.sqrt(Math.max(0, 1 - (cz / rz) * (cz / rz)));
  // In axes where the crown is a unit sphere, the rim is the great circle square to the ray.
  const ray: Vec3 = [a / rx, b / ry, 1 / rz];
  const flat = Math.hypot(ray[0], ray[2]);
  const long = Math.hypot(flat, ray[1]);
  const u: Vec3 = [ray[2] / flat, 0, -ray[0] / flat];
  const v: Vec3 = [(-ray[0] * ray[1]) / (flat * long), flat / long, (-ray[2] * ray[1]) / (flat * long)];
  for (let i = 0; i < SIDES; i++) {
    points.push([cx + rx * section * COS[i]!, cy + ry * section * SIN[i]!]);
    const z = cz + rz * (u[2] * COS[i]! + v[2] * SIN[i]!);
    if (z <= 0) continue;
    points.push([cx + rx * (u[0] * COS[i]! + v[0] * SIN[i]!) - a * z, cy + ry * (v[1] * SIN[i]!) - b * z]);
  }
  const hull = convexHull(points);
  hull.forEach((p, i) => {
    outX[i] = p[0];
    outY[i] = p[1];
  });
  return hull.length < 3 ? 0 : hull.length;
}
