import { constants } from 'node:fs';
import { type FileHandle, open, stat } from 'node:fs/promises';

export type ReadFault = {
  readonly code: 'missing' | 'denied' | 'not-a-file' | 'too-large' | 'unreadable';
  readonly message: string;
};
type Refused = { readonly ok: false; readonly fault: ReadFault };
export type ReadOutcome = { readonly ok: true; readonly bytes: Uint8Array } | Refused;

const fault = (code: ReadFault['code'], message: string): Refused => ({ ok: false, fault: { code, message } });

const mebibytes = (bytes: number): string => `${(bytes / 1024 / 1024).toFixed(bytes < 10 * 1024 * 1024 ? 1 : 0)} MiB`;

/** What the system refuses; null for what is no word of the system. */
function fromSystem(error: unknown): Refused | null {
  const { code } = error as NodeJS.ErrnoException;
  if (code === undefined) return null;
  if (code === 'ENOENT' || code === 'ENOTDIR') return fault('missing', 'there is no such file');
  if (code === 'EACCES' || code === 'EPERM') return fault('denied', 'it may not be read: the system refuses access');
  if (code === 'ENAMETOOLONG') return fault('missing', 'the name is too long to be a file');
  if (code === 'ERR_INVALID_ARG_VALUE') return fault('missing', 'the name holds a character that no file name can');
  return fault('unreadable', `it cannot be read (${code ?? 'unknown reason'})`);
}

const tooLarge = (size: number, most: number) =>
  fault('too-large', `it is ${mebibytes(size)} large and the most that is read is ${mebibytes(most)}`);

/**
 * Opens an ordinary file of at most `most` bytes for something to be done with it. The size is asked before anything is read, and a
 * folder, a device or a named pipe is refused before it is opened, because opening one can wait for ever.
 */
async function withFile<T>(
  path: string,
  most: number,
  use: (file: FileHandle, size: number) => Promise<T | Refused>,
): Promise<T | Refused> {
  let file: FileHandle | null = null;
  try {
    const before = await stat(path);
    if (before.isDirectory()) return fault('not-a-file', 'it is a folder');
    if (!before.isFile()) return fault('not-a-file', 'it is not an ordinary file');
    if (before.size > most) return tooLarge(before.size, most);
    file = await open(path, constants.O_RDONLY | (constants.O_NONBLOCK ?? 0));
    const opened = await file.stat();
    if (!opened.isFile()) return fault('not-a-file', 'it is not an ordinary file');
    return await use(file, opened.size);
  } catch (error) {
    const refused = fromSystem(error);
    if (refused === null) throw error;
    return refused;
  } finally {
    await file?.close();
  }
}

/** The bytes of a file; reads one past the bound at most, because a file may grow while it is being read. */
export const readBounded = (path: string, most: number): Promise<ReadOutcome> =>
  withFile<ReadOutcome>(path, most, async (file, size) => {
    const buffer = Buffer.alloc(Math.min(size, most) + 1);
    let length = 0;
    while (length < buffer.length) {
      const { bytesRead } = await file.read(buffer, length, buffer.length - length, length);
      if (bytesRead === 0) return { ok: true, bytes: buffer.subarray(0, length) };
      length += bytesRead;
    }
    if (length > most) return tooLarge(Math.max(size, most + 1), most);
    return { ok: true, bytes: buffer.subarray(0, length) };
  });

/** Bytes that are read at a time. */
const PIECE = 1 << 16;

/** What the taker of a piece threw. It is carried out apart: a decoder's errors, too, bear a code as those of the system do. */
class Thrown {
  readonly error: unknown;
  constructor(error: unknown) {
    this.error = error;
  }
}

/**
 * Hands the bytes of a file on piece by piece, so that it is never held whole.
 * @param take is given each piece, which it must not keep; false: the rest is not wanted
 * @returns what went wrong; null: all went well
 * @throws what `take` throws
 */
export async function streamBounded(
  path: string,
  most: number,
  take: (piece: Uint8Array) => boolean,
): Promise<ReadFault | null> {
  const refused = await withFile<Thrown | null>(path, most, async (file, size) => {
    const buffer = Buffer.alloc(PIECE);
    for (let at = 0; ; ) {
      const { bytesRead } = await file.read(buffer, 0, PIECE, at);
      if (bytesRead === 0) return null;
      at += bytesRead;
      if (at > most) return tooLarge(Math.max(size, at), most);
      try {
        if (!take(buffer.subarray(0, bytesRead))) return null;
      } catch (error) {
        return new Thrown(error);
      }
    }
  });
  if (refused instanceof Thrown) throw refused.error;
  return refused === null ? null : refused.fault;
}
