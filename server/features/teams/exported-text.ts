import { textCell } from '#engine/csv-cell.ts';
import type { ExportedRow, ExportedTable } from './exported-tables-read-model.ts';

/** A byte order mark, by which spreadsheets know UTF-8. */
const MARK = '\uFEFF';

/** What stands before the rows: the heads of a table of comma-separated values, nothing of lines of JSON. */
export function headOf({ entry, columns }: ExportedTable): string {
  return isLines(entry) ? '' : `${MARK}${Object.keys(columns).map(textCell).join(',')}\r\n`;
}

/** Rows as text: RFC 4180 with text guarded against spreadsheets that compute, or a JSON object a line. */
export function textOfRows({ entry, columns }: ExportedTable, rows: readonly ExportedRow[]): string {
  if (isLines(entry)) return rows.map((row) => `${JSON.stringify(row)}\n`).join('');
  const heads = Object.keys(columns);
  return rows.map((row) => `${heads.map((head) => cell(row[head])).join(',')}\r\n`).join('');
}

function isLines(entry: string): boolean {
  return entry.endsWith('.jsonl');
}

function cell(value: unknown): string {
  if (value === null || value === undefined) return '';
  if (typeof value === 'number' || typeof value === 'boolean') return String(value);
  if (value instanceof Date) return value.toISOString();
  return textCell(typeof value === 'string' ? value : JSON.stringify(value));
}
