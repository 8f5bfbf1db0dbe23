import type { Kind } from '../state/selection.ts';
import { fixed } from '../ui/format.ts';
import { words } from '../words/words.ts';
import type { CellEdit, ListName } from './cell-edit.ts';

/** What a cell is worth: a number sorts as a number and stands to the right. */
export type Cell = string | number | null;

export type Column<Row> = {
  readonly key: string;
  readonly head: string;
  readonly unit?: string;
  readonly value: (row: Row) => Cell;
  /** How a number is written; text stands as it is. */
  readonly write?: (value: number, row: Row) => string;
  /** How its cells are changed; absent: they follow from the rest. */
  readonly edit?: CellEdit<Row>;
};

/** A schedule's rows and columns, read from the scheme and its shapes. */
export type Schedule<Row extends { readonly id: string }> = {
  readonly kind: Kind;
  readonly list: ListName;
  readonly rows: readonly Row[];
  readonly columns: readonly Column<Row>[];
};

/** The heads of all columns. */
export const head = words.schedule.head;
/** Metres to the centimetre. */
export const length = (v: number): string => fixed(v, 2);
/** Square metres to the tenth. */
export const area = (v: number): string => fixed(v, 1);

/** A text of the row's entry that can be typed. */
export const text = <R>(field: string, of: (row: R) => string): { readonly edit: CellEdit<R> } => ({
  edit: { field, kind: 'text', typed: of },
});
/** A number of it; null where the row has none. */
export const number = <R>(
  field: string,
  of: (row: R) => number | null,
  asShare?: CellEdit<R>['asShare'],
): { readonly edit: CellEdit<R> } => ({
  edit: {
    field,
    kind: 'number',
    typed: (row) => {
      const value = of(row);
      return value === null ? null : String(value);
    },
    asShare,
  },
});
/** One of a few, by value and name. */
export const choice = <R>(
  field: string,
  of: (row: R) => string,
  options: readonly (readonly [string, string])[],
): { readonly edit: CellEdit<R> } => ({ edit: { field, kind: 'choice', typed: of, options } });

/** Values with their names, to choose from. */
export const named = (names: { readonly [value: string]: string }): readonly (readonly [string, string])[] =>
  Object.entries(names);
/** Entries to choose from by their ids. */
export const ids = (entries: readonly { readonly id: string }[]): readonly (readonly [string, string])[] =>
  entries.map(({ id }) => [id, id] as const);
