import * as maths from '../maths/maths.ts';
import type { Tree } from '../scheme/schema.ts';
import type { Skyline } from './skyline.ts';
import { turnOf } from './skyline-columns.ts';

/**
 * Crowns of trees as plain columns: ellipsoids upright on their axes (see `crown.ts`), and what each lets through. Light that
 * passes a crown is weakened by the month's transmittance, not switched off; two crowns in a row multiply.
 */
export type Crowns = {
  readonly count: number;
  /** `CROWN` numbers each: x, y, z of the middle, radius in plan, half the height. */
  readonly shape: Float64Array;
  /** `THROUGH` numbers each: the mean of the year, then January to December, 0..1. */
  readonly through: Float64Array;
};

export const CROWN = 5;
export const THROUGH = 13;

/** The crowns of trees, in an order of their own, so that sums do not hang on the order of the scheme. Trees that are all trunk have none. */
export function crownColumns(trees: readonly Tree[]): Crowns {
  const rows = trees
    .map((tree) => {
      const rise = (tree.height - tree.trunk) / 2;
      const shape = [tree.at[0], tree.at[1], tree.base + tree.trunk + rise, tree.spread / 2, rise];
      const mean = tree.transmittance.reduce((sum, t) => sum + t, 0) / tree.transmittance.length;
      return { shape, through: [mean, ...tree.transmittance] };
    })
    .filter(({ shape }) => (shape[3] as number) > 0 && (shape[4] as number) > 0)
    .sort((a, b) => firstDifference([...a.shape, ...a.through], [...b.shape, ...b.through]));
  return {
    count: rows.length,
    shape: Float64Array.from(rows.flatMap((r) => r.shape)),
    through: Float64Array.from(rows.flatMap((r) => r.through)),
  };
}

function firstDifference(a: readonly number[], b: readonly number[]): number {
  for (let i = 0; i < a.length; i++) if (a[i] !== b[i]) return a[i]! - b[i]!;
  return 0;
}

/** Whether a crown reaches in front of a plane through a point, and so may stand before it. */
export function isInFront(
  { shape }: Crowns,
  crown: number,
  x: number,
  y: number,
  z: number,
  normal: readonly [number, number, number],
): boolean {
  const o = crown * CROWN;
  const [nx, ny, nz] = normal;
  const along = nx * (shape[o]! - x) + ny * (shape[o + 1]! - y) + nz * (shape[o + 2]! - z);
  const flat = shape[o + 3]! * shape[o + 3]! * (nx * nx + ny * ny);
  const upright = shape[o + 4]! * nz;
  return along + Math.sqrt(flat + upright * upright) > 0;
}

/** Working memory of `dimSeen`: what comes through to each sample (1 at rest), and the samples that are dimmed. */
export type Dimming = { readonly share: Float64Array; readonly dimmed: Uint32Array };

export const makeDimming = (samples: number): Dimming => ({
  share: new Float64Array(samples).fill(1),
  dimmed: new Uint32Array(samples),
});

/**
 * Takes from sums of seen samples what crowns keep off: each seen sample whose ray meets a crown counts with what comes
 * through in its month. Exact: a ray meets the ellipsoid or it does not; a point inside a crown has it before it whichever
 * way it looks. To be called after `sumSeen`.
 * @param sums  minutes, beam on the plane
 */
export function dimSeen(
  s: Skyline,
  d: Dimming,
  crowns: Crowns,
  normal: readonly [number, number, number],
  x: number,
  y: number,
  z: number,
  sums: Float64Array,
): void {
  const { minutesBefore, beamBefore } = s.light;
  let n = 0;
  for (let k = 0; k < crowns.count; k++)
    if (isInFront(crowns, k, x, y, z, normal)) n = dimByCrown(s, d, crowns, k, x, y, z, n);
  let minutes = 0;
  let beam = 0;
  for (let j = 0; j < n; j++) {
    const i = d.dimmed[j]!;
    minutes += (1 - d.share[i]!) * (minutesBefore[i + 1]! - minutesBefore[i]!);
    beam += (1 - d.share[i]!) * (beamBefore[i + 1]! - beamBefore[i]!);
    d.share[i] = 1;
  }
  sums[0] = Math.max(0, sums[0]! - minutes);
  sums[1] = Math.max(0, sums[1]! - beam);
}

/** Dims the seen samples behind one crown. @returns how many are dimmed so far */
function dimByCrown(
  s: Skyline,
  d: Dimming,
  { shape, through }: Crowns,
  crown: number,
  x: number,
  y: number,
  z: number,
  before: number,
): number {
  const { light, floor, ceiling, openFrom, openTo, mark } = s;
  const { count, tan, month } = light;
  const o = crown * CROWN;
  const cx = shape[o]! - x;
  const cy = shape[o + 1]! - y;
  const cz = shape[o + 2]! - z;
  const radius = shape[o + 3]!;
  const rise = shape[o + 4]!;
  const away = Math.sqrt(cx * cx + cy * cy);
  if (cz + rise <= 0) return before;
  // Seen from beyond its radius it spans some columns and altitudes; from closer, any. A turn is at most one a radian.
  const isFar = away > radius * 1.0001;
  const half = isFar ? maths.asin(radius / away) : 2;
  const turn = isFar ? turnOf(cx, cy) : 2;
  const first = Math.floor(((turn - half) * count) / 4);
  const columns = Math.min(count, Math.floor(((turn + half) * count) / 4) - first + 1);
  const low = !isFar || cz <= rise ? 0 : (cz - rise) / (away + radius);
  const high = isFar ? (cz + rise) / (away - radius) : Infinity;
  // In axes where the crown is a unit sphere: |t·s − c| = 1 for some t > 0.
  const ux = cx / radius;
  const uy = cy / radius;
  const uz = cz / rise;
  const outside = ux * ux + uy * uy + uz * uz - 1;
  let n = before;
  let c = first - count * Math.floor(first / count);
  for (let j = 0; j < columns; j++, c = c + 1 === count ? 0 : c + 1) {
    const to = ceiling[c]!;
    for (let i = floor[c]!; i < to; i++) {
      if (tan[i]! < low) continue;
      if (tan[i]! > high) break;
      if (mark[i] === 1 && i >= openFrom[c]! && i < openTo[c]!) continue;
      const sx = light.sx[i]! / radius;
      const sy = light.sy[i]! / radius;
      const sz = light.sz[i]! / rise;
      const along = sx * ux + sy * uy + sz * uz;
      const root = along * along - (sx * sx + sy * sy + sz * sz) * outside;
      if (!(root > 0 && (outside < 0 || along > 0))) continue;
      if (d.share[i] === 1) d.dimmed[n++] = i;
      d.share[i]! *= through[crown * THROUGH + month[i]!]!;
    }
  }
  return n;
}
