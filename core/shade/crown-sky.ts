import * as maths from '../maths/maths.ts';
import { CROWN, type Crowns, isInFront, THROUGH } from './crown-light.ts';
import { type Dome, lightBelow } from './dome-light.ts';
import { openStretches, type SkyTrace } from './sky-view-trace.ts';
import { turnOf } from './skyline-columns.ts';

/** How much of a light falls in each month: shares that add up to 1, entry 0 for light of no month, which takes the mean of the year. */
export type MonthShares = Float64Array;

/** Light of no month. */
export const ANY_MONTH: MonthShares = Float64Array.of(1, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0);

/**
 * What crowns take of the dome's light on a plane, in the units of `domeShare`. On each ray a crown spans one stretch of
 * altitude, cut out by the two tangents to the ellipse in which the ray's upright plane cuts it: exact. Where several stand
 * one behind the other their transmittances multiply month by month.
 */
export function crownLoss(
  t: SkyTrace,
  crowns: Crowns,
  months: MonthShares,
  at: readonly [number, number, number],
  normal: readonly [number, number, number],
  dome: Dome,
): number {
  const { columns, width_rad } = t.rays;
  const { count, ux, uy } = columns;
  const met: Met[][] = [];
  const rays: number[] = [];
  const stretch = new Float64Array(2);
  for (let k = 0; k < crowns.count; k++) {
    if (!isInFront(crowns, k, ...at, normal)) continue;
    const [first, n] = raysOf(crowns, k, at, count);
    for (let j = 0; j < n; j++) {
      const c = (first + j) % count;
      // What ends below the skyline keeps nothing off that is not hidden anyway.
      if (!crownOnRay(crowns, k, at, ux[c]!, uy[c]!, stretch) || stretch[1]! <= t.horizon[c]!) continue;
      const entry = { crown: k, low: stretch[0]!, high: stretch[1]! };
      const list = met[c];
      if (list !== undefined) list.push(entry);
      else {
        met[c] = [entry];
        rays.push(c);
      }
    }
  }
  let sum = 0;
  // In the order of the rays, whatever crown met them first, so that sums do not hang on it.
  for (const c of rays.sort((p, q) => p - q)) {
    const along = normal[0] * ux[c]! + normal[1] * uy[c]!;
    sum += lossOnRay(t, c, crowns, months, met[c]!, along, normal[2], dome) * width_rad[c]!;
  }
  return dome === 'uniform' ? sum / Math.PI : (3 * sum) / (7 * Math.PI);
}

/** The rays that a crown can lie on: the first, and how many; from within its radius, all of them. */
function raysOf(
  { shape }: Crowns,
  crown: number,
  at: readonly [number, number, number],
  count: number,
): readonly [number, number] {
  const o = crown * CROWN;
  const dx = shape[o]! - at[0];
  const dy = shape[o + 1]! - at[1];
  const radius = shape[o + 3]!;
  const away = Math.sqrt(dx * dx + dy * dy);
  if (!(away > radius * 1.0001)) return [0, count];
  // A turn is at most one a radian.
  const half = maths.asin(radius / away);
  const turn = turnOf(dx, dy);
  const first = Math.floor(((turn - half) * count) / 4);
  const last = Math.ceil(((turn + half) * count) / 4);
  return [((first % count) + count) % count, Math.min(count, last - first + 1)];
}

type Met = { readonly crown: number; readonly low: number; readonly high: number };

/** The light that crowns keep off on one ray: between any two of their ends, what is open is dimmed alike. */
function lossOnRay(
  t: SkyTrace,
  c: number,
  crowns: Crowns,
  months: MonthShares,
  met: readonly Met[],
  a: number,
  nz: number,
  dome: Dome,
): number {
  if (a <= 0 && nz <= 0) return 0;
  const front = a <= 0 ? -a / nz : 0;
  const back = a > 0 && nz < 0 ? -a / nz : Infinity;
  const ends = Float64Array.from({ length: 2 * met.length }, (_, i) =>
    i % 2 === 0 ? met[i >> 1]!.low : met[i >> 1]!.high,
  ).sort();
  const n = openStretches(t, c);
  let loss = 0;
  for (let e = 0; e + 1 < ends.length; e++) {
    const from = Math.max(front, ends[e]!);
    const to = Math.min(back, ends[e + 1]!);
    if (!(to > from)) continue;
    let light = 0;
    for (let i = 0; i < n; i++) {
      const low = Math.max(from, t.open[2 * i]!);
      const high = Math.min(to, t.open[2 * i + 1]!);
      if (high > low) light += lightBelow(high, a, nz, dome) - lightBelow(low, a, nz, dome);
    }
    if (light > 0) loss += light * (1 - throughAll(crowns, months, met, ends[e]!, ends[e + 1]!));
  }
  return loss;
}

/** What comes through all the crowns that span a stretch, as the months share the light. */
function throughAll({ through }: Crowns, months: MonthShares, met: readonly Met[], low: number, high: number): number {
  const rows: number[] = [];
  for (const one of met) if (one.low < high && one.high > low) rows.push(one.crown * THROUGH);
  if (rows.length === 0) return 1;
  let all = 0;
  for (let m = 0; m < THROUGH; m++) {
    let share = months[m]!;
    if (share === 0) continue;
    for (const row of rows) share *= through[row + m]!;
    all += share;
  }
  return all;
}

/**
 * The stretch of altitude, as tangents, that a crown spans on the ray of a unit direction in plan. In the ray's upright plane
 * the crown is an ellipse about (p, h) with half axes a and b, and a line of slope t through the point touches it where
 * t²(p² − a²) − 2tph + h² − b² = 0.
 * @param stretch  filled with the lower and the upper end  @returns whether it is met above the horizon
 */
export function crownOnRay(
  { shape }: Crowns,
  crown: number,
  at: readonly [number, number, number],
  ux: number,
  uy: number,
  stretch: Float64Array,
): boolean {
  const o = crown * CROWN;
  const dx = shape[o]! - at[0];
  const dy = shape[o + 1]! - at[1];
  const h = shape[o + 2]! - at[2];
  const radius = shape[o + 3]!;
  const p = dx * ux + dy * uy;
  const aside = (ux * dy - uy * dx) / radius;
  const k2 = 1 - aside * aside;
  if (!(k2 > 0)) return false;
  const a2 = radius * radius * k2;
  const b2 = shape[o + 4]! * shape[o + 4]! * k2;
  stretch[0] = -Infinity;
  stretch[1] = Infinity;
  if ((p * p) / a2 + (h * h) / b2 < 1) return true;
  // Straight below its rim the tangent stands upright; a hair's breadth aside it does not.
  const beyond = p * p - a2 || -1e-12 * a2;
  if (beyond > 0 && p < 0) return false;
  const root = Math.sqrt(Math.max(0, p * p * h * h - beyond * (h * h - b2)));
  const one = (p * h - root) / beyond;
  const other = (p * h + root) / beyond;
  const low = Math.min(one, other);
  const high = Math.max(one, other);
  if (beyond > 0) {
    stretch[0] = low;
    stretch[1] = high;
  } else if (h > 0) stretch[0] = high;
  else stretch[1] = low;
  return stretch[1] > 0 && stretch[1] > stretch[0];
}
