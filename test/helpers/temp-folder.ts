import { mkdtempSync, realpathSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { onTestFinished } from 'vitest';

/** An empty folder that goes when the test has ended. */
export function tempFolder(): string {
  const folder = realpathSync(mkdtempSync(join(tmpdir(), 'shadewright-test-')));
  onTestFinished(() => rmSync(folder, { recursive: true, force: true }));
  return folder;
}
