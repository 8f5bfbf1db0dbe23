import * as maths from '../maths/maths.ts';
import { isUpright } from './hiders.ts';
import { openShares, type WindowShade } from './sunlit-fraction.ts';

/** What a window's glass gets of an even sky, of the horizon and of an even ground, averaged over the glass. */
export type WindowSky = {
  /** Cosine-weighted share of the sky dome's light: 0.5 for open upright glass, 1 for an open rooflight. */
  readonly sky: number;
  /** Visible share of the horizon in front, cosine-weighted, 0..1. 0 for a rooflight, which faces no horizon. */
  readonly horizon: number;
  /** The same for the ground: 0.5 for open upright glass, 0 for a rooflight. */
  readonly ground: number;
  /**
   * Light of a CIE overcast sky on the glass as a share of that on open level ground: 0.39618 for open upright glass. Unlike
   * the vertical sky component, which is taken at a point on the face of the wall, it counts the reveal and the devices.
   */
  readonly overcast: number;
};

/**
 * Sky and ground seen from a window: the exact open share of the glass for each of a fixed set of directions.
 *
 * For upright glass there are 987 directions for the sky and their mirror images for the ground, for a rooflight 2584, of
 * equal weight in cos θ dω (Nusselt's projection), laid out as a Fibonacci lattice whose rows are even in the sine of the
 * profile angle: long parallel obstructions and overhangs, which cut the sky along such rows, come out to 0.0005 of a dome,
 * other shapes to about 0.001 (both in the tests). Light reflected by obstructions and by the undersides of devices is left out; crowns of trees let
 * through what the month says.
 * @param month  1..12 for the crowns of trees; 0, unless given, for the mean of the year
 */
export const windowSky = (shade: WindowShade, month = 0): WindowSky => windowSkies(shade, [month])[0] as WindowSky;

/**
 * The same for several months: crowns that let through alike are worked out once, and what no crown reaches once for all.
 * @param months each 1..12, or 0 for the mean of the year
 * @returns      one for each of them, in their order
 */
export function windowSkies(shade: WindowShade, months: readonly number[]): readonly WindowSky[] {
  const through = months.map((month) => shade.crowns.map((crown) => crown.transmittance[month] ?? 1).join());
  const distinct = [...new Set(through)];
  const standIns = distinct.map((t) => months[through.indexOf(t)] as number);
  const skies = isUpright(shade.panel) ? uprightSkies(shade, standIns) : levelSkies(shade, standIns);
  return through.map((t) => skies[distinct.indexOf(t)] as WindowSky);
}

/** Neighbours in Fibonacci's row: how many directions, and the stride of their lattice. */
const UPRIGHT_LATTICE = [987, 610] as const;
const LEVEL_LATTICE = [2584, 1597] as const;
const HORIZON_DIRECTIONS = 144;

/** Slopes of each direction and the luminance of a CIE overcast sky there, as a share of the sum over all of them. */
type Lattice = { readonly a: Float64Array; readonly b: Float64Array; readonly overcast: Float64Array };

/** Light of an overcast sky on open upright glass over that on open level ground: 3/14 + 4/7π. */
const OVERCAST_UPRIGHT = 3 / 14 + 4 / (7 * Math.PI);

/** Adds a weighted share for each month. */
function addTo(sums: Float64Array, shares: Float64Array, weight: number): void {
  for (let k = 0; k < sums.length; k++) sums[k] = sums[k]! + shares[k]! * weight;
}

function uprightSkies(shade: WindowShade, months: readonly number[]): readonly WindowSky[] {
  const { a, b, overcast } = UPRIGHT;
  const count = a.length;
  const sums = (): Float64Array => new Float64Array(months.length);
  const seen = { sky: sums(), overcast: sums(), ground: sums(), horizon: sums() };
  const open = sums();
  for (let i = 0; i < count; i++) {
    openShares(shade, a[i]!, b[i]!, months, open);
    addTo(seen.sky, open, 1);
    addTo(seen.overcast, open, overcast[i]!);
    openShares(shade, a[i]!, -b[i]!, months, open);
    addTo(seen.ground, open, 1);
  }
  for (let i = 0; i < HORIZON_DIRECTIONS; i++) {
    // Even in the sine of the angle from the normal, which is what the cosine weighs by.
    const sine = (2 * (i + 0.5)) / HORIZON_DIRECTIONS - 1;
    openShares(shade, sine / Math.sqrt(1 - sine * sine), 0, months, open);
    addTo(seen.horizon, open, 1);
  }
  return months.map((_, k) => ({
    sky: seen.sky[k]! / (2 * count),
    horizon: seen.horizon[k]! / HORIZON_DIRECTIONS,
    ground: seen.ground[k]! / (2 * count),
    overcast: OVERCAST_UPRIGHT * Math.min(1, seen.overcast[k]!),
  }));
}

function levelSkies(shade: WindowShade, months: readonly number[]): readonly WindowSky[] {
  const { a, b, overcast } = LEVEL;
  const sky = new Float64Array(months.length);
  const light = new Float64Array(months.length);
  const open = new Float64Array(months.length);
  for (let i = 0; i < a.length; i++) {
    openShares(shade, a[i]!, b[i]!, months, open);
    addTo(sky, open, 1);
    addTo(light, open, overcast[i]!);
  }
  return months.map((_, k) => ({ sky: sky[k]! / a.length, horizon: 0, ground: 0, overcast: Math.min(1, light[k]!) }));
}

/**
 * The upper half of the projected dome: the direction (sin ψ, cos ψ sin Γ, cos ψ cos Γ) has cos θ dω = cos²ψ cos Γ dψ dΓ, so
 * it is even in sin Γ and in (ψ + sin ψ cos ψ).
 */
const UPRIGHT = lattice(UPRIGHT_LATTICE, (u, v) => {
  const target = Math.PI * (v - 0.5);
  let psi = target / 2;
  for (let k = 0; k < 40; k++)
    psi -= (psi + maths.sin(psi) * maths.cos(psi) - target) / (2 * maths.square(maths.cos(psi)) + 1e-12);
  const cos = Math.sqrt(1 - u * u);
  return { a: maths.tan(psi) / cos, b: u / cos, sine: maths.cos(psi) * u };
});

/** The whole projected dome, a disc: even in the square of the radius and in the angle. */
const LEVEL = lattice(LEVEL_LATTICE, (u, v) => {
  const cos = Math.sqrt(1 - u);
  const slope = Math.sqrt(u) / cos;
  return { a: slope * maths.cos(2 * Math.PI * v), b: slope * maths.sin(2 * Math.PI * v), sine: cos };
});

/** @param place  slopes and sine of the altitude of the direction at a place in the unit square */
function lattice(
  [count, stride]: readonly [number, number],
  place: (u: number, v: number) => { a: number; b: number; sine: number },
): Lattice {
  const all = Array.from({ length: count }, (_, i) => place((i + 0.5) / count, (((i * stride) % count) + 0.5) / count));
  const light = all.reduce((sum, d) => sum + 1 + 2 * d.sine, 0);
  return {
    a: Float64Array.from(all, (d) => d.a),
    b: Float64Array.from(all, (d) => d.b),
    overcast: Float64Array.from(all, (d) => (1 + 2 * d.sine) / light),
  };
}
