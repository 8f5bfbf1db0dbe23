import * as maths from '../maths/maths.ts';

/** Luminance of a point of the sky over that of the zenith. `fromSun_rad`: difference of azimuth to the sun. */
export type RelativeLuminance = (altitude_rad: number, fromSun_rad: number) => number;

/**
 * Traditional CIE overcast sky: three times as bright at the zenith as at the horizon, the same all round.
 * @see CIE (1955), after P. Moon, D. E. Spencer, Illuminating Engineering 37, 707–726 (1942); kept in ISO 15469:2004 as the
 *      sixteenth sky
 */
export const overcastLuminance: RelativeLuminance = (altitude_rad) => (1 + 2 * maths.sin(altitude_rad)) / 3;

/** Horizontal illuminance of the traditional overcast sky over its zenith luminance: ∫ L sin γ dω = 7π/9 [sr]. */
export const OVERCAST_LEVEL_sr = (7 * Math.PI) / 9;

/** Vertical over horizontal illuminance under the traditional overcast sky, nothing in front: 3/14 + 4/(7π) = 0.396. */
export const OVERCAST_VERTICAL = 3 / 14 + 4 / (7 * Math.PI);

/** One of the CIE general skies: a and b shape the fall from zenith to horizon, c, d and e the brightness round the sun. */
export type GeneralSky = {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly d: number;
  readonly e: number;
  readonly name: string;
};

const sky = (a: number, b: number, c: number, d: number, e: number, name: string): GeneralSky => ({
  a,
  b,
  c,
  d,
  e,
  name,
});

/** The fifteen skies, type 1 first. ISO 15469:2004 (CIE S 011/E:2003). */
export const GENERAL_SKIES: readonly GeneralSky[] = [
  sky(4, -0.7, 0, -1, 0, 'overcast, steep, the same all round'),
  sky(4, -0.7, 2, -1.5, 0.15, 'overcast, steep, slightly brighter towards the sun'),
  sky(1.1, -0.8, 0, -1, 0, 'overcast, moderate, the same all round'),
  sky(1.1, -0.8, 2, -1.5, 0.15, 'overcast, moderate, slightly brighter towards the sun'),
  sky(0, -1, 0, -1, 0, 'evenly bright'),
  sky(0, -1, 2, -1.5, 0.15, 'partly cloudy, even, slightly brighter towards the sun'),
  sky(0, -1, 5, -2.5, 0.3, 'partly cloudy, even, brighter round the sun'),
  sky(0, -1, 10, -3, 0.45, 'partly cloudy, even, distinct corona'),
  sky(-1, -0.55, 2, -1.5, 0.15, 'partly cloudy, sun hidden'),
  sky(-1, -0.55, 5, -2.5, 0.3, 'partly cloudy, brighter round the sun'),
  sky(-1, -0.55, 10, -3, 0.45, 'white-blue, distinct corona'),
  sky(-1, -0.32, 10, -3, 0.45, 'clear, clean air'),
  sky(-1, -0.32, 16, -3, 0.3, 'clear, polluted air'),
  sky(-1, -0.15, 16, -3, 0.3, 'cloudless, hazy, broad corona'),
  sky(-1, -0.15, 24, -2.8, 0.15, 'white-blue, hazy, broad corona'),
];

/**
 * A CIE general sky with the sun at a place. Only its shape is given: scale it with a zenith luminance or with a horizontal
 * illuminance (`levelShare_sr`).
 * @param type            1 to 15
 * @param sunZenith_rad   zenith angle of the sun, 0 to π/2
 * @throws {RangeError}   when there is no such type
 * @see ISO 15469:2004 (CIE S 011/E:2003)
 */
export function generalSky(type: number, sunZenith_rad: number): RelativeLuminance {
  const kind = GENERAL_SKIES[type - 1];
  if (!kind) throw new RangeError(`no such sky: ${type}; the general skies are 1 to 15`);
  const { a, b, c, d, e } = kind;
  // exp(b/cos Z) tends to 0 at the horizon, so the gradation tends to 1; b is negative in every row.
  const gradation = (cosZ: number): number => (cosZ > 0 ? 1 + a * maths.exp(b / cosZ) : 1);
  const corona = (chi: number, cosChi: number): number =>
    1 + c * (maths.exp(d * chi) - maths.exp((d * Math.PI) / 2)) + e * cosChi * cosChi;
  const cosSun = maths.cos(sunZenith_rad);
  const sinSun = maths.sin(sunZenith_rad);
  const zenith = corona(sunZenith_rad, cosSun) * gradation(1);
  return (altitude_rad, fromSun_rad) => {
    const cosZ = maths.sin(altitude_rad);
    const cosChi = Math.min(1, Math.max(-1, cosSun * cosZ + sinSun * maths.cos(altitude_rad) * maths.cos(fromSun_rad)));
    return (corona(maths.acos(cosChi), cosChi) * gradation(cosZ)) / zenith;
  };
}

/** Midpoints over a quarter turn; with 180 the sums below stand within 1e-4 of the closed forms. */
const RINGS = 180;

/** Horizontal illuminance of an open sky over its zenith luminance: ∫ L sin γ dω [sr]; π for an even sky. */
export function levelShare_sr(luminance: RelativeLuminance): number {
  return dome(luminance, (altitude) => maths.sin(altitude), -Math.PI, Math.PI);
}

/**
 * Illuminance of an open vertical plane over the zenith luminance [sr]; π/2 for an even sky.
 * @param bearingFromSun_rad  of the plane's normal, from the sun's azimuth
 */
export function verticalShare_sr(luminance: RelativeLuminance, bearingFromSun_rad: number): number {
  const facing = (altitude: number, azimuth: number): number =>
    maths.cos(altitude) * maths.cos(azimuth - bearingFromSun_rad);
  return dome(luminance, facing, bearingFromSun_rad - Math.PI / 2, bearingFromSun_rad + Math.PI / 2);
}

function dome(
  luminance: RelativeLuminance,
  cosine: (altitude_rad: number, azimuth_rad: number) => number,
  from_rad: number,
  to_rad: number,
): number {
  const high = Math.PI / 2 / RINGS;
  const spokes = Math.round((to_rad - from_rad) / high);
  const wide = (to_rad - from_rad) / spokes;
  let sum = 0;
  for (let i = 0; i < RINGS; i++) {
    const altitude = (i + 0.5) * high;
    // Solid angle of the patch, exactly: the ring's height in sine times the width of the spoke.
    const patch = (maths.sin((i + 1) * high) - maths.sin(i * high)) * wide;
    for (let k = 0; k < spokes; k++) {
      const azimuth = from_rad + (k + 0.5) * wide;
      sum += luminance(altitude, azimuth) * cosine(altitude, azimuth) * patch;
    }
  }
  return sum;
}
