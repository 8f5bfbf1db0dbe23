/**
 * Where the cells of a line begin: `starts[i]` to `starts[i + 1] - 1`. Rows of weather tables hold no quoted cells with
 * delimiters in them; such a row comes out with too many cells and is told as a fault.
 * @returns how many cells there are; those beyond the room in `starts` are counted but not kept
 */
export function cutCells(line: string, delimiter: number, starts: Int32Array): number {
  let n = 1;
  starts[0] = 0;
  const end = line.length > 0 && line.charCodeAt(line.length - 1) === 13 ? line.length - 1 : line.length;
  for (let i = 0; i < end; i++) {
    if (line.charCodeAt(i) !== delimiter) continue;
    if (n < starts.length) starts[n] = i + 1;
    n++;
  }
  if (n < starts.length) starts[n] = end + 1;
  return n;
}

/** The text of a cell, without blanks and without the quotes round it. */
export function cellText(line: string, starts: Int32Array, i: number): string {
  const text = line.slice(starts[i]!, starts[i + 1]! - 1).trim();
  return text.length > 1 && text.startsWith('"') && text.endsWith('"') ? text.slice(1, -1).trim() : text;
}

/** All cells of a head line, quotes minded. */
export function headCells(line: string, delimiter: string): string[] {
  const cells: string[] = [];
  let cell = '';
  let quoted = false;
  for (const c of line.replace(/\r$/, '')) {
    if (c === '"') quoted = !quoted;
    else if (c === delimiter && !quoted) {
      cells.push(cell.trim());
      cell = '';
    } else cell += c;
  }
  return [...cells, cell.trim()];
}
