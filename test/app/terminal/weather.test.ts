import { copyFileSync, existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { createCheckMemo } from '../../../core/gain/gain-memo.ts';
import type { LimitSet } from '../../../core/limits/limit-set.ts';
import { applyEdit } from '../../../core/scheme/edit.ts';
import { bytesHash } from '../../../core/scheme/hash.ts';
import { loadScheme } from '../../../core/scheme/load.ts';
import { writeScheme } from '../../../core/scheme/write.ts';
import { waysToPass } from '../../../core/sizing/ways-to-pass.ts';
import type { WeatherMapping } from '../../../core/sky/weather/mapping.ts';
import { readWeather } from '../../../core/sky/weather/read-weather.ts';
import type { CheckResult } from '../../../core/study/check-result.ts';
import type { Comparison } from '../../../core/study/compare.ts';
import { weatherInput } from '../../../core/study/weather-input.ts';
import { asText, madeYear } from '../../core/sky/weather/made-year.ts';
import { less } from '../../helpers/less-of.ts';
import { runCommand } from '../../helpers/run-command.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const DEMO = resolve(import.meta.dirname, '../../../assets/demo/tannery-yard.scheme.json');
const TMY3 = resolve(import.meta.dirname, '../../../../shared/checks/weather/723170TYA.CSV');

/** How the made-up table is read, as a scheme keeps it. */
const mapping = {
  name: 'a made-up year',
  delimiter: ';',
  decimal: '.',
  headLine: 2,
  time: { columns: ['when'], form: 'YYYY-MM-DD HH:mm', offset_h: 1, label: 'end' },
  columns: [
    { quantity: 'global_Wm2', column: 'global', unit: 'W/m2' },
    { quantity: 'tAir_C', column: 'air', unit: 'C' },
  ],
  missing: [],
  place: { latitude: 51.45, longitude: -2.59, elevation: 18 },
};

/** A folder with a scheme that goes by a weather file, and the file beside it. */
function folderWithWeather(): string {
  const folder = tempFolder();
  const table = asText(madeYear());
  writeFileSync(join(folder, 'year.csv'), table);
  const scheme = JSON.parse(readFileSync(DEMO, 'utf8'));
  scheme.weather = { file: 'year.csv', hash: bytesHash(new TextEncoder().encode(table)), mapping };
  writeFileSync(join(folder, 'yard.scheme.json'), JSON.stringify(scheme));
  return folder;
}

describe('a check with a year of weather', () => {
  test('reads the file beside the scheme as the scheme maps it, and its report holds when worked out again from it', async () => {
    const folder = folderWithWeather();
    const text = await runCommand(['check', 'yard.scheme.json'], folder);
    expect(text.status, text.err).toBe(1);
    expect(text.out).toMatch(/Weather year: year\.csv, table, a made-up year, 8760 rows of 60 min/);
    const json = await runCommand(['check', 'yard.scheme.json', '--json'], folder);
    writeFileSync(join(folder, 'report.json'), json.out);
    expect(JSON.parse(json.out).weather).toMatchObject({ file: 'year.csv', rows: 8760, step_min: 60 });

    const without = await runCommand(['verify', 'report.json'], folder);
    expect(without.status).toBe(2);
    expect(without.err).toMatch(/year\.csv.*--weather/);
    const held = await runCommand(['verify', 'report.json', '--weather', 'year.csv'], folder);
    expect(held.status, held.out + held.err).toBe(0);
    writeFileSync(join(folder, 'other.csv'), asText(madeYear()).replace('800', '801').replace('12.0', '12.1'));
    const other = await runCommand(['verify', 'report.json', '--weather', 'other.csv'], folder);
    expect(other.status).toBe(2);
    expect(other.err).toMatch(/not the weather that the report rests on/);
  });

  test('is looked at by the sheet of findings and the comparison too, and a way to pass under it holds when checked again', async () => {
    const folder = folderWithWeather();
    const file = JSON.parse(readFileSync(join(folder, 'yard.scheme.json'), 'utf8'));
    const limit = {
      id: 'warm',
      name: 'warm half of the year',
      metric: 'warm-gain',
      comparison: 'at-most',
      value: 60,
      unit: 'kWh/m²',
      source: 'a brief, invented',
      checked: null,
    };
    const set = { format: 'shadewright-limits', version: 1, id: 'brief', name: 'brief', example: true, note: '' };
    const scheme = { ...file, limits: { ...set, close: 0.1, limits: [limit] } };
    writeFileSync(join(folder, 'yard.scheme.json'), JSON.stringify(scheme));
    const report = async (name: string): Promise<CheckResult> =>
      JSON.parse((await runCommand(['check', name, '--json'], folder)).out);
    const { findings, skyModel } = await report('yard.scheme.json');
    const over = findings.find((finding) => finding.verdict === 'over');
    if (over === undefined) throw new Error('a room is over');

    const loaded = loadScheme(JSON.stringify(scheme));
    if (!loaded.ok) throw new Error(JSON.stringify(loaded.faults));
    const table = readWeather(asText(madeYear()), loaded.value.weather?.mapping as WeatherMapping);
    const year = weatherInput(loaded.value, { name: 'year.csv', hash: '' }, table, null);
    if (!year.ok) throw new Error(JSON.stringify(year.faults));
    const under = { skyModel, weather: year.value.months };
    const limits = scheme.limits as LimitSet;
    const { ways } = waysToPass(loaded.value, limits, over.room, over, createCheckMemo(), under);
    const way = ways.find((one) => one.passes && one.lever === 'glass');
    if (!way?.passes) throw new Error('darker glass passes');
    const verdicts = await Promise.all(
      [way.edit, less(way)].map(async (edit, i) => {
        const next = applyEdit(loaded.value, edit);
        if (!next.ok) throw new Error(JSON.stringify(next.faults));
        writeFileSync(join(folder, `then${i}.scheme.json`), writeScheme(next.value));
        return (await report(`then${i}.scheme.json`)).findings.find((f) => f.room === over.room)?.verdict;
      }),
    );
    expect(verdicts).toEqual(['close', 'over']);

    const beside = await runCommand(['compare', 'yard.scheme.json', 'then0.scheme.json', '--json'], folder);
    const row = (JSON.parse(beside.out) as Comparison).rows.find((one) => one.room === over.room);
    expect(row?.values[0]).toBe(over.value);
    expect(row?.verdicts).toEqual(['over', 'close']);
    const drawn = await runCommand(['sheet', 'findings', 'yard.scheme.json', '--svg', 'f.svg'], folder);
    expect(drawn.status, drawn.err).toBe(0);
    const pages = readdirSync(folder).filter((name) => name.endsWith('.svg'));
    const said = pages.map((name) => readFileSync(join(folder, name), 'utf8')).join('\n');
    expect(said).toContain('warm half of the year');
  });

  test('reads a file in the older spelling, whose bytes are no UTF-8', async () => {
    const folder = folderWithWeather();
    writeFileSync(
      join(folder, 'year.csv'),
      Buffer.from(asText(madeYear()).replace('a made-up', 'M\u00fcll, a made-up'), 'latin1'),
    );
    const ran = await runCommand(['check', 'yard.scheme.json', '--weather', 'year.csv'], folder);
    expect(ran.status, ran.err).toBe(1);
    expect(ran.out).toMatch(/Weather year: year\.csv, table, a made-up year, 8760 rows of 60 min/);
  });

  test('says that a file is not beside the scheme and goes on with its design days', async () => {
    const folder = tempFolder();
    copyFileSync(join(folderWithWeather(), 'yard.scheme.json'), join(folder, 'yard.scheme.json'));
    const ran = await runCommand(['check', 'yard.scheme.json'], folder);
    expect(ran.status).toBe(1);
    expect(ran.err).toMatch(/year\.csv does not lie beside the scheme/);
    expect(ran.out).not.toContain('Weather year');
  });

  test('tells a file with other content from the one that the scheme went by', async () => {
    const folder = folderWithWeather();
    writeFileSync(join(folder, 'year.csv'), asText(madeYear(2022)));
    const ran = await runCommand(['check', 'yard.scheme.json'], folder);
    expect(ran.err).toMatch(/other content than the year\.csv that the scheme went by/);
    expect(ran.out).toContain('Weather year');
  });

  test.each<[string, string, RegExp]>([
    ['a file that is not there', 'nosuch.csv', /nosuch\.csv: there is no such file/],
    ['a file that is no weather', 'yard.scheme.json', /yard\.scheme\.json/],
    ['a folder', '.', /--weather/],
  ])('%s is refused', async (_, name, words) => {
    const folder = folderWithWeather();
    const ran = await runCommand(['check', 'yard.scheme.json', '--weather', name], folder);
    expect(ran.status).toBe(2);
    expect(ran.out).toBe('');
    expect(ran.err).toMatch(words);
  });

  test('a scheme cannot make the command read a file outside its folder', async () => {
    const folder = folderWithWeather();
    const scheme = JSON.parse(readFileSync(join(folder, 'yard.scheme.json'), 'utf8'));
    scheme.weather.file = '../../../../etc/passwd';
    writeFileSync(join(folder, 'yard.scheme.json'), JSON.stringify(scheme));
    const ran = await runCommand(['check', 'yard.scheme.json'], folder);
    expect(ran.err).toMatch(/does not lie beside the scheme/);
    expect(ran.out + ran.err).not.toContain('root:');
  });

  test.skipIf(!existsSync(TMY3))('a TMY3 file needs no mapping', async () => {
    const folder = tempFolder();
    const scheme = JSON.parse(readFileSync(DEMO, 'utf8'));
    Object.assign(scheme.site, { latitude: 36.1, longitude: -79.95, zone: 'America/New_York', elevation: 273 });
    writeFileSync(join(folder, 'yard.scheme.json'), JSON.stringify(scheme));
    const ran = await runCommand(['check', 'yard.scheme.json', '--weather', TMY3], folder);
    expect(ran.status, ran.err).toBe(1);
    expect(ran.out).toMatch(/Weather year: 723170TYA\.CSV, TMY3, GREENSBORO/);
    expect(ran.out).not.toMatch(/choose weather from nearer the site|do not agree/);
  });

  test.skipIf(!existsSync(TMY3))(
    'weather whose light is hours from the site’s sun is refused: its sums would be nonsense',
    async () => {
      const ran = await runCommand(['check', DEMO, '--weather', TMY3], tempFolder());
      expect(ran.status).toBe(2);
      expect(ran.out).toBe('');
      expect(ran.err).toMatch(/sunlight and sun do not agree.*5 h/);
    },
  );
});

test('the working of a room that is not there is refused, in every form', async () => {
  for (const form of [[], ['--json'], ['--csv']]) {
    const ran = await runCommand(['check', DEMO, '--working', 'nosuch', ...form], tempFolder());
    expect(ran.status).toBe(2);
    expect(ran.out).toBe('');
    expect(ran.err).toMatch(/nosuch.*it has 1\.1/);
  }
});
