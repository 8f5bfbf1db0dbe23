import { expect, test } from 'vitest';
import { guessTable } from '../../../../core/sky/weather/guess-table.ts';
import { UNITS } from '../../../../core/sky/weather/mapping.ts';
import { readWeather } from '../../../../core/sky/weather/read-weather.ts';
import { asText, HEAD, madeYear } from './made-year.ts';

test('a made-up year is read by its guess, with nothing typed but the clock and the label', () => {
  const text = asText(madeYear());
  const guess = guessTable(text);
  expect(guess).toMatchObject({
    delimiter: ';',
    decimal: '.',
    headLine: 2,
    heads: HEAD.split(';'),
    time: { columns: ['when'], form: 'YYYY-MM-DD HH:mm' },
  });
  expect(guess?.columns).toEqual([
    { quantity: 'global_Wm2', column: 'global', unit: 'W/m2' },
    { quantity: 'tAir_C', column: 'air', unit: 'C' },
    { quantity: 'pressure_hPa', column: 'pressure', unit: 'hPa' },
  ]);
  if (guess === null) return;
  const { delimiter, decimal, headLine, time } = guess;
  const read = readWeather(text, {
    name: 'made up',
    delimiter,
    decimal,
    headLine,
    time: { ...time, offset_h: 1, label: 'end', shift_min: 0 },
    air: 'mean',
    columns: guess.columns.filter((c) => c.quantity !== 'pressure_hPa'),
    missing: [],
    place: { latitude: null, longitude: null, elevation: null },
  });
  expect(read.ok ? read.value.rows : read.faults).toBe(8760);
});

test('decimal commas, units in the head, and time spread over columns', () => {
  const guess = guessTable(
    'station 4\nYear;Month;Day;Hour;GHI [kJ/m²];DNI [Wh/m²];DHI [MJ/m²];Temperature [°F];RH [%];Press [kPa]\n2020;1;1;1;0,0;0;0;41,5;80;101,3\n2020;1;1;2;0,0;0;0;41,0;80;101,3\n',
  );
  expect(guess).toMatchObject({
    delimiter: ';',
    decimal: ',',
    headLine: 2,
    time: { columns: ['Year', 'Month', 'Day', 'Hour'], form: 'YYYY MM DD HH' },
  });
  expect(guess?.columns.map((c) => c.unit)).toEqual(['kJ/m2', 'Wh/m2', 'MJ/m2', 'F', '%', 'kPa']);
});

test('every unit guessed is one that its quantity comes in', () => {
  const heads = ['t (K)', 'global kWh/m2', 'dew (F)', 'wind speed %', 'albedo %', 'pressure Pa', 'humidity'];
  const guess = guessTable(`time,${heads.join(',')}\n2020-01-01 01:00,1,2,3,4,5,6,7\n2020-01-01 02:00,1,2,3,4,5,6,7\n`);
  expect(guess?.columns.length).toBe(7);
  for (const { quantity, unit } of guess?.columns ?? []) expect(UNITS[quantity][unit]).toBeDefined();
});

test('what is no table has no guess', () => {
  expect(guessTable('')).toBeNull();
  expect(guessTable('just a letter\nto somebody\n')).toBeNull();
  expect(guessTable('1,2,3\n4,5,6\n')).toBeNull();
});
