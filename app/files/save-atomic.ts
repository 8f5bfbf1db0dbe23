import { randomBytes } from 'node:crypto';
import { chmod, open, realpath, rename, stat, unlink } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';

/** A link is followed, so that saving over it changes the file it names and leaves the link in place. */
async function targetOf(path: string): Promise<string> {
  try {
    return await realpath(path);
  } catch {
    return path;
  }
}

/** The name of a file that was moved into place is on the disk only when its folder is; not every system can flush a folder. */
export async function flushFolder(folder: string): Promise<void> {
  if (process.platform === 'win32') return;
  const handle = await open(folder, 'r');
  try {
    await handle.sync();
  } catch {
    // Some file systems (network shares) refuse to flush a folder; the file itself is flushed already.
  } finally {
    await handle.close();
  }
}

/** Windows holds a file that a scanner or a viewer has open for a moment; a short wait is the known cure. */
async function renameWithPatience(from: string, to: string): Promise<void> {
  for (let attempt = 0; ; attempt++) {
    try {
      return await rename(from, to);
    } catch (error) {
      const { code } = error as NodeJS.ErrnoException;
      const isHeld = process.platform === 'win32' && (code === 'EPERM' || code === 'EACCES' || code === 'EBUSY');
      if (!isHeld || attempt === 5) throw error;
      await new Promise((done) => setTimeout(done, 40 * 2 ** attempt));
    }
  }
}

/** A file written beside its place, flushed, and ready to be moved there. */
export type Ready = {
  /** Where it goes; a link is followed. */
  readonly target: string;
  /** Whether something is there already. */
  readonly isThere: boolean;
  readonly move: () => Promise<void>;
  /** Takes away what was written beside. */
  readonly drop: () => Promise<void>;
};

/** A name beside a file that nothing has yet. */
export const besideName = (target: string, ending: string): string =>
  join(dirname(target), `.${basename(target).slice(0, 80)}.${randomBytes(6).toString('hex')}.${ending}`);

/**
 * Writes a file beside its place. The permissions of one that is there stay; something that is no ordinary file is refused.
 * @throws the system's error; nothing is left beside it then
 */
export async function makeReady(path: string, bytes: Uint8Array | string): Promise<Ready> {
  const target = await targetOf(path);
  const before = await stat(target).catch(() => null);
  if (before && !before.isFile()) {
    throw Object.assign(new Error(`${basename(target)} is not an ordinary file`), {
      code: before.isDirectory() ? 'EISDIR' : 'EINVAL',
    });
  }
  const beside = besideName(target, 'part');
  const drop = () => unlink(beside).catch(() => undefined);
  const handle = await open(beside, 'wx', 0o666);
  try {
    try {
      await handle.writeFile(bytes);
      await handle.sync();
    } finally {
      await handle.close();
    }
    if (before && process.platform !== 'win32') await chmod(beside, before.mode & 0o7777);
  } catch (error) {
    await drop();
    throw error;
  }
  return { target, isThere: before !== null, move: () => renameWithPatience(beside, target), drop };
}

/**
 * Writes a file so that a crash at any point leaves the whole old one or the whole new one: beside it, flushed, then renamed.
 * @throws the system's error; the old file is then untouched and nothing is left beside it
 */
export async function saveAtomic(path: string, bytes: Uint8Array | string): Promise<void> {
  const ready = await makeReady(path, bytes);
  try {
    await ready.move();
  } catch (error) {
    await ready.drop();
    throw error;
  }
  await flushFolder(dirname(ready.target));
}
