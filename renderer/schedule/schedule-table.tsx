import { useLayoutEffect, useMemo, useRef, useState } from 'preact/hooks';
import { isSelected, type Kind, selection, select, toggle } from '../state/selection.ts';
import { words } from '../words/words.ts';
import type { Cell, Column, Schedule } from './columns.ts';
import { nextOrder, type Order, sortRows } from './sort-rows.ts';

/** Height of a row, as in the style sheet [px]: rows out of sight are not made. */
const ROW_px = 28;
const SPARE_ROWS = 12;

type Row = { readonly id: string };

const written = <R extends Row>(column: Column<R>, row: R): string => {
  const value: Cell = column.value(row);
  if (value === null || value === '') return '–';
  return typeof value === 'number' ? (column.write?.(value, row) ?? String(value)) : value;
};

const isNumeric = <R extends Row>(column: Column<R>): boolean => column.write !== undefined;

/** One schedule as a grid: sortable by its heads, one tab stop, arrow keys from row to row, the row's thing selected with it. */
export function ScheduleTable<R extends Row>({ schedule, label }: { schedule: Schedule<R>; label: string }) {
  const { kind, columns } = schedule;
  const [order, setOrder] = useState<Order | null>(null);
  const [range, setRange] = useState<readonly [number, number]>([0, 40]);
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

  const [from, to] = [Math.min(range[0], rows.length), Math.min(range[1], rows.length)];
  return (
    <div class="schedule-scroller" ref={scroller} onScroll={look}>
      <table
        // biome-ignore lint/a11y/noNoninteractiveElementToInteractiveRole: a grid of data is a table
        role="grid"
        aria-label={label}
        aria-rowcount={rows.length + 1}
        aria-multiselectable="true"
        onKeyDown={(event) => moveRow(event, rows, leadAt, kind)}
      >
        <thead>
          <tr aria-rowindex={1}>
            {columns.map((column) => (
              <Head
                key={column.key}
                column={column}
                order={order}
                onPress={() => setOrder(nextOrder(order, column.key))}
              />
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
              isStop={leadAt < 0 ? from + i === 0 : row.id === lead}
            />
          ))}
          {to < rows.length ? <Gap rows={rows.length - to} columns={columns.length} /> : null}
        </tbody>
      </table>
      {rows.length === 0 ? <p class="empty-line soft">{words.schedule.none[kind]}</p> : null}
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

type BodyRowProps<R extends Row> = {
  readonly row: R;
  readonly schedule: Schedule<R>;
  readonly index: number;
  readonly isStop: boolean;
};

function BodyRow<R extends Row>({ row, schedule, index, isStop }: BodyRowProps<R>) {
  const { kind, columns } = schedule;
  const chosen = isSelected(kind, row.id);
  return (
    <tr
      data-row={index}
      class={chosen ? 'chosen' : ''}
      aria-rowindex={index + 2}
      aria-selected={chosen}
      tabIndex={isStop ? 0 : -1}
      onClick={(event) => (event.ctrlKey || event.metaKey ? toggle : select)(kind, row.id)}
    >
      {columns.map((column) => (
        <td key={column.key} class={isNumeric(column) ? 'number' : ''}>
          {written(column, row)}
        </td>
      ))}
    </tr>
  );
}

function bringIntoView(scroller: HTMLDivElement, index: number): void {
  const top = index * ROW_px;
  const room = scroller.clientHeight - 2 * ROW_px;
  if (top < scroller.scrollTop) scroller.scrollTop = top;
  else if (top > scroller.scrollTop + room) scroller.scrollTop = top - room;
}

const PAGE = 10;

function moveRow(
  event: KeyboardEvent & { currentTarget: HTMLTableElement },
  rows: readonly Row[],
  at: number,
  kind: Kind,
): void {
  if ((event.target as HTMLElement).tagName === 'BUTTON') return;
  const last = rows.length - 1;
  const to = {
    ArrowDown: at + 1,
    ArrowUp: at - 1,
    PageDown: at + PAGE,
    PageUp: at - PAGE,
    Home: 0,
    End: last,
    Enter: Math.max(at, 0),
    ' ': Math.max(at, 0),
  }[event.key];
  if (to === undefined || rows.length === 0) return;
  event.preventDefault();
  const index = Math.min(last, Math.max(0, to));
  const { currentTarget } = event;
  select(kind, (rows[index] as Row).id);
  requestAnimationFrame(() => currentTarget.querySelector<HTMLElement>(`[data-row="${index}"]`)?.focus());
}
