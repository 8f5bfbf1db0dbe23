/** Reads comma-separated values by the grammar of RFC 4180, section 2, and nothing looser. @throws on text that is not */
export function readCsv(text: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  let i = 0;
  while (i < text.length) {
    let cell = '';
    if (text[i] === '"') {
      i++;
      for (;;) {
        if (i >= text.length) throw new Error('a quoted field does not end');
        if (text[i] === '"' && text[i + 1] === '"') {
          cell += '"';
          i += 2;
        } else if (text[i] === '"') {
          i++;
          break;
        } else cell += text[i++];
      }
    } else {
      while (i < text.length && !',\r\n"'.includes(text[i] as string)) cell += text[i++];
    }
    row.push(cell);
    if (text[i] === ',') i++;
    else if (text.startsWith('\r\n', i)) {
      rows.push(row);
      row = [];
      i += 2;
    } else throw new Error(`unexpected ${JSON.stringify(text[i])} at ${i}`);
  }
  return rows;
}
