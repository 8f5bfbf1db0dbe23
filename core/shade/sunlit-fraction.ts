import type { Panel, Shader, Solid, WindowForm } from '../form/model.ts';
import { Patches } from '../plane/patches.ts';
import type { Vec3 } from '../plane/vec.ts';
import type { Tree } from '../scheme/schema.ts';
import { type Crown, crownOutline, crownsOf } from './crown.ts';
import { cutShadows } from './cut-shadows.ts';
import { type Hiders, hidersOf } from './hiders.ts';

/** A pane with everything that can shade it, prepared once and asked for many directions. */
export type WindowShade = {
  readonly panel: Panel;
  readonly reveal_m: number;
  readonly hiders: Hiders;
  readonly crowns: readonly Crown[];
};

/** A direction that makes less than this with the pane's plane [sine] lies in it: it brings no light, and slopes overflow. */
const GRAZING = 1e-9;

/**
 * A window prepared for `sunlitFraction` and `windowSky`.
 * @param solids  those that stand, the window's own block among them: its other wings shade it
 */
export const windowShade = (window: WindowForm, solids: readonly Solid[], trees: readonly Tree[]): WindowShade =>
  panelShade(window, window.reveal_m, window.shaders, solids, trees);

/** The same for any rectangle, such as a neighbour's window, whose glass lies `reveal_m` behind its opening. */
export const panelShade = (
  panel: Panel,
  reveal_m: number,
  shaders: readonly Shader[],
  solids: readonly Solid[],
  trees: readonly Tree[],
): WindowShade => ({
  panel,
  reveal_m,
  hiders: hidersOf(panel, solids, shaders),
  crowns: crownsOf(panel, trees),
});

/**
 * Share of a window's glass in direct sun, 0..1, exact for flat opaque devices and prisms.
 *
 * Drawn on the plane of the opening: the opening, less what the reveal hides (the glass moved along the ray to the
 * opening), less the shadow of every piece of every solid and device in front. What is behind the opening's plane, the
 * window's own wall and whatever flanks it, cannot hide anything, since the sun stands in front of it. Sun as a point, by
 * its true direction; 0 when it is at or below the horizon or behind the pane.
 * @param sun    unit vector towards the sun in drawing axes
 * @param month  1..12, for what comes through the crowns of trees; without it trees are left out
 */
export function sunlitFraction(shade: WindowShade, sun: Vec3, month?: number): number {
  if (!(sun[2] > 0)) return 0;
  const { right, up, normal } = shade.panel;
  const sz = sun[0] * normal[0] + sun[1] * normal[1] + sun[2] * normal[2];
  if (!(sz > GRAZING)) return 0;
  const a = (sun[0] * right[0] + sun[1] * right[1] + sun[2] * right[2]) / sz;
  const b = (sun[0] * up[0] + sun[1] * up[1] + sun[2] * up[2]) / sz;
  return openShare(shade, a, b, month);
}

/** Scratch of `openShare` and `openShares`, which call nothing that could call them again. */
const patches = new Patches();
const box: [number, number, number, number] = [0, 0, 0, 0];

/**
 * Share of the glass, 0..1, from which nothing hides the direction with the slopes a (along the panel's `right`) and b
 * (along its `up`), per unit along its normal.
 * @param month  1..12, 0 for the mean of the year, or undefined to leave trees out
 */
export function openShare(shade: WindowShade, a: number, b: number, month?: number): number {
  if (!leaveOpen(shade, a, b)) return 0;
  if (month !== undefined)
    for (const crown of shade.crowns) {
      const corners = crownOutline(crown, a, b, box, patches.cutX, patches.cutY);
      if (corners > 0) patches.cut(corners, crown.transmittance[month] ?? 1);
    }
  return shareLeft(shade);
}

/**
 * `openShare` for several months at once: what no crown reaches is the same in all of them, and is cut once.
 * @param months each 1..12, or 0 for the mean of the year
 * @param out    takes a share for each of the months
 */
export function openShares(
  shade: WindowShade,
  a: number,
  b: number,
  months: readonly number[],
  out: Float64Array,
): void {
  if (!leaveOpen(shade, a, b)) {
    out.fill(0);
    return;
  }
  const isReached = shade.crowns.some((crown) => crownOutline(crown, a, b, box, patches.cutX, patches.cutY) > 0);
  if (!isReached) out.fill(shareLeft(shade));
  else for (let k = 0; k < months.length; k++) out[k] = openShare(shade, a, b, months[k]);
}

/** Leaves in the scratch what solids and devices leave open of the glass. @returns whether anything is */
function leaveOpen({ panel, reveal_m, hiders }: WindowShade, a: number, b: number): boolean {
  const { width_m, height_m } = panel;
  box[0] = Math.max(0, reveal_m * a);
  box[1] = Math.max(0, reveal_m * b);
  box[2] = Math.min(width_m, width_m + reveal_m * a);
  box[3] = Math.min(height_m, height_m + reveal_m * b);
  if (!(box[2] > box[0] && box[3] > box[1])) return false;
  patches.clear();
  patches.addRectangle(box[0], box[1], box[2], box[3]);
  cutShadows(patches, hiders, a, b);
  return patches.count > 0;
}

/** Share of the glass that the patches in the scratch make up. */
const shareLeft = ({ panel }: WindowShade): number => Math.min(1, patches.area() / (panel.width_m * panel.height_m));
