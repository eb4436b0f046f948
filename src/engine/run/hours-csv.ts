/**
 * The hours table as CSV (RFC 4180, lines end with a line feed): rows that begin with `#` say what it is, then one row of
 * column names with their units, then one row per slot. A blank cell is not known or has no meaning for such an hour.
 */
import { METHOD_VERSION } from '../conventions.ts';
import { textCell } from '../csv-cell.ts';
import type { YearKind } from '../reduction/weather-year.ts';
import type { HourRow, HoursTable } from './hours-table.ts';

export interface HoursTableOrigin {
  /** Names as a person gave them or a file holds them: guarded before they stand in a cell. */
  readonly file: string;
  readonly station: string;
  /** What kind of year it is, of a derived one also how it was made: "typical year". */
  readonly weatherYear: string;
  /** Under which licence the weather may be passed on, and whom to name; null where nobody has said. */
  readonly licence: string | null;
  readonly brief: string;
  /** The brief in one sentence. */
  readonly briefSentence: string;
  /** IANA name of the civil time. */
  readonly zone: string;
}

/** "typical year", "actual year 2019". */
export function weatherYearText({ kind, year }: { readonly kind: YearKind; readonly year: number | null }): string {
  return kind === 'actual' ? `actual year ${year}` : `${kind} year`;
}

interface Column {
  readonly name: string;
  readonly cell: (row: HourRow) => string;
}

/** Ends of slots in the order of the calendar on which the year was laid. */
export function hoursCsv(table: HoursTable, origin: HoursTableOrigin): string {
  const columns = columnsOf(table);
  const lines = [
    ...aboutLines(table, origin),
    columns.map(({ name }) => name).join(','),
    ...table.rows.map((row) => columns.map(({ cell }) => cell(row)).join(',')),
  ];
  return `${lines.join('\n')}\n`;
}

function aboutLines({ clock, limitUnit }: HoursTable, origin: HoursTableOrigin): readonly string[] {
  const units = `°C, K, Pa, kg of water per kg of dry air, %, litres and kWh per kW of design load; limit in ${limitUnit}`;
  const laidOn = `${clock.calendarYear} (the calendar's own year, which for a typical or derived year is a convention)`;
  return [
    ['method version', METHOD_VERSION],
    ['brief', origin.brief],
    ['requirement', origin.briefSentence],
    ['file', origin.file],
    ['station', origin.station],
    ['weather year', origin.weatherYear],
    ...(origin.licence === null ? [] : [['licence of the weather', origin.licence]]),
    ['units', units],
    [
      'times',
      `end of the hour; standard time is UTC${offsetText(clock.utcOffsetMin)}, civil time that of ${origin.zone}`,
    ],
    ['calendar', laidOn],
    ['relative humidity', 'over ice below 0 °C'],
    ['room', 'with what is supplied and without back-up'],
  ].map(([name, value]) => `# ${name},${textCell(value ?? '')}`);
}

function offsetText(offsetMin: number): string {
  const size = Math.abs(offsetMin);
  const two = (value: number): string => String(value).padStart(2, '0');
  return `${offsetMin < 0 ? '-' : '+'}${two(Math.floor(size / 60))}:${two(size % 60)}`;
}

function columnsOf({ limitUnit }: HoursTable): readonly Column[] {
  const unit = limitUnit === '°C' ? 'C' : 'points';
  const shortfallUnit = limitUnit === '°C' ? 'K' : 'points';
  const number = (name: string, decimals: number, value: (row: HourRow) => number | null): Column => ({
    name,
    cell: (row) => numberCell(value(row), decimals),
  });
  const text = (name: string, value: (row: HourRow) => string | null): Column => ({
    name,
    cell: (row) => textCell(value(row) ?? ''),
  });
  return [
    text('standard_time', ({ standardMs }) => timeText(standardMs)),
    text('civil_time', ({ civilMs }) => timeText(civilMs)),
    number('dry_bulb_C', 2, ({ dryBulbC }) => dryBulbC),
    number('humidity_ratio_kg_kg', 6, ({ humidityRatio }) => humidityRatio),
    number('relative_humidity_pct', 2, (row) => row.relativeHumidityPct),
    number('pressure_Pa', 0, ({ pressurePa }) => pressurePa),
    number('wet_bulb_C', 3, ({ wetBulbC }) => wetBulbC),
    text('class', ({ hourClass }) => hourClass),
    text('met', ({ met }) => (met === null ? null : met ? 'yes' : 'no')),
    text('stage', ({ stage }) => stage),
    number('wetting_share', 4, ({ share }) => share),
    number('load_fraction', 4, ({ loadFraction }) => loadFraction),
    number('supply_C', 3, ({ supplyC }) => supplyC),
    number('supply_humidity_ratio_kg_kg', 7, (row) => row.supplyHumidityRatio),
    number('room_C', 3, ({ roomC }) => roomC),
    number('room_relative_humidity_pct', 2, ({ roomRhPct }) => roomRhPct),
    number('room_index_points', 2, ({ roomIndex }) => roomIndex),
    number(`limit_${unit}`, 4, ({ limit }) => limit),
    number(`shortfall_${shortfallUnit}`, 3, ({ shortfall }) => shortfall),
    number('water_L_per_kW', 4, ({ waterLitres }) => waterLitres),
    number('electricity_kWh_per_kW', 4, ({ kwh }) => kwh),
    text('reason', ({ reason }) => reason),
    number('file_line', 0, ({ line }) => line),
  ];
}

/** Local time, "2029-07-14 15:00". */
function timeText(localMs: number): string {
  return new Date(localMs).toISOString().slice(0, 16).replace('T', ' ');
}

function numberCell(value: number | null, decimals: number): string {
  if (value === null) return '';
  const written = value.toFixed(decimals);
  // A small negative number rounds to "-0.00".
  return Number(written) === 0 ? written.replace('-', '') : written;
}
