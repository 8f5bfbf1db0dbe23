export type Column = { readonly head: string; readonly align: 'left' | 'right' };

/** Columns of plain text under a rule, two spaces apart; trailing blanks are left out so that lines can be compared. */
export function table(columns: readonly Column[], rows: readonly (readonly string[])[]): string {
  // A name that runs over lines would break the row it stands in.
  const cell = (text: string | undefined): string => (text ?? '').replace(/[\r\n\t]+/gu, ' ');
  const all = [columns.map(({ head }) => cell(head)), ...rows.map((row) => columns.map((_, c) => cell(row[c])))];
  const widths = columns.map((_, c) => all.reduce((most, row) => Math.max(most, (row[c] as string).length), 0));
  const line = (cells: readonly string[]): string =>
    columns
      .map(({ align }, c) =>
        align === 'right' ? (cells[c] ?? '').padStart(widths[c] ?? 0) : (cells[c] ?? '').padEnd(widths[c] ?? 0),
      )
      .join('  ')
      .trimEnd();
  const [head, ...body] = all.map(line);
  return [head, widths.map((width) => '─'.repeat(width)).join('  '), ...body, ''].join('\n');
}
