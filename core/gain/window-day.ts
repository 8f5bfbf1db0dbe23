import type { WindowForm } from '../form/model.ts';
import type { DayGrid } from '../sky/day-grid.ts';
import { blindFactor, blindRules } from './blind-rule.ts';
import { type GlassLight, glassLight } from './glass-light.ts';
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

/** Parts that come from the sun or close to it, and are shaded with it: the first of `PARTS`. */
const DIRECT = 2;

/**
 * What one window takes in on one day. Each part is shaded in its own way: beam and circumsolar light by the sunlit share of
 * the glass, the dome by the share of it that is seen, the horizon band by its visible share, the ground likewise. Beam and
 * circumsolar light pass the glass at the sun's angle, the rest at its hemispherical value.
 * Q = A(1 − F)·g(θ)·blind·E for each part.
 * @param open   irradiance on the open plane
 * @param light  direct sun on the glass
 * @param view   what the window sees, as shares of the open view
 * @param glass  what the glass lets through at each step, where it is known already
 * @returns      watts through the glass; the parts sum to `total_W`
 */
export function windowDay(
  window: WindowForm,
  grid: DayGrid,
  open: OpenLight,
  light: WindowLight,
  view: WindowView,
  glass: GlassLight = glassLight(window.glass, light.cosIncidence),
): Omit<WindowDay, 'seen'> {
  const n = grid.instant_ms.length;
  const rules = blindRules(window.blinds, window.glass);
  const normal = window.glass_m2 * window.glass.g;
  const diffuse = normal * glass.hemispherical;
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
  // By place in `PARTS` and not by name: this is where a year of weather spends its time.
  const falling = PARTS.map((part) => open[part]);
  const through = PARTS.map((part) => parts[part]);
  const reaching = [0, 0, view.sky, view.horizon, view.ground];
  for (let i = 0; i < n; i++) {
    const lit = sunlit[i]!;
    reaching[0] = lit;
    reaching[1] = lit;
    const direct = lit > 0 ? normal * glass.byAngle[i]! : 0;
    let arriving = 0;
    for (let k = 0; k < falling.length; k++) arriving += falling[k]![i]! * reaching[k]!;
    if (arriving === 0) continue;
    const left = rules.length > 0 ? blindFactor(rules, grid.clock_min[i]!, arriving) : 1;
    blind[i] = left;
    let total = 0;
    for (let k = 0; k < falling.length; k++) {
      const watts = falling[k]![i]! * reaching[k]! * (k < DIRECT ? direct : diffuse) * left;
      through[k]![i] = watts;
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
