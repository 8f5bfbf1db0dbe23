import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Cell, Column } from '../../renderer/schedule/columns.ts';
import { nextOrder, sortRows } from '../../renderer/schedule/sort-rows.ts';

type Row = { readonly id: string; readonly cell: Cell };
const columns: readonly Column<Row>[] = [{ key: 'cell', head: 'cell', value: (r) => r.cell }];
const rowsOf = (cells: readonly Cell[]): readonly Row[] => cells.map((cell, i) => ({ id: String(i), cell }));
const sorted = (cells: readonly Cell[], isDown: boolean): readonly Cell[] =>
  sortRows(rowsOf(cells), columns, { key: 'cell', isDown }).map((r) => r.cell);

describe('sorting a schedule', () => {
  it('reads the digits in names as numbers', () => {
    expect(sorted(['W10', 'W2', 'W1'], false)).toEqual(['W1', 'W2', 'W10']);
  });

  it('puts what is empty last, either way', () => {
    expect(sorted([null, 2, 1], false)).toEqual([1, 2, null]);
    expect(sorted([null, 2, 1], true)).toEqual([2, 1, null]);
  });

  it('keeps every row, numbers in order, equal ones as in the scheme', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 5 })), fc.boolean(), (cells, isDown) => {
        const rows = sortRows(rowsOf(cells), columns, { key: 'cell', isDown });
        expect(rows).toHaveLength(cells.length);
        for (let i = 1; i < rows.length; i++) {
          const [a, b] = [rows[i - 1] as Row, rows[i] as Row];
          const step = ((b.cell as number) - (a.cell as number)) * (isDown ? -1 : 1);
          expect(step > 0 || (step === 0 && Number(a.id) < Number(b.id))).toBe(true);
        }
      }),
    );
  });

  it('goes from smallest first to largest first to the order of the scheme', () => {
    const one = nextOrder(null, 'cell');
    const two = nextOrder(one, 'cell');
    expect([one, two, nextOrder(two, 'cell')]).toEqual([
      { key: 'cell', isDown: false },
      { key: 'cell', isDown: true },
      null,
    ]);
    expect(nextOrder(two, 'other')).toEqual({ key: 'other', isDown: false });
  });
});
