import { turnOf } from './skyline-columns.ts';
import { SLACK } from './skyline.ts';

/** Columns in a band of the shelter. */
const BAND = 8;
/** Columns that an angle of one radian spans at the most, as a share of a quarter: turns run fastest along the axes. */
const TURN_PER_RADIAN = 1;

/** What walls hide for certain, per band of columns (tangent): a quick first look at small things far off. */
export type Shelter = Float64Array;

/** @param columns a multiple of 8 */
export const makeShelter = (columns: number): Shelter => new Float64Array(columns / BAND);

/**
 * What is hidden for certain, band by band: the least of a band's values and of the first after it, so that it holds for
 * values at the columns' edges as for those of whole columns.
 */
export function fillShelter(shelter: Shelter, hidden: Float64Array): void {
  const count = hidden.length;
  for (let b = 0; b < shelter.length; b++) {
    const after = (b + 1) * BAND;
    let least = hidden[after === count ? 0 : after]!;
    for (let c = b * BAND; c < after; c++) least = Math.min(least, hidden[c]!);
    shelter[b] = least * (1 - SLACK);
  }
}

/** Whether the cylinder round a patch, seen from the point, stands nowhere above the shelter. `at`: where its disc starts. */
export function isSheltered(
  shelter: Shelter,
  discs: Float64Array,
  at: number,
  x: number,
  y: number,
  z: number,
): boolean {
  const dx = discs[at]! - x;
  const dy = discs[at + 1]! - y;
  const radius = discs[at + 2]!;
  const away = Math.sqrt(dx * dx + dy * dy);
  if (away < 2 * radius) return false;
  const rise = (discs[at + 3]! - z) / (away - radius);
  if (!(rise > 0)) return true;
  // Half the angle that it spans is asin(r / d), which is less than 1.05 r / d from two radii on.
  const half = ((1.05 * radius) / away) * TURN_PER_RADIAN;
  const bands = shelter.length;
  const turn = turnOf(dx, dy);
  const first = Math.floor(((turn - half) * bands) / 4);
  const last = Math.floor(((turn + half) * bands) / 4);
  for (let b = first; b <= last; b++) {
    if (rise > shelter[b < 0 ? b + bands : b >= bands ? b - bands : b]!) return false;
  }
  return true;
}
