import { describe, expect, test } from 'vitest';
import { foldName, type Place, searchPlaces } from '../../../core/sun/places.ts';
import { zoneDisagrees } from '../../../core/sun/zone-disagrees.ts';
import { zoneOfPlace } from '../../../core/sun/zone-of-place.ts';

const place = (name: string, country: string, population: number, region = ''): Place => ({
  name,
  country,
  region,
  latitude_deg: 0,
  longitude_deg: 0,
  population,
  folded: foldName(name),
});

const list = [
  place('York', 'GB', 144_000, 'ENG'),
  place('New York City', 'US', 8_175_000, 'NY'),
  place('Yorktown', 'US', 200, 'VA'),
  place('Zürich', 'CH', 341_000, 'ZH'),
  place('Łódź', 'PL', 768_000),
  place('Ærøskøbing', 'DK', 950),
  place('Saint-Étienne', 'FR', 176_000),
  place('L’Aquila', 'IT', 68_000),
  place('Bristol', 'GB', 617_000, 'ENG'),
  place('Bristol', 'US', 26_000, 'TN'),
  place('Bristol', 'US', 60_000, 'CT'),
];

const found = (text: string, most?: number) => searchPlaces(list, text, most).map((p) => `${p.name} ${p.country}`);

describe('searching places', () => {
  test('the start of the name first, then of a later word; the largest first', () => {
    expect(found('york')).toEqual(['York GB', 'Yorktown US', 'New York City US']);
    expect(found('bristol').slice(0, 2)).toEqual(['Bristol GB', 'Bristol US']);
    expect(found('bristol', 1)).toEqual(['Bristol GB']);
  });

  test.each([
    ['zurich', 'Zürich CH'],
    ['ZÜR', 'Zürich CH'],
    ['lodz', 'Łódź PL'],
    ['aeroskobing', 'Ærøskøbing DK'],
    ['saint etienne', 'Saint-Étienne FR'],
    ['saint-é', 'Saint-Étienne FR'],
    ["l'aquila", 'L’Aquila IT'],
    ['etienne', 'Saint-Étienne FR'],
  ])('%s finds %s', (text, name) => expect(found(text)).toEqual([name]));

  test('a comma narrows by country or region', () => {
    expect(found('bristol, gb')).toEqual(['Bristol GB']);
    expect(searchPlaces(list, 'Bristol, TN').map((p) => p.population)).toEqual([26_000]);
    expect(found('bristol,')).toHaveLength(3);
  });

  test('nothing for nothing, and for what is not there', () => {
    expect(found('')).toEqual([]);
    expect(found('   ')).toEqual([]);
    expect(found('ork')).toEqual([]);
  });

  test('the order of the list does not matter', () => {
    expect(searchPlaces([...list].reverse(), 'b')).toEqual(searchPlaces(list, 'b'));
  });
});

describe('zone of a place', () => {
  // What these cities keep is common knowledge (time zone database, zone1970.tab).
  test.each([
    [51.5074, -0.1278, 'Europe/London'],
    [40.7128, -74.006, 'America/New_York'],
    [-33.8688, 151.2093, 'Australia/Sydney'],
    [27.7172, 85.324, 'Asia/Kathmandu'],
    [69.6492, 18.9553, 'Europe/Oslo'],
    [-34.6037, -58.3816, 'America/Argentina/Buenos_Aires'],
  ])('%d, %d keeps %s', (latitude, longitude, zone) => expect(zoneOfPlace(latitude, longitude)).toBe(zone));

  test('no place, no zone; the poles and the dates line have one', () => {
    expect(zoneOfPlace(91, 0)).toBeNull();
    expect(zoneOfPlace(0, 540)).toBeNull();
    expect(zoneOfPlace(Number.NaN, 0)).toBeNull();
    for (const [latitude, longitude] of [
      [90, 0],
      [-90, 0],
      [0, 180],
      [0, -180],
    ] as const)
      expect(zoneOfPlace(latitude, longitude)).not.toBeNull();
  });

  const june = Date.UTC(2025, 5, 21);

  test('a sign turned round is noticed', () => {
    expect(zoneDisagrees('Australia/Sydney', 151.2, june)).toBe(false);
    expect(zoneDisagrees('Australia/Sydney', -151.2, june)).toBe(true);
    expect(zoneDisagrees('America/New_York', 74, june)).toBe(true);
    expect(zoneDisagrees('Europe/London', 103.8, june)).toBe(true);
  });

  test('clocks far from the sun by law are let be: Galicia in summer, Kashgar, Samoa and Kiribati past the date line', () => {
    expect(zoneDisagrees('Europe/Madrid', -9.2, june)).toBe(false);
    expect(zoneDisagrees('Asia/Shanghai', 75.99, june)).toBe(false);
    expect(zoneDisagrees('Pacific/Apia', -171.8, june)).toBe(false);
    expect(zoneDisagrees('Pacific/Kiritimati', -157.4, june)).toBe(false);
  });
});
