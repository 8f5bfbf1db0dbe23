import { existsSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { LineCutter, LONGEST_LINE } from '../../../../core/sky/weather/line-cutter.ts';
import { readWeather } from '../../../../core/sky/weather/read-weather.ts';
import { WeatherReader } from '../../../../core/sky/weather/weather-reader.ts';
import { seedOf } from '../../../helpers/property-seed.ts';
import { asText, MAPPING, madeYear } from './made-year.ts';

/** The text cut at some places. */
function cut(text: string, places: readonly number[]): string[] {
  const at = [...new Set(places.map((share) => Math.floor(share * text.length)))].sort((a, b) => a - b);
  return [...at, text.length].map((to, i) => text.slice(i === 0 ? 0 : at[i - 1], to));
}
const places = fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 30 });
const year = asText(madeYear());
const lines = year.split('\n');

describe('lines of text that comes in pieces', () => {
  it('are those of the whole, wherever it is cut', () => {
    const letters = fc.constantFrom('a', 'ü', '\n', '\r', '\r\n', ' ', '\ufeff');
    fc.assert(
      fc.property(fc.array(letters, { maxLength: 60 }), places, (all, at) => {
        const text = all.join('');
        const found: string[] = [];
        const cutter = new LineCutter((line, number) => {
          expect(number).toBe(found.length + 1);
          found.push(line);
        });
        for (const piece of cut(text, at)) cutter.push(piece);
        cutter.finish();
        expect(found).toEqual(text.replace(/^\ufeff/, '').split('\n'));
      }),
      { seed: seedOf(20261205) },
    );
  });
});

describe('a year that streams in', () => {
  const spoilt: readonly (readonly [string, string])[] = [
    ['sound', year],
    ['with a mark at its head and carriage returns', `\ufeff${year.replaceAll('\n', '\r\n')}`],
    ['that breaks off within a row', year.slice(0, -9)],
    ['that breaks off within a row, and blank lines', `${year.slice(0, -9)}\n\n  \r\n`],
    ['with a blank line between rows', [...lines.slice(0, 50), '', ' ', ...lines.slice(50)].join('\n')],
    ['with a short row among others', [...lines.slice(0, 50), 'x;1', ...lines.slice(50)].join('\n')],
    [
      'with a cell too many, and a word for a number',
      year.replace(';101300\n', ';101300;7\n').replace(';0.0;', ';none;'),
    ],
    ['with heads and nothing more', lines.slice(0, 2).join('\n')],
    ['that ends above its heads', 'a made-up year'],
    ['with nothing in it', ''],
  ];
  it.each(spoilt)('%s comes to the same as the whole, wherever it is cut', (_, text) => {
    const whole = readWeather(text, MAPPING);
    fc.assert(
      fc.property(places, (at) => {
        expect(readWeather(cut(text, at), MAPPING)).toEqual(whole);
      }),
      { seed: seedOf(20261206), numRuns: 12 },
    );
  });

  it('whose last row breaks off is told from one with a short row in its midst', () => {
    const codes = (text: string): readonly string[] => {
      const read = readWeather(text, MAPPING);
      return read.ok ? [] : read.faults.map((fault) => `${fault.code} ${fault.place}`);
    };
    expect(codes(`${year.slice(0, -9)}\n\n`)).toEqual([`cut-short line ${lines.length - 1}`]);
    expect(codes([...lines.slice(0, 50), 'x;1', ...lines.slice(50)].join('\n'))).toEqual(['cells line 51']);
    expect(codes([...lines.slice(0, 50), '', '', ...lines.slice(50)].join('\n'))).toEqual([
      'cells line 51',
      'cells line 52',
    ]);
  });

  it('is refused as soon as that is known, and no more of it is asked for', () => {
    const strange = new WeatherReader(null);
    expect(strange.push('Dear all,\n')).toBe(true);
    expect(strange.push('the year was warm\n')).toBe(false);
    expect(strange.finish()).toMatchObject({ ok: false, faults: [{ code: 'unknown-form' }] });
    const endless = new WeatherReader(MAPPING);
    let pieces = 0;
    while (endless.push('x'.repeat(10_000))) pieces++;
    expect(pieces).toBe(LONGEST_LINE / 10_000);
    expect(endless.finish()).toMatchObject({ ok: false, faults: [{ code: 'too-long', place: 'line 1' }] });
  });

  it('with more rows than a year has minutes is not read on', () => {
    const reader = new WeatherReader(MAPPING);
    reader.push('a made-up year\nwhen;global;air;pressure\n');
    const thousand = '2023-01-01 01:00;0;10;101300\n'.repeat(1000);
    let pieces = 0;
    while (reader.push(thousand)) pieces++;
    expect(pieces).toBe(527);
    const read = reader.finish();
    expect(read.ok ? [] : read.faults.map((fault) => fault.code)).toContain('too-long');
  });
});

const FOLDER = resolve(import.meta.dirname, '../../../../../shared/checks/weather');
const files = ['723170TYA.CSV', 'tmy_45.000_8.000_2005_2023.csv'];
describe.skipIf(!existsSync(FOLDER))('the published files', () => {
  it.each(files)('%s comes to the same in pieces as whole', (file) => {
    const text = readFileSync(resolve(FOLDER, file), 'latin1');
    const whole = readWeather(text);
    expect(whole.ok).toBe(true);
    fc.assert(
      fc.property(places, (at) => {
        expect(readWeather(cut(text, at))).toEqual(whole);
      }),
      { seed: seedOf(20261207), numRuns: 5 },
    );
  });
});
