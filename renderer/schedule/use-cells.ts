import { useState } from 'preact/hooks';
import type { SchemeEdit } from '../../core/scheme/edit.ts';
import type { Fault } from '../../core/scheme/fault.ts';
import { performEdit } from '../state/perform-edit.ts';
import { isSelected } from '../state/selection.ts';
import { words } from '../words/words.ts';
import { type Editing, type Row, written } from './body-row.tsx';
import { type Changes, changesOf, clipboardCell, type ListName, readClipboard } from './cell-edit.ts';
import type { Column, Schedule } from './columns.ts';
import { copiesOf } from './row-actions.ts';

/** Changes with the entries that they are made to added first, as the same step. */
function withAdded(changes: Changes, list: ListName, added: readonly { readonly id: string }[], name: string): Changes {
  if (!changes.ok || added.length === 0) return changes;
  const adds = added.map((entry): SchemeEdit => ({ kind: 'add', list, entry }));
  const sets = changes.edit === null ? [] : [changes.edit];
  return { ok: true, edit: { kind: 'together', edits: [...adds, ...sets], name } };
}

/** The cells of a schedule as they are being changed. */
export type Cells<R extends Row> = {
  readonly editing: Editing | null;
  /** What was refused last; nothing of it was changed. */
  readonly faults: readonly Fault[];
  /** Opens a cell. @param typed the key that began it, in place of what stands there; null: what stands there */
  readonly open: (row: R | undefined, column: Column<R> | undefined, typed: string | null) => void;
  readonly close: () => void;
  readonly dismiss: () => void;
  /** Takes what was typed into a cell, for all rows that are chosen with its row. */
  readonly take: (column: Column<R>, id: string, text: string) => void;
  /** Takes a clipboard from a cell on, downwards and to the right; cells that follow from others are passed over, and lines past the last row are added. */
  readonly paste: (text: string, row: number, column: number) => void;
  /** The chosen rows as a clipboard. */
  readonly copy: () => string;
};

/** @param rows as they are sorted */
export function useCells<R extends Row>({ kind, list, columns }: Schedule<R>, rows: readonly R[]): Cells<R> {
  const [editing, setEditing] = useState<Editing | null>(null);
  const [faults, setFaults] = useState<readonly Fault[]>([]);
  const perform = (changes: Changes): void => {
    if (!changes.ok) setFaults(changes.faults);
    else setFaults(changes.edit === null ? [] : performEdit(changes.edit, undefined, false));
  };
  const chosen = (): readonly R[] => rows.filter((row) => isSelected(kind, row.id));
  const cell = (row: R, of: Column<R>, text: string) => ({ id: row.id, row, head: of.head, edit: of.edit, text });
  return {
    editing,
    faults,
    open: (row, of, typed) => {
      const stands = row === undefined ? null : (of?.edit?.typed(row) ?? null);
      if (row === undefined || of === undefined || stands === null) return;
      setFaults([]);
      setEditing({ id: row.id, key: of.key, begin: typed ?? stands, isTyped: typed !== null });
    },
    close: () => setEditing(null),
    dismiss: () => setFaults([]),
    take: (of, id, text) => {
      const changed = isSelected(kind, id) ? chosen() : rows.filter((row) => row.id === id);
      const { editOne, editMany } = words.schedule;
      const name = changed.length === 1 ? editOne(of.head, id) : editMany(of.head, changed.length);
      perform(
        changesOf(
          list,
          changed.map((row) => cell(row, of, text)),
          name,
        ),
      );
    },
    paste: (text, row, column) => {
      const lines = readClipboard(text);
      const beyond = lines.slice(Math.max(0, rows.length - row));
      const last = rows.at(-1);
      const idAt = columns.findIndex((of) => of.edit?.field === 'id') - column;
      // Lines that go on past the last row are rows of their own.
      const added =
        last === undefined || beyond.length === 0
          ? []
          : copiesOf(
              kind,
              list,
              last.id,
              beyond.map((line) => line[idAt]?.trim() || null),
            );
      const all = lines.flatMap((line, r) =>
        line.flatMap((typed, c) => {
          const [at, of, entry] = [rows[row + r], columns[column + c], added[row + r - rows.length]];
          if (of === undefined) return [];
          if (at !== undefined) return [cell(at, of, typed)];
          if (entry === undefined || last === undefined || of.edit?.field === 'id') return [];
          return [{ ...cell(last, of, typed), id: entry.id, isNew: true }];
        }),
      );
      const own = all.filter(({ edit, row: at }) => (edit?.typed(at) ?? null) !== null);
      // Where none of them can be changed, it is told.
      const meant = own.length > 0 ? own : all;
      const { pasted, pastedRows } = words.schedule;
      const name = added.length === 0 ? pasted(meant.length) : pastedRows(added.length);
      perform(withAdded(changesOf(list, meant, name), list, added, name));
    },
    copy: () =>
      chosen()
        .map((row) => columns.map((of) => clipboardCell(of.edit?.typed(row) ?? written(of, row))).join('\t'))
        .join('\n'),
  };
}
