/** What is wrong with an input: where it stands, what it is, and what would cure it. Errors stop the work, warnings go with it. */
export type Fault = {
  readonly level: 'error' | 'warning';
  /** A stable word for programs and translations, such as `out-of-range` or `window-outside-wall`. */
  readonly code: string;
  /** Path into the file, such as `rooms[3].windows[0].width`; empty for the whole file. */
  readonly place: string;
  /** What is wrong, in one clause without a full stop. */
  readonly message: string;
  /** What would put it right, in one clause. */
  readonly cure: string;
};

/** A value, or the faults that stand in its way. `notes` are warnings that go with a value. */
export type Checked<T> =
  | { readonly ok: true; readonly value: T; readonly notes: readonly Fault[] }
  | { readonly ok: false; readonly faults: readonly Fault[] };

/** One fault as a line: `place: message (cure)`. */
export const faultLine = (f: Fault): string =>
  `${f.place === '' ? '' : `${f.place}: `}${f.message}${f.cure === '' ? '' : `; ${f.cure}`}`;
