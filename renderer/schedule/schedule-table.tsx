import { useLayoutEffect, useMemo, useRef, useState } from 'preact/hooks';
import type { Fault } from '../../core/scheme/fault.ts';
import { performEdit } from '../state/perform-edit.ts';
import { isSelected, type Kind, selection, select } from '../state/selection.ts';
import { words } from '../words/words.ts';
import { type Changes, changesOf, clipboardCell, readClipboard } from './cell-edit.ts';
import { removeRows } from './row-actions.ts';
import { RowTools } from './row-tools.tsx';
import { BodyRow, type Editing, isNumeric, type Row, written } from './body-row.tsx';
import type { Column, Schedule } from './columns.ts';
import { pressCell } from './press-cell.ts';
import { nextOrder, type Order, sortRows } from './sort-rows.ts';

/** Height of a row, as in the style sheet [px]: rows out of sight are not made. */
const ROW_px = 28;
const SPARE_ROWS = 12;

/**
 * One schedule as a grid: sortable by its heads, one tab stop, arrow keys from cell to cell, the row's thing selected with it.
 * Cells are changed in place; with several rows chosen, all of them at once.
 */
export function ScheduleTable<R extends Row>({ schedule, label }: { schedule: Schedule<R>; label: string }) {
  const { kind, list, columns } = schedule;
  const [order, setOrder] = useState<Order | null>(null);
  const [range, setRange] = useState<readonly [number, number]>([0, 40]);
  const [column, setColumn] = useState(0);
  const [editing, setEditing] = useState<Editing | null>(null);
  const [faults, setFaults] = useState<readonly Fault[]>([]);
  const scroller = useRef<HTMLDivElement>(null);
  const rows = useMemo(() => sortRows(schedule.rows, columns, order), [schedule, order]);
  const lead = selection.value?.kind === kind ? (selection.value.ids.at(-1) ?? null) : null;
  const leadAt = lead === null ? -1 : rows.findIndex((r) => r.id === lead);

  const look = (): void => {
    const { scrollTop, clientHeight } = scroller.current as HTMLDivElement;
    const from = Math.max(0, Math.floor(scrollTop / ROW_px) - SPARE_ROWS);
    setRange([from, from + Math.ceil(clientHeight / ROW_px) + 2 * SPARE_ROWS]);
  };
  useLayoutEffect(() => {
    const watch = new ResizeObserver(look);
    watch.observe(scroller.current as HTMLDivElement);
    return () => watch.disconnect();
  }, []);
  useLayoutEffect(() => {
    if (leadAt >= 0) bringIntoView(scroller.current as HTMLDivElement, leadAt);
  }, [leadAt]);

  const focusCell = (row: number, at: number): void => {
    const index = Math.min(rows.length - 1, Math.max(0, row));
    const to = Math.min(columns.length - 1, Math.max(0, at));
    const id = rows[index]?.id;
    if (id === undefined) return;
    if (lead !== id) select(kind, id);
    setColumn(to);
    requestAnimationFrame(() =>
      scroller.current?.querySelector<HTMLElement>(`[data-row="${index}"] [data-column="${to}"]`)?.focus(),
    );
  };
  const edit = (index: number, at: number, begin: string | null): void => {
    const row = rows[index];
    const of = columns[at];
    const typed = row === undefined ? null : (of?.edit?.typed(row) ?? null);
    if (row === undefined || of === undefined || typed === null) return;
    setFaults([]);
    setEditing({ id: row.id, key: of.key, begin: begin ?? typed, isTyped: begin !== null });
  };
  const perform = (changes: Changes): void => {
    if (!changes.ok) setFaults(changes.faults);
    else setFaults(changes.edit === null ? [] : performEdit(changes.edit));
  };
  /** The rows that change with a row: all that are chosen, when it is one of them. */
  const rowsWith = (id: string): readonly R[] =>
    isSelected(kind, id) ? rows.filter((row) => isSelected(kind, row.id)) : rows.filter((row) => row.id === id);
  const take = (of: Column<R>, id: string, text: string): void => {
    const changed = rowsWith(id);
    const name =
      changed.length === 1 ? words.schedule.editOne(of.head, id) : words.schedule.editMany(of.head, changed.length);
    perform(
      changesOf(
        list,
        changed.map((row) => ({ id: row.id, row, head: of.head, edit: of.edit, text })),
        name,
      ),
    );
  };
  const paste = (text: string): void => {
    const cells = readClipboard(text).flatMap((line, r) =>
      line.map((cell, c) => ({ row: rows[Math.max(0, leadAt) + r], of: columns[column + c], cell })),
    );
    const known = cells.flatMap(({ row, of, cell }) =>
      row === undefined || of === undefined ? [] : [{ id: row.id, row, head: of.head, edit: of.edit, text: cell }],
    );
    perform(changesOf(list, known, words.schedule.pasted(known.length)));
  };
  const copy = (): string =>
    rows
      .filter((row) => isSelected(kind, row.id))
      .map((row) => columns.map((of) => clipboardCell(of.edit?.typed(row) ?? written(of, row))).join('\t'))
      .join('\n');

  const [from, to] = [Math.min(range[0], rows.length), Math.min(range[1], rows.length)];
  return (
    <div class="schedule-place">
      <RowTools kind={kind} list={list} />
      <CellFaults faults={faults} onDismiss={() => setFaults([])} />
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
              edit,
              remove: () => removeRows(kind, list, selection.peek()?.ids ?? []),
            })
          }
          onCopy={(event) => {
            if (editing !== null) return;
            event.preventDefault();
            event.clipboardData?.setData('text/plain', copy());
          }}
          onPaste={(event) => {
            if (editing !== null) return;
            event.preventDefault();
            paste(event.clipboardData?.getData('text/plain') ?? '');
          }}
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
                editing={editing?.id === row.id ? editing : null}
                onCell={setColumn}
                onEdit={(at) => edit(from + i, at, null)}
                onRange={() => chooseRange(kind, rows, lead, row.id)}
                onTake={(of, text, then) => {
                  setEditing(null);
                  take(of, row.id, text);
                  const side = then === 'right' ? 1 : then === 'left' ? -1 : 0;
                  if (then !== 'stay') focusCell(from + i + (then === 'down' ? 1 : 0), column + side);
                }}
                onGiveUp={() => {
                  setEditing(null);
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

function bringIntoView(scroller: HTMLDivElement, index: number): void {
  const top = index * ROW_px;
  const room = scroller.clientHeight - 2 * ROW_px;
  if (top < scroller.scrollTop) scroller.scrollTop = top;
  else if (top > scroller.scrollTop + room) scroller.scrollTop = top - room;
}
