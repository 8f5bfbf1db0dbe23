/** How the text of a weather file may be spelt: UTF-8 where it is that, else Latin 1, in which older files spell their stations. */
export const SPELLINGS = ['utf-8', 'latin1'] as const;
export type Spelling = (typeof SPELLINGS)[number];

/** Bytes that become text at a time. */
const PIECE = 1 << 16;

/** Turns bytes that come in pieces into text. @throws {TypeError} at bytes that are no UTF-8, where that was said */
export class Speller {
  readonly #decoder: InstanceType<typeof TextDecoder>;

  constructor(spelling: Spelling) {
    // The mark at the head of a file goes on, for whoever reads the text to leave out.
    this.#decoder = new TextDecoder(spelling, { fatal: spelling === 'utf-8', ignoreBOM: true });
  }

  push(bytes: Uint8Array): string {
    return this.#decoder.decode(bytes, { stream: true });
  }

  finish(): string {
    return this.#decoder.decode();
  }
}

/** The text of bytes that are at hand, piece by piece, so that it never stands there whole. */
export function* textPieces(bytes: Uint8Array): Generator<string> {
  const speller = new Speller(spellingOf(bytes));
  for (const part of parts(bytes)) yield speller.push(part);
  yield speller.finish();
}

function spellingOf(bytes: Uint8Array): Spelling {
  const speller = new Speller('utf-8');
  try {
    for (const part of parts(bytes)) speller.push(part);
    speller.finish();
    return 'utf-8';
  } catch {
    return 'latin1';
  }
}

function* parts(bytes: Uint8Array): Generator<Uint8Array> {
  for (let from = 0; from < bytes.length; from += PIECE) yield bytes.subarray(from, from + PIECE);
}
