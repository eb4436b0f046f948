import type { FindingList } from '../finding-list.ts';
import type { LineCursor } from '../text/line-cursor.ts';
import { type SeparatedFields, separatedText } from '../text/separated-fields.ts';

/** Where the columns of a TMY3 stand, counted from 0; -1 where the file has none. Found by name, never by position. */
export interface Tmy3Columns {
  /** Columns that are named. */
  readonly count: number;
  readonly date: number;
  readonly time: number;
  readonly dryBulb: number;
  readonly dewPoint: number;
  readonly relativeHumidity: number;
  readonly pressure: number;
  readonly dryBulbSource: number;
  readonly dewPointSource: number;
  readonly relativeHumiditySource: number;
}

const DRY_BULB = 'Dry-bulb (C)';
const DEW_POINT = 'Dew-point (C)';
const RELATIVE_HUMIDITY = 'RHum (%)';

/** Whether a second line names the columns of this format. */
export const TMY3_NAMES = /^\s*"?Date \(MM\/DD\/YYYY\)"?\s*,\s*"?Time \(HH:MM\)/i;

/** The columns that the present line names; what is missing for a wet bulb is told by name. */
export function readTmy3Columns(cursor: LineCursor, fields: SeparatedFields, findings: FindingList): Tmy3Columns {
  const places = new Map<string, number>();
  for (let index = Math.min(fields.count, fields.starts.length) - 1; index >= 0; index--) {
    places.set(separatedText(cursor, fields, index).trim().toLowerCase(), index);
  }
  const place = (name: string) => places.get(name.toLowerCase()) ?? -1;
  const columns = {
    count: fields.count,
    date: place('Date (MM/DD/YYYY)'),
    time: place('Time (HH:MM)'),
    dryBulb: place(DRY_BULB),
    dewPoint: place(DEW_POINT),
    relativeHumidity: place(RELATIVE_HUMIDITY),
    pressure: place('Pressure (mbar)'),
    dryBulbSource: place('Dry-bulb source'),
    dewPointSource: place('Dew-point source'),
    relativeHumiditySource: place('RHum source'),
  };
  tellMissing(columns, cursor.line, findings);
  return columns;
}

function tellMissing(columns: Tmy3Columns, line: number, findings: FindingList): void {
  if (columns.dryBulb < 0) {
    findings.add({
      code: 'no-temperature',
      severity: 'refuse',
      line,
      message: () => `Line ${line} names no column “${DRY_BULB}”. Bring a file with the temperatures.`,
    });
  }
  if (columns.dewPoint >= 0 || columns.relativeHumidity >= 0) return;
  findings.add({
    code: 'no-humidity',
    severity: 'refuse',
    line,
    message: () =>
      `Line ${line} names neither a column “${DEW_POINT}” nor “${RELATIVE_HUMIDITY}”. The wet bulb needs one of them: bring a file that has it.`,
  });
}
