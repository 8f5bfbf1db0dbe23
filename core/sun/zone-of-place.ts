import tzLookup from '@photostructure/tz-lookup';
import { isZone } from './civil.ts';

/**
 * The time zone that a place most likely keeps: a suggestion for the user to confirm. The map behind it is coarse; near
 * borders one inhabited place in twenty gets a neighbour's zone with other clocks (by its makers' own count).
 * @param latitude_deg  −90 to 90
 * @param longitude_deg −180 to 180
 * @returns a name of the time zone database; null where the map's name is not known to this host, or the place is none
 */
export function zoneOfPlace(latitude_deg: number, longitude_deg: number): string | null {
  if (!(Math.abs(latitude_deg) <= 90 && Math.abs(longitude_deg) <= 180)) return null;
  const zone = tzLookup(latitude_deg, longitude_deg);
  return isZone(zone) ? zone : null;
}
