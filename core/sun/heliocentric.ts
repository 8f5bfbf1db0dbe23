import * as maths from '../maths/maths.ts';
import { DISTANCE, LATITUDE, LONGITUDE, type Series } from './earth-terms.ts';

/** One group of terms laid out flat (A, B, C, A, B, C …): the sums below run for every sun position, objects are too slow. */
const flat = (series: Series): readonly Float64Array[] => series.map((group) => Float64Array.from(group.flat()));

const longitude = flat(LONGITUDE);
const latitude = flat(LATITUDE);
const distance = flat(DISTANCE);

/** Σ tᵏ · Σ A·cos(B + C·t), in the units of A. */
function sum(groups: readonly Float64Array[], t: number): number {
  let total = 0;
  for (let k = groups.length - 1; k >= 0; k--) {
    const terms = groups[k] as Float64Array;
    let group = 0;
    for (let i = 0; i < terms.length; i += 3) group += terms[i]! * maths.cos(terms[i + 1]! + terms[i + 2]! * t);
    total = total * t + group;
  }
  return total * 1e-8;
}

/** Where the Earth stands as seen from the sun, mean ecliptic and equinox of the date. */
export type Heliocentric = {
  /** Not reduced to one turn. */
  readonly longitude_rad: number;
  readonly latitude_rad: number;
  readonly distance_au: number;
};

/**
 * The Earth's heliocentric place.
 * @param t thousands of Julian years of terrestrial time from J2000, −4 to 4
 * @see Reda & Andreas 2004, equations 9–12
 */
export const heliocentric = (t: number): Heliocentric => ({
  longitude_rad: sum(longitude, t),
  latitude_rad: sum(latitude, t),
  distance_au: sum(distance, t),
});

/** The distance alone. @param t as in `heliocentric` @returns astronomical units */
export const earthDistance_au = (t: number): number => sum(distance, t);
