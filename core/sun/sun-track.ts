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

/**
 * A sun made ready for many instants at one place: what depends on the date alone comes from `SunKnots` (within 2e-8°), what
 * depends on the time of day and the place is worked out in full. Ask in the order of time where you can: a new half day
 * costs some microseconds, the instants within it a tenth of one.
 * @param observer as for `sunPosition`
 * @param knots    share one between the tracks of several observers
 */
export function sunTrack(observer: Observer, knots: SunKnots = new SunKnots()): SunTrack {
  const station = stationOf(observer);
  const sun: DatedSun = { x: 1, y: 0, z: 0, distance_au: 1, equationOfEquinoxes_rad: 0 };
  // ΔT holds for a calendar month: asking the calendar for every sample would cost more than the sun.
  let delta_s = observer.deltaT_s ?? Number.NaN;
  let from_ms = observer.deltaT_s === undefined ? Number.POSITIVE_INFINITY : Number.NEGATIVE_INFINITY;
  let until_ms = Number.POSITIVE_INFINITY;
  return (instant_ms, out) => {
    if (instant_ms < from_ms || instant_ms >= until_ms) {
      delta_s = deltaT_s(instant_ms);
      from_ms = instant_ms;
      until_ms = nextMonth_ms(instant_ms);
    }
    const days = daysFromJ2000(instant_ms);
    knots.at(days + delta_s / 86400, sun);
    const sidereal_rad = meanSiderealTime_deg(days) * DEG + sun.equationOfEquinoxes_rad;
    lookFrom(station, sun.x, sun.y, sun.z, sun.distance_au, sidereal_rad, out);
    out.distance_au = sun.distance_au;
  };
}
