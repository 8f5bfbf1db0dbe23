export type Column = { readonly head: string; readonly align: 'left' | 'right' };

/** Columns of plain text under a rule, two spaces apart; trailing blanks are left out so that lines can be compared. */
export function table(columns: readonly Column[], rows: readonly (readonly string[])[]): string {
  const widths = columns.map(({ head }, c) => Math.max(head.length, ...rows.map((row) => row[c]?.length ?? 0)));
  const line = (cells: readonly string[]): string =>
    columns
      .map(({ align }, c) =>
        align === 'right' ? (cells[c] ?? '').padStart(widths[c] ?? 0) : (cells[c] ?? '').padEnd(widths[c] ?? 0),
      )
      .join('  ')
      .trimEnd();
  return [
    line(columns.map(({ head }) => head)),
    widths.map((width) => '─'.repeat(width)).join('  '),
    ...rows.map(line),
    '',
  ].join('\n');
}
