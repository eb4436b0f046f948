/** Cells of each row of a CSV text (RFC 4180), read plainly. */
export function csvRows(text: string): readonly (readonly string[])[] {
  const rows: string[][] = [];
  let row: string[] = [];
  for (const [whole, quoted, plain, end] of text.matchAll(/(?:"((?:[^"]|"")*)"|([^",\n]*))(,|\n|$)/g)) {
    if (whole === '' && row.length === 0) break;
    row.push(quoted === undefined ? (plain ?? '') : quoted.replaceAll('""', '"'));
    if (end === ',') continue;
    rows.push(row);
    row = [];
  }
  return rows;
}

/** Rows as records by the names of the header, those that begin with # left out. */
export function csvRecords(text: string): readonly Readonly<Record<string, string>>[] {
  const [header = [], ...rows] = csvRows(text).filter(([first = '']) => !first.startsWith('#'));
  return rows.map((row) => Object.fromEntries(header.map((name, at) => [name, row[at] ?? ''])));
}
