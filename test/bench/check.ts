import { existsSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { textPieces } from '../../app/contract/file-text.ts';
import { createCheckMemo } from '../../core/gain/gain-memo.ts';
import { parseLimitSet } from '../../core/limits/load-limits.ts';
import { bytesHash } from '../../core/scheme/hash.ts';
import { loadScheme } from '../../core/scheme/load.ts';
import type { Scheme } from '../../core/scheme/schema.ts';
import { readWeather } from '../../core/sky/weather/read-weather.ts';
import { waysToPass } from '../../core/sizing/ways-to-pass.ts';
import { checkScheme } from '../../core/study/check.ts';
import { weatherInput } from '../../core/study/weather-input.ts';
import type { Row } from './row.ts';

const read = (path: string): string => readFileSync(resolve(process.cwd(), path), 'utf8');
const go = async (): Promise<'go'> => 'go';
const sorted = (times: number[]): number[] => times.sort((a, b) => a - b);

function schemeOf(name: string): Scheme {
  const loaded = loadScheme(read(`assets/demo/${name}.scheme.json`));
  if (!loaded.ok) throw new Error(`${name} does not read`);
  return loaded.value;
}

/** The scheme with one overhang of its own over one window, this deep. */
const withOverhang = (scheme: Scheme, depth: number): Scheme => ({
  ...scheme,
  devices: [...scheme.devices, { id: 'bench', kind: 'overhang', depth, above: 0, left: 0.3, right: 0.3, tilt: 0 }],
  windows: scheme.windows.map((w, i) => (i === 20 ? { ...w, devices: ['bench'] } : w)),
});

/** Whole checks, a dragged overhang and ways to pass. No public library does this work; the bars are in seconds. */
export async function benchCheck(): Promise<Row[]> {
  const limits = parseLimitSet(read('assets/limits/example-gain.json'));
  if (!limits.ok) throw new Error('the example limits do not read');
  const set = limits.value;
  const rows: Row[] = [];
  const row = (what: string, times: number[], note: string): void => {
    const [least, middle] = [times[0] as number, times[times.length >> 1] as number];
    const text = `least ${least.toFixed(0)} ms, median ${middle.toFixed(0)} ms; ${note}`;
    rows.push({ what, ours_perSecond: 1000 / middle, other: '', other_perSecond: null, ratio: null, note: text });
  };
  const blocks = schemeOf('two-hundred-blocks');
  const yard = schemeOf('tannery-yard');
  let findings = 0;
  const cold: number[] = [];
  for (let k = 0; k < 7; k++) {
    const start = performance.now();
    const result = await checkScheme(blocks, set, [], go);
    cold.push(performance.now() - start);
    findings = result?.findings.length ?? 0;
  }
  row(
    'check 50 rooms, 200 windows, 200 blocks, five days at 5 min',
    sorted(cold),
    `bar 1000 ms on one core; ${findings} findings`,
  );
  const memo = createCheckMemo();
  await checkScheme(blocks, set, [], go, { memo });
  const drag: number[] = [];
  for (let k = 0; k < 60; k++) {
    const now = withOverhang(blocks, 0.3 + 0.02 * k);
    const start = performance.now();
    await checkScheme(now, set, [], go, { memo });
    drag.push(performance.now() - start);
  }
  const p95 = sorted(drag)[57] as number;
  row('the same checked again after one overhang is dragged', drag, `p95 ${p95.toFixed(0)} ms, bar 50 ms`);
  const weatherFile = resolve(process.cwd(), '../shared/checks/weather/tmy_45.000_8.000_2005_2023.csv');
  if (existsSync(weatherFile)) {
    const bytes = readFileSync(weatherFile);
    const years: number[] = [];
    for (let k = 0; k < 3; k++) {
      const start = performance.now();
      const weather = weatherInput(
        blocks,
        { name: 'tmy_45.000_8.000_2005_2023.csv', hash: bytesHash(bytes) },
        readWeather(bytes.toString('latin1')),
        null,
      );
      if (!weather.ok) throw new Error('the weather file does not read');
      await checkScheme(blocks, set, [], go, { weather: weather.value });
      years.push(performance.now() - start);
    }
    row('the same over a weather year of 8 760 hours, file read and all', sorted(years), 'bar 10 000 ms on one core');
  }
  for (const file of ['723170TYA.CSV', 'tmy_45.000_8.000_2005_2023.csv']) {
    const path = resolve(process.cwd(), '../shared/checks/weather', file);
    if (!existsSync(path)) {
      console.log(`a weather year read: ${file}: skipped, the file is not beside the project`);
      continue;
    }
    const bytes = readFileSync(path);
    const reads: number[] = [];
    for (let k = 0; k < 9; k++) {
      const start = performance.now();
      if (!readWeather(textPieces(bytes)).ok) throw new Error('the weather file does not read');
      reads.push(performance.now() - start);
    }
    row(`a weather year read: ${file}`, sorted(reads), 'streamed in; bar 300 ms');
  }
  const result = await checkScheme(yard, set, [], go, { memo });
  const over = result?.findings.filter((f) => f.verdict === 'over') ?? [];
  const ways: number[] = [];
  let passing = 0;
  for (const finding of over) {
    const start = performance.now();
    passing += waysToPass(yard, set, finding.room, finding, createCheckMemo()).ways.filter((w) => w.passes).length;
    ways.push(performance.now() - start);
  }
  if (existsSync(weatherFile)) {
    const bytes = readFileSync(weatherFile);
    const table = readWeather(textPieces(bytes));
    const weather = weatherInput(yard, { name: 'w', hash: bytesHash(bytes) }, table, null);
    if (!weather.ok) throw new Error('the weather file does not read');
    // A brief, invented, that the demo's worst rooms are over.
    const brief: typeof set = {
      ...set,
      limits: [
        {
          id: 'warm',
          name: 'warm half of the year',
          metric: 'warm-gain',
          comparison: 'at-most',
          value: 55,
          unit: 'kWh/m²',
          source: 'invented for the bench',
          checked: null,
        },
      ],
    };
    const judged = await checkScheme(yard, brief, [], go, { weather: weather.value });
    const times: number[] = [];
    for (const finding of judged?.findings.filter((f) => f.verdict === 'over') ?? []) {
      const start = performance.now();
      waysToPass(yard, brief, finding.room, finding, createCheckMemo(), { weather: weather.value.months });
      times.push(performance.now() - start);
    }
    const longest = `${times.length} rooms, at most ${Math.max(...times).toFixed(0)} ms; bar 1000 ms`;
    row('ways to pass of one room over a weather year', sorted(times), longest);
  }
  row('ways to pass of one room of the demo', sorted(ways), `${over.length} findings, ${passing} ways; bar 1000 ms`);
  return rows;
}
