import type { Solid } from '../form/model.ts';
import { stands } from '../form/stands.ts';
import { differenceOf } from '../plane/boolean.ts';
import { convexHull } from '../plane/convex-hull.ts';
import { fromFirstCorner, type Region, regionArea } from '../plane/region.ts';
import type { Point, Ring, Vec3 } from '../plane/vec.ts';
import { IN_FRONT_m, UNION_GRID_m } from '../units/tolerance.ts';
import type { GroundShadow, ShadowChange } from './shadow.ts';

/** Below this sine of the altitude (0.0001°) shadows are longer than the Earth is flat; the sun counts as set. */
const LOWEST_SUN = 2e-6;

const NONE: GroundShadow = { regions: [], area_m2: 0 };

/**
 * Shadows on level ground before and after the proposal, and their difference, as polygons.
 *
 * Each convex piece of a standing solid throws the hull of its base and its top, both moved along the ray to the ground;
 * the shadow is their union, less the ground under buildings that stand on it. A block that floats above the ground covers
 * none of it. Only what rises above `level_m` counts. Corners are on a grid of 0.1 mm (wider for shadows longer than 9 km).
 * Trees are left out. Sun at or below the horizon: no shadow, area 0.
 * @param solids   all solids of the scheme, whatever their standing
 * @param sun      unit vector towards the sun in drawing axes
 * @param level_m  height of the ground [m]
 */
export function shadowChange(solids: readonly Solid[], sun: Vec3, level_m: number): ShadowChange {
  if (!(sun[2] > LOWEST_SUN)) return { before: NONE, after: NONE, added: NONE, gained: NONE };
  const frame = frameOf(sun);
  const cast = (keep: (before: boolean, after: boolean) => boolean) =>
    castsOf(
      solids.filter((s) => keep(stands(s.standing, 'before'), stands(s.standing, 'after'))),
      frame,
      level_m,
    );
  const kept = cast((before, after) => before && after);
  const gone = cast((before, after) => before && !after);
  const come = cast((before, after) => !before && after);
  const before = both(kept, gone);
  const after = both(kept, come);
  const shadowBefore = shadowOf(differenceOf(before.shadows, before.feet), frame);
  const isSame = gone.shadows.length === 0 && come.shadows.length === 0;
  return {
    before: shadowBefore,
    after: isSame ? shadowBefore : shadowOf(differenceOf(after.shadows, after.feet), frame),
    added: shadowOf(newIn(come, before, after.feet), frame),
    gained: shadowOf(newIn(gone, after, before.feet), frame),
  };
}

/**
 * Plan axes turned to the sun: u along the shadows, v to the left of them. There shadows lie level, and a sweep over v has few
 * edges in hand at a time: unions take a third of the time at noon and a tenth at sunset.
 */
type Frame = { readonly c: number; readonly s: number /** Length of the shadow of one metre. */; readonly run: number };

function frameOf(sun: Vec3): Frame {
  const level = Math.hypot(sun[0], sun[1]);
  return level > 1e-12 ? { c: -sun[0] / level, s: -sun[1] / level, run: level / sun[2] } : { c: 1, s: 0, run: 0 };
}

const turned = (p: Point, f: Frame): Point => [p[0] * f.c + p[1] * f.s, p[1] * f.c - p[0] * f.s];

/** Regions turned back into drawing axes, to the tenth of a millimetre, in the order of their first corners. */
function shadowOf(turnedRegions: readonly Region[], f: Frame): GroundShadow {
  const round = (v: number): number => Math.round(v * PER_METRE) / PER_METRE + 0;
  const back = (ring: Ring): Ring =>
    fromFirstCorner(
      ring.map((p): Point => [round(p[0] * f.c - p[1] * f.s), round(p[0] * f.s + p[1] * f.c)]).filter(notRepeated),
    );
  const regions = turnedRegions
    .map((r): Region => ({ outer: back(r.outer), holes: r.holes.map(back).sort(byFirstCorner) }))
    .sort((p, q) => byFirstCorner(p.outer, q.outer));
  return { regions, area_m2: regionArea(regions) };
}

const PER_METRE = Math.round(1 / UNION_GRID_m);
const byFirstCorner = ([p]: Ring, [q]: Ring): number => (p && q ? p[0] - q[0] || p[1] - q[1] : 0);
const notRepeated = (p: Point, i: number, ring: readonly Point[]): boolean => {
  const q = ring[(i + 1) % ring.length] as Point;
  return p[0] !== q[0] || p[1] !== q[1];
};

/** Shadows of single convex pieces, footprint included, and the footprints of what stands on the ground; in turned axes. */
type Casts = { readonly shadows: readonly Ring[]; readonly feet: readonly Ring[] };

function castsOf(solids: readonly Solid[], frame: Frame, level_m: number): Casts {
  const shadows: Ring[] = [];
  const feet: Ring[] = [];
  for (const solid of solids) {
    const top = solid.top_m - level_m;
    const base = Math.max(0, solid.base_m - level_m);
    if (!(top > base + IN_FRONT_m)) continue;
    if (base <= IN_FRONT_m) feet.push(solid.outline.map((p) => turned(p, frame)));
    for (const piece of solid.pieces) {
      const plan = piece.map((p) => turned(p, frame));
      const moved = (h: number) => plan.map((p): Point => [p[0] + h * frame.run, p[1]]);
      shadows.push(convexHull([...moved(base), ...moved(top)]));
    }
  }
  return { shadows, feet };
}

const both = (p: Casts, q: Casts): Casts => ({
  shadows: [...p.shadows, ...q.shadows],
  feet: [...p.feet, ...q.feet],
});

/**
 * Shadow that `casts` throw where there was none at the other stage, and no building at either. Only what comes near them
 * is taken off; that is less work than to take off the other stage's finished shadow.
 */
function newIn(casts: Casts, other: Casts, feet: readonly Ring[]): readonly Region[] {
  if (casts.shadows.length === 0) return [];
  const boxes = casts.shadows.map(boxOf);
  const near = (ring: Ring): boolean => {
    const box = boxOf(ring);
    return boxes.some((b) => meets(b, box));
  };
  return differenceOf(casts.shadows, [...other.shadows, ...other.feet, ...feet].filter(near));
}

type Box = readonly [number, number, number, number];

function boxOf(ring: Ring): Box {
  let [x0, y0, x1, y1] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const p of ring) {
    if (p[0] < x0) x0 = p[0];
    if (p[0] > x1) x1 = p[0];
    if (p[1] < y0) y0 = p[1];
    if (p[1] > y1) y1 = p[1];
  }
  return [x0, y0, x1, y1];
}

const meets = (p: Box, q: Box): boolean => p[0] <= q[2] && q[0] <= p[2] && p[1] <= q[3] && q[1] <= p[3];
