/**
 * `npm run bench`: bundles the benches as plain modules (no test runner's wrapping in the timed code), runs each against
 * public libraries in the same process, interleaved, and prints ratios. Pass names to run some only: `npm run bench -- sun`.
 */
import { readdirSync } from 'node:fs';
import { resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from 'vite';

const here = import.meta.dirname;
const root = resolve(here, '../..');
const entries = readdirSync(here).filter((f) => f.endsWith('.ts') && f !== 'row.ts');
const input = Object.fromEntries(entries.map((f) => [f.slice(0, -3), resolve(here, f)]));

await build({
  configFile: false,
  root,
  logLevel: 'error',
  ssr: { noExternal: ['temporal-polyfill', 'clipper2-ts', 'three', 'three-mesh-bvh', 'zod', '@noble/hashes'] },
  build: {
    ssr: true,
    outDir: resolve(root, 'out/bench'),
    emptyOutDir: true,
    minify: false,
    target: 'node20',
    rolldownOptions: { input },
  },
});

const wanted = process.argv.slice(2);
const pad = (text, n) => String(text).padEnd(n);
const num = (v) => (v === null || v === undefined ? '' : v >= 1e5 ? `${(v / 1e6).toPrecision(3)} M` : v.toPrecision(4));
for (const name of Object.keys(input)) {
  if (wanted.length > 0 && !wanted.some((w) => name.includes(w))) continue;
  const module = await import(pathToFileURL(resolve(root, `out/bench/${name}.js`)).href);
  const bench = Object.entries(module).find(([key, value]) => key.startsWith('bench') && typeof value === 'function');
  if (!bench) continue;
  console.log(`\n${name}`);
  console.log(`${pad('work', 62)}${pad('ours /s', 12)}${pad('beside', 26)}${pad('its /s', 12)}ratio`);
  for (const row of await bench[1]()) {
    console.log(
      `${pad(row.what, 62)}${pad(num(row.ours_perSecond), 12)}${pad(row.other ?? '', 26)}${pad(num(row.other_perSecond), 12)}${row.ratio ? `${row.ratio.toPrecision(3)}×` : ''}`,
    );
    if (row.note) console.log(`    ${row.note}`);
  }
}
