/** A line longer than this is no row of a table. */
export const LONGEST_LINE = 100_000;

/**
 * Cuts text that comes in pieces into lines, wherever the pieces end. Lines keep their carriage return, as splitting at line feeds
 * would; what follows the last line feed is a line too, empty where nothing follows. The mark that some programs put at the head of
 * a text file is left out.
 */
export class LineCutter {
  readonly #take: (line: string, number: number) => void;
  #rest = '';
  #lines = 0;
  #characters = 0;

  /** @param take is given each line and its number, 1 the first */
  constructor(take: (line: string, number: number) => void) {
    this.#take = take;
  }

  /** Characters so far. */
  get characters(): number {
    return this.#characters;
  }

  /** Whether the line that is not yet whole is too long to be one. */
  get isEndless(): boolean {
    return this.#rest.length > LONGEST_LINE;
  }

  /** Number of the line that is not yet whole. */
  get at(): number {
    return this.#lines + 1;
  }

  push(piece: string): void {
    let from = this.#characters === 0 && piece.charCodeAt(0) === 0xfeff ? 1 : 0;
    this.#characters += piece.length;
    for (let to = piece.indexOf('\n', from); to >= 0; to = piece.indexOf('\n', from)) {
      this.#lines++;
      this.#take(this.#rest === '' ? piece.slice(from, to) : this.#rest + piece.slice(from, to), this.#lines);
      this.#rest = '';
      from = to + 1;
    }
    this.#rest += piece.slice(from);
  }

  /** The last line. */
  finish(): void {
    this.#lines++;
    this.#take(this.#rest, this.#lines);
    this.#rest = '';
  }
}
