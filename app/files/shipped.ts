import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';

/** Upwards from where this code runs (built into out/main, or the source in app/files) to the folder that holds assets. */
function findRoot(from: string): string {
  for (let folder = from; ; folder = dirname(folder)) {
    if (existsSync(join(folder, 'assets', 'demo')) && existsSync(join(folder, 'package.json'))) return folder;
    if (dirname(folder) === folder)
      throw new Error(`the program's own files are not where they should be (looked upwards from ${from})`);
  }
}

let root: string | null = null;

/** A path inside what ships with the program, such as `shipped('assets', 'demo')`. */
export function shipped(...parts: readonly string[]): string {
  root ??= findRoot(import.meta.dirname);
  return join(root, ...parts);
}
