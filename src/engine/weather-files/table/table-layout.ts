/** Where a table stands in a text: its delimiter, the lines above it, its header, and what its columns are called. */
import type { DecodedText } from '../text/decode-text.ts';
import { LineCursor } from '../text/line-cursor.ts';
import { findSeparatedFields, type SeparatedFields, separatedFields, separatedText } from '../text/separated-fields.ts';

export const MOST_COLUMNS = 400;
const FEWEST_COLUMNS = 3;
/** Lines that are looked at for the layout. */
const LOOKED_AT = 400;
const LONGEST_CELL = 120;
const LONGEST_LINE = 2_000;
/** A header is followed by so many rows of the same number of fields, fewer only at the end of the file. */
const ROWS_AFTER_HEADER = 20;
const DELIMITERS = [',', ';', '\t', '|'] as const;
/** Of lines 5 to 200; a preamble may take the others. */
const SAME_COUNT_SHARE = 0.9;
const DECIMAL_SHARE = 0.9;
const COMMA = 0x2c;
const DECIMAL_COMMA = /^[+-]?\d+,\d+$/;
const DECIMAL_POINT = /^[+-]?\d+\.\d+$/;
const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+|\d+,\d+)(e[+-]?\d+)?$/i;

export interface TableLayout {
  readonly delimiter: string;
  readonly separator: number;
  /** Fields of a row, without a trailing empty one. */
  readonly fieldCount: number;
  /** A name for every field, each once: of the header, else "column 3". */
  readonly names: readonly string[];
  /** What the units row says of each; empty without one. */
  readonly units: readonly string[];
  readonly headerLine: number;
  /** Line of the first row. */
  readonly firstRowLine: number;
  readonly decimalComma: boolean;
  /** Lines above the table, as text. */
  readonly preamble: readonly string[];
}

export interface NoLayout {
  /** Why there is no table: nothing that looks like one, or decimal commas between commas. */
  readonly reason: 'no table' | 'decimal commas';
  readonly line: number;
}

interface LookedAt {
  readonly line: number;
  readonly text: string;
  readonly cells: readonly string[];
}

/** Finds the table in a text. */
export function findLayout(text: DecodedText): TableLayout | NoLayout {
  let best: { delimiter: string; share: number; lines: readonly LookedAt[] } | null = null;
  for (const delimiter of DELIMITERS) {
    const lines = linesBy(text, delimiter.charCodeAt(0));
    const share = sameCountShare(lines);
    if (share > (best?.share ?? 0)) best = { delimiter, share, lines };
  }
  const commas = commasBetweenCommas(linesBy(text, COMMA));
  if (commas !== null && (best === null || best.delimiter === ',')) return commas;
  if (best === null || best.share < SAME_COUNT_SHARE) return { reason: 'no table', line: 1 };
  const { delimiter, lines } = best;
  const header = headerIndex(lines);
  if (header < 0 || !holdsNumbers(lines)) return { reason: 'no table', line: 1 };
  return layoutFrom(delimiter, lines, header);
}

function linesBy(text: DecodedText, separator: number): readonly LookedAt[] {
  const cursor = new LineCursor(text);
  const fields = separatedFields(MOST_COLUMNS);
  const lines: LookedAt[] = [];
  while (lines.length < LOOKED_AT && cursor.next()) {
    findSeparatedFields(cursor, separator, fields);
    lines.push({ line: cursor.line, text: cursor.string(LONGEST_LINE), cells: cellsOf(cursor, fields) });
  }
  return lines;
}

function cellsOf(cursor: LineCursor, fields: SeparatedFields): readonly string[] {
  const count = Math.min(fields.count, MOST_COLUMNS);
  return Array.from({ length: count }, (_none, index) => separatedText(cursor, fields, index, LONGEST_CELL).trim());
}

/** Share of lines 5 to 200 that have the most frequent number of fields, 3 at least. */
function sameCountShare(lines: readonly LookedAt[]): number {
  const looked = lines.length > 8 ? lines.slice(4, 200) : lines;
  const counts = new Map<number, number>();
  for (const { cells } of looked) counts.set(cells.length, (counts.get(cells.length) ?? 0) + 1);
  let most = 0;
  for (const [fields, count] of counts) if (fields >= FEWEST_COLUMNS) most = Math.max(most, count);
  return most / Math.max(1, looked.length);
}

