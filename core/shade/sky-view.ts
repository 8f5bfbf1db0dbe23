import type { Shader, Solid } from '../form/model.ts';
import type { Tree } from '../scheme/schema.ts';
import { CROWN } from './crown-light.ts';
import { type Dome, lightBelow } from './dome-light.ts';
import { ANY_MONTH, crownLoss, type MonthShares } from './crown-sky.ts';
import { byNormal, type Receptors, visitReceptors } from './skyline-groups.ts';
import { makeOccluders, type Occluders } from './skyline-occluders.ts';
import { makeSkyTrace, openStretches, type SkyRays, type SkyTrace, traceSky } from './sky-view-trace.ts';

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
      if (high > low) ray += lightBelow(high, a, nz, dome) - lightBelow(low, a, nz, dome);
    }
    sum += ray * width_rad[c]!;
  }
  const share = dome === 'uniform' ? sum / Math.PI : (3 * sum) / (7 * Math.PI);
  return Math.min(1, Math.max(0, share));
}

/**
 * The dome's share for each receptor (see `domeShare`), less what crowns of trees keep off; 0 for one inside a solid.
 * @param months  when the light falls, for the crowns
 */
export function domeOnReceptors(
  o: Occluders,
  rays: SkyRays,
  r: Receptors,
  dome: Dome,
  months: MonthShares = ANY_MONTH,
): Float64Array {
  const n = r.x.length;
  const share = new Float64Array(n);
  const trace = makeSkyTrace(rays);
  const lowest = new Float64Array(rays.columns.count);
  for (const rows of byNormal(r, 0, n)) {
    visitReceptors(o, rays.columns, lowest, r, rows, (row, list) => {
      if (list === null) return;
      traceSky(trace, o, list, r.x[row]!, r.y[row]!, r.z[row]!);
      const normal = [r.nx[row]!, r.ny[row]!, r.nz[row]!] as const;
      const open = domeShare(trace, normal, dome);
      const at = [r.x[row]!, r.y[row]!, r.z[row]!] as const;
      const lost = o.crowns.count > 0 ? crownLoss(trace, o.crowns, months, at, normal, dome) : 0;
      share[row] = Math.max(0, open - lost);
    });
  }
  return share;
}

/**
 * The world upside down: what hides the ground from a receptor is what hides the dome from its mirror image. The ground is
 * taken to lie at level 0 below whatever reaches deeper, and everything below the horizon that no solid hides is ground.
 */
export function mirroredOccluders(
  solids: readonly Solid[],
  shaders: readonly Shader[],
  trees: readonly Tree[] = [],
): Occluders {
  const mirrored = makeOccluders(
    solids.map((s) => ({ ...s, base_m: -s.top_m, top_m: -(s.base_m < 0 ? Math.min(0, s.top_m) : s.base_m) })),
    shaders.map((s) => ({ ...s, corners: s.corners.map((p) => [p[0], p[1], -p[2]] as const) })),
    trees,
  );
  const shape = mirrored.crowns.shape.map((v, i) => (i % CROWN === 2 ? -v : v));
  return { ...mirrored, crowns: { ...mirrored.crowns, shape } };
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
  months: MonthShares = ANY_MONTH,
): Float64Array {
  const flip = (column: Float64Array): Float64Array => column.map((v) => -v);
  return domeOnReceptors(mirrored, rays, { ...r, z: flip(r.z), nz: flip(r.nz) }, 'uniform', months);
}
