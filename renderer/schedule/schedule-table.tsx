import { useMemo, useRef, useState } from 'preact/hooks';
import type { Fault } from '../../core/scheme/fault.ts';
import { type Kind, selection, select } from '../state/selection.ts';
import { words } from '../words/words.ts';
import { BodyRow, isNumeric, type Row } from './body-row.tsx';
import type { Column, Schedule } from './columns.ts';
import { pressCell } from './press-cell.ts';
import { removeRows } from './row-actions.ts';
import { RowTools } from './row-tools.tsx';
import { nextOrder, type Order, sortRows } from './sort-rows.ts';
import { useCellFocus } from './use-cell-focus.ts';
import { type Cells, useCells } from './use-cells.ts';
import { ROW_px, useVisibleRows } from './use-visible-rows.ts';

/**
 * One schedule as a grid: sortable by its heads, one tab stop, arrow keys from cell to cell, the row's thing selected with it.
 * Cells are changed in place; with several rows chosen, all of them at once.
 */
export function ScheduleTable<R extends Row>({ schedule, label }: { schedule: Schedule<R>; label: string }) {
  const { kind, list, columns } = schedule;
  const [order, setOrder] = useState<Order | null>(null);
  const [column, setColumn] = useState(0);
  const scroller = useRef<HTMLDivElement>(null);
  const rows = useMemo(() => sortRows(schedule.rows, columns, order), [schedule, order]);
  const lead = selection.value?.kind === kind ? (selection.value.ids.at(-1) ?? null) : null;
  const leadAt = lead === null ? -1 : rows.findIndex((r) => r.id === lead);
  const { from, to, look } = useVisibleRows(scroller, rows.length, leadAt);
  const cells = useCells(schedule, rows);
  const goTo = useCellFocus(scroller);

  const focusCell = (row: number, at: number): void => {
    const index = Math.min(rows.length - 1, Math.max(0, row));
    const stop = Math.min(columns.length - 1, Math.max(0, at));
    const id = rows[index]?.id;
    if (id === undefined) return;
    if (lead !== id) select(kind, id);
    setColumn(stop);
    goTo(index, stop);
  };
  return (
    <div class="schedule-place">
      <RowTools kind={kind} list={list} />
      <CellFaults faults={cells.faults} onDismiss={cells.dismiss} />
      <div class="schedule-scroller" ref={scroller} onScroll={look}>
        <table
          // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: a grid of data is a table
          role="grid"
          aria-label={label}
          aria-rowcount={rows.length + 1}
          aria-multiselectable="true"
          onKeyDown={(event) =>
            pressCell(event, {
              rows: rows.length,
              at: leadAt,
              column,
              focusCell,
              edit: (row, at, typed) => cells.open(rows[row], columns[at], typed),
              remove: () => removeRows(kind, list, selection.peek()?.ids ?? []),
            })
          }
          {...clipboardOf(cells, Math.max(0, leadAt), column)}
        >
          <thead>
            <tr aria-rowindex={1}>
              {columns.map((of) => (
                <Head key={of.key} column={of} order={order} onPress={() => setOrder(nextOrder(order, of.key))} />
              ))}
            </tr>
          </thead>
          <tbody>
            {from > 0 ? <Gap rows={from} columns={columns.length} /> : null}
            {rows.slice(from, to).map((row, i) => (
              <BodyRow
                key={row.id}
                row={row}
                schedule={schedule}
                index={from + i}
                stop={(leadAt < 0 ? from + i === 0 : row.id === lead) ? column : null}
                editing={cells.editing?.id === row.id ? cells.editing : null}
                onCell={setColumn}
                onEdit={(at) => cells.open(row, columns[at], null)}
                onRange={() => chooseRange(kind, rows, lead, row.id)}
                onTake={(of, text, then) => {
                  cells.close();
                  cells.take(of, row.id, text);
                  const side = then === 'right' ? 1 : then === 'left' ? -1 : 0;
                  if (then !== 'stay') focusCell(from + i + (then === 'down' ? 1 : 0), column + side);
                }}
                onGiveUp={() => {
                  cells.close();
                  focusCell(from + i, column);
                }}
              />
            ))}
            {to < rows.length ? <Gap rows={rows.length - to} columns={columns.length} /> : null}
          </tbody>
        </table>
        {rows.length === 0 ? <p class="empty-line soft">{words.schedule.none[kind]}</p> : null}
      </div>
    </div>
  );
}

/** Copying and pasting whole cells; while one is being changed, its own text is meant. */
function clipboardOf<R extends Row>(cells: Cells<R>, row: number, column: number) {
  const isOwn = (event: ClipboardEvent): boolean => {
    if (cells.editing !== null) return false;
    event.preventDefault();
    return true;
  };
  return {
    onCopy: (event: ClipboardEvent) => {
      if (isOwn(event)) event.clipboardData?.setData('text/plain', cells.copy());
    },
    onPaste: (event: ClipboardEvent) => {
      if (isOwn(event)) cells.paste(event.clipboardData?.getData('text/plain') ?? '', row, column);
    },
  };
}

/** All rows between the one that leads and another, as they are sorted. */
function chooseRange(kind: Kind, rows: readonly Row[], lead: string | null, id: string): void {
  const a = rows.findIndex((row) => row.id === (lead ?? id));
  const b = rows.findIndex((row) => row.id === id);
  const ids = rows.slice(Math.min(a, b), Math.max(a, b) + 1).map((row) => row.id);
  // The one that was pointed at leads.
  selection.value = { kind, ids: [...ids.filter((other) => other !== id), id] };
}

/** What was refused, cell by cell; nothing of it was changed. */
function CellFaults({ faults, onDismiss }: { readonly faults: readonly Fault[]; readonly onDismiss: () => void }) {
  if (faults.length === 0) return null;
  return (
    <div class="notice cell-faults" role="alert">
      <strong>{words.schedule.refused(faults.length)}</strong>
      <ul>
        {faults.slice(0, 6).map((fault) => (
          <li key={`${fault.place} ${fault.message}`}>
            <code>{fault.place}</code> {fault.message}; {fault.cure}.
          </li>
        ))}
      </ul>
      <button type="button" class="link" onClick={onDismiss}>
        {words.status.dismiss}
      </button>
    </div>
  );
}

const Gap = ({ rows, columns }: { rows: number; columns: number }) => (
  <tr style={{ height: `${rows * ROW_px}px` }}>
    <td colSpan={columns} />
  </tr>
);

function Head<R extends Row>({
  column,
  order,
  onPress,
}: {
  column: Column<R>;
  order: Order | null;
  onPress: () => void;
}) {
  const sorted = order?.key !== column.key ? 'none' : order.isDown ? 'descending' : 'ascending';
  return (
    <th scope="col" class={isNumeric(column) ? 'number' : ''} aria-sort={sorted}>
      <button type="button" onClick={onPress}>
        {column.head}
        {column.unit === undefined ? null : <span class="unit"> {column.unit}</span>}
        <span class="sort-mark" aria-hidden="true">
          {sorted === 'none' ? '' : sorted === 'ascending' ? '↑' : '↓'}
        </span>
      </button>
    </th>
  );
}
