/** Rows that page up and page down go by. */
const PAGE = 10;

type Press = {
  readonly rows: number;
  /** The row that leads; −1: none. */
  readonly at: number;
  readonly column: number;
  readonly focusCell: (row: number, column: number) => void;
  /** @param begin what stands in the cell at first; null: what it holds */
  readonly edit: (row: number, column: number, begin: string | null) => void;
  readonly remove: () => void;
};

/** Arrows go from cell to cell, Enter and F2 open one, typing replaces it, Delete takes the chosen rows out. */
export function pressCell(event: KeyboardEvent, { rows, at, column, focusCell, edit, remove }: Press): void {
  const { key } = event;
  const isElsewhere = (event.target as HTMLElement).closest('button, input, select') !== null;
  if (isElsewhere || rows === 0 || event.altKey) return;
  const isPlain = !event.ctrlKey && !event.metaKey;
  const row = Math.max(0, at);
  const steps: { readonly [key: string]: readonly [number, number] } = {
    ArrowDown: [at + 1, column],
    ArrowUp: [at - 1, column],
    ArrowRight: [row, column + 1],
    ArrowLeft: [row, column - 1],
    PageDown: [at + PAGE, column],
    PageUp: [at - PAGE, column],
    Home: isPlain ? [row, 0] : [0, 0],
    End: isPlain ? [row, Number.MAX_SAFE_INTEGER] : [rows - 1, Number.MAX_SAFE_INTEGER],
  };
  const to = steps[key];
  if (to !== undefined) focusCell(...to);
  else if (key === 'Enter' || key === 'F2') edit(row, column, null);
  else if (key === 'Delete') remove();
  else if (key === ' ' && at < 0) focusCell(0, column);
  else if (isPlain && key.length === 1 && key !== ' ') edit(row, column, key);
  else return;
  event.preventDefault();
}
