import * as maths from '../maths/maths.ts';
import { DEG } from '../units/angle.ts';
import type { Observer } from './position.ts';

/** An observer's place made ready: what every position seen from there shares. */
export type Station = {
  readonly sinLatitude: number;
  readonly cosLatitude: number;
  readonly longitude_rad: number;
  /** From the Earth's axis and from the plane of the equator, in equatorial radii (x and y of the paper). */
  readonly fromAxis: number;
  readonly fromEquator: number;
};

/** Polar by equatorial radius of the Earth, and the equatorial radius [m]. Reda & Andreas 2004, equations 34–36. */
const FLATTENING = 0.99664719;
const EARTH_RADIUS_m = 6378140;

/**
 * @param observer latitude −90 to 90, any longitude, elevation in metres above the sea
 * @see Reda & Andreas 2004, equations 34–36
 */
export function stationOf(observer: Observer): Station {
  const latitude = observer.latitude_deg * DEG;
  const sinLatitude = maths.sin(latitude);
  const cosLatitude = maths.cos(latitude);
  const u = maths.atan2(FLATTENING * sinLatitude, cosLatitude);
  const height = observer.elevation_m / EARTH_RADIUS_m;
  return {
    sinLatitude,
    cosLatitude,
    longitude_rad: observer.longitude_deg * DEG,
    fromAxis: maths.cos(u) + height * cosLatitude,
    fromEquator: FLATTENING * maths.sin(u) + height * sinLatitude,
  };
}

/** A direction over the horizon; a plain record that kernels fill again and again. */
export type Direction = { azimuth_rad: number; altitude_rad: number };

/** Horizontal parallax of the sun at one astronomical unit [rad]: 8.794″. Reda & Andreas 2004, equation 33. */
const PARALLAX_rad = (8.794 / 3600) * DEG;

/**
 * The sun over a station's horizon, with parallax, without refraction.
 *
 * The observer's place, scaled by the sine of the parallax, is taken off the sun's unit vector; the rest is turned to the
 * meridian and to the latitude. That is what the paper's equations 37–41, 45 and 46 come to, with two inverse functions in
 * place of nine and no loss of digits near the zenith.
 * @param x,y,z        unit vector of the geocentric sun, true equator and equinox
 * @param distance_au  of the sun
 * @param sidereal_rad apparent sidereal time at Greenwich
 * @param out          is given azimuth [0, 2π), clockwise from true north, and true altitude
 * @see Reda & Andreas 2004, sections 3.11–3.15
 */
export function lookFrom(
  station: Station,
  x: number,
  y: number,
  z: number,
  distance_au: number,
  sidereal_rad: number,
  out: Direction,
): void {
  const { sinLatitude, cosLatitude, fromAxis, fromEquator } = station;
  const theta = sidereal_rad + station.longitude_rad;
  const c = maths.cos(theta);
  const s = maths.sin(theta);
  const parallax = maths.sin(PARALLAX_rad / distance_au);
  const meridian = x * c + y * s - fromAxis * parallax;
  const west = x * s - y * c;
  const pole = z - fromEquator * parallax;
  const up = sinLatitude * pole + cosLatitude * meridian;
  const north = cosLatitude * pole - sinLatitude * meridian;
  const azimuth = maths.atan2(-west, north);
  out.azimuth_rad = azimuth < 0 ? azimuth + 2 * Math.PI : azimuth === 0 ? 0 : azimuth;
  out.altitude_rad = maths.atan2(up, Math.sqrt(west * west + north * north));
}
