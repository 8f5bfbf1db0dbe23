import * as maths from '../maths/maths.ts';
import { DEG, toDegrees, wrap180 } from '../units/angle.ts';
import { heliocentric } from './heliocentric.ts';
import { meanObliquity_deg, nutation } from './nutation.ts';

/** The sun from the centre of the Earth at one instant: everything that is the same for all observers. */
export type GeocentricSun = {
  /** Unit vector in the true equator and equinox of the date: x to the equinox, z to the north pole. */
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly distance_au: number;
  /** Apparent ecliptic longitude, with nutation and aberration [°], not reduced to one turn. */
  readonly apparentLongitude_deg: number;
  /** Apparent minus mean sidereal time: nutation in longitude times cos of the obliquity [°]. */
  readonly equationOfEquinoxes_deg: number;
  readonly nutationLongitude_deg: number;
  readonly nutationObliquity_deg: number;
  readonly obliquity_deg: number;
  readonly heliocentricLongitude_deg: number;
  readonly heliocentricLatitude_deg: number;
};

/**
 * The apparent place of the sun.
 * @param days_TT days of terrestrial time from J2000; the series hold from −2000 to 6000
 * @see Reda & Andreas 2004, sections 3.2 to 3.8 and 3.9–3.10 written as a rotation of the unit vector about the line of the
 *      equinoxes by the obliquity, which is what their equations 30 and 31 say for right ascension and declination
 */
export function geocentricSun(days_TT: number): GeocentricSun {
  const T = days_TT / 36525;
  const earth = heliocentric(T / 10);
  const shift = nutation(T);
  const obliquity_deg = meanObliquity_deg(T) + shift.obliquity_deg;
  const aberration_deg = -20.4898 / (3600 * earth.distance_au);
  const heliocentricLongitude_deg = toDegrees(earth.longitude_rad);
  const apparentLongitude_deg = heliocentricLongitude_deg + 180 + shift.longitude_deg + aberration_deg;
  const lambda = apparentLongitude_deg * DEG;
  const beta = -earth.latitude_rad;
  const epsilon = obliquity_deg * DEG;
  const cosEpsilon = maths.cos(epsilon);
  const sinEpsilon = maths.sin(epsilon);
  const across = maths.cos(beta) * maths.sin(lambda);
  const up = maths.sin(beta);
  return {
    x: maths.cos(beta) * maths.cos(lambda),
    y: across * cosEpsilon - up * sinEpsilon,
    z: across * sinEpsilon + up * cosEpsilon,
    distance_au: earth.distance_au,
    apparentLongitude_deg,
    equationOfEquinoxes_deg: shift.longitude_deg * cosEpsilon,
    nutationLongitude_deg: shift.longitude_deg,
    nutationObliquity_deg: shift.obliquity_deg,
    obliquity_deg,
    heliocentricLongitude_deg,
    heliocentricLatitude_deg: toDegrees(earth.latitude_rad),
  };
}

/** Right ascension of the sun [°], (−180, 180]. */
export const rightAscension_deg = (sun: GeocentricSun): number => toDegrees(maths.atan2(sun.y, sun.x));

/** Declination of the sun [°]. */
export const declination_deg = (sun: GeocentricSun): number => toDegrees(maths.atan2(sun.z, Math.hypot(sun.x, sun.y)));

/** Coefficients of the sun's mean longitude in thousands of Julian years [°]. Reda & Andreas 2004, equation A2. */
const MEAN_LONGITUDE = [280.4664567, 360007.6982779, 0.03032028, 1 / 49931, -1 / 15300, -1 / 2000000] as const;

/**
 * Equation of time: apparent minus mean solar time; positive when the sundial is ahead of the clock.
 * @param days_TT days of terrestrial time from J2000
 * @param sun     the sun at that instant
 * @returns minutes, about −14.3 to 16.5
 * @see Reda & Andreas 2004, appendix A.1
 */
export function equationOfTime_min(days_TT: number, sun: GeocentricSun): number {
  const t = days_TT / 365250;
  const mean_deg = MEAN_LONGITUDE.reduceRight((sum, c) => sum * t + c, 0);
  return 4 * wrap180(mean_deg - 0.0057183 - rightAscension_deg(sun) + sun.equationOfEquinoxes_deg);
}
