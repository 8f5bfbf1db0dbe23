import { resolve } from 'node:path';

/** Begins the word that names an example to start with; the key follows. */
export const EXAMPLE_WORD = '--example=';

/** The key of the example that the desktop was started with; null: none. */
export function startExample(words: readonly string[]): string | null {
  const word = words.findLast((w) => w.startsWith(EXAMPLE_WORD));
  return word === undefined ? null : word.slice(EXAMPLE_WORD.length);
}

/**
 * The scheme that the desktop was started with, as an absolute path; null: none. Electron's own switches are not files, and while
 * the program is not packaged the first word is the program's folder.
 * @param words      `process.argv`, or that of a second start
 * @param isPackaged whether the words begin with the program alone
 * @param folder     what a relative path stands in
 */
export function startFile(words: readonly string[], isPackaged: boolean, folder: string): string | null {
  const files = words.slice(isPackaged ? 1 : 2).filter((word) => word !== '' && !word.startsWith('-'));
  const last = files.at(-1);
  return last === undefined ? null : resolve(folder, last);
}
