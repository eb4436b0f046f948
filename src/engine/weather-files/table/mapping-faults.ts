import { zoneIsKnown } from '../../clock/zone-offset.ts';
import type { TableLayout } from './table-layout.ts';
import type { TableMapping, TimeColumns } from './table-mapping.ts';

/** Whether any humidity is mapped; without one there is no wet bulb. */
export function hasHumidity({ dewPoint, relativeHumidity, wetBulb }: TableMapping): boolean {
  return dewPoint !== null || relativeHumidity !== null || wetBulb !== null;
}

/** Why a mapping does not serve a table, as sentences; empty when it does. */
export function mappingFaults(mapping: TableMapping, layout: TableLayout): readonly string[] {
  const faults: string[] = [];
  for (const name of mappedColumns(mapping)) {
    if (!layout.names.includes(name))
      faults.push(`The mapping names a column “${name}”, which the table does not have.`);
  }
  const { scale, zone } = mapping.time;
  if (scale === 'clock' && (zone === null || !zoneIsKnown(zone))) {
    faults.push('Local clock time needs the name of a time zone, such as Europe/Rome.');
  }
  return faults;
}

function mappedColumns({ dewPoint, dryBulb, pressure, relativeHumidity, station, time, wetBulb }: TableMapping) {
  const values = [dryBulb, dewPoint, relativeHumidity, wetBulb, pressure].map((column) => column?.column ?? null);
  return [...timeColumnNames(time.columns), ...values, station].filter((name) => name !== null);
}

/** The columns that hold the time. */
export function timeColumnNames(columns: TimeColumns): readonly (string | null)[] {
  switch (columns.form) {
    case 'date and time':
      return [columns.date, columns.time];
    case 'parts':
      return [columns.year, columns.month, columns.day, columns.hour, columns.minute];
    default:
      return [columns.column];
  }
}
