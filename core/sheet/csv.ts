/** A table of results: a header that names every column's unit, and rows of texts, numbers or nothing. */
export type DataTable = {
  readonly header: readonly string[];
  readonly rows: readonly (readonly (string | number | null)[])[];
};

/** Numbers carry six significant figures: more than any of our methods is good for, few enough to read. */
const figures = (value: number): string => (Number.isFinite(value) ? String(Number(value.toPrecision(6))) : '');

/**
 * Spreadsheets run a text that starts like a formula, and schemes come from other people: such a text gets an apostrophe in
 * front, which spreadsheets read as "this is text".
 */
const harmless = (text: string): string => (/^[=+\-@\t\r]./su.test(text) ? `'${text}` : text);

const quoted = (text: string): string => (/[",\r\n]|^\s|\s$/u.test(text) ? `"${text.replaceAll('"', '""')}"` : text);

function cell(value: string | number | null): string {
  if (value === null) return '';
  return typeof value === 'number' ? figures(value) : quoted(harmless(value));
}

/**
 * A table as comma-separated values: RFC 4180, lines ended by CR LF, a point as the decimal mark. The text is to be written as
 * UTF-8.
 * @param mark  a byte order mark in front, which spreadsheets want and programs do not
 */
export function writeCsv(table: DataTable, mark = false): string {
  const lines = [table.header.map((h) => quoted(h)), ...table.rows.map((row) => row.map(cell))];
  return (mark ? '\ufeff' : '') + lines.map((l) => `${l.join(',')}\r\n`).join('');
}
