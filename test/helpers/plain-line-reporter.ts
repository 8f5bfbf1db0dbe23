import { writeSync } from 'node:fs';
import type { Reporter, TestModule } from 'vitest/node';

export type Counts = { readonly passed: number; readonly failed: number; readonly skipped: number };

/** The one line that scripts read: `12 passed, 0 failed`, with `, 3 skipped` where some were. */
export const plainLine = ({ passed, failed, skipped }: Counts): string =>
  `${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`;

/** A file that does not load has no tests to fail, so it counts as one failure itself; so does each error outside any test. */
export function countTests(modules: readonly Pick<TestModule, 'children' | 'errors'>[], strayErrors: number): Counts {
  let passed = 0;
  let failed = strayErrors;
  let skipped = 0;
  for (const module of modules) {
    failed += module.errors().length;
    for (const test of module.children.allTests()) {
      const { state } = test.result();
      if (state === 'passed') passed++;
      else if (state === 'failed') failed++;
      else skipped++;
    }
  }
  return { passed, failed, skipped };
}

/** Prints the counts alone on the last line of a run, after every other reporter and every teardown has had its say. */
export default class PlainLineReporter implements Reporter {
  #counts: Counts | null = null;

  onInit(): void {
    process.once('exit', () => {
      if (this.#counts) writeSync(1, `${plainLine(this.#counts)}\n`);
    });
  }

  onTestRunEnd(modules: readonly TestModule[], strayErrors: readonly unknown[]): void {
    this.#counts = countTests(modules, strayErrors.length);
  }
}
