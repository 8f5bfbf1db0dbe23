import * as maths from '../maths/maths.ts';
import type { Vec3 } from '../plane/vec.ts';
import { DEG } from '../units/angle.ts';
import { ANY_MONTH, crownLoss } from './crown-sky.ts';
import type { Dome } from './dome-light.ts';
import { facing } from './exposure-grid.ts';
import { domeShare } from './sky-view.ts';
import {
  makeSkyRays,
  makeSkyTrace,
  openStretches,
  RAYS_OF_A_POINT,
  type SkyTrace,
  traceSky,
} from './sky-view-trace.ts';
import { visitReceptors } from './skyline-groups.ts';
import type { Occluders } from './skyline-occluders.ts';

/** What hides the dome from a point, azimuth by azimuth. */
export type ShadingMask = {
  readonly azimuths: readonly {
    /** True azimuth [°, 0..360). */
    readonly azimuth_deg: number;
    /** Hidden stretches of altitude [°], lowest first, each exact at this azimuth. */
    readonly hidden: readonly (readonly [number, number])[];
  }[];
};

/** The sky of one point. */
export type PointSky = {
  /** Share of a uniform dome's light on the point's plane; an open level plane has 1. */
  readonly skyView: number;
  /** The same under the CIE overcast sky: on an upright plane the vertical sky component, 0.396 in the open. */
  readonly skyComponent: number;
};

/** Sky view factor and sky component of one point on a plane. 0 inside a solid. */
export function pointSky(o: Occluders, at: Vec3, normal: Vec3): PointSky {
  let sky: PointSky = { skyView: 0, skyComponent: 0 };
  trace(o, at, normal, RAYS_OF_A_POINT, (t) => {
    const seen = (dome: Dome): number =>
      Math.max(0, domeShare(t, normal, dome) - crownLoss(t, o.crowns, ANY_MONTH, at, normal, dome));
    sky = { skyView: seen('uniform'), skyComponent: seen('overcast') };
  });
  return sky;
}

/**
 * The shading mask of a point: everything round it, whichever way it faces. Inside a solid everything is hidden.
 * @param north_rad  `Model.north_rad`
 * @param count      azimuths, a multiple of 8; they stand a little closer together near the axes of the drawing
 */
export function shadingMask(o: Occluders, at: Vec3, north_rad: number, count = 720): ShadingMask {
  const rays = makeSkyRays(count);
  const hidden: (readonly [number, number])[][] = Array.from({ length: count }, () => [[0, 90]]);
  // Looking up, nothing that rises above the point is behind its plane.
  trace(o, at, [0, 0, 1], count, (t) => {
    for (let c = 0; c < count; c++) hidden[c] = hiddenStretches(t, c);
  });
  const azimuths = hidden.map((stretches, c) => {
    const bearing = maths.atan2(rays.columns.ux[c]!, rays.columns.uy[c]!);
    const azimuth = (bearing - north_rad) / DEG;
    return { azimuth_deg: ((azimuth % 360) + 360) % 360, hidden: stretches };
  });
  azimuths.sort((a, b) => a.azimuth_deg - b.azimuth_deg);
  return { azimuths };
}

/** What is left of 0 to 90° without the open stretches [°]. */
function hiddenStretches(t: SkyTrace, c: number): (readonly [number, number])[] {
  const n = openStretches(t, c);
  const out: (readonly [number, number])[] = [];
  let from = 0;
  for (let i = 0; i < n; i++) {
    const low = maths.atan(t.open[2 * i]!) / DEG;
    if (low > from) out.push([from, low]);
    from = maths.atan(t.open[2 * i + 1]!) / DEG;
  }
  if (from < 90) out.push([from, 90]);
  return out;
}

function trace(o: Occluders, at: Vec3, normal: Vec3, count: number, done: (t: SkyTrace) => void): void {
  const rays = makeSkyRays(count);
  const t = makeSkyTrace(rays);
  const lowest = new Float64Array(count);
  visitReceptors(o, rays.columns, lowest, facing([at], normal), Uint32Array.of(0), (_, list) => {
    if (list === null) return;
    traceSky(t, o, list, at[0], at[1], at[2]);
    done(t);
  });
}
