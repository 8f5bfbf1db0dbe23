import type { Model } from '../form/model.ts';
import { solidsAt } from '../form/stands.ts';
import { type ShadingMask, shadingMask } from '../shade/sky-view-mask.ts';
import { makeOccluders } from '../shade/skyline-occluders.ts';

/** The middle of the glass stands this far in front of the wall, so that the wall itself is behind it [m]. */
const CLEAR_m = 0.01;

/**
 * What hides the sky from the middle of a window, when the proposal stands: blocks, its own wall, fixed devices. The reveal and
 * trees are left out.
 * @returns null where there is no such window
 */
export function windowMask(model: Model, id: string): ShadingMask | null {
  const window = model.windows.find((w) => w.id === id);
  if (window === undefined) return null;
  const { origin, right, up, normal, width_m, height_m } = window;
  const along = (i: 0 | 1 | 2): number => origin[i] + (right[i] * width_m + up[i] * height_m) / 2 + normal[i] * CLEAR_m;
  const standing = solidsAt(model.solids, 'after');
  const blocks = new Set(standing.map((s) => s.id));
  const shaders = model.windows.filter((w) => blocks.has(w.block)).flatMap((w) => w.shaders);
  return shadingMask(makeOccluders(standing, shaders), [along(0), along(1), along(2)], model.north_rad);
}
