import type { WindowForm } from '../form/model.ts';
import * as maths from '../maths/maths.ts';
import { dot, minus } from '../plane/vec.ts';

/**
 * A window cut by the upright plane square to its wall: `out` runs outwards from the face of the wall and `up` from the sill,
 * in metres. Devices are taken to run on past the cut on both sides.
 */
export type SectionPoint = readonly [out: number, up: number];

export type SectionBlade = {
  readonly device: string;
  readonly kind: 'overhang' | 'louvres';
  readonly ends: readonly [SectionPoint, SectionPoint];
};

export type WindowSection = {
  readonly height_m: number;
  readonly reveal_m: number;
  /** Overhangs and louvre blades as they are cut. */
  readonly blades: readonly SectionBlade[];
};

/** A window's section. Fins stand beside the cut and are no part of it. */
export function windowSection(window: WindowForm): WindowSection {
  const blades = window.shaders.flatMap((s): SectionBlade[] => {
    if (s.kind === 'fin') return [];
    const at = s.corners.map((c): SectionPoint => {
      const v = minus(c, window.origin);
      return [dot(v, window.normal), dot(v, window.up)];
    });
    const sorted = [...at].sort((a, b) => a[0] - b[0] || a[1] - b[1]);
    return [{ device: s.device, kind: s.kind, ends: [sorted[0] as SectionPoint, sorted.at(-1) as SectionPoint] }];
  });
  return { height_m: window.height_m, reveal_m: window.reveal_m, blades };
}

/** Where the ray through a point meets the plane of the glass: its height above the sill [m]. @param slope  tan of the profile angle */
export const onGlass = (p: SectionPoint, reveal_m: number, slope: number): number => p[1] - (p[0] + reveal_m) * slope;

/**
 * The stretches of the glass that the sun reaches in the section, from below: the glass less what head, overhangs and blades
 * hide. The sill hides nothing of glass that starts at its height.
 * @param profile_rad  profile angle of the sun, above 0 and below π/2
 */
export function litOnGlass(s: WindowSection, profile_rad: number): readonly (readonly [number, number])[] {
  const slope = maths.tan(profile_rad);
  const hidden: (readonly [number, number])[] = [[s.height_m - s.reveal_m * slope, Number.POSITIVE_INFINITY]];
  for (const blade of s.blades) {
    const [a, b] = blade.ends.map((e) => onGlass(e, s.reveal_m, slope)) as [number, number];
    hidden.push([Math.min(a, b), Math.max(a, b)]);
  }
  hidden.sort((p, q) => p[0] - q[0]);
  const lit: (readonly [number, number])[] = [];
  let from = 0;
  for (const [low, high] of hidden) {
    if (low > from) lit.push([from, Math.min(low, s.height_m)]);
    from = Math.max(from, high);
    if (from >= s.height_m) break;
  }
  return lit.filter(([a, b]) => b - a > 1e-9);
}
