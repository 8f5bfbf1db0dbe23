import { existsSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { checkMapping, type WeatherMapping } from '../../../../core/sky/weather/mapping.ts';
import { readWeather } from '../../../../core/sky/weather/read-weather.ts';
import { weatherSummary } from '../../../../core/sky/weather/summary.ts';
import { timeForm } from '../../../../core/sky/weather/time-form.ts';
import { weatherGrid } from '../../../../core/sky/weather/weather-grid.ts';
import { asText, MAPPING, madeYear, type Row } from './made-year.ts';

/** The codes of the faults that a spoilt year brings, each once, and all of them as lines. */
function spoilt(
  change: (rows: Row[]) => Row[] | undefined,
  mapping: WeatherMapping = MAPPING,
): { codes: string[]; lines: string; read: ReturnType<typeof readWeather> } {
  const rows = madeYear();
  const read = readWeather(asText(change(rows) ?? rows), mapping);
  const faults = read.ok ? read.notes : read.faults;
  const lines = faults.map((f) => `${f.place}: ${f.message}; ${f.cure}`).join('\n');
  return { codes: [...new Set(faults.map((f) => f.code))], lines, read };
}

/** The year with some cells of its hundred and first row (line 103 of the file) changed. */
const withCell = (rows: Row[], change: Partial<Row>): Row[] =>
  rows.map((r, i) => (i === 100 ? { ...r, ...change } : r));

describe('a table read by a mapping', () => {
  it('is read whole, in the units it is kept in, each row in its interval', () => {
    const { read, codes } = spoilt(() => undefined);
    expect(codes).toEqual([]);
    if (!read.ok) throw new Error('not read');
    const year = read.value;
    expect([year.rows, year.step_min]).toEqual([8760, 60]);
    expect(new Date(year.start_ms[0]!).toISOString()).toBe('2022-12-31T23:00:00.000Z');
    expect(new Date(year.end_ms[8759]!).toISOString()).toBe('2023-12-31T23:00:00.000Z');
    expect([year.month[0], year.day[0], year.month[8759], year.day[8759]]).toEqual([1, 1, 12, 31]);
    expect(weatherSummary(year).months.map((m) => m.rows)).toEqual([
      744, 672, 744, 720, 744, 720, 744, 744, 720, 744, 720, 744,
    ]);
    expect(year.columns.pressure_hPa![0]).toBeCloseTo(1013, 9);
    expect(year.columns.beamNormal_Wm2).toBeNull();
  });

  it.each([
    ['kJ/m2', 3.6],
    ['MJ/m2', 0.0036],
    ['kWh/m2', 0.001],
    ['Wh/m2', 1],
  ] as const)('%s an hour come to the same sums as W/m²', (unit, times) => {
    const rows = madeYear().map((r) => ({ ...r, global: String(Number(r.global) * times) }));
    const mapping = { ...MAPPING, columns: MAPPING.columns.map((c) => (c.column === 'global' ? { ...c, unit } : c)) };
    const read = readWeather(asText(rows), mapping);
    const plain = readWeather(asText(madeYear()), MAPPING);
    if (!read.ok || !plain.ok) throw new Error('not read');
    expect(weatherSummary(read.value).year.global_kWhm2).toBeCloseTo(weatherSummary(plain.value).year.global_kWhm2!, 6);
  });

  it('takes decimal commas, degrees Fahrenheit, a leap year and half-hourly rows', () => {
    const leap = madeYear(2024).map((r) => ({
      ...r,
      air: String((Number(r.air) * 9) / 5 + 32).replace('.', ','),
      global: r.global.replace('.', ','),
    }));
    const mapping: WeatherMapping = {
      ...MAPPING,
      decimal: ',',
      columns: MAPPING.columns.map((c) => (c.column === 'air' ? { ...c, unit: 'F' as const } : c)),
    };
    const read = readWeather(asText(leap), mapping);
    if (!read.ok) throw new Error(JSON.stringify(read.faults));
    expect(read.value.rows).toBe(8784);
    expect(read.notes.map((f) => f.code)).toEqual(['leap-day']);
    expect(read.value.columns.tAir_C![12]).toBeCloseTo(Number(madeYear(2024)[12]!.air), 9);
    const half = madeYear().flatMap((r) => {
      const early = new Date(Date.parse(`${r.when.replace(' ', 'T')}:00Z`) - 1_800_000).toISOString();
      return [{ ...r, when: `${early.slice(0, 10)} ${early.slice(11, 16)}` }, r];
    });
    const fine = readWeather(asText(half), MAPPING);
    if (!fine.ok) throw new Error(JSON.stringify(fine.faults));
    expect([fine.value.rows, fine.value.step_min]).toEqual([17520, 30]);
  });

  it('from global alone beam and diffuse are split and told, and close to global', () => {
    const { read } = spoilt(() => undefined);
    if (!read.ok) throw new Error('not read');
    const { grid, notes } = weatherGrid(
      read.value,
      { latitude_deg: 45, longitude_deg: 15, elevation_m: 100 },
      'Europe/Ljubljana',
    );
    expect(notes.map((f) => f.code)).toEqual(['worked-out']);
    for (let i = 0; i < grid.instant_ms.length; i++) {
      const sum = grid.diffuse_Wm2[i]! + grid.beamNormal_Wm2[i]! * Math.max(0, Math.sin(grid.altitude_rad[i]!));
      if (grid.diffuse_Wm2[i]! > 0) expect(Math.abs(sum - grid.global_Wm2[i]!)).toBeLessThan(1e-6);
    }
    // Row 4380 ends at 13:00 of 2 July by the file's clock, which is UTC+1; the civil clock then runs an hour ahead of that.
    const noon = 182 * 24 + 12;
    expect(grid.clock_min[noon]).toBeCloseTo(13.5 * 60, 6);
  });
});

describe('what is wrong with a file is told by line, with a cure', () => {
  it.each<[string, string, RegExp, (rows: Row[]) => Row[] | undefined]>([
    ['a row taken out', 'gap', /line 103: nothing between/, (rows) => rows.filter((_, i) => i !== 100)],
    [
      'a row twice',
      'repeated',
      /line 103: .* stands twice/,
      (rows) => [...rows.slice(0, 100), rows[99]!, ...rows.slice(100)],
    ],
    [
      'two rows changed about',
      'order',
      /runs back/,
      (rows) => [...rows.slice(0, 100), rows[101]!, rows[100]!, ...rows.slice(102)],
    ],
    ['half a year', 'not-a-year', /4000 rows/, (rows) => rows.slice(0, 4000)],
    ['two years', 'not-a-year', /17520 rows/, (rows) => [...rows, ...madeYear(2024).slice(0, 8760)]],
    ['no rows', 'empty', /no rows/, () => []],
    [
      'a word among numbers',
      'number',
      /line 103, global: `dark` is not a number/,
      (rows) => withCell(rows, { global: 'dark' }),
    ],
    [
      'a time that is none',
      'time',
      /line 103: `2023-02-30 10:00`/,
      (rows) => withCell(rows, { when: '2023-02-30 10:00' }),
    ],
    ['a cell too many', 'cells', /5 cells where the head has 4/, (rows) => withCell(rows, { air: '3;4' })],
    [
      'sunlight in kJ',
      'units',
      /kJ\/m² a row/,
      (rows) => rows.map((r) => ({ ...r, global: String(Number(r.global) * 3.6) })),
    ],
    [
      'sunlight in MJ',
      'units',
      /MJ\/m² a row or kW/,
      (rows) => rows.map((r) => ({ ...r, global: String(Number(r.global) * 0.0036) })),
    ],
    [
      'temperature in kelvin',
      'units',
      /look like kelvin/,
      (rows) => rows.map((r) => ({ ...r, air: String(Number(r.air) + 273.15) })),
    ],
    [
      'temperature in Fahrenheit',
      'units',
      /Fahrenheit/,
      (rows) => rows.map((r) => ({ ...r, air: String(Number(r.air) * 1.8 + 32) })),
    ],
    [
      'a column that is all dark',
      'units',
      /global irradiance of 0/,
      (rows) => rows.map((r) => ({ ...r, global: '0' })),
    ],
    [
      'a week missing',
      'long-gap',
      /168 values missing/,
      (rows) => rows.map((r, i) => (i >= 500 && i < 668 ? { ...r, air: '-999' } : r)),
    ],
  ])('%s', (_name, code, message, change) => {
    const { codes, lines, read } = spoilt(change);
    expect(read.ok).toBe(false);
    expect(codes).toContain(code);
    expect(lines).toMatch(message);
  });

  it('a file cut off in the middle of a row', () => {
    const text = asText(madeYear());
    const read = readWeather(text.slice(0, text.length - 12), MAPPING);
    expect(read.ok).toBe(false);
    expect(read.ok ? [] : read.faults.map((f) => f.code)).toEqual(['cut-short']);
  });

  it('a pressure in the wrong unit costs the column, not the file', () => {
    const { read, codes } = spoilt((rows) => rows.map((r) => ({ ...r, pressure: '1013' })));
    expect(read.ok).toBe(true);
    expect(codes).toEqual(['units']);
    expect(read.ok && read.value.columns.pressure_hPa).toBeNull();
  });

  it('short gaps are filled straight and told; small negative light is set to 0 and told', () => {
    const { read, codes } = spoilt((rows) => {
      rows[50]!.air = '10';
      rows[51]!.air = '-999';
      rows[52]!.air = '';
      rows[53]!.air = '16';
      rows[2]!.global = '-1.5';
      return rows;
    });
    expect(codes.sort()).toEqual(['below-zero', 'filled']);
    if (!read.ok) throw new Error('not read');
    expect([...read.value.columns.tAir_C!.subarray(50, 54)].map((v) => Number(v.toFixed(9)))).toEqual([10, 12, 14, 16]);
    expect(read.value.columns.global_Wm2![2]).toBe(0);
  });

  it('ten thousand equal faults become a few and a count', () => {
    const { read } = spoilt((rows) => rows.map((r) => ({ ...r, global: 'x' })));
    expect(read.ok ? [] : read.faults.length).toBe(5);
    expect(read.ok ? '' : read.faults[4]!.message).toMatch(/more like this/);
  });

  it('what is neither form, without a mapping', () => {
    const read = readWeather('hello\nworld\n');
    expect(read.ok ? '' : read.faults[0]!.code).toBe('unknown-form');
  });
});

describe('a mapping is checked before the file', () => {
  it.each<[string, Partial<WeatherMapping>, string, RegExp]>([
    [
      'a form without an hour',
      { time: { ...MAPPING.time, form: 'YYYY-MM-DD' } },
      'weather.time.form',
      /month, day and hour/,
    ],
    ['no year', { time: { ...MAPPING.time, form: 'MM-DD HH:mm' } }, 'weather.time.year', /no year/],
    ['a clock that is none', { time: { ...MAPPING.time, offset_h: 20 } }, 'weather.time.offset_h', /−12 to 14/],
    [
      'a unit that does not fit',
      { columns: [{ quantity: 'tAir_C', column: 'air', unit: 'Pa' }] },
      'weather.columns[0].unit',
      /does not come in Pa/,
    ],
    [
      'no air temperature',
      { columns: [{ quantity: 'global_Wm2', column: 'global', unit: 'W/m2' }] },
      'weather.columns',
      /air temperature/,
    ],
    [
      'no sunlight',
      { columns: [{ quantity: 'tAir_C', column: 'air', unit: 'C' }] },
      'weather.columns',
      /neither global/,
    ],
  ])('%s', (_name, change, place, message) => {
    const faults = checkMapping({ ...MAPPING, ...change }, 'weather');
    expect(faults.some((f) => f.place === place && message.test(f.message) && f.cure !== '')).toBe(true);
  });
  it('a column that the file has not', () => {
    const read = readWeather(asText(madeYear()), {
      ...MAPPING,
      columns: [{ quantity: 'tAir_C', column: 'Air', unit: 'C' }, ...MAPPING.columns.slice(0, 1)],
    });
    expect(read.ok ? '' : read.faults[0]!.cure).toContain('when, global, air, pressure');
  });
});

describe('printed times', () => {
  it.each([
    ['MM/DD/YYYY HH:mm', '1/5/1988 24:00', [1988, 1, 5, 24, 0, 0]],
    ['YYYYMMDD:HHmm', '20180131:2310', [2018, 1, 31, 23, 10, 0]],
    ['DD.MM.YYYY HH:mm:ss', '29.02.2024 07:08:09', [2024, 2, 29, 7, 8, 9]],
    ['YYYY-MM-DDTHH:mm', '2020-06-01T00:30', [2020, 6, 1, 0, 30, 0]],
    ['MM DD HH', '7 4 13', [1999, 7, 4, 13, 0, 0]],
  ] as const)('%s reads %s', (form, text, wanted) => {
    const s = timeForm(form)?.read(text, 1999);
    expect(s && [s.year, s.month, s.day, s.hour, s.minute, s.second]).toEqual(wanted);
  });
  it('refuses what the calendar has not', () => {
    const form = timeForm('YYYY-MM-DD HH:mm')!;
    for (const text of [
      '2023-02-29 10:00',
      '2023-13-01 10:00',
      '2023-01-01 24:30',
      '2023-01-01 10:60',
      '2023-01-01',
      '',
    ])
      expect(form.read(text, 0), text).toBeNull();
    expect(timeForm('DD HH')).toBeNull();
    expect(timeForm('MM DD HH HH')).toBeNull();
  });
});

const TMY3 = resolve(import.meta.dirname, '../../../../../shared/checks/weather/723170TYA.CSV');
describe.skipIf(!existsSync(TMY3))('the TMY3 file read by a mapping', () => {
  it('gives what the reader of its form gives', () => {
    const text = readFileSync(TMY3, 'latin1');
    const own = readWeather(text);
    const mapped = readWeather(text, {
      ...MAPPING,
      delimiter: ',',
      time: {
        columns: ['Date (MM/DD/YYYY)', 'Time (HH:MM)'],
        form: 'MM/DD/YYYY HH:mm',
        offset_h: -5,
        label: 'end',
        shift_min: 0,
      },
      air: 'at-label',
      columns: [
        { quantity: 'global_Wm2', column: 'GHI (W/m^2)', unit: 'W/m2' },
        { quantity: 'tAir_C', column: 'Dry-bulb (C)', unit: 'C' },
      ],
    });
    if (!own.ok || !mapped.ok) throw new Error('not read');
    for (const key of ['start_ms', 'end_ms', 'month', 'day', 'airOffset_min'] as const)
      expect(mapped.value[key]).toEqual(own.value[key]);
    expect(mapped.value.columns.global_Wm2).toEqual(own.value.columns.global_Wm2);
    expect(mapped.value.columns.tAir_C).toEqual(own.value.columns.tAir_C);
  });
  it('cut short, in the middle of the file', () => {
    const text = readFileSync(TMY3, 'latin1');
    const read = readWeather(text.slice(0, 900_000));
    expect(read.ok ? [] : read.faults.map((f) => f.code)).toEqual(['cut-short']);
    const rows = text.split('\n').slice(0, 5000).join('\n');
    const half = readWeather(`${rows}\n`);
    expect(half.ok ? [] : half.faults.map((f) => f.code)).toEqual(['not-a-year']);
  });
});

describe('heads of the known forms', () => {
  it('a TMY3 head with a latitude that is none, and a column gone', () => {
    const read = readWeather('1,"A",B,-5,136.1,-79.95,273\nDate (MM/DD/YYYY),Time (HH:MM),GHI (W/m^2)\n');
    const codes = read.ok ? [] : read.faults.map((f) => `${f.place} ${f.code}`);
    expect(codes).toContain('line 1 head');
    expect(codes).toContain('line 2 column');
  });
  it('a JRC head without its offset is read with a warning, and refused with one of a day', () => {
    const rows = madeYear().map((r) => {
      const at = new Date(Date.parse(`${r.when.replace(' ', 'T')}:00Z`) - 3_600_000).toISOString();
      return `${at.slice(0, 10).replaceAll('-', '')}:${at.slice(11, 13)}00,${r.air},50,${r.global},${r.global},0,${r.pressure}`;
    });
    const table = `time(UTC),T2m,RH,G(h),Gb(n),Gd(h),SP\n${rows.join('\n')}\n`;
    const place = 'Latitude (decimal degrees): 45.000\nLongitude (decimal degrees): 8.000\nElevation (m): 250.0\n';
    const spoiltDiffuse = readWeather(place + table);
    expect(spoiltDiffuse.ok ? [] : spoiltDiffuse.faults.map((f) => f.code)).toEqual(['units']);
    const good = readWeather(place + table.replaceAll(',0,', ',90,'));
    expect(good.ok ? good.notes.map((f) => f.code) : good.faults).toEqual(['no-offset']);
    const bad = readWeather(`${place}Irradiance Time Offset (h): 24\n${table}`);
    expect(bad.ok ? [] : bad.faults.map((f) => f.code)).toEqual(['head']);
  });
});
