import { expect, test } from 'vitest';
import { gazetteer } from '../../../app/files/gazetteer.ts';
import { searchPlaces } from '../../../core/sun/places.ts';
import { zoneOfPlace } from '../../../core/sun/zone-of-place.ts';

test('the bundled gazetteer holds the towns of the world, largest first, once each', async () => {
  const places = await gazetteer();
  expect(places.length).toBeGreaterThan(100_000);
  expect(places[0]!.population).toBeGreaterThan(10_000_000);
  for (const p of places) {
    if (!(Math.abs(p.latitude_deg) <= 90 && Math.abs(p.longitude_deg) <= 180)) throw new Error(`${p.name} is nowhere`);
    if (p.name === '' || p.folded === '') throw new Error(`a place without a name at ${p.latitude_deg}`);
  }
  expect(await gazetteer()).toBe(places);
});

// Coordinates to a tenth of a degree: common knowledge, any atlas.
test.each([
  ['bristol', 'Bristol', 'GB', 51.5, -2.6, 'Europe/London'],
  ['zurich', 'Zürich', 'CH', 47.4, 8.5, 'Europe/Zurich'],
  ['sao paulo', 'São Paulo', 'BR', -23.5, -46.6, 'America/Sao_Paulo'],
  ['portland, or', 'Portland', 'US', 45.5, -122.7, 'America/Los_Angeles'],
  ['tromso', 'Tromsø', 'NO', 69.6, 19.0, 'Europe/Oslo'],
])('%s is found first', async (text, name, country, latitude, longitude, zone) => {
  const [first] = searchPlaces(await gazetteer(), text);
  expect(first).toMatchObject({ name, country });
  expect(Math.abs(first!.latitude_deg - latitude)).toBeLessThan(0.15);
  expect(Math.abs(first!.longitude_deg - longitude)).toBeLessThan(0.15);
  expect(zoneOfPlace(first!.latitude_deg, first!.longitude_deg)).toBe(zone);
});
