/** One state of a document and the edit that led to it, in words that stand after "Undo". */
export type Step<T> = { readonly value: T; readonly label: string };

/**
 * Undo without end: whole immutable values that share their structure, so that there are no inverse edits to get wrong.
 * Selection, camera and moment stay outside.
 */
export type History<T> = {
  readonly past: readonly Step<T>[];
  readonly now: Step<T>;
  readonly future: readonly Step<T>[];
};

/** A history that begins here: nothing to undo, nothing to redo. */
export const begin = <T>(value: T): History<T> => ({ past: [], now: { value, label: '' }, future: [] });

/** The history after an edit. An edit that gives back the same value changes nothing, and keeps what could be redone. */
export function commit<T>(history: History<T>, value: T, label: string): History<T> {
  if (value === history.now.value) return history;
  return { past: [...history.past, history.now], now: { value, label }, future: [] };
}

/** One edit back; the same history when there is none. */
export function undo<T>(history: History<T>): History<T> {
  const last = history.past.at(-1);
  if (last === undefined) return history;
  return { past: history.past.slice(0, -1), now: last, future: [history.now, ...history.future] };
}

/** One edit forward; the same history when there is none. */
export function redo<T>(history: History<T>): History<T> {
  const [next, ...rest] = history.future;
  if (next === undefined) return history;
  return { past: [...history.past, history.now], now: next, future: rest };
}

/** What an undo would take back, or null. */
export const undoLabel = <T>(history: History<T>): string | null =>
  history.past.length > 0 ? history.now.label : null;

/** What a redo would bring back, or null. */
export const redoLabel = <T>(history: History<T>): string | null => history.future[0]?.label ?? null;
