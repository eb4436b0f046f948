/** A table on its way to become sites: which column is what, what each row says, and what is sent. Pure. */
import { MOST_PORTION_BYTES, MOST_ROWS_AT_ONCE } from '../../contract/site-imports.ts';
import { findDuplicates } from '../../engine/sites/find-duplicates.ts';
import { type RowFault, readSiteRow, type SiteOfRow } from '../../engine/sites/read-site-row.ts';
import { type SiteCells, type SiteColumn, siteColumns } from '../../engine/sites/site-columns.ts';
import type { TableFile } from './read-table-file.ts';

export type ColumnMapping = Readonly<Partial<Record<SiteColumn, number>>>;

export interface RowOfTable {
  readonly line: number;
  readonly cells: SiteCells;
  readonly site: SiteOfRow | null;
}

export interface TableReading {
  readonly rows: readonly RowOfTable[];
  readonly faults: readonly (RowFault & { readonly line: number })[];
  /** Rows without a fault. */
  readonly good: number;
  /** Rows that double another of the table. */
  readonly doubles: number;
}

/** Reads every row of a table under a mapping of its columns. */
export function readTable(table: TableFile, mapping: ColumnMapping): TableReading {
  const columns = siteColumns.flatMap((column) => {
    const at = mapping[column];
    return at === undefined ? [] : [{ column, at }];
  });
  const faults: (RowFault & { line: number })[] = [];
  const rows = table.rows.map(({ line, cells: written }) => {
    const cells: SiteCells = Object.fromEntries(columns.map(({ column, at }) => [column, written[at] ?? '']));
    const { site, faults: found } = readSiteRow(cells);
    faults.push(...found.map((fault) => ({ line, ...fault })));
    return { line, cells, site };
  });
  const sites = rows.flatMap(({ site }) => (site === null ? [] : [site]));
  return { rows, faults, good: sites.length, doubles: findDuplicates(sites).length };
}

/** What a mapping still lacks, in words; null when it can be read. */
export function mappingProblem(mapping: ColumnMapping): string | null {
  const lacks = [
    ...(mapping.name === undefined ? ['the name'] : []),
    ...(mapping.position === undefined && (mapping.latitude === undefined || mapping.longitude === undefined)
      ? ['latitude and longitude, or both in one column']
      : []),
  ];
  return lacks.length === 0 ? null : `Say which column holds ${lacks.join(', and which ')}.`;
}

type RowToSend = Pick<RowOfTable, 'line' | 'cells'>;

/** Rows in portions that the server takes at once: so many rows, so many bytes. */
export function portionsOf(rows: readonly RowToSend[]): readonly (readonly RowToSend[])[] {
  const portions: RowToSend[][] = [];
  let bytes = Number.POSITIVE_INFINITY;
  for (const { line, cells } of rows) {
    // A character may take three bytes in UTF-8, or six when JSON escapes it.
    const own = 6 * JSON.stringify(cells).length + 64;
    const last = portions.at(-1);
    if (last === undefined || last.length >= MOST_ROWS_AT_ONCE || bytes + own > MOST_PORTION_BYTES) {
      portions.push([{ line, cells }]);
      bytes = own;
    } else {
      last.push({ line, cells });
      bytes += own;
    }
  }
  return portions;
}
