/**
 * Mean sidereal time at Greenwich.
 * @param days days of universal time from J2000
 * @returns degrees, reduced to (−360, 360) so that later sums keep their digits
 * @see Reda & Andreas 2004, equation 28, after Meeus 1998, equation 12.4
 */
export function meanSiderealTime_deg(days: number): number {
  const T = days / 36525;
  // 360.98…·days without the whole turns of the whole days, which would only cost digits.
  const turn = (days % 1) * 360;
  return (280.46061837 + turn + 0.98564736629 * days + T * T * (0.000387933 - T / 38710000)) % 360;
}
