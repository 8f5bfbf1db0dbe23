/** One line of the bench's table: what was done, how often a second, and how often a public library did the same in the same run. */
export type Row = {
  readonly what: string;
  readonly ours_perSecond: number;
  /** The library beside us, with its version; empty where there is none that does this. */
  readonly other: string;
  readonly other_perSecond: number | null;
  readonly ratio: number | null;
  /** Sizes, spread, accuracy: what a reader needs to judge the line. */
  readonly note: string;
};
