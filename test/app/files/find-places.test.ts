import { expect, test } from 'vitest';
import { findPlaces } from '../../../app/files/find-places.ts';
import { contract } from '../../../app/contract/host.ts';

test('a town is found by the start of its name, with its zone, in the form of the contract', async () => {
  const found = contract['place:search'].reply.parse(await findPlaces('bristol, gb'));
  // Bristol: 51.45° N 2.58° W (any atlas); the zone of England.
  expect(found.places[0]).toMatchObject({ name: 'Bristol', country: 'GB', zone: 'Europe/London' });
  expect(Math.abs((found.places[0]?.latitude ?? 0) - 51.45)).toBeLessThan(0.05);
  expect(Math.abs((found.places[0]?.longitude ?? 0) + 2.58)).toBeLessThan(0.05);
  expect(found.credit).toContain('GeoNames');
});

test('no more than twelve, and none for nothing', async () => {
  expect((await findPlaces('san')).places.length).toBe(12);
  expect((await findPlaces('  ')).places).toEqual([]);
  expect((await findPlaces('no such town at all')).places).toEqual([]);
});
