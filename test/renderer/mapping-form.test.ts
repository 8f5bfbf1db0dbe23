import { expect, test } from 'vitest';
import { guessTable } from '../../core/sky/weather/guess-table.ts';
import { checkMapping, UNITS, type WeatherMapping } from '../../core/sky/weather/mapping.ts';
import {
  formOfGuess,
  formOfMapping,
  QUANTITIES,
  readMappingForm,
  sampleOf,
  unitsOf,
} from '../../renderer/weather/mapping-form.ts';
import { asText, madeYear } from '../core/sky/weather/made-year.ts';

const mapping: WeatherMapping = {
  name: 'roof',
  delimiter: '\t',
  decimal: ',',
  headLine: 3,
  time: { columns: ['day', 'hour'], form: 'MM/DD HH', year: 2001, offset_h: -5.5, label: 'start', shift_min: -30 },
  air: 'at-label',
  columns: [
    { quantity: 'global_Wm2', column: 'G', unit: 'kJ/m2' },
    { quantity: 'tAir_C', column: 'T', unit: 'F' },
  ],
  missing: ['-999', 'NA'],
  place: { latitude: -33.9, longitude: 151.2, elevation: null },
};

test('a mapping goes through its fields and comes out the same', () => {
  expect(readMappingForm(formOfMapping(mapping))).toEqual(mapping);
});

test('a guess fills fields that make a mapping without faults', () => {
  const guess = guessTable(asText(madeYear()));
  if (guess === null) throw new Error('no guess');
  const read = readMappingForm(formOfGuess(guess, 'made up', 1));
  if (!('columns' in read)) throw new Error(read.join());
  expect(checkMapping(read, 'weather')).toEqual([]);
});

test('numbers that are none are named; those that may be empty may be', () => {
  const form = formOfMapping(mapping);
  expect(readMappingForm({ ...form, offset: 'one', latitude: 'x', headLine: '0' })).toEqual(
    expect.arrayContaining(['offset', 'latitude', 'headLine']),
  );
  expect(readMappingForm({ ...form, offset: '' })).toEqual(['offset']);
  expect(readMappingForm({ ...form, year: '', shift: '', latitude: '', longitude: '' })).toMatchObject({
    time: { offset_h: -5.5, shift_min: 0 },
    place: { latitude: null, longitude: null },
  });
});

test('every quantity offers only units that it comes in', () => {
  for (const quantity of QUANTITIES) for (const unit of unitsOf(quantity)) expect(UNITS[quantity][unit]).toBeDefined();
});

test('the sample shows the heads of the line named, byte-order mark and all', () => {
  const bytes = new TextEncoder().encode('\ufeffa title\nx;y\n1;2\n\n3;4\n');
  expect(sampleOf(bytes, ';', 2)).toEqual({
    heads: ['x', 'y'],
    rows: [
      ['1', '2'],
      ['3', '4'],
    ],
  });
  expect(sampleOf(bytes, ';', 1).heads).toEqual(['a title']);
});
