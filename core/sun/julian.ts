/** Noon of 1 January 2000, from which the algorithm counts its days [UTC ms]. */
const J2000_ms = 946_728_000_000;
const DAY_ms = 86_400_000;

/**
 * Days from J2000 (JD 2 451 545.0). Counting from J2000 and not from the start of the Julian period keeps eleven digits
 * after the point, where a Julian day in double precision has nine: the sidereal time is 1e-7° better for it.
 * @param instant_ms UTC, taken as universal time (UT1; the two stay within 0.9 s)
 * @returns days of universal time, any sign
 */
export const daysFromJ2000 = (instant_ms: number): number => (instant_ms - J2000_ms) / DAY_ms;

/** The inverse of `daysFromJ2000`. @param days from J2000 @returns UTC milliseconds, not rounded */
export const instantFromJ2000_ms = (days: number): number => days * DAY_ms + J2000_ms;

/** Julian day. @param instant_ms UTC milliseconds @returns days, good to 4e-5 s */
export const julianDay = (instant_ms: number): number => daysFromJ2000(instant_ms) + 2_451_545;
