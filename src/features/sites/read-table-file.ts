import Papa from 'papaparse';

/** A table as text, row by row; `line` is where a row begins in the file. */
export interface TableFile {
  readonly name: string;
  readonly heads: readonly string[];
  readonly rows: readonly { readonly line: number; readonly cells: readonly string[] }[];
}

export const MOST_TABLE_BYTES = 32 * 1024 * 1024;

/**
 * Reads a file of separated values in the browser: comma, semicolon, tab or bar, as the file itself suggests; UTF-8, UTF-16 with its
 * mark, or else Windows-1252.
 * @throws RangeError in words for the person, when there is no table in it
 */
export async function readTableFile(file: File): Promise<TableFile> {
  if (file.size > MOST_TABLE_BYTES) throw new RangeError('The file has over 32 MB. Divide it, and import its parts.');
  const text = textOf(new Uint8Array(await file.arrayBuffer()));
  const { data } = Papa.parse<string[]>(text, { header: false, skipEmptyLines: false });
  let line = 1;
  const rows: { line: number; cells: string[] }[] = [];
  for (const cells of data) {
    if (cells.some((cell) => cell.trim() !== '')) rows.push({ line, cells });
    // Cells in quotes may hold line ends of their own.
    line += 1 + cells.reduce((sum, cell) => sum + (cell.match(/\r\n|\r|\n/g)?.length ?? 0), 0);
  }
  const [first, ...others] = rows;
  if (first === undefined || others.length === 0) {
    throw new RangeError(
      'The file has no row below its heads. The first row names the columns, each other row is a site.',
    );
  }
  return { name: file.name, heads: first.cells.map((head) => head.trim()), rows: others };
}

function textOf(bytes: Uint8Array): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder('utf-16le').decode(bytes);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return new TextDecoder('utf-16be').decode(bytes);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder('windows-1252').decode(bytes);
  }
}