/** The first line whose followers have its number of fields, with one more only when that is empty. */
function headerIndex(lines: readonly LookedAt[]): number {
  for (let index = 0; index + 1 < lines.length; index++) {
    const cells = lines[index]?.cells ?? [];
    if (cells.length < FEWEST_COLUMNS) continue;
    const after = lines.slice(index + 1, index + 1 + ROWS_AFTER_HEADER);
    if (after.every((row) => fits(row.cells, cells.length))) return index;
  }
  return -1;
}

/** A table of hours has numbers; delimiters alone make none. */
function holdsNumbers(lines: readonly LookedAt[]): boolean {
  return lines.some(({ cells }) => cells.some(isNumber));
}

function fits(cells: readonly string[], count: number): boolean {
  return cells.length === count || (cells.length === count + 1 && cells.at(-1) === '');
}

/**
 * Rows with more fields than the line of names right above them, up to twice as many: each decimal comma was taken for a
 * separator. Unnamed trailing fields are empty and no such rows.
 */
function commasBetweenCommas(lines: readonly LookedAt[]): NoLayout | null {
  const at = lines.findIndex(({ cells }, index) => {
    const below = lines[index + 1]?.cells ?? [];
    return cells.length >= FEWEST_COLUMNS && !cells.some(isNumber) && below.some(isNumber);
  });
  const header = lines[at];
  if (header === undefined) return null;
  const rows = lines.slice(at + 1, at + 1 + ROWS_AFTER_HEADER);
  const count = header.cells.length;
  const broken = rows.filter(({ cells }) => cells.length > count && cells.length < 2 * count && cells.at(-1) !== '');
  return broken.length < SAME_COUNT_SHARE * rows.length ? null : { reason: 'decimal commas', line: header.line + 1 };
}

function isNumber(cell: string): boolean {
  return NUMBER.test(cell);
}

function layoutFrom(delimiter: string, lines: readonly LookedAt[], at: number): TableLayout {
  const first = lines[at];
  const cells = first?.cells ?? [];
  const named = !cells.some((cell, index) => isNumber(cell) && index > 0) && cells.some((cell) => /\p{L}/u.test(cell));
  const under = lines[at + 1]?.cells ?? [];
  const below = lines[at + 2]?.cells ?? [];
  const hasUnits = named && !under.some(isNumber) && below.some(isNumber) && !under.some((cell) => /\d{4}/.test(cell));
  const rowsFrom = at + (named ? 1 : 0) + (hasUnits ? 1 : 0);
  const rows = lines.slice(rowsFrom);
  const trailing = rows.length > 0 && rows.every((row) => row.cells.at(-1) === '') && cells.at(-1) === '';
  const fieldCount = cells.length - (trailing ? 1 : 0);
  return {
    delimiter,
    separator: delimiter.charCodeAt(0),
    fieldCount,
    names: uniqueNames(cells.slice(0, fieldCount), named),
    units: cells.slice(0, fieldCount).map((_cell, index) => (hasUnits ? (under[index] ?? '') : '')),
    headerLine: first?.line ?? 1,
    firstRowLine: lines[rowsFrom]?.line ?? (lines.at(-1)?.line ?? 0) + 1,
    decimalComma: hasDecimalCommas(rows),
    preamble: lines.slice(0, at).map(({ text }) => text),
  };
}

/** A name that stands twice gets its number; an empty one is called after its place. */
function uniqueNames(cells: readonly string[], named: boolean): readonly string[] {
  const seen = new Map<string, number>();
  return cells.map((cell, index) => {
    const name = named && cell !== '' ? cell.replace(/\p{C}/gu, '') : `column ${index + 1}`;
    const times = (seen.get(name) ?? 0) + 1;
    seen.set(name, times);
    return times === 1 ? name : `${name} (${times})`;
  });
}

function hasDecimalCommas(rows: readonly LookedAt[]): boolean {
  let commas = 0;
  let points = 0;
  for (const { cells } of rows) {
    for (const cell of cells) {
      if (DECIMAL_COMMA.test(cell)) commas++;
      else if (DECIMAL_POINT.test(cell)) points++;
    }
  }
  return commas > 0 && commas >= DECIMAL_SHARE * (commas + points);
}
