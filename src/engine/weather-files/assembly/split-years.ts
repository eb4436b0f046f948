import { RowCollector } from './row-collector.ts';
import type { SourceRows } from './source-rows.ts';

/** Rows of one calendar year. */
export interface YearRows {
  readonly year: number;
  readonly rows: SourceRows;
}

/**
 * Rows with real dates, parted by calendar year, first year first. A year at the edge with at most so many rows is only the
 * overlap of another clock and is dropped.
 * @param edgeRows rows that a neighbouring year may have without being a year of its own
 */
export function splitYears(rows: SourceRows, edgeRows: number): readonly YearRows[] {
  const counts = new Map<number, number>();
  for (const year of rows.years) counts.set(year, (counts.get(year) ?? 0) + 1);
  if (counts.size === 1) return [{ year: rows.years[0] ?? 0, rows }];
  const most = Math.max(0, ...counts.values());
  const kept = [...counts]
    .filter(([, count]) => count > edgeRows || count === most)
    .map(([year]) => year)
    .sort((a, b) => a - b);
  const collectors = new Map(kept.map((year) => [year, new RowCollector(counts.get(year))]));
  for (let row = 0; row < rows.lines.length; row++) {
    collectors.get(rows.years[row] ?? 0)?.add(rowAt(rows, row));
  }
  return [...collectors].map(([year, collector]) => ({ year, rows: collector.finish() }));
}

function rowAt(rows: SourceRows, row: number) {
  return {
    line: rows.lines[row] ?? 0,
    year: rows.years[row] ?? 0,
    month: rows.months[row] ?? 0,
    day: rows.days[row] ?? 0,
    hour: rows.hours[row] ?? 0,
    minute: rows.minutes[row] ?? 0,
    dryBulbC: rows.dryBulbC[row] ?? Number.NaN,
    dewPointC: rows.dewPointC[row] ?? Number.NaN,
    relativeHumidityPct: rows.relativeHumidityPct[row] ?? Number.NaN,
    pressurePa: rows.pressurePa[row] ?? Number.NaN,
    estimated: rows.estimated[row] ?? 0,
  };
}
