/** Exit statuses of the command, as its help states them. */
export const EXIT = { within: 0, over: 1, refused: 2, fault: 3 } as const;

/** The input or the call is wrong, and the user can put it right: one line or more, each naming file, place and cure. */
export class Refusal extends Error {
  readonly lines: readonly string[];
  constructor(...lines: readonly string[]) {
    super(lines.join('\n'));
    this.lines = lines;
  }
}
