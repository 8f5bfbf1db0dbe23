import type { Cell, Column } from './columns.ts';

export type Order = { readonly key: string; readonly isDown: boolean };

const collator = new Intl.Collator(undefined, { numeric: true, sensitivity: 'base' });

/** Numbers by size, text with its digits by size; what is empty stands last either way. */
function compare(a: Cell, b: Cell, isDown: boolean): number {
  const emptyA = a === null || a === '';
  const emptyB = b === null || b === '';
  if (emptyA || emptyB) return Number(emptyA) - Number(emptyB);
  const by = typeof a === 'number' && typeof b === 'number' ? a - b : collator.compare(String(a), String(b));
  return isDown ? -by : by;
}

/** Rows in the order of a column; equal ones, and all of them without an order, as in the scheme. */
export function sortRows<Row>(
  rows: readonly Row[],
  columns: readonly Column<Row>[],
  order: Order | null,
): readonly Row[] {
  const column = columns.find((c) => c.key === order?.key);
  if (column === undefined || order === null) return rows;
  return [...rows].sort((a, b) => compare(column.value(a), column.value(b), order.isDown));
}

/** Pressing a head: smallest first, then largest first, then as in the scheme. */
export function nextOrder(order: Order | null, key: string): Order | null {
  if (order?.key !== key) return { key, isDown: false };
  return order.isDown ? null : { key, isDown: true };
}
