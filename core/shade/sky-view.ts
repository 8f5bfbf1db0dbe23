import type { Shader, Solid } from '../form/model.ts';
import { byNormal, type Receptors, visitReceptors } from './skyline-groups.ts';
import { makeOccluders, type Occluders } from './skyline-occluders.ts';
import { makeSkyTrace, openStretches, type SkyRays, type SkyTrace, traceSky } from './sky-view-trace.ts';

/** How bright the dome is taken to be: alike all over, or the traditional CIE overcast sky, (1 + 2 sin γ)/3 of its zenith. */
export type Dome = 'uniform' | 'overcast';

/**
 * Light of the dome on a plane that reaches it past what stands before it, as a share of the light that an open level plane
 * receives from the same dome, 0..1. Level and open: 1. Upright and open: 0.5 (uniform), 0.39618 (overcast), which is the
 * vertical sky component of the trade. Reflected light counts for nothing.
 *
 * On each ray the integral over altitude γ of (1 or (1 + 2 sin γ)/3) · cos(incidence) · cos γ is closed: with a and b the
 * parts of the normal along the ray and upwards, a(γ + sin γ cos γ)/2 + b sin²γ/2, and for the brighter zenith
 * 2a(1 − cos³γ)/3 + 2b sin³γ/3 on top. Overcast shares are divided by 7π/9 · 3 instead of π.
 * @see ISO 15469:2004 (CIE S 011/E:2003), 16th sky; derivation as for the long parallel obstruction, checked against its closed form
 */
export function domeShare(t: SkyTrace, normal: readonly [number, number, number], dome: Dome): number {
  const { columns, width_rad } = t.rays;
  const [nx, ny, nz] = normal;
  let sum = 0;
  for (let c = 0; c < columns.count; c++) {
    const a = nx * columns.ux[c]! + ny * columns.uy[c]!;
    // In front of the plane: a cos γ + b sin γ > 0.
    let from = 0;
    let to = Infinity;
    if (a <= 0) {
      if (nz <= 0) continue;
      from = -a / nz;
    } else if (nz < 0) to = -a / nz;
    let ray = 0;
    const n = openStretches(t, c);
    for (let i = 0; i < n; i++) {
      const low = Math.max(from, t.open[2 * i]!);
      const high = Math.min(to, t.open[2 * i + 1]!);
      if (high > low) ray += below(high, a, nz, dome) - below(low, a, nz, dome);
    }
    sum += ray * width_rad[c]!;
  }
  const share = dome === 'uniform' ? sum / Math.PI : (3 * sum) / (7 * Math.PI);
  return Math.min(1, Math.max(0, share));
}

/** Light of one ray from the horizon up to an altitude of tangent t. */
function below(t: number, a: number, b: number, dome: Dome): number {
  if (t <= 0) return 0;
  const cos = 1 / Math.sqrt(1 + t * t);
  const sin = t === Infinity ? 1 : t * cos;
  const uniform = (a * (Math.atan(t) + sin * cos) + b * sin * sin) / 2;
  return dome === 'uniform' ? uniform : uniform + (2 / 3) * (a * (1 - cos * cos * cos) + b * sin * sin * sin);
}

/**
 * The dome's share for each receptor (see `domeShare`); 0 for one inside a solid.
 * @param from, to  rows to work out, `to` exclusive
 */
export function domeOnReceptors(
  o: Occluders,
  rays: SkyRays,
  r: Receptors,
  dome: Dome,
  from = 0,
  to = r.x.length,
): Float64Array {
  const share = new Float64Array(to - from);
  const trace = makeSkyTrace(rays);
  const lowest = new Float64Array(rays.columns.count);
  for (const rows of byNormal(r, from, to)) {
    visitReceptors(o, rays.columns, lowest, r, rows, (row, list) => {
      if (list === null) return;
      traceSky(trace, o, list, r.x[row]!, r.y[row]!, r.z[row]!);
      share[row - from] = domeShare(trace, [r.nx[row]!, r.ny[row]!, r.nz[row]!], dome);
    });
  }
  return share;
}

/**
 * The world upside down: what hides the ground from a receptor is what hides the dome from its mirror image. The ground is
 * taken to lie at level 0 below whatever reaches deeper, and everything below the horizon that no solid hides is ground.
 */
export function mirroredOccluders(solids: readonly Solid[], shaders: readonly Shader[]): Occluders {
  return makeOccluders(
    solids.map((s) => ({ ...s, base_m: -s.top_m, top_m: -(s.base_m < 0 ? Math.min(0, s.top_m) : s.base_m) })),
    shaders.map((s) => ({ ...s, corners: s.corners.map((p) => [p[0], p[1], -p[2]] as const) })),
  );
}

/**
 * The ground's share for each receptor: what an evenly bright ground sends to its plane over what it would
 * send to a level plane that looks down on it. Upright and open: 0.5. Level and looking up: 0.
 * @param mirrored  from `mirroredOccluders`
 */
export function groundOnReceptors(
  mirrored: Occluders,
  rays: SkyRays,
  r: Receptors,
  from = 0,
  to = r.x.length,
): Float64Array {
  const flip = (column: Float64Array): Float64Array => column.map((v) => -v);
  return domeOnReceptors(mirrored, rays, { ...r, z: flip(r.z), nz: flip(r.nz) }, 'uniform', from, to);
}
