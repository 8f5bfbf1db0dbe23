import { readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import type { Sweep } from '../../../core/sizing/sweep.ts';
import { readPdf } from '../../helpers/read-pdf.ts';
import { runCommand } from '../../helpers/run-command.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const DEMO = resolve(import.meta.dirname, '../../../assets/demo/tannery-yard.scheme.json');

describe('size', () => {
  test('sizes several windows, or those of a wall, together', async () => {
    const folder = tempFolder();
    const two = await runCommand(['size', DEMO, '--window', 'W4,W12', '--device', 'overhang', '--json'], folder);
    expect((JSON.parse(two.out) as Sweep).windows).toEqual(['W4', 'W12']);
    const wall = await runCommand(['size', DEMO, '--wall', '1.3:3', '--device', 'overhang', '--json'], folder);
    const one = await runCommand(['size', DEMO, '--window', 'W4', '--device', 'overhang', '--json'], folder);
    expect(JSON.parse(wall.out)).toEqual(JSON.parse(one.out));
  });

  test('writes the curves as a sheet with what they show, in text that can be read', async () => {
    const folder = tempFolder();
    const ran = await runCommand(
      ['size', DEMO, '--window', 'W4', '--device', 'overhang', '--target', '12000', '--pdf', 'sizing.pdf'],
      folder,
    );
    expect(ran.status, ran.err).toBe(0);
    const pdf = await readPdf(new Uint8Array(readFileSync(join(folder, 'sizing.pdf'))));
    expect(pdf.pages[0]?.width).toBeCloseTo(420, 1);
    const said = pdf.pages[0]?.texts.map((t) => t.text).join(' ') ?? '';
    for (const word of [
      'Window W4',
      'summer',
      'winter',
      'target',
      'meets it',
      'Estimates for design',
      'need an engineer',
    ])
      expect(said).toContain(word);
  });

  test.each<[string, readonly string[], RegExp]>([
    ['neither window nor wall', [], /one of the two/],
    ['both', ['--window', 'W4', '--wall', '1.3:3'], /one of the two/],
    ['a wall without windows', ['--wall', '1.3:0'], /there are 1\.3:3/],
    ['a wall that is no wall', ['--wall', 'west'], /such as 2\.4:3/],
    ['a window that is not there', ['--window', 'W4,W99'], /W99.*no such window/],
  ])('%s is refused', async (_, words, said) => {
    const ran = await runCommand(['size', DEMO, '--device', 'overhang', ...words], tempFolder());
    expect(ran.status).toBe(2);
    expect(ran.err).toMatch(said);
  });
});
