import { mkdir } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { RecentList } from '../contract/stored.ts';
import { readBounded } from './read-bounded.ts';
import { saveAtomic } from './save-atomic.ts';

const MOST = 12;
const MAX_LIST_BYTES = 256 * 1024;

export type RecentFile = { readonly path: string; readonly name: string; readonly opened: string };

/** The schemes opened or saved last, newest first, kept in the settings folder. A list that cannot be read counts as empty. */
export class RecentFiles {
  #file: string;
  #clock: () => Date;
  #last: Promise<void> = Promise.resolve();

  constructor(dataDir: string, clock: () => Date = () => new Date()) {
    this.#file = join(dataDir, 'recent.json');
    this.#clock = clock;
  }

  async list(): Promise<readonly RecentFile[]> {
    const read = await readBounded(this.#file, MAX_LIST_BYTES);
    if (!read.ok) return [];
    try {
      const list = RecentList.parse(JSON.parse(new TextDecoder().decode(read.bytes)));
      return list.map((entry) => ({ ...entry, name: basename(entry.path) }));
    } catch {
      return [];
    }
  }

  /** Puts a file first. Calls follow one another, so that two at once do not lose one. */
  remember(path: string): Promise<void> {
    const next = this.#last.then(async () => {
      const others = (await this.list())
        .filter((entry) => entry.path !== path)
        .map(({ path, opened }) => ({ path, opened }));
      const list = [{ path, opened: this.#clock().toISOString() }, ...others].slice(0, MOST);
      await mkdir(dirname(this.#file), { recursive: true, mode: 0o700 });
      await saveAtomic(this.#file, `${JSON.stringify(list, null, 2)}\n`);
    });
    this.#last = next.catch(() => undefined);
    return next;
  }
}
