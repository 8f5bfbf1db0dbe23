import type { Solid } from '../form/model.ts';
import type { Vec3 } from '../plane/vec.ts';

/**
 * Which solids can throw a shadow on which, at one moment: found in plan axes turned to the sun (u away from it, v across),
 * where only solids whose strips of v overlap can meet, the one nearer the sun shading the other, and only as far as its
 * shadow reaches down to the other's base. Errs on the safe side only.
 * @param sun  unit vector towards the sun, above the horizon
 * @returns    for solid i of the list, the solids that may shade it, itself among them (a wing may shade another), in order
 */
export function sunwardOf(solids: readonly Solid[], sun: Vec3): (i: number) => readonly Solid[] {
  const level = Math.hypot(sun[0], sun[1]);
  const [c, s] = level > 1e-12 ? [-sun[0] / level, -sun[1] / level] : [1, 0];
  /** Fall of the ray a metre of plan. */
  const fall = sun[2] / Math.max(level, 1e-12);
  const strips = solids.map((solid, i) => {
    const strip = { i, u0: Infinity, u1: -Infinity, v0: Infinity, v1: -Infinity };
    for (const [x, y] of solid.outline) {
      const u = x * c + y * s;
      const v = y * c - x * s;
      strip.u0 = Math.min(strip.u0, u);
      strip.u1 = Math.max(strip.u1, u);
      strip.v0 = Math.min(strip.v0, v);
      strip.v1 = Math.max(strip.v1, v);
    }
    return strip;
  });
  const byStart = [...strips].sort((p, q) => p.v0 - q.v0 || p.i - q.i);
  const widest = strips.reduce((w, p) => Math.max(w, p.v1 - p.v0), 0);
  return (i) => {
    const on = strips[i];
    const solid = solids[i];
    if (on === undefined || solid === undefined) return [];
    const found: number[] = [];
    for (let k = firstFrom(byStart, on.v0 - widest); k < byStart.length; k++) {
      const strip = byStart[k];
      if (strip === undefined || strip.v0 > on.v1) break;
      const other = solids[strip.i] as Solid;
      if (strip.v1 < on.v0 || strip.u0 > on.u1) continue;
      if (other.top_m - Math.max(0, on.u0 - strip.u1) * fall <= solid.base_m) continue;
      found.push(strip.i);
    }
    return found.sort((p, q) => p - q).map((k) => solids[k] as Solid);
  };
}

/** The first place in a list sorted by v0 whose v0 is not below `from`. */
function firstFrom(sorted: readonly { readonly v0: number }[], from: number): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((sorted[middle] as { v0: number }).v0 < from) low = middle + 1;
    else high = middle;
  }
  return low;
}
