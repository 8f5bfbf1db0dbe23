import * as maths from '../maths/maths.ts';
import { stereographic } from '../sun/sun-path.ts';
import { DEG, toDegrees, wrap180, wrap360 } from '../units/angle.ts';
import type { Mm } from './drawing.ts';
import type { Rect } from './paper.ts';

export type SunPathProjection = 'stereographic' | 'altitude-azimuth';
export type PagePoint = readonly [Mm, Mm];

/** How a part of the page shows the sky. */
export type SkyView =
  | { readonly kind: 'stereographic'; readonly centre: PagePoint; readonly radius: Mm }
  | {
      readonly kind: 'altitude-azimuth';
      readonly frame: Rect;
      /** The bearing at the middle of the frame [°]: the side of the noon sun. */
      readonly middle_deg: number;
      /** The altitude at the top of the frame [°]. */
      readonly top_deg: number;
    };

/** Where a direction lies on the page. Altitudes from −90 to 90°; those below the horizon lie outside the drawing. */
export function skyOnPage(view: SkyView, azimuth_rad: number, altitude_rad: number): PagePoint {
  if (view.kind === 'stereographic') {
    const [e, n] = stereographic(azimuth_rad, altitude_rad);
    return [view.centre[0] + e * view.radius, view.centre[1] - n * view.radius];
  }
  const { x, y, width, height } = view.frame;
  const off = wrap180(toDegrees(azimuth_rad) - view.middle_deg);
  return [x + width * (0.5 + off / 360), y + height * (1 - toDegrees(altitude_rad) / view.top_deg)];
}

/** The direction that a place on the page shows, or null outside the drawing. The inverse of `skyOnPage`. */
export function pageToSky(
  view: SkyView,
  [px, py]: PagePoint,
): { readonly azimuth_rad: number; readonly altitude_rad: number } | null {
  if (view.kind === 'stereographic') {
    const [e, n] = [(px - view.centre[0]) / view.radius, (view.centre[1] - py) / view.radius];
    const r = Math.hypot(e, n);
    if (r > 1) return null;
    return { azimuth_rad: wrap360(toDegrees(maths.atan2(e, n))) * DEG, altitude_rad: 90 * DEG - 2 * maths.atan(r) };
  }
  const { x, y, width, height } = view.frame;
  const [u, v] = [(px - x) / width, (py - y) / height];
  if (u < 0 || u > 1 || v < 0 || v > 1) return null;
  return {
    azimuth_rad: wrap360(view.middle_deg + (u - 0.5) * 360) * DEG,
    altitude_rad: (1 - v) * view.top_deg * DEG,
  };
}

/**
 * A run of directions as lines on the page: cut where it leaves the frame on one side and comes back on the other. Both ends of
 * a cut are carried on to the edge.
 */
export function skyLines(view: SkyView, azimuth_rad: Float64Array, altitude_rad: Float64Array): PagePoint[][] {
  const lines: PagePoint[][] = [];
  let line: PagePoint[] = [];
  for (let i = 0; i < azimuth_rad.length; i++) {
    const at = skyOnPage(view, azimuth_rad[i]!, altitude_rad[i]!);
    const before = line.at(-1);
    if (view.kind === 'altitude-azimuth' && before !== undefined && crossesEdge(view.frame, before, at)) {
      const { x, width } = view.frame;
      const side = before[0] > at[0] ? 1 : -1;
      const share = ((side > 0 ? x + width : x) - before[0]) / (at[0] + side * width - before[0]);
      const level = before[1] + share * (at[1] - before[1]);
      line.push([side > 0 ? x + width : x, level]);
      lines.push(line);
      line = [[side > 0 ? x : x + width, level]];
    }
    line.push(at);
  }
  lines.push(line);
  return lines.filter((l) => l.length > 1);
}

/** Two neighbours on one path lie nearer round the back than across the frame. */
const crossesEdge = (frame: Rect, a: PagePoint, b: PagePoint): boolean => Math.abs(b[0] - a[0]) > frame.width / 2;

/** Leaves out points that a straight line between their neighbours passes within `most` of. */
export function thinned(line: readonly PagePoint[], most: Mm): PagePoint[] {
  const kept: PagePoint[] = [];
  let from = 0;
  const first = line[0];
  if (first !== undefined) kept.push(first);
  for (let to = 2; to < line.length; to++) {
    const a = line[from] as PagePoint;
    const b = line[to] as PagePoint;
    const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
    let isFlat = true;
    for (let i = from + 1; i < to && isFlat; i++) {
      const p = line[i] as PagePoint;
      const off = Math.abs((b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0]));
      isFlat = length > 0 && off / length <= most;
    }
    if (!isFlat) {
      from = to - 1;
      kept.push(line[from] as PagePoint);
    }
  }
  const last = line.at(-1);
  if (line.length > 1 && last !== undefined) kept.push(last);
  return kept;
}
