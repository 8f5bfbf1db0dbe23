import { constants } from 'node:fs';
import { type FileHandle, open, stat } from 'node:fs/promises';

export type ReadFault = {
  readonly code: 'missing' | 'denied' | 'not-a-file' | 'too-large' | 'unreadable';
  readonly message: string;
};
export type ReadOutcome =
  | { readonly ok: true; readonly bytes: Uint8Array }
  | { readonly ok: false; readonly fault: ReadFault };

const fault = (code: ReadFault['code'], message: string): ReadOutcome => ({ ok: false, fault: { code, message } });

const mebibytes = (bytes: number): string => `${(bytes / 1024 / 1024).toFixed(bytes < 10 * 1024 * 1024 ? 1 : 0)} MiB`;

function fromSystem(error: unknown): ReadOutcome {
  const { code } = error as NodeJS.ErrnoException;
  if (code === 'ENOENT' || code === 'ENOTDIR') return fault('missing', 'there is no such file');
  if (code === 'EACCES' || code === 'EPERM') return fault('denied', 'it may not be read: the system refuses access');
  if (code === 'ENAMETOOLONG') return fault('missing', 'the name is too long to be a file');
  if (code === 'ERR_INVALID_ARG_VALUE') return fault('missing', 'the name holds a character that no file name can');
  return fault('unreadable', `it cannot be read (${code ?? 'unknown reason'})`);
}

/** Reads to the end, one byte past the bound at most: a file may grow while it is being read. */
async function readUpTo(file: FileHandle, size: number, most: number): Promise<Uint8Array | null> {
  const buffer = Buffer.alloc(Math.min(size, most) + 1);
  let length = 0;
  while (length < buffer.length) {
    const { bytesRead } = await file.read(buffer, length, buffer.length - length, length);
    if (bytesRead === 0) return buffer.subarray(0, length);
    length += bytesRead;
  }
  return length > most ? null : buffer.subarray(0, length);
}

/**
 * The bytes of an ordinary file of at most `most` bytes. The size is asked before anything is read, and a folder, a device or a
 * named pipe is refused before it is opened, because opening one can wait for ever.
 */
export async function readBounded(path: string, most: number): Promise<ReadOutcome> {
  const tooLarge = (size: number) =>
    fault('too-large', `it is ${mebibytes(size)} large and the most that is read is ${mebibytes(most)}`);
  let file: FileHandle | null = null;
  try {
    const before = await stat(path);
    if (before.isDirectory()) return fault('not-a-file', 'it is a folder');
    if (!before.isFile()) return fault('not-a-file', 'it is not an ordinary file');
    if (before.size > most) return tooLarge(before.size);
    file = await open(path, constants.O_RDONLY | (constants.O_NONBLOCK ?? 0));
    const opened = await file.stat();
    if (!opened.isFile()) return fault('not-a-file', 'it is not an ordinary file');
    const bytes = await readUpTo(file, opened.size, most);
    return bytes ? { ok: true, bytes } : tooLarge(Math.max(opened.size, most + 1));
  } catch (error) {
    return fromSystem(error);
  } finally {
    await file?.close();
  }
}
