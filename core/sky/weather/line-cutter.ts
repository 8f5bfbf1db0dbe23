/** A line longer than this is no row of a table. */
export const LONGEST_LINE = 100_000;

/** A line, as far as it has come. */
export type Line = {
  readonly text: string;
  /** 1 the first. */
  readonly number: number;
  /** Characters of the text before it. */
  readonly before: number;
};

/**
 * Cuts text that comes in pieces into lines, wherever the pieces end. Lines keep their carriage return, as splitting at line feeds
 * would; what follows the last line feed is a line too, empty where nothing follows. The mark that some programs put at the head of
 * a text file is left out.
 */
export class LineCutter {
  readonly #take: (line: Line) => void;
  #rest = '';
  #number = 1;
  #before = 0;

  /** @param take is given each line */
  constructor(take: (line: Line) => void) {
    this.#take = take;
  }

  /** The line that is not yet whole. */
  get rest(): Line {
    return { text: this.#rest, number: this.#number, before: this.#before };
  }

  push(piece: string): void {
    let from = 0;
    if (this.#before === 0 && this.#rest === '' && piece.charCodeAt(0) === 0xfeff) from = this.#before = 1;
    for (let to = piece.indexOf('\n', from); to >= 0; to = piece.indexOf('\n', from)) {
      this.#rest += piece.slice(from, to);
      this.finish();
      from = to + 1;
    }
    this.#rest += piece.slice(from);
  }

  /** The line is whole: it ends here. */
  finish(): void {
    const line = this.rest;
    this.#take(line);
    this.#rest = '';
    this.#number++;
    this.#before += line.text.length + 1;
  }
}
