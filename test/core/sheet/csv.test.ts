import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { writeCsv } from '../../../core/sheet/csv.ts';
import { findingsTable, roomDayTable, shadowTable } from '../../../core/sheet/data-tables.ts';
import { checkScheme } from '../../../core/study/check.ts';
import { shadowMoments } from '../../../core/study/shadow-moments.ts';
import { demoScheme, modelOf } from '../../helpers/demo-scheme.ts';
import { readCsv } from '../../helpers/read-csv.ts';

test('whatever stands in the cells comes back, by the grammar of RFC 4180', () => {
  fc.assert(
    fc.property(
      fc.array(fc.array(fc.string({ unit: 'grapheme' }), { minLength: 2, maxLength: 2 }), { maxLength: 20 }),
      (rows) => {
        const read = readCsv(writeCsv({ header: ['a [m²]', 'b, "c"'], rows }));
        expect(read[0]).toEqual(['a [m²]', 'b, "c"']);
        expect(read.slice(1)).toEqual(rows.map((r) => r.map((c) => (/^[=+\-@\t\r]./su.test(c) ? `'${c}` : c))));
      },
    ),
  );
});

test('numbers keep six figures, a point and a plain minus; what is not there is empty', () => {
  const text = writeCsv({ header: ['v'], rows: [[-1234.56789], [1 / 3], [null], [0], [Number.NaN], [1e21]] });
  expect(text).toBe('v\r\n-1234.57\r\n0.333333\r\n\r\n0\r\n\r\n1e+21\r\n');
});

test('a text that a spreadsheet would run is made harmless', () => {
  const text = writeCsv({ header: ['name'], rows: [['=HYPERLINK("http://127.0.0.1")'], ['-'], ['+1 m']] });
  expect(readCsv(text).slice(1)).toEqual([['\'=HYPERLINK("http://127.0.0.1")'], ['-'], ["'+1 m"]]);
});

describe('tables of the demo', () => {
  const scheme = demoScheme('tannery-yard');
  const file = join(import.meta.dirname, '../../../assets/limits/example-gain.json');

  test('findings: a row each, with units in the header', async () => {
    const result = await checkScheme(scheme, JSON.parse(readFileSync(file, 'utf8')), [], async () => 'go');
    if (!result) throw new Error('stopped');
    const read = readCsv(writeCsv(findingsTable(result)));
    expect(read.length).toBe(result.findings.length + 1);
    expect(read.every((r) => r.length === read[0]?.length)).toBe(true);
    const at = (name: string): number => read[0]?.indexOf(name) ?? -1;
    result.findings.forEach((f, i) => {
      expect(read[i + 1]?.[at('room')]).toBe(f.room);
      expect(Number(read[i + 1]?.[at('value [unit]')]) / f.value).toBeCloseTo(1, 5);
      expect(read[i + 1]?.[at('verdict')]).toBe(f.verdict);
    });
    const day = roomDayTable(result, '3.3', 'hottest');
    const steps = readCsv(writeCsv(day ?? { header: [], rows: [] }));
    // 24 h in steps of 5 minutes.
    expect(steps.length).toBe(289);
    const peak = Math.max(...steps.slice(1).map((r) => Number(r[2])));
    const floor = result.rooms.find((r) => r.room === '3.3')?.floor_m2 ?? 0;
    const finding = result.findings.find((f) => f.room === '3.3' && f.metric === 'peak-gain');
    expect(peak / floor / (finding?.value ?? 0)).toBeCloseTo(1, 4);
    expect(roomDayTable(result, 'nowhere', 'hottest')).toBeNull();
  });

  test('shadows: a row a moment, nothing but a note when the sun is down', () => {
    const moments = shadowMoments(scheme, modelOf(scheme), ['2025-12-21'], ['12:00', '16:30']);
    const read = readCsv(writeCsv(shadowTable(moments)));
    expect(read[1]?.[0]).toBe('21 December 2025, 12:00 (UTC+00:00)');
    expect(read[1]?.[1]).toBe('2025-12-21T12:00:00Z');
    expect(Number(read[1]?.[6])).toBeCloseTo(moments[0]?.change?.added.area_m2 ?? -1, 2);
    expect(read[2]?.slice(4, -1).every((c) => c === '')).toBe(true);
    expect(read[2]?.at(-1)).toBe('sun below the horizon');
  });
});
