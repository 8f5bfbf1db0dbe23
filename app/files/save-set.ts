import { copyFile, link, rename, unlink } from 'node:fs/promises';
import { dirname } from 'node:path';
import { besideName, flushFolder, makeReady, type Ready } from './save-atomic.ts';

/** A file of a set: where it goes and what is in it. */
export type SetFile = readonly [path: string, bytes: Uint8Array | string];

/** One of a set could not be written; none was. */
export class SetFault extends Error {
  /** The file that could not. */
  readonly path: string;

  constructor(path: string, cause: unknown) {
    super(`${path} was not written`, { cause });
    this.path = path;
  }
}

/**
 * Writes several files that belong together, all or none: each beside its place and flushed first, then all moved. When one cannot
 * be moved, those that were are taken back, and what they replaced is there again. A machine that stops among the moves leaves each
 * file whole, new ones and old ones side by side, with the kept old ones under hidden names. So does a disk that will not have an old
 * one back.
 * @throws {SetFault} naming the file, with the system's error as its cause; every file is then as it was
 */
export async function saveSet(files: readonly SetFile[]): Promise<void> {
  const ready: Ready[] = [];
  const moved: { readonly target: string; readonly kept: string | null }[] = [];
  let at = '';
  try {
    for (const [path, bytes] of files) {
      at = path;
      ready.push(await makeReady(path, bytes));
    }
    for (const [i, { target, isThere, move }] of ready.entries()) {
      at = files[i]?.[0] ?? target;
      const kept = isThere ? await keep(target) : null;
      try {
        await move();
      } catch (error) {
        // It still stands where it was: the second name of it is one too many.
        if (kept !== null) await unlink(kept).catch(() => undefined);
        throw error;
      }
      moved.push({ target, kept });
    }
  } catch (cause) {
    for (const { target, kept } of moved.reverse())
      await (kept === null ? unlink(target) : rename(kept, target)).catch(() => undefined);
    for (const { drop } of ready) await drop();
    throw new SetFault(at, cause);
  }
  for (const { kept } of moved) if (kept !== null) await unlink(kept).catch(() => undefined);
  for (const folder of new Set(moved.map(({ target }) => dirname(target)))) await flushFolder(folder);
}

/** Another name for a file that is about to be replaced; a copy where the disk knows no second names. Nothing is left when it fails. */
async function keep(target: string): Promise<string> {
  const kept = besideName(target, 'kept');
  try {
    await link(target, kept);
  } catch {
    try {
      await copyFile(target, kept);
    } catch (error) {
      await unlink(kept).catch(() => undefined);
      throw error;
    }
  }
  return kept;
}
