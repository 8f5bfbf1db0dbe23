import * as maths from '../maths/maths.ts';

/** How glass lets less through as the sun strikes it more obliquely: by optics where the panes are known, by fit where only g is. */

/** Refractive index of soda-lime float glass in sunlight, as solar handbooks take it (Duffie and Beckman, Solar Engineering of Thermal Processes, ch. 5). */
export const FLOAT_GLASS_INDEX = 1.526;

/** How a pane's transmittance falls with the angle of incidence, as a share of what it is square on. */
export type AngleCurve = {
  /** @param cosIncidence cosine of the angle from the normal, 0..1 @returns share of the normal value, 0..1 */
  readonly at: (cosIncidence: number) => number;
  /** Mean of `at` over light that comes evenly from the whole half space in front. */
  readonly hemispherical: number;
};

type Split = { readonly s: number; readonly p: number };

/** Fresnel reflection where light crosses from index `from` to index `to`, for both polarisations. */
function reflection(from: number, to: number, cosIn: number, cosOut: number): Split {
  const s = (from * cosIn - to * cosOut) / (from * cosIn + to * cosOut);
  const p = (from * cosOut - to * cosIn) / (from * cosOut + to * cosIn);
  return { s: s * s, p: p * p };
}

/** Cosine of the angle after refraction from index `from` into `to` (Snell). */
const refracted = (from: number, to: number, cosIn: number): number =>
  Math.sqrt(1 - maths.square(from / to) * Math.max(0, 1 - cosIn * cosIn));

/**
 * Share of sunlight that passes N equal clear panes in air, all reflections between their faces summed.
 * @param cosIncidence cosine of the angle from the normal, 0..1
 * @param panes        1..4
 * @param index        refractive index of the glass
 * @param absorption   extinction coefficient times thickness of one pane (KL), 0 for glass without loss
 * @returns            transmittance 0..1
 * @see J. A. Duffie, W. A. Beckman, Solar Engineering of Thermal Processes, ch. 5 (from memory); Fresnel and Snell
 */
export function clearPanesTransmittance(
  cosIncidence: number,
  panes: number,
  index = FLOAT_GLASS_INDEX,
  absorption = 0.04,
): number {
  const cosIn = Math.min(1, Math.max(0, cosIncidence));
  const cosOut = refracted(1, index, cosIn);
  const r = reflection(1, index, cosIn, cosOut);
  const through = (x: number): number => (1 - x) / (1 + (2 * panes - 1) * x);
  return ((through(r.s) + through(r.p)) / 2) * maths.exp((-panes * absorption) / cosOut);
}

/** The angle curve of N clear panes, from `clearPanesTransmittance`. */
export function clearPanesCurve(panes: number, index = FLOAT_GLASS_INDEX, absorption = 0.04): AngleCurve {
  const normal = clearPanesTransmittance(1, panes, index, absorption);
  const at = (c: number): number => clearPanesTransmittance(c, panes, index, absorption) / normal;
  return { at, hemispherical: hemispherical(at) };
}

/**
 * Angle curve of any glazing of which only g at normal incidence, the number of panes and a coating category are known.
 * @param panes    number of panes p, 1..4
 * @param coating  category q, 1..10: about 4 for clear float, lower for reflective coatings
 * @see J. Karlsson, A. Roos, Modelling the angular behaviour of the total solar energy transmittance of windows,
 *      Solar Energy 69, 321–329 (2000)
 */
export function karlssonRoosCurve(panes: number, coating: number): AngleCurve {
  const a = 8;
  const b = 0.25 / coating;
  const c = 1 - a - b;
  const alpha = 5.2 + 0.7 * coating;
  const gamma = 5.26 + 0.06 * panes + (0.73 + 0.04 * panes) * coating;
  const at = (cosIncidence: number): number => {
    const z = maths.acos(Math.min(1, Math.max(0, cosIncidence))) / (Math.PI / 2);
    return Math.max(0, 1 - a * maths.pow(z, alpha) - b * z * z - c * maths.pow(z, gamma));
  };
  return { at, hemispherical: hemispherical(at) };
}

