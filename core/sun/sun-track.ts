import { DEG } from '../units/angle.ts';
import { deltaT_s, nextMonth_ms } from './delta-t.ts';
import { daysFromJ2000 } from './julian.ts';
import type { Observer } from './position.ts';
import { meanSiderealTime_deg } from './sidereal.ts';
import { lookFrom, stationOf } from './station.ts';
import { type DatedSun, SunKnots } from './sun-knots.ts';

/** The sun over a horizon: azimuth [0, 2π) from true north, true altitude, distance. Filled again and again. */
export type SunSight = { azimuth_rad: number; altitude_rad: number; distance_au: number };

/** Fills a record with the sun at an instant [UTC ms]. */
export type SunTrack = (instant_ms: number, out: SunSight) => void;

/** Fills a record with the sun of an instant [UTC ms] and returns the apparent sidereal time at Greenwich [rad]. */
export type GreenwichSun = (instant_ms: number, out: DatedSun) => number;

/**
 * What a sun made ready has in common for all places.
 * @param given_s ΔT where the user gave one; else the published polynomials hold, years 1860 to 2149
 * @param knots   share one between all that look at the same dates
 */
export function greenwichSun(given_s: number | undefined, knots: SunKnots): GreenwichSun {
  // ΔT holds for a calendar month: asking the calendar for every sample would cost more than the sun.
  let delta_s = given_s ?? Number.NaN;
  let from_ms = given_s === undefined ? Number.POSITIVE_INFINITY : Number.NEGATIVE_INFINITY;
  let until_ms = Number.POSITIVE_INFINITY;
  return (instant_ms, out) => {
    if (instant_ms < from_ms || instant_ms >= until_ms) {
      delta_s = deltaT_s(instant_ms);
      from_ms = instant_ms;
      until_ms = nextMonth_ms(instant_ms);
    }
    const days = daysFromJ2000(instant_ms);
    knots.at(days + delta_s / 86400, out);
    return meanSiderealTime_deg(days) * DEG + out.equationOfEquinoxes_rad;
  };
}

/** A record for `GreenwichSun` and `SunKnots` to fill. */
export const emptySun = (): DatedSun => ({ x: 1, y: 0, z: 0, distance_au: 1, equationOfEquinoxes_rad: 0 });

/**
 * A sun made ready for many instants at one place: what depends on the date alone comes from `SunKnots` (within 2e-8°), what
 * depends on the time of day and the place is worked out in full. Ask in the order of time where you can: a new half day
 * costs some microseconds, the instants within it a tenth of one.
 * @param observer as for `sunPosition`
 * @param knots    share one between the tracks of several observers
 */
export function sunTrack(observer: Observer, knots: SunKnots = new SunKnots()): SunTrack {
  const station = stationOf(observer);
  const greenwich = greenwichSun(observer.deltaT_s, knots);
  const sun = emptySun();
  return (instant_ms, out) => {
    const sidereal_rad = greenwich(instant_ms, sun);
    lookFrom(station, sun.x, sun.y, sun.z, sun.distance_au, sidereal_rad, out);
    out.distance_au = sun.distance_au;
  };
}
