/**
 * Writes the sample sheets into assets/samples, from the demo of Tannery Yard: PDFs, and pages as pictures. Run with
 * `node test/helpers/make-samples.mjs` after a change of the sheets, look at each picture, and commit them.
 */
import { spawnSync } from 'node:child_process';
import { resolve } from 'node:path';

const root = resolve(import.meta.dirname, '../..');
const words = [
  'vitest',
  'run',
  '--config',
  'test/vitest.config.ts',
  '--project',
  'app',
  'test/app/pdf/samples.test.ts',
];
const run = spawnSync('npx', words, {
  cwd: root,
  env: { ...process.env, SHADEWRIGHT_SAMPLES: '1' },
  stdio: 'inherit',
  shell: process.platform === 'win32',
});
process.exitCode = run.status ?? 1;