/**
 * Mean of an angle function over evenly bright light from the half space: 2∫f(θ) cos θ sin θ dθ, by Simpson's rule.
 * @param at  function of the cosine of the angle from the normal
 */
export function hemispherical(at: (cosIncidence: number) => number): number {
  const n = 720;
  const h = Math.PI / 2 / n;
  let sum = 0;
  for (let i = 1; i < n; i++) sum += (i % 2 === 1 ? 4 : 2) * at(maths.cos(i * h)) * maths.sin(2 * i * h);
  return (sum * h) / 3;
}

/**
 * ASHRAE's reference clear pane, 3 mm: transmittance and absorptance by angle.
 * @param cosIncidence 0..1 @returns shares of the irradiance, 0..1
 * @see ASHRAE Handbook of Fundamentals 2009, ch. 15 (double-strength sheet coefficients)
 */
export function referencePane(cosIncidence: number): { readonly transmittance: number; readonly absorptance: number } {
  const c = Math.min(1, Math.max(0, cosIncidence));
  const series = (k: readonly number[]): number => k.reduceRight((sum, x) => sum * c + x, 0);
  return { transmittance: Math.max(0, series(PANE_T)), absorptance: Math.max(0, series(PANE_A)) };
}

const PANE_T = [-0.00885, 2.71235, -0.62062, -7.07329, 9.75995, -3.89922] as const;
const PANE_A = [0.01154, 0.77674, -3.94657, 8.57881, -8.38135, 3.01188] as const;

/**
 * One refracting face and one pass through the glass behind it, as a share of normal incidence: the incidence modifier of a
 * surface bonded to what lies behind it (reflection at the back is left out, so this is not a pane standing in air).
 * @param cosIncidence  0..1
 * @param index         refractive index of the glass
 * @param extinction_pm extinction coefficient K [1/m]
 * @param thickness_m   L
 * @param coatingIndex  index of an anti-reflective layer on the outer face; absent: none
 * @see W. De Soto, S. A. Klein, W. A. Beckman, Solar Energy 80, 78–88 (2006)
 */
export function bondedFaceModifier(
  cosIncidence: number,
  index: number,
  extinction_pm: number,
  thickness_m: number,
  coatingIndex?: number,
): number {
  const through = (cosIn: number): number => {
    const first = coatingIndex ?? index;
    const cosFirst = refracted(1, first, cosIn);
    const outer = reflection(1, first, cosIn, cosFirst);
    let s = 1 - outer.s;
    let p = 1 - outer.p;
    let cosGlass = cosFirst;
    if (coatingIndex !== undefined) {
      cosGlass = refracted(coatingIndex, index, cosFirst);
      const inner = reflection(coatingIndex, index, cosFirst, cosGlass);
      s *= (1 - inner.s) / (1 - inner.s * outer.s);
      p *= (1 - inner.p) / (1 - inner.p * outer.p);
    }
    return ((s + p) / 2) * maths.exp((-extinction_pm * thickness_m) / cosGlass);
  };
  return through(Math.min(1, Math.max(0, cosIncidence))) / through(1);
}

/**
 * One-parameter modifier 1 − b(1/cos θ − 1), not below 0; meant for angles under 70°.
 * @see A. F. Souka, H. H. Safwat, Solar Energy 10, 170–174 (1966)
 */
export const oneParameterModifier = (cosIncidence: number, b: number): number =>
  cosIncidence > 0 ? Math.max(0, 1 - b * (1 / cosIncidence - 1)) : 0;

/**
 * Polynomial modifier 1 − (1 − cos θ)⁵.
 * @see C. Schlick, Computer Graphics Forum 13, 233–246 (1994)
 */
export function schlickModifier(cosIncidence: number): number {
  const off = 1 - Math.max(0, cosIncidence);
  return 1 - maths.square(maths.square(off)) * off;
}
