import type {} from 'vitest';
import type { TestProject } from 'vitest/node';
import { findChromium } from './find-chromium.ts';
import freshBuild from './fresh-build.ts';

declare module 'vitest' {
  interface ProvidedContext {
    /** Path of an installed browser, for `inject('chromium')`; null: none here, and the tests that need one skip. */
    chromium: string | null;
  }
}

/** Before the browser tests: an up-to-date program and a browser. Where CI is set a missing browser is a failure, not a skip. */
export default async function chromiumSetup(project: TestProject): Promise<void> {
  const found = findChromium();
  if (found.path === null) {
    if (process.env.CI) throw new Error(`Browser tests cannot run: ${found.why}.`);
    console.warn(`\n*** BROWSER TESTS SKIPPED: ${found.why}. ***\n`);
  } else {
    await freshBuild();
  }
  project.provide('chromium', found.path);
}
