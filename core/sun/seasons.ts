import { wrap180 } from '../units/angle.ts';
import { geocentricSun } from './geocentric.ts';
import { daysFromJ2000 } from './julian.ts';
import { rootBetween } from './root.ts';
import { instantOfTerrestrial_ms } from './terrestrial.ts';

/** The equinoxes and solstices of a year [UTC ms]. June and December, not summer and winter: half the world has them the other way. */
export type Seasons = {
  readonly marchEquinox_ms: number;
  readonly juneSolstice_ms: number;
  readonly septemberEquinox_ms: number;
  readonly decemberSolstice_ms: number;
};

/** A tenth of a second, in days; the sun's longitude itself is good to 25 s of time. */
const NEAR_days = 0.1 / 86400;

/** When the sun's apparent longitude passes a value in the days 14 to 28 of a month. @returns days of terrestrial time */
function passing_TT(longitude_deg: number, year: number, month: number): number {
  const past = (days_TT: number): number => wrap180(geocentricSun(days_TT).apparentLongitude_deg - longitude_deg);
  return rootBetween(
    past,
    daysFromJ2000(Date.UTC(year, month - 1, 14)),
    daysFromJ2000(Date.UTC(year, month - 1, 28)),
    NEAR_days,
  );
}

/**
 * The four seasons' instants: apparent longitude of the sun 0, 90, 180 and 270°, by the full series.
 * @param year 1900 to 2100
 * @returns UTC ms; a second's accuracy from the search, some ten to twenty from the shortened series, and beyond 2030 that
 *          of the predicted ΔT
 * @throws {RangeError} outside 1860 to 2149
 * @see J. Meeus, Astronomical Algorithms, 2nd edition 1998, chapter 27, "higher accuracy"
 */
export const seasons = (year: number): Seasons => ({
  marchEquinox_ms: instantOfTerrestrial_ms(passing_TT(0, year, 3)),
  juneSolstice_ms: instantOfTerrestrial_ms(passing_TT(90, year, 6)),
  septemberEquinox_ms: instantOfTerrestrial_ms(passing_TT(180, year, 9)),
  decemberSolstice_ms: instantOfTerrestrial_ms(passing_TT(270, year, 12)),
});
