import { mkdir, readdir, unlink } from 'node:fs/promises';
import { join } from 'node:path';
import { SlotKey } from '../contract/host.ts';
import { StoredSlot } from '../contract/stored.ts';
import { decode, encode } from '../contract/wire.ts';
import { readBounded } from './read-bounded.ts';
import { saveAtomic } from './save-atomic.ts';

/** A slot holds a document of the host's largest size, a third larger in base64. */
const MAX_SLOT_BYTES = 96 * 1024 * 1024;
/** Slots shown and kept: unsaved work is never thrown away to make room, so a full folder refuses new documents and says so. */
const MOST = 200;
const SUFFIX = '.autosave.json';

export type RecoverySlot = StoredSlot & { readonly key: string };

/** Unsaved work, one slot a document, in the settings folder and never beside the scheme. */
export class Recovery {
  #folder: string;
  #clock: () => Date;

  constructor(dataDir: string, clock: () => Date = () => new Date()) {
    this.#folder = join(dataDir, 'recovery');
    this.#clock = clock;
  }

  async #keys(): Promise<string[]> {
    const names = await readdir(this.#folder).catch(() => []);
    return names.filter((name) => name.endsWith(SUFFIX)).map((name) => name.slice(0, -SUFFIX.length));
  }

  #path(key: string): string {
    return join(this.#folder, `${SlotKey.parse(key)}${SUFFIX}`);
  }

  async keep(key: string, name: string, bytes: Uint8Array): Promise<void> {
    const path = this.#path(key);
    await mkdir(this.#folder, { recursive: true, mode: 0o700 });
    const keys = await this.#keys();
    if (!keys.includes(key) && keys.length >= MOST)
      throw new Error(`${MOST} documents already wait to be recovered; recover or discard some`);
    await saveAtomic(path, encode({ name, saved: this.#clock().toISOString(), bytes }));
  }

  /** Newest first. A slot that cannot be read is passed over and left where it is. */
  async list(): Promise<readonly RecoverySlot[]> {
    const slots: RecoverySlot[] = [];
    for (const key of await this.#keys()) {
      if (!SlotKey.safeParse(key).success) continue;
      const read = await readBounded(this.#path(key), MAX_SLOT_BYTES);
      if (!read.ok) continue;
      try {
        slots.push({ key, ...StoredSlot.parse(decode(new TextDecoder().decode(read.bytes))) });
      } catch {
        // Half a slot cannot come from us (it is renamed into place), so someone else's file: not ours to delete.
      }
    }
    return slots.sort((a, b) => (a.saved < b.saved ? 1 : -1));
  }

  async discard(key: string): Promise<void> {
    await unlink(this.#path(key)).catch((error: NodeJS.ErrnoException) => {
      if (error.code !== 'ENOENT') throw error;
    });
  }
}
