import { DEG, toDegrees, wrap180 } from '../units/angle.ts';
import { dayBounds } from './civil.ts';
import { deltaT_s } from './delta-t.ts';
import { geocentricSun, rightAscension_deg } from './geocentric.ts';
import { daysFromJ2000 } from './julian.ts';
import type { Observer } from './position.ts';
import { lowestBetween, rootBetween } from './root.ts';
import { meanSiderealTime_deg } from './sidereal.ts';
import { type SunSight, sunTrack } from './sun-track.ts';

/** True altitude of the sun's centre when its upper edge stands on a sea horizon: 34′ of refraction, 16′ of radius [°]. */
export const RISING_deg = -0.8333;

const DAY_ms = 86_400_000;
const QUARTER_ms = DAY_ms / 4;
const NEAR_ms = 1;

/** Rising, highest and setting sun of one civil day. */
export type SunEvents = {
  /** Before the transit; on the evening before where summer nights are short. Null when the sun does not rise then. */
  readonly sunrise_ms: number | null;
  /** When the sun crosses the meridian, the transit nearest to the middle of the civil day. */
  readonly transit_ms: number;
  /** After the transit; past midnight where summer nights are short. Null when the sun does not set then. */
  readonly sunset_ms: number | null;
  /** `never-rises`: polar night. `never-sets`: polar day. On the days between, one of sunrise and sunset may be null. */
  readonly state: 'rises' | 'never-rises' | 'never-sets';
  /** True altitude at the transit. */
  readonly transitAltitude_deg: number;
};

/**
 * How far the sea horizon lies below the level for an eye above it, refraction counted.
 * @param height_m of the eye above the sea or plain, 0 or more
 * @returns degrees
 * @see The Nautical Almanac, altitude correction tables: dip = 1.76′·√height
 */
export const horizonDip_deg = (height_m: number): number => (1.76 * Math.sqrt(height_m)) / 60;

/** How far the sun stands past the meridian [°], (−180, 180]. */
function hourAngle_deg(instant_ms: number, observer: Observer): number {
  const days = daysFromJ2000(instant_ms);
  const sun = geocentricSun(days + (observer.deltaT_s ?? deltaT_s(instant_ms)) / 86400);
  const sidereal = meanSiderealTime_deg(days) + sun.equationOfEquinoxes_deg;
  return wrap180(sidereal + observer.longitude_deg - rightAscension_deg(sun));
}

/** The passing of an hour angle that is nearest to an instant. Each turn leaves a thousandth of the error before it. */
function passing_ms(hour_deg: number, near_ms: number, observer: Observer): number {
  let t = near_ms;
  for (let turn = 0; turn < 5; turn++) t -= (wrap180(hourAngle_deg(t, observer) - hour_deg) / 360) * DAY_ms;
  return t;
}

/**
 * Sunrise, transit and sunset of a civil day, by root search on the sun's place itself (not by the procedure of appendix A.2
 * of the paper, which interpolates between days and leaves parallax out).
 *
 * The search runs from the lowest sun of the night before over the highest of the day to the lowest of the night after, so
 * every crossing of the horizon belongs to one day and short polar days and nights are not missed.
 * @param date     YYYY-MM-DD
 * @param zone     of the time zone database
 * @param observer as for `sunPosition`. The height above the sea counts in the parallax only; see `dip_deg`
 * @param dip_deg  lowers the horizon: `horizonDip_deg` of the height over the land or sea around; 0, a level horizon
 * @throws {RangeError} on no such date or zone
 */
export function sunEvents(date: string, zone: string, observer: Observer, dip_deg = 0): SunEvents {
  const track = sunTrack(observer);
  const sight: SunSight = { azimuth_rad: 0, altitude_rad: 0, distance_au: 1 };
  const limit_rad = (RISING_deg - dip_deg) * DEG;
  const above = (t: number): number => {
    track(t, sight);
    return sight.altitude_rad - limit_rad;
  };
  const below = (t: number): number => -above(t);
  const { start_ms, end_ms } = dayBounds(date, zone);
  const transit_ms = passing_ms(0, (start_ms + end_ms) / 2, observer);
  const lowest = (near_ms: number): number => {
    const midnight = passing_ms(180, near_ms, observer);
    return lowestBetween(above, midnight - QUARTER_ms, midnight + QUARTER_ms, NEAR_ms);
  };
  const before = lowest(transit_ms - DAY_ms / 2);
  const after = lowest(transit_ms + DAY_ms / 2);
  const top = lowestBetween(below, transit_ms - QUARTER_ms, transit_ms + QUARTER_ms, NEAR_ms);
  const shines = above(top) >= 0;
  const darkBefore = above(before) < 0;
  const darkAfter = above(after) < 0;
  return {
    sunrise_ms: shines && darkBefore ? rootBetween(above, before, top, NEAR_ms) : null,
    transit_ms,
    sunset_ms: shines && darkAfter ? rootBetween(above, top, after, NEAR_ms) : null,
    state: !shines ? 'never-rises' : darkBefore || darkAfter ? 'rises' : 'never-sets',
    transitAltitude_deg: toDegrees(above(transit_ms) + limit_rad),
  };
}
