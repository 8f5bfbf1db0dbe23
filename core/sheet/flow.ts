import type { Mark, Mm } from './drawing.ts';
import { line, type Piece, paragraph, type WordStyle } from './marks.ts';
import { RULE } from './ink.ts';
import type { Rect } from './paper.ts';

type Content = { readonly title: string; readonly marks: readonly Mark[] };

/** What stands at the head of every page of a flow, drawn from the top of its rectangle. */
export type PageHead = (rect: Rect, title: string) => Piece;

/** Text and tables running down pages of one size: keeps the place, and turns the page when something does not fit. */
export class Flow {
  readonly #rect: Rect;
  readonly #head: PageHead;
  readonly #pages: { title: string; marks: Mark[] }[] = [];
  #y: Mm = 0;

  constructor(rect: Rect, head: PageHead) {
    this.#rect = rect;
    this.#head = head;
  }

  get x(): Mm {
    return this.#rect.x;
  }

  get y(): Mm {
    return this.#y;
  }

  get width(): Mm {
    return this.#rect.width;
  }

  /** Room left on this page. */
  get left(): Mm {
    return this.#rect.y + this.#rect.height - this.#y;
  }

  get pages(): readonly Content[] {
    return this.#pages;
  }

  /** Starts a page. @param title  its bookmark, and what its head says */
  turn(title: string): void {
    const head = this.#head(this.#rect, title);
    this.#pages.push({ title, marks: [...head.marks] });
    this.#y = this.#rect.y + head.height;
  }

  /** Turns the page unless so much room is left. @returns whether it turned */
  need(height: Mm): boolean {
    if (this.left >= height) return false;
    this.turn(this.#pages.at(-1)?.title ?? '');
    return true;
  }

  /** Marks that were placed by `x` and `y`, and how far down they reach. */
  put(marks: readonly Mark[], height: Mm): void {
    this.#pages.at(-1)?.marks.push(...marks);
    this.#y += height;
  }

  gap(height: Mm): void {
    this.#y += height;
  }

  /**
   * A paragraph over the full width, or from an inset; a page break falls between its lines only when it is longer than a page.
   * @param most  lines at most, the last of them cut
   */
  say(text: string, style: WordStyle = {}, inset: Mm = 0, most = Number.POSITIVE_INFINITY): void {
    const at = (): Piece => paragraph(text, this.x + inset, this.#y, this.width - inset, style, most);
    const piece = at();
    if (piece.height <= this.#rect.height * 0.8) {
      this.need(piece.height);
      this.put(at().marks, piece.height);
      return;
    }
    for (const mark of piece.marks) {
      if (mark.kind !== 'text') continue;
      const height = piece.height / piece.marks.length;
      this.need(height);
      this.put([{ ...mark, at: [mark.at[0], this.#y + mark.size * 0.75] }], height);
    }
  }

  /** A heading that stays with what follows it. */
  heading(text: string, keep: Mm = 24): void {
    if (!this.need(keep)) this.gap(3);
    this.say(text, { size: 4.6, face: 'semibold' }, 0, 2);
    this.put([line(this.x, this.#y, this.x + this.width, this.#y, RULE)], 2);
  }
}
