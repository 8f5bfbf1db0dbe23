/**
 * Remembers results by the content they depend on. Keys are texts that spell that content out; a result that has not been asked
 * for while `size` others were is dropped, so that a long afternoon of dragging does not fill the memory.
 */
export class ContentMemo<T> {
  readonly #size: number;
  #recent = new Map<string, T>();
  #older = new Map<string, T>();
  /** How many results had to be worked out. */
  made = 0;

  /** @param size results kept at least; at most twice as many are */
  constructor(size: number) {
    this.#size = size;
  }

  /** The remembered result, or the one that `make` gives. */
  get(key: string, make: () => T): T {
    const recent = this.#recent.get(key);
    if (recent !== undefined) return recent;
    const older = this.#older.get(key);
    const value = older ?? make();
    if (older === undefined) this.made++;
    this.#recent.set(key, value);
    if (this.#recent.size >= this.#size) {
      this.#older = this.#recent;
      this.#recent = new Map();
    }
    return value;
  }
}
