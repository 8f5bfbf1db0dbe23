import type { FaultList } from './fault-list.ts';
import { type Quantity, RADIATION } from './weather-year.ts';

/** Runs of missing values up to this many rows are drawn straight between their neighbours, and told. */
const LONGEST_FILLED = 6;

/**
 * Fills short gaps of a column and tells them; a long gap is an error in a column that is needed and drops one that is not.
 * @returns false when the column is not to be used
 */
export function fillGaps(
  quantity: Quantity,
  column: Float64Array,
  head: string,
  line: Int32Array,
  faults: FaultList,
): boolean {
  const needed = RADIATION.includes(quantity) || quantity === 'tAir_C';
  const n = column.length;
  let filled = 0;
  let first = -1;
  for (let i = 0; i < n; i++) {
    if (!Number.isNaN(column[i]!)) continue;
    let end = i;
    while (end < n && Number.isNaN(column[end]!)) end++;
    if (end - i > LONGEST_FILLED) {
      const message = `${end - i} values missing on end${needed ? '' : '; the column is left out'}`;
      faults.add(
        needed ? 'error' : 'warning',
        'long-gap',
        `line ${line[i]}, ${head}`,
        message,
        `gaps of up to ${LONGEST_FILLED} rows are filled; choose another year or another file`,
      );
      if (!needed) return false;
    } else {
      const before = i > 0 ? column[i - 1]! : column[end]!;
      const after = end < n ? column[end]! : before;
      for (let k = i; k < end; k++) column[k] = before + ((after - before) * (k - i + 1)) / (end - i + 1);
      filled += end - i;
      if (first < 0) first = i;
    }
    i = end;
  }
  if (filled > 0)
    faults.add(
      'warning',
      'filled',
      `line ${line[first]}, ${head}`,
      filled === 1
        ? '1 missing value was drawn straight between its neighbours'
        : `${filled} missing values were drawn straight between their neighbours`,
      'look whether that is good enough',
    );
  return true;
}
