import { wrap180 } from '../units/angle.ts';
import { offset_min } from './civil.ts';

/** Clocks stray from the sun by up to three hours (the west of China keeps Beijing's); more is most likely a mistake [h]. */
const ODD_h = 3;

/**
 * Whether a zone's clock stands more than three hours from the mean sun of a longitude: a sign turned round (east for west)
 * or a zone from elsewhere.
 * @param zone          of the time zone database
 * @param longitude_deg any
 * @param instant_ms    UTC, for the offset in force
 * @throws {RangeError} on no such zone
 */
export function zoneDisagrees(zone: string, longitude_deg: number, instant_ms: number): boolean {
  // Compared around the clock: on either side of the date line the same hour carries two dates.
  const apart_deg = wrap180((offset_min(instant_ms, zone) / 60) * 15 - longitude_deg);
  return Math.abs(apart_deg) / 15 > ODD_h;
}
