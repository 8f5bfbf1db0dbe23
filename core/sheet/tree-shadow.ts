import type { Model } from '../form/model.ts';
import { levelPanel } from '../form/panel.ts';
import type { Ring } from '../plane/vec.ts';
import { crownOutline, crownsOf } from '../shade/crown.ts';
import { sunVector } from '../shade/sun-vector.ts';
import { DEG } from '../units/angle.ts';

/** More corners than any outline of a crown has. */
const MOST = 128;

/**
 * Outlines of the shadows that tree crowns throw on level ground: what of them lets how much light through depends on the
 * month, so that they are drawn as outlines and never count as added shadow.
 * @param altitude_deg  above 0
 */
export function treeShadows(model: Model, azimuth_deg: number, altitude_deg: number, level_m = 0): readonly Ring[] {
  if (model.trees.length === 0) return [];
  const sun = sunVector(azimuth_deg * DEG, altitude_deg * DEG, model.north_rad);
  if (!(sun[2] > 1e-6)) return [];
  const [x0, y0, x1, y1] = model.extent;
  const panel = levelPanel(
    [
      [x0, y0],
      [x1, y0],
      [x1, y1],
      [x0, y1],
    ],
    level_m,
  );
  const far = 1e9;
  const [xs, ys] = [new Float64Array(MOST), new Float64Array(MOST)];
  return crownsOf(panel, model.trees).flatMap((crown) => {
    const n = crownOutline(crown, sun[0] / sun[2], sun[1] / sun[2], [-far, -far, far, far], xs, ys);
    if (n < 3) return [];
    return [Array.from({ length: n }, (_, i) => [panel.origin[0] + xs[i]!, panel.origin[1] + ys[i]!] as const)];
  });
}
