import { readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { runCommand } from '../../helpers/run-command.ts';
import { tempFolder } from '../../helpers/temp-folder.ts';

const DEMO = resolve(import.meta.dirname, '../../../assets/demo/tannery-yard.scheme.json');

/** A wide field, so that one study makes several tiles. */
function field(folder: string, change: object = {}): string {
  const scheme = {
    format: 'shadewright',
    version: 1,
    title: 'field',
    site: { latitude: 51.45, longitude: -2.59, zone: 'Europe/London' },
    blocks: [{ id: 'B', standing: 'proposed', box: { at: [0, 0], width: 20, depth: 20 }, base: 0, height: 20 }],
    trees: [{ id: 'T', at: [40, 0], trunk: 2, height: 12, spread: 8, transmittance: Array(12).fill(0.3) }],
    receptors: [
      {
        id: 'A',
        kind: 'area',
        outline: [
          [-50, -50],
          [50, -50],
          [50, 50],
          [-50, 50],
        ],
      },
    ],
    ...change,
  };
  writeFileSync(join(folder, 'field.json'), JSON.stringify(scheme));
  return 'field.json';
}

type Sides = { before: { sunMinutes: number[] }; after: { sunMinutes: number[] }; change: { sunMinutes: number[] } };
type Mapped = { surfaces: (Sides & { kind: string; at: number[][]; builtOver: { after: number[] } })[] };

describe('exposure', () => {
  test('gives the same bytes with 1, 2 and 3 threads', async () => {
    const folder = tempFolder();
    const file = field(folder);
    const runs = await Promise.all(
      ['1', '2', '3'].map((n) =>
        runCommand(
          ['exposure', file, '--map', 'ground', '--on', '2025-03-21', '--spacing', '0.4', '--threads', n, '--json'],
          folder,
        ),
      ),
    );
    const [one, two, three] = runs.map((r) => r.out);
    expect(runs.map((r) => [r.status, r.err])).toEqual([
      [0, ''],
      [0, ''],
      [0, ''],
    ]);
    expect(JSON.parse(one as string).surfaces[0].at.length).toBeGreaterThan(2 * 2048);
    expect(two).toBe(one);
    expect(three).toBe(one);
  });

  test('maps surfaces before and after with the change, the same in JSON, CSV and text', async () => {
    const ask = ['exposure', DEMO, '--map', 'ground', 'N4', '--on', '2025-03-21', '--spacing', '4', '--step', '15'];
    const [json, csv, text] = await Promise.all(
      [[...ask, '--json'], [...ask, '--csv'], ask].map((words) => runCommand(words, tempFolder())),
    );
    const { surfaces } = JSON.parse(json?.out ?? '') as Mapped;
    expect(surfaces.map((s) => s.kind)).toEqual(['ground', ...Array(6).fill('wall'), 'roof']);
    const points = surfaces.reduce((sum, s) => sum + s.at.length, 0);
    const rows = (csv?.out ?? '').trim().split('\r\n').slice(1);
    expect(rows).toHaveLength(points);
    let row = 0;
    for (const { at, before, after, change } of surfaces)
      at.forEach((place, i) => {
        const cells = rows[row++]?.split(',').slice(1).map(Number) ?? [];
        expect(change.sunMinutes[i]).toBe((after.sunMinutes[i] ?? 0) - (before.sunMinutes[i] ?? 0));
        expect(cells.slice(0, 3)).toEqual(place.map((v) => Number(v.toPrecision(6))));
        expect([cells[3], cells[7], cells[11]]).toEqual([
          before.sunMinutes[i],
          after.sunMinutes[i],
          change.sunMinutes[i],
        ]);
      });
    expect(text?.out).toContain('N4 roof');
    expect(text?.out).toContain(`${points} points of 8 surfaces`);
  });

  test('says what receptors keep of their light, the same in JSON, CSV and text', async () => {
    const ask = ['exposure', DEMO, '--light', '--step', '15', '--hours', '3'];
    const [json, csv, text, trees] = await Promise.all(
      [[...ask, '--json'], [...ask, '--csv'], ask, [...ask, '--trees', '--json']].map((words) =>
        runCommand(words, tempFolder()),
      ),
    );
    const light = JSON.parse(json?.out ?? '');
    const scheme = JSON.parse(readFileSync(DEMO, 'utf8'));
    expect(light.hours).toBe(3);
    expect(light.receptors.map((r: { id: string }) => r.id)).toEqual(scheme.receptors.map((r: { id: string }) => r.id));
    const window = light.receptors.find((r: { kind: string }) => r.kind === 'window');
    expect(csv?.out).toContain(
      `${window.id},sky view factor,1,${[window.skyView.before, window.skyView.after].map((v: number) => Number(v.toPrecision(6))).join()}`,
    );
    expect(text?.out).toContain(window.skyView.after.toFixed(3));
    expect(text?.err).toContain('without the trees');
    const treed = JSON.parse(trees?.out ?? '');
    expect(trees?.err).toBe('');
    expect([light.trees, treed.trees]).toEqual(['left-out', 'counted']);
    expect(light.treesNote).toContain('common practice, no source');
    expect(text?.out).toContain(light.treesNote);
    expect(treed.treesNote).toMatch(/^Trees are counted/u);
    const [head, ...rows] = (csv?.out ?? '').trim().split('\r\n');
    expect(head).toMatch(/,trees$/u);
    for (const row of rows) expect(row).toMatch(/,left out$/u);
    treed.receptors.forEach((r: { annual?: { after: number } }, i: number) => {
      if (r.annual) expect(r.annual.after).toBeLessThanOrEqual(light.receptors[i].annual.after);
    });
  });

  test('refuses what does not go together, and more points than it takes on, each with a cure', async () => {
    const folder = tempFolder();
    const file = field(folder);
    for (const [words, said] of [
      [['--map', 'ground', '--light'], /--map and --light/],
      [['--map', 'cellar'], /cellar names nothing/],
      [['--hours', '2'], /--hours goes with --light/],
      [['--light', '--between', '2025-01-01', '2025-02-01'], /leave out --between/],
      [['--light', '--sunshine', '0.2,0.3'], /twelve shares/],
      [['--threads', '0'], /threads/],
      [['--spacing', '0.05'], /more than 1000000.*wider spacing/],
      [['--map', 'walls', 'roofs', 'ground', '--spacing', '0.03'], /more than 1000000/],
      [['--year', '2025', '--step', '0'], /minutes/],
    ] as const) {
      const ran = await runCommand(['exposure', file, ...words], folder);
      expect([ran.status, ran.out, ran.err]).toEqual([2, '', expect.stringMatching(said)]);
    }
  });
});
