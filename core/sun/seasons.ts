import { wrap180 } from '../units/angle.ts';
import { geocentricSun } from './geocentric.ts';
import { daysFromJ2000 } from './julian.ts';
import { instantOfTerrestrial_ms } from './terrestrial.ts';

/** The equinoxes and solstices of a year [UTC ms]. June and December, not summer and winter: half the world has them the other way. */
export type Seasons = {
  readonly marchEquinox_ms: number;
  readonly juneSolstice_ms: number;
  readonly septemberEquinox_ms: number;
  readonly decemberSolstice_ms: number;
};

/** Mean motion of the sun in longitude [° a day]: a turn in the tropical year of 365.2422 days. */
const MEAN_MOTION = 360 / 365.2422;

/**
 * When the sun's apparent longitude passes a value near the 21st of a month. @returns days of terrestrial time
 *
 * The true motion is within 3.5 % of the mean, so each turn leaves at most that share of the error: after eight, less than a
 * millisecond of the first week.
 */
function passing_TT(longitude_deg: number, year: number, month: number): number {
  let days_TT = daysFromJ2000(Date.UTC(year, month - 1, 21));
  for (let turn = 0; turn < 8; turn++)
    days_TT -= wrap180(geocentricSun(days_TT).apparentLongitude_deg - longitude_deg) / MEAN_MOTION;
  return days_TT;
}

/**
 * The four seasons' instants: apparent longitude of the sun 0, 90, 180 and 270°, by the full series.
 * @param year 1900 to 2100
 * @returns UTC ms, good to some twenty seconds (the series are shortened), less where ΔT is a prediction
 * @throws {RangeError} outside 1860 to 2149
 * @see J. Meeus, Astronomical Algorithms, 2nd edition 1998, chapter 27, "higher accuracy"
 */
export const seasons = (year: number): Seasons => ({
  marchEquinox_ms: instantOfTerrestrial_ms(passing_TT(0, year, 3)),
  juneSolstice_ms: instantOfTerrestrial_ms(passing_TT(90, year, 6)),
  septemberEquinox_ms: instantOfTerrestrial_ms(passing_TT(180, year, 9)),
  decemberSolstice_ms: instantOfTerrestrial_ms(passing_TT(270, year, 12)),
});
