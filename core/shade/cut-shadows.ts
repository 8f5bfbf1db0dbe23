import type { Patches } from '../plane/patches.ts';
import { castOutline } from './cast-outline.ts';
import type { Hiders } from './hiders.ts';

/**
 * Take the shadow of every hider off the patches of its panel, along a ray with the slopes a and b (see `Hiders`). Hiders
 * whose bounds say that they cannot matter are passed over; it stops when nothing is left.
 * @param keep  whether what is in shadow stays, with weight 0
 */
export function cutShadows(patches: Patches, hiders: Hiders, a: number, b: number, keep = false): void {
  const { bounds, count } = hiders;
  const { cutX, cutY } = patches;
  for (let i = 0; i < count; i++) {
    const k = 4 * i;
    if (bounds[k + 3]! <= b) return;
    if (bounds[k + 2]! >= b || bounds[k]! >= a || bounds[k + 1]! <= a) continue;
    patches.cut(castOutline(hiders, i, a, b, cutX, cutY), 0, keep);
    if (patches.count === 0) return;
  }
}
