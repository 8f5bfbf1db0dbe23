import { copyFileSync, existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { bytesHash } from '../../../core/scheme/hash.ts';
import { asText, madeYear } from '../../core/sky/weather/made-year.ts';
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
