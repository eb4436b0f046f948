import type { DecodedText } from '../text/decode-text.ts';
import type { CivilTime } from '../time/civil-minutes.ts';
import { timeReader } from './row-time.ts';
import { valuesReader } from './row-values.ts';
import type { SampleRow } from './table-guess.ts';
import type { TableLayout } from './table-layout.ts';
import type { TableMapping } from './table-mapping.ts';
import { isRow, scanTable } from './table-scan.ts';

const SHOWN_ROWS = 10;

/** The first ten rows under a mapping: temperatures in °C, humidity in %, pressure in Pa; null where nothing could be read. */
export function sampleRows(text: DecodedText, layout: TableLayout, mapping: TableMapping): readonly SampleRow[] {
  const [readTime, readValues] = [timeReader(mapping.time.columns, layout), valuesReader(mapping, layout)];
  const rows: SampleRow[] = [];
  scanTable(text, layout, (cursor, fields) => {
    if (rows.length >= SHOWN_ROWS || !isRow(cursor, fields, layout)) return;
    const stamp = readTime(cursor, fields);
    const values = readValues(cursor, fields, () => undefined);
    const known = (value: number) => (Number.isFinite(value) ? value : null);
    rows.push({
      line: cursor.line,
      time: stamp === null ? null : isoTime(stamp.time),
      dryBulbC: known(values.dryBulbC),
      dewPointC: known(values.dewPointC),
      relativeHumidityPct: known(values.relativeHumidityPct),
      wetBulbC: known(values.wetBulbC),
      pressurePa: known(values.pressurePa),
    });
  });
  return rows;
}

function isoTime({ day, hour, minute, month, year }: CivilTime): string {
  const two = (value: number) => String(value).padStart(2, '0');
  return `${year}-${two(month)}-${two(day)}T${two(hour)}:${two(minute)}`;
}
