import { readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { readCsv } from '../../helpers/read-csv.ts';
import { runCommand } from '../../helpers/run-command.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const DEMO = resolve(import.meta.dirname, '../../../assets/demo/tannery-yard.scheme.json');

/** A folder with the demo and a variant of it with darker glass. */
function folderWithTwo(): string {
  const folder = tempFolder();
  const scheme = JSON.parse(readFileSync(DEMO, 'utf8'));
  writeFileSync(join(folder, 'yard.scheme.json'), JSON.stringify(scheme));
  for (const glass of scheme.glass) glass.g = Math.min(glass.g, 0.25);
  for (const glass of scheme.glass) glass.light = Math.min(glass.light, 0.4);
  writeFileSync(join(folder, 'darker.scheme.json'), JSON.stringify(scheme));
  return folder;
}

describe('compare', () => {
  test('sets two variants side by side; its status is that of the last', async () => {
    const folder = folderWithTwo();
    const ran = await runCommand(['compare', 'yard.scheme.json', 'darker.scheme.json'], folder);
    expect(ran.status, ran.err).toBe(0);
    expect(ran.out).toMatch(/^yard +6 +2 +8 +example-gain$/m);
    expect(ran.out).toMatch(/^darker +0 +/m);
    expect(ran.out).toMatch(/3\.3 +Studio +W\/m² +111 +over/);
    expect(ran.out).toContain('shadow added, m²');
    expect(ran.out).toContain('do not show compliance');
    const back = await runCommand(['compare', 'darker.scheme.json', 'yard.scheme.json'], folder);
    expect(back.status).toBe(1);
  });

  test('sets a scheme beside the variants that are kept with it, the scheme itself last', async () => {
    const folder = folderWithTwo();
    const [yard, darker] = ['yard', 'darker'].map((name) =>
      JSON.parse(readFileSync(join(folder, `${name}.scheme.json`), 'utf8')),
    );
    writeFileSync(
      join(folder, 'both.scheme.json'),
      JSON.stringify({ ...yard, variants: [{ name: 'dark panes', scheme: darker }] }),
    );
    const ran = await runCommand(['compare', 'both.scheme.json'], folder);
    expect(ran.status, ran.err).toBe(1);
    expect(ran.out).toMatch(/^dark panes +0 +[\s\S]*^both +6 +2 +8 +example-gain$/m);
    const [alone, kept] = await Promise.all(
      ['yard', 'both'].map(async (name) =>
        JSON.parse((await runCommand(['check', `${name}.scheme.json`, '--json'], folder)).out),
      ),
    );
    expect(kept).toEqual(alone);
  });

  test('gives the same as JSON and as CSV', async () => {
    const folder = folderWithTwo();
    const files = ['yard.scheme.json', 'darker.scheme.json'];
    const json = JSON.parse((await runCommand(['compare', ...files, '--json'], folder)).out);
    const csv = readCsv((await runCommand(['compare', ...files, '--csv'], folder)).out);
    expect(csv.length - 1).toBe(json.rows.length + json.shadows.length);
    expect(Number(csv[1]?.[4])).toBeCloseTo(json.rows[0].values[0], 2);
  });

  test.each<[string, readonly string[], RegExp]>([
    ['one scheme', ['yard.scheme.json'], /two or more/],
    ['a scheme that is not there', ['yard.scheme.json', 'nosuch.json'], /nosuch\.json/],
    ['a date that is none', ['yard.scheme.json', 'darker.scheme.json', '--on', '2025-02-30'], /date that exists/],
    ['both forms', ['yard.scheme.json', 'darker.scheme.json', '--json', '--csv'], /one of the two/],
  ])('%s is refused', async (_, words, said) => {
    const ran = await runCommand(['compare', ...words], folderWithTwo());
    expect(ran.status).toBe(2);
    expect(ran.out).toBe('');
    expect(ran.err).toMatch(said);
  });
});
