import { copyFileSync, existsSync, readFileSync, symlinkSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { runCommand } from '../../helpers/run-command.ts';
import { smallScheme } from '../../helpers/small-scheme.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const LIMITS = resolve(import.meta.dirname, '../../../assets/limits/example-gain.json');

/** A folder with a scheme, a limit set, and the scheme again under the name of a link. */
function folderOf(): { readonly folder: string; readonly text: string } {
  const folder = tempFolder();
  const text = JSON.stringify(smallScheme());
  writeFileSync(join(folder, 'scheme.json'), text);
  copyFileSync(LIMITS, join(folder, 'our.limits.json'));
  symlinkSync('scheme.json', join(folder, 'link.json'));
  return { folder, text };
}

const SIZE = ['size', 'scheme.json', '--window', 'W1', '--device', 'overhang'];

describe('a file that was read is not written over', () => {
  test.each([
    [
      'the report over its scheme',
      ['check', 'scheme.json', '--pdf', 'scheme.json'],
      /--pdf scheme\.json is the scheme/,
    ],
    ['the same by another path', ['check', 'scheme.json', '--pdf', './scheme.json'], /--pdf .*is the scheme/],
    ['the same through a link', ['check', 'scheme.json', '--pdf', 'link.json'], /--pdf link\.json is the scheme/],
    [
      'the report over its limits',
      ['check', 'scheme.json', '--limits', 'our.limits.json', '--pdf', 'our.limits.json'],
      /--pdf our\.limits\.json is the limit set/,
    ],
    ['the study over its scheme', ['shadows', 'scheme.json', '--pdf', 'scheme.json'], /--pdf .*is the scheme/],
    ['GeoJSON over its scheme', ['shadows', 'scheme.json', '--geojson', 'scheme.json'], /--geojson .*is the scheme/],
    ['a sheet over its scheme', ['sheet', 'sun-path', 'scheme.json', '--svg', 'scheme.json'], /--svg .*is the scheme/],
    ['sizing over its scheme', [...SIZE, '--pdf', 'scheme.json'], /--pdf .*is the scheme/],
  ])('%s', async (_, words, said) => {
    const { folder, text } = folderOf();
    const ran = await runCommand(words, folder);
    expect(ran.err).toMatch(said);
    expect(ran.status).toBe(2);
    expect(ran.out).toBe('');
    expect(readFileSync(join(folder, 'scheme.json'), 'utf8')).toBe(text);
    expect(readFileSync(join(folder, 'our.limits.json'), 'utf8')).toBe(readFileSync(LIMITS, 'utf8'));
  });

  test('nor are two results written to one file', async () => {
    const { folder } = folderOf();
    const ran = await runCommand(['shadows', 'scheme.json', '--pdf', 'study', '--svg', './study'], folder);
    expect(ran.status).toBe(2);
    expect(ran.err).toMatch(/--svg \.\/study is the file of --pdf too/);
    expect(existsSync(join(folder, 'study'))).toBe(false);
  });

  test('an older result is', async () => {
    const { folder } = folderOf();
    writeFileSync(join(folder, 'report.pdf'), 'old');
    const ran = await runCommand(['check', 'scheme.json', '--pdf', 'report.pdf'], folder);
    expect(ran.status).toBe(0);
    expect(readFileSync(join(folder, 'report.pdf')).subarray(0, 5).toString()).toBe('%PDF-');
  });
});
