import { existsSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { FaultList, MOST_FAULTS } from '../../../../core/sky/weather/fault-list.ts';
import { LineCutter, LONGEST_LINE } from '../../../../core/sky/weather/line-cutter.ts';
import { mappedPlan } from '../../../../core/sky/weather/mapped.ts';
import type { WeatherMapping } from '../../../../core/sky/weather/mapping.ts';
import { readWeather } from '../../../../core/sky/weather/read-weather.ts';
import { RowScan } from '../../../../core/sky/weather/row-scan.ts';
import { WeatherReader } from '../../../../core/sky/weather/weather-reader.ts';
import { seedOf } from '../../../helpers/property-seed.ts';
import { asJrc, asText, asTmy3, MAPPING, madeYear } from './made-year.ts';

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
        const cutter = new LineCutter((line) => {
          expect(line.number).toBe(found.length + 1);
          expect(line.before).toBe(found.reduce((sum, one) => sum + one.length + 1, text.startsWith('\ufeff') ? 1 : 0));
          found.push(line.text);
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

  /** What can befall a line of a file, each told in its own way. */
  const mishaps: { readonly [what: string]: (line: string) => string } = {
    lost: () => '',
    blank: () => ' \t ',
    'broken off': (line) => line.slice(0, line.length / 2),
    'with a cell too many': (line) => `${line},;\t7`,
    'with a letter among its digits': (line) => line.replace(/\d/, 'q'),
    twice: (line) => `${line}\n${line}`,
    'after three hundred blank ones': (line) => `${'\n'.repeat(300)}${line}`,
    endless: (line) => line + 'x'.repeat(2 * LONGEST_LINE),
    'as it was': (line) => line,
  };
  const made = madeYear();
  const tabs = { ...MAPPING, delimiter: '\t' } as const;
  const forms: readonly (readonly [string, string, WeatherMapping | null])[] = [
    ['TMY3', asTmy3(made), null],
    ['JRC', asJrc(made), null],
    ['a table', year, MAPPING],
    ['a table with tabs', year.replaceAll(';', '\t'), tabs],
  ];
  it.each(forms)(
    'in the form of %s is sound, and comes to the same in pieces whatever befalls it',
    (_, text, mapping) => {
      expect(readWeather(text, mapping).ok).toBe(true);
      const share = fc.double({ min: 0, max: 1, maxExcluded: true, noNaN: true });
      // Heads are a handful of lines among thousands: they and the end get their own share of mishaps.
      const place = fc.oneof(
        share,
        share.map((s) => s / 500),
        share.map((s) => 1 - (1 - s) / 1000),
      );
      const mishap = fc.record({ what: fc.constantFrom(...Object.keys(mishaps)), place });
      fc.assert(
        fc.property(fc.array(mishap, { maxLength: 3 }), places, fc.boolean(), (all, at, isMarked) => {
          const spoiltLines = text.split('\n');
          for (const { what, place: from } of all) {
            const i = Math.floor(from * spoiltLines.length);
            spoiltLines[i] = mishaps[what]?.(spoiltLines[i] ?? '') ?? '';
          }
          const whole = (isMarked ? '\ufeff' : '') + spoiltLines.join('\n');
          expect(readWeather(cut(whole, at), mapping)).toEqual(readWeather(whole, mapping));
        }),
        { seed: seedOf(20261209), numRuns: 40 },
      );
    },
  );

  it('with a line too long to be one is refused for it, whether the line comes whole or not', () => {
    const long = [...lines.slice(0, 50), 'x'.repeat(LONGEST_LINE + 1), ...lines.slice(50)].join('\n');
    for (const pieces of [[long], cut(long, [0.3, 0.31, 0.32])])
      expect(readWeather(pieces, MAPPING)).toMatchObject({
        ok: false,
        faults: [{ code: 'too-long', place: 'line 51' }],
      });
    // What is known already is not overruled by a line that comes after it, nor by one among the notes.
    const letter = `Dear all,\nthe year was warm\n${'x'.repeat(2 * LONGEST_LINE)}`;
    expect(readWeather(letter)).toMatchObject({ ok: false, faults: [{ code: 'unknown-form' }] });
    expect(readWeather(`${asJrc(made)}${'x'.repeat(2 * LONGEST_LINE)}`).ok).toBe(true);
  });

  it('tells blank rows that hold delimiters by their cells', () => {
    const text = [...lines.slice(0, 50), ';;', ...lines.slice(50)].join('\n').replaceAll(';', '\t');
    const message = '3 cells where the head has 4';
    expect(readWeather(text, tabs)).toMatchObject({
      ok: false,
      faults: [{ code: 'cells', place: 'line 51', message }],
    });
  });

  it('holds no more blank lines than can be told as faults', () => {
    const faults = new FaultList();
    const plan = mappedPlan(lines.slice(0, 2), MAPPING);
    if (!plan.ok) throw new Error(JSON.stringify(plan.faults));
    const scan = new RowScan(plan.value, faults);
    for (let i = 0; i < 5000; i++) scan.take('', 3 + i);
    expect(scan.held).toBeLessThanOrEqual(MOST_FAULTS + 1);
    expect(faults.failed).toBe(false);
    scan.take(lines[2] ?? '', 5003);
    const told = faults.all();
    expect(told.map((fault) => fault.place)).toEqual(['line 3', 'line 4', 'line 5', 'line 6', 'line 7']);
    expect(told[4]?.message).toContain(`${MOST_FAULTS + 1 - 5} more like this`);
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
