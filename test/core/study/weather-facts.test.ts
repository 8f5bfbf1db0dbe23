import { expect, test } from 'vitest';
import { bytesHash, contentHash } from '../../../core/scheme/hash.ts';
import type { WeatherMapping } from '../../../core/sky/weather/mapping.ts';
import { weatherFacts } from '../../../core/study/weather-facts.ts';
import { asText, madeYear } from '../sky/weather/made-year.ts';

const mapping: WeatherMapping = {
  name: 'made up',
  delimiter: ';',
  decimal: '.',
  headLine: 2,
  time: { columns: ['when'], form: 'YYYY-MM-DD HH:mm', offset_h: 1, label: 'end', shift_min: 0 },
  air: 'mean',
  columns: [
    { quantity: 'global_Wm2', column: 'global', unit: 'W/m2' },
    { quantity: 'tAir_C', column: 'air', unit: 'C' },
  ],
  missing: [],
  place: { latitude: 10, longitude: 15, elevation: 0 },
};
const site = { latitude_deg: 10, longitude_deg: 15, elevation_m: 0 };

test('a year of weather in facts: rows, what it lacks, and sums that are those of its own rows', () => {
  const rows = madeYear();
  const facts = weatherFacts(asText(rows), mapping, site, 'Africa/Lagos');
  if (!facts.ok) throw new Error(JSON.stringify(facts.faults));
  const { value } = facts;
  expect(value).toMatchObject({ rows: 8760, step_min: 60, label: 'end' });
  expect(value.missing).toEqual(expect.arrayContaining(['beamNormal_Wm2', 'diffuse_Wm2', 'windSpeed_ms']));
  expect(value.missing).not.toContain('global_Wm2');
  const sum = rows.reduce((s, r) => s + Number(r.global), 0) / 1000;
  expect(value.summary.year.global_kWhm2).toBeCloseTo(sum, 6);
});

test('weather of another place or by another clock is told with a cure', () => {
  const far = weatherFacts(asText(madeYear()), mapping, { ...site, latitude_deg: 20 }, 'Africa/Lagos');
  expect(far.ok && far.notes.some((note) => note.cure !== '')).toBe(true);
  const turned = { ...mapping, time: { ...mapping.time, offset_h: -9 } };
  const late = weatherFacts(asText(madeYear()), turned, site, 'Africa/Lagos');
  expect(late.ok && late.notes.some((note) => note.code === 'far-clock')).toBe(true);
});

test('the hash of a text’s bytes is the hash of the text (FIPS 180-4, “abc”)', () => {
  const bytes = new TextEncoder().encode('abc');
  expect(bytesHash(bytes)).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
  expect(bytesHash(bytes)).toBe(contentHash('abc'));
});
