import * as maths from '../maths/maths.ts';
import type { Hatch, Mm } from './drawing.ts';

type Run = readonly (readonly [Mm, Mm])[];
/** A straight line on the page: x and y of both ends [mm]. */
export type HatchLine = readonly [Mm, Mm, Mm, Mm];

/**
 * The lines of a hatch inside closed runs, filled even-odd. Lines lie on a family fixed to the page's origin, not to the
 * outline, so that neighbouring pieces of one region meet without a seam and the same region hatches alike on every page. They
 * are cut here and not by a clipping path, so that paper, screen and whoever measures the file all get the very same lines.
 * @param runs   closed outlines [mm]
 * @param hatch  angle, anticlockwise from +x as seen on the page; spacing, measured square to the lines
 */
export function hatchLines(runs: readonly Run[], hatch: Hatch): readonly HatchLine[] {
  const angle = (hatch.angle_deg * Math.PI) / 180;
  const [ux, uy] = [maths.cos(angle), -maths.sin(angle)];
  const [nx, ny] = [-uy, ux];
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const run of runs)
    for (const [x, y] of run) {
      const d = x * nx + y * ny;
      low = Math.min(low, d);
      high = Math.max(high, d);
    }
  const lines: HatchLine[] = [];
  if (!(hatch.spacing > 0) || !Number.isFinite(low)) return lines;
  for (let k = Math.ceil(low / hatch.spacing); k * hatch.spacing <= high; k++) {
    const d = k * hatch.spacing;
    const cuts = crossings(runs, nx, ny, ux, uy, d);
    for (let i = 0; i + 1 < cuts.length; i += 2) {
      const from = cuts[i] as number;
      const to = cuts[i + 1] as number;
      if (to - from > 1e-6) lines.push([nx * d + ux * from, ny * d + uy * from, nx * d + ux * to, ny * d + uy * to]);
    }
  }
  return lines;
}

/** Where a line n·p = d crosses the outlines, as places along u in rising order; an even count, because an end counts on one side only. */
function crossings(runs: readonly Run[], nx: number, ny: number, ux: number, uy: number, d: number): number[] {
  const cuts: number[] = [];
  for (const run of runs) {
    for (let i = 0, j = run.length - 1; i < run.length; j = i++) {
      const a = run[j] as readonly [Mm, Mm];
      const b = run[i] as readonly [Mm, Mm];
      const da = a[0] * nx + a[1] * ny - d;
      const db = b[0] * nx + b[1] * ny - d;
      if (da > 0 === db > 0) continue;
      const t = da / (da - db);
      const ta = a[0] * ux + a[1] * uy;
      cuts.push(ta + t * (b[0] * ux + b[1] * uy - ta));
    }
  }
  return cuts.sort((p, q) => p - q);
}
