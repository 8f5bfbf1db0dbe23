import { readdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { defineConfig } from 'vitest/config';

const root = resolve(import.meta.dirname, '..');
const seeds = resolve(root, 'test/helpers/property-seed.ts');

/** Files of core that hold property tests: they run once with their fixed seeds, and once with a seed of this run's own. */
const properties = readdirSync(resolve(root, 'test/core'), { recursive: true, encoding: 'utf8' })
  .map((file) => `test/core/${file.replaceAll('\\', '/')}`)
  .filter(
    (file) => file.endsWith('.test.ts') && readFileSync(resolve(root, file), 'utf8').includes("from 'fast-check'"),
  );
const freshSeed = process.env['SHADEWRIGHT_SEED'] || String(Date.now() % 2 ** 31);

/** One config, one project a folder; `npm test` runs them all. Browser tests share one built program and one Chromium. */
export default defineConfig({
  root,
  test: {
    reporters: ['default', resolve(root, 'test/helpers/plain-line-reporter.ts')],
    projects: [
      {
        root,
        test: {
          name: 'core',
          include: ['test/core/**/*.test.ts', 'test/repro/**/*.test.ts'],
          setupFiles: [seeds],
          env: { SHADEWRIGHT_SEED: '' },
          testTimeout: 60_000,
        },
      },
      {
        root,
        test: {
          name: 'fresh',
          include: properties,
          setupFiles: [seeds],
          env: { SHADEWRIGHT_SEED: freshSeed },
          testTimeout: 60_000,
        },
      },
      {
        root,
        test: {
          name: 'app',
          include: ['test/app/**/*.test.ts'],
          globalSetup: ['test/helpers/fresh-build.ts'],
          testTimeout: 120_000,
          hookTimeout: 120_000,
        },
      },
      { root, test: { name: 'renderer', include: ['test/renderer/**/*.test.ts', 'test/renderer/**/*.test.tsx'] } },
      {
        root,
        test: {
          name: 'browser',
          include: ['test/browser/**/*.test.ts'],
          globalSetup: ['test/helpers/chromium-setup.ts'],
          testTimeout: 120_000,
          hookTimeout: 240_000,
          fileParallelism: false,
        },
      },
      {
        root,
        test: {
          name: 'desktop',
          include: ['test/desktop/**/*.test.ts'],
          globalSetup: ['test/helpers/fresh-build.ts'],
          testTimeout: 120_000,
        },
      },
    ],
  },
});
