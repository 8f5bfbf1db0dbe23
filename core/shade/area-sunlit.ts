import type { Panel, Solid } from '../form/model.ts';
import { levelPanel } from '../form/panel.ts';
import { convexPieces } from '../plane/convex-pieces.ts';
import { Patches } from '../plane/patches.ts';
import type { Point, Ring, Vec3 } from '../plane/vec.ts';
import type { Tree } from '../scheme/schema.ts';
import { IN_FRONT_m } from '../units/tolerance.ts';
import { type Crown, crownOutline, crownsOf } from './crown.ts';
import { cutShadows } from './cut-shadows.ts';
import { type Hiders, hidersOf } from './hiders.ts';

/** A level area with everything that can shade it, prepared once and asked for many moments. */
export type AreaShade = {
  readonly panel: Panel;
  /** The area less what stands on it, as convex pieces in the panel's axes. */
  readonly pieces: readonly Ring[];
  readonly open_m2: number;
  readonly hiders: Hiders;
  readonly crowns: readonly Crown[];
};

export type AreaSun = {
  /** The area, less the ground under buildings that stand on it [m²]. */
  readonly open_m2: number;
  /** Sunlit part of it; what lies behind a crown counts with the month's transmittance [m²]. */
  readonly sunlit_m2: number;
  /** sunlit_m2 / open_m2; 0 for an area that is built over as a whole. */
  readonly share: number;
};

/** Scratch: nothing that is called while it is in use could call this module again. */
const patches = new Patches();

/**
 * An amenity area prepared for `areaSunlit`.
 * @param outline  a simple outline in plan
 * @param level_m  its height
 * @param solids   those that stand; one that stands on the area takes its ground away, one that floats above it does not
 */
export function areaShade(outline: Ring, level_m: number, solids: readonly Solid[], trees: readonly Tree[]): AreaShade {
  const panel = levelPanel(outline, level_m);
  const inPlan = (ring: Ring): Ring => ring.map((p): Point => [p[0] - panel.origin[0], p[1] - panel.origin[1]]);
  patches.clear();
  for (const piece of convexPieces(outline)) patches.addRing(inPlan(piece));
  for (const solid of solids) {
    if (solid.base_m > level_m + IN_FRONT_m || !(solid.top_m > level_m + IN_FRONT_m)) continue;
    for (const piece of solid.pieces) {
      const ring = inPlan(piece);
      ring.forEach((p, i) => {
        patches.cutX[i] = p[0];
        patches.cutY[i] = p[1];
      });
      patches.cut(ring.length, 0);
    }
  }
  return {
    panel,
    pieces: Array.from({ length: patches.count }, (_, i) => patches.ringOf(i)),
    open_m2: patches.area(),
    hiders: hidersOf(panel, solids, []),
    crowns: crownsOf(panel, trees),
  };
}

/**
 * How much of an area lies in direct sun at a moment, exactly, by the same clipping as for glass. 0 with the sun at or below
 * the horizon.
 * @param sun    unit vector towards the sun in drawing axes
 * @param month  1..12, for what comes through the crowns of trees; without it trees are left out
 */
export function areaSunlit(shade: AreaShade, sun: Vec3, month?: number): AreaSun {
  const { panel, pieces, open_m2, hiders, crowns } = shade;
  if (!(sun[2] > 1e-9) || open_m2 === 0) return { open_m2, sunlit_m2: 0, share: 0 };
  const a = sun[0] / sun[2];
  const b = sun[1] / sun[2];
  patches.clear();
  for (const ring of pieces) patches.addRing(ring);
  cutShadows(patches, hiders, a, b);
  const { cutX, cutY } = patches;
  if (month !== undefined)
    for (const crown of crowns) {
      const corners = crownOutline(crown, a, b, [0, 0, panel.width_m, panel.height_m], cutX, cutY);
      if (corners > 0) patches.cut(corners, crown.transmittance[month] ?? 1);
    }
  const sunlit_m2 = Math.min(open_m2, patches.area());
  return { open_m2, sunlit_m2, share: sunlit_m2 / open_m2 };
}
