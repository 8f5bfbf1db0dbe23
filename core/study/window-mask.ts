import type { Model, Panel } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import type { Vec3 } from '../plane/vec.ts';
import { type ShadingMask, shadingMask } from '../shade/sky-view-mask.ts';
import { makeOccluders } from '../shade/skyline-occluders.ts';

/** The middle of the glass stands this far in front of the wall, so that the wall itself is behind it [m]. */
const CLEAR_m = 0.01;

/** The middle of a panel, just in front of it. */
function middleOf({ origin, right, up, normal, width_m, height_m }: Panel): Vec3 {
  const along = (i: 0 | 1 | 2): number => origin[i] + (right[i] * width_m + up[i] * height_m) / 2 + normal[i] * CLEAR_m;
  return [along(0), along(1), along(2)];
}

/** Where a thing looks at the sky from: the middle of a window, of the scheme or of a neighbour, or a point; null for any other. */
function eyeOf(model: Model, id: string): Vec3 | null {
  const window = model.windows.find((w) => w.id === id);
  if (window !== undefined) return middleOf(window);
  const receptor = model.receptors.find((r) => r.id === id);
  if (receptor?.panel !== undefined) return middleOf(receptor.panel);
  return receptor?.kind === 'point' ? receptor.at : null;
}

/**
 * What hides the sky from the middle of a window, of the scheme or of a neighbour, or from a point, when the proposal stands:
 * blocks, its own wall, fixed devices. The reveal and trees are left out.
 * @returns null where there is no such window or point
 */
export function windowMask(model: Model, id: string): ShadingMask | null {
  const eye = eyeOf(model, id);
  if (eye === null) return null;
  const standing = solidsAt(model.solids, 'after');
  const blocks = new Set(standing.map((s) => s.id));
  const shaders = model.windows.filter((w) => blocks.has(w.block)).flatMap((w) => w.shaders);
  return shadingMask(makeOccluders(standing, shaders), eye, model.north_rad);
}
