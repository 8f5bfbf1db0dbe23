import { isSelected, select, toggle } from '../state/selection.ts';
import { words } from '../words/words.ts';
import type { CellEdit } from './cell-edit.ts';
import { CellEditor } from './cell-editor.tsx';
import type { Cell, Column, Schedule } from './columns.ts';

export type Row = { readonly id: string };

/** A cell as it reads. */
export const written = <R extends Row>(column: Column<R>, row: R): string => {
  const value: Cell = column.value(row);
  if (value === null || value === '') return '–';
  return typeof value === 'number' ? (column.write?.(value, row) ?? String(value)) : value;
};

/** Whether a cell may be cut short, so that the whole of it is shown under the pointer. */
const isLong = (text: string): boolean => text.length > 20;

export const isNumeric = <R extends Row>(column: Column<R>): boolean => column.write !== undefined;

/** The cell that is being changed, and what stands in it at first. */
export type Editing = { readonly id: string; readonly key: string; readonly begin: string; readonly isTyped: boolean };

type BodyRowProps<R extends Row> = {
  readonly row: R;
  readonly schedule: Schedule<R>;
  readonly index: number;
  /** The column that the tab key stops at; null: the row has no stop. */
  readonly stop: number | null;
  readonly editing: Editing | null;
  readonly onCell: (column: number) => void;
  readonly onEdit: (column: number) => void;
  readonly onRange: () => void;
  readonly onTake: (column: Column<R>, text: string, then: 'down' | 'stay' | 'right' | 'left') => void;
  readonly onGiveUp: () => void;
};

/** One thing: its cells, and of those the one that is being changed. */
export function BodyRow<R extends Row>(props: BodyRowProps<R>) {
  const { row, schedule, index, stop, editing } = props;
  const { kind, columns } = schedule;
  const chosen = isSelected(kind, row.id);
  const choose = (event: MouseEvent): void => {
    if (event.shiftKey) props.onRange();
    else if (event.ctrlKey || event.metaKey) toggle(kind, row.id);
    // A second press on one of several chosen rows keeps them, so that they can be changed together.
    else if (!(chosen && event.detail > 1)) select(kind, row.id);
  };
  return (
    <tr
      data-row={index}
      class={chosen ? 'chosen' : ''}
      aria-rowindex={index + 2}
      aria-selected={chosen}
      onClick={choose}
    >
      {columns.map((column, at) => {
        const isEdited = editing?.key === column.key && column.edit !== undefined;
        return (
          <td
            key={column.key}
            data-column={at}
            class={[isNumeric(column) ? 'number' : '', isEdited ? 'edited' : ''].join(' ').trim()}
            title={isLong(written(column, row)) ? written(column, row) : undefined}
            tabIndex={stop === at ? 0 : -1}
            onFocus={() => props.onCell(at)}
            onDblClick={() => props.onEdit(at)}
          >
            {/* Under its editor the text stays, unseen: it holds the column's width. */}
            {isEdited ? <span class="under">{written(column, row)}</span> : written(column, row)}
            {isEdited ? (
              <CellEditor
                edit={column.edit as CellEdit<R>}
                label={words.schedule.cell(column.head, row.id)}
                begin={editing.begin}
                isTyped={editing.isTyped}
                onTake={(text, then) => props.onTake(column, text, then)}
                onGiveUp={props.onGiveUp}
              />
            ) : null}
          </td>
        );
      })}
    </tr>
  );
}
