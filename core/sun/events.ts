import * as maths from '../maths/maths.ts';
import { DEG, toDegrees, wrap180 } from '../units/angle.ts';
import { dayBounds } from './civil.ts';
import type { Observer } from './position.ts';
import { lowestBetween, rootBetween } from './root.ts';
import { SunKnots } from './sun-knots.ts';
import { emptySun, greenwichSun, type SunSight, sunTrack } from './sun-track.ts';

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

/** Finds the instant nearest to another at which the sun stands at an hour angle [°]: 0 highest, 180 lowest. */
type Passing = (hour_deg: number, near_ms: number) => number;

function passings(observer: Observer, knots: SunKnots): Passing {
  const greenwich = greenwichSun(observer.deltaT_s, knots);
  const sun = emptySun();
  return (hour_deg, near_ms) => {
    let t = near_ms;
    // Each turn leaves a thousandth of the error before it.
    for (let turn = 0; turn < 4; turn++) {
      const hourAngle = toDegrees(greenwich(t, sun) - maths.atan2(sun.y, sun.x)) + observer.longitude_deg;
      t -= (wrap180(hourAngle - hour_deg) / 360) * DAY_ms;
    }
    return t;
  };
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
 * @param knots    share one where many days are asked for
 * @throws {RangeError} on no such date or zone
 */
export function sunEvents(
  date: string,
  zone: string,
  observer: Observer,
  dip_deg = 0,
  knots: SunKnots = new SunKnots(),
): SunEvents {
  const track = sunTrack(observer, knots);
  const passing = passings(observer, knots);
  const sight: SunSight = { azimuth_rad: 0, altitude_rad: 0, distance_au: 1 };
  const limit_rad = (RISING_deg - dip_deg) * DEG;
  const above = (t: number): number => {
    track(t, sight);
    return sight.altitude_rad - limit_rad;
  };
  const below = (t: number): number => -above(t);
  const { start_ms, end_ms } = dayBounds(date, zone);
  const transit_ms = passing(0, (start_ms + end_ms) / 2);
  const lowest = (near_ms: number): number => {
    const midnight = passing(180, near_ms);
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
