import { randomBytes } from 'node:crypto';
import { realpath } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { FileId } from '../contract/host.ts';

type Granted = { readonly path: string; readonly name: string };

/** More than anyone opens in a sitting: old grants are never dropped, so this only stops a page that runs wild. */
const MOST = 10_000;

/**
 * The files that the user chose in this run, under opaque ids. A page holds ids and names, never a path. Only a dialog's
 * answer, the command line, the system's open-file event or a dropped file becomes a grant, and links are resolved once, then.
 */
export class GrantedFiles {
  #byId = new Map<string, Granted>();
  #byPath = new Map<string, FileId>();

  /** The id of a file that the user chose; the same file gets the same id. It need not exist yet (save as). */
  async grant(path: string): Promise<{ id: FileId; name: string }> {
    const real = await realpath(path).catch(async () => join(await realpath(dirname(path)), basename(path)));
    const name = basename(path);
    const known = this.#byPath.get(real);
    if (known) return { id: known, name };
    if (this.#byId.size >= MOST) throw new Error('too many files are open in this run');
    const id = FileId.parse(randomBytes(18).toString('base64url'));
    this.#byId.set(id, { path: real, name });
    this.#byPath.set(real, id);
    return { id, name };
  }

  /** The file behind an id; null for an id that was never given out. */
  find(id: FileId): Granted | null {
    return this.#byId.get(id) ?? null;
  }
}
