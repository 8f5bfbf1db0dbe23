import { searchPlaces } from '../../core/sun/places.ts';
import { zoneOfPlace } from '../../core/sun/zone-of-place.ts';
import type { Answer } from '../contract/host.ts';
import { GAZETTEER_CREDIT, gazetteer } from './gazetteer.ts';

const MOST = 12;

/** Places of the bundled gazetteer by name, each with the zone that it most likely keeps. */
export async function findPlaces(text: string): Promise<Answer<'place:search'>> {
  const found = searchPlaces(await gazetteer(), text, MOST);
  return {
    credit: GAZETTEER_CREDIT,
    places: found.map(({ name, country, region, latitude_deg, longitude_deg }) => ({
      name,
      country,
      region,
      latitude: latitude_deg,
      longitude: longitude_deg,
      zone: zoneOfPlace(latitude_deg, longitude_deg),
    })),
  };
}
