import { expect, test } from 'vitest';
import { loadScheme } from '../../../core/scheme/load.ts';
import { writeScheme } from '../../../core/scheme/write.ts';
import type { WeatherMapping } from '../../../core/sky/weather/mapping.ts';
import { readWeather } from '../../../core/sky/weather/read-weather.ts';

const mapping = {
  name: 'roof station',
  delimiter: ';',
  decimal: ',',
  headLine: 1,
  time: { columns: ['when'], form: 'YYYY-MM-DD HH:mm', offset_h: 1, label: 'end' },
  columns: [
    { quantity: 'global_Wm2', column: 'G', unit: 'kJ/m2' },
    { quantity: 'tAir_C', column: 'T', unit: 'F' },
  ],
  place: { latitude: 51.45, longitude: -2.59, elevation: null },
};

const scheme = (weather: unknown): string =>
  JSON.stringify({
    format: 'shadewright',
    version: 1,
    site: { latitude: 51.45, longitude: -2.59, zone: 'Europe/London' },
    weather,
  });

test('a mapping in a scheme is read, filled with its defaults, written and read again the same', () => {
  const read = loadScheme(scheme({ file: 'roof.csv', hash: 'ab'.repeat(32), mapping, by: 'kept' }));
  if (!read.ok) throw new Error(JSON.stringify(read.faults));
  expect(read.value.weather).toEqual({
    file: 'roof.csv',
    hash: 'ab'.repeat(32),
    by: 'kept',
    mapping: { ...mapping, air: 'mean', missing: [], time: { ...mapping.time, shift_min: 0 } },
  });
  const again = loadScheme(writeScheme(read.value));
  expect(again.ok && again.value.weather).toEqual(read.value.weather);
});

test('the mapping of a scheme is one that the weather reader takes', () => {
  const read = loadScheme(scheme({ file: 'roof.csv', hash: '', mapping }));
  const taken: WeatherMapping | null | undefined = read.ok ? read.value.weather?.mapping : null;
  const year = readWeather('when;G;T\n2021-01-01 01:00;0;50', taken ?? null);
  // Not a whole year, so it has faults; none of them is about the mapping or the columns.
  expect(year.ok ? [] : year.faults.filter((f) => f.place.startsWith('weather'))).toEqual([]);
});

test('no weather may be said as null or left out; anything else is named by its place', () => {
  for (const none of [null, undefined]) expect(loadScheme(scheme(none)).ok).toBe(true);
  const read = loadScheme(
    scheme({
      file: 'a.csv',
      hash: '',
      mapping: { ...mapping, columns: [{ quantity: 'rain', column: 'R', unit: 'mm' }] },
    }),
  );
  const places = read.ok ? [] : read.faults.map((f) => f.place);
  expect(places).toEqual(
    expect.arrayContaining(['weather.mapping.columns[0].quantity', 'weather.mapping.columns[0].unit']),
  );
});
