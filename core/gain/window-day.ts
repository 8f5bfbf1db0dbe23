import type { WindowForm } from '../form/model.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import { blindFactor, blindRules } from './blind-rule.ts';
import { type AngleCurve, karlssonRoosCurve } from './glass-angle.ts';
import { PARTS, type Part, type WindowDay } from './series.ts';

/** Direct sun on one window over one day: what the shade stage found, one row a step. */
export type WindowLight = {
  /** Share of the glass in direct sun, 0..1. */
  readonly sunlit: Float64Array;
  /** Cosine of the angle between the sun and the glass's normal, 0 behind it. */
  readonly cosIncidence: Float64Array;
};

/** What the window sees of dome, horizon and ground, set against the same glass with nothing in front: 1 each when open. */
export type WindowView = { readonly sky: number; readonly horizon: number; readonly ground: number };

/** Irradiance on the plane of the glass with nothing in front of it, part by part [W/m²], one row a step. */
export type OpenLight = { readonly [P in Part]: Float64Array };

/** An opening without a pane lets light in alike from all sides. */
const OPEN: AngleCurve = { at: () => 1, hemispherical: 1 };

/** The angle curve of a glass of the scheme: Karlsson and Roos, since a scheme knows g, panes and coating. */
export const glassCurve = (glass: WindowForm['glass']): AngleCurve =>
  glass.panes === 0 ? OPEN : karlssonRoosCurve(glass.panes, glass.coating);

/** Share of the open irradiance of a part that reaches the glass at a step. */
const reach = (part: Part, sunlit: number, view: WindowView): number =>
  part === 'beam' || part === 'circumsolar' ? sunlit : view[part];

/**
 * What one window takes in on one day. Each part is shaded in its own way: beam and circumsolar light by the sunlit share of
 * the glass, the dome by the share of it that is seen, the horizon band by its visible share, the ground likewise. Beam and
 * circumsolar light pass the glass at the sun's angle, the rest at its hemispherical value.
 * Q = A(1 − F)·g(θ)·blind·E for each part.
 * @param open   irradiance on the open plane
 * @param light  direct sun on the glass
 * @param view   what the window sees, as shares of the open view
 * @returns      watts through the glass; the parts sum to `total_W`
 */
export function windowDay(
  window: WindowForm,
  grid: DayGrid,
  open: OpenLight,
  light: WindowLight,
  view: WindowView,
): Omit<WindowDay, 'seen'> {
  const n = grid.instant_ms.length;
  const curve = glassCurve(window.glass);
  const rules = blindRules(window.blinds, window.glass);
  const normal = window.glass_m2 * window.glass.g;
  const diffuse = normal * curve.hemispherical;
  const { sunlit, cosIncidence } = light;
  const blind = new Float64Array(n).fill(1);
  const total_W = new Float64Array(n);
  const parts = {
    beam: new Float64Array(n),
    circumsolar: new Float64Array(n),
    sky: new Float64Array(n),
    horizon: new Float64Array(n),
    ground: new Float64Array(n),
  };
  for (let i = 0; i < n; i++) {
    const lit = sunlit[i]!;
    const direct = lit > 0 ? normal * curve.at(cosIncidence[i]!) : 0;
    let arriving = 0;
    for (const part of PARTS) arriving += open[part][i]! * reach(part, lit, view);
    if (arriving === 0) continue;
    const left = rules.length > 0 ? blindFactor(rules, grid.clock_min[i]!, arriving) : 1;
    blind[i] = left;
    let total = 0;
    for (const part of PARTS) {
      const through = part === 'beam' || part === 'circumsolar' ? direct : diffuse;
      const watts = open[part][i]! * reach(part, lit, view) * through * left;
      parts[part][i] = watts;
      total += watts;
    }
    // A horizon darker than the dome (Perez) takes from the dome's light, and cannot take more than the window sees of it.
    const dark = parts.sky[i]! + parts.horizon[i]!;
    if (dark < 0) {
      parts.horizon[i] = -parts.sky[i]!;
      total -= dark;
    }
    total_W[i] = total;
  }
  return { window: window.id, day: grid.key, sunlit, cosIncidence, blind, parts, total_W };
}
