/**
 * Global Hourly CSV: the same reports as the integrated surface data, a quoted column for each group; values and their quality
 * codes share a cell. In UTC. Columns vary by file and are found by name.
 */
import type { FindingList } from '../finding-list.ts';
import type { ReadOptions } from '../read-options.ts';
import { assembleReports } from '../reports/assemble-reports.ts';
import { LeftOutByCode } from '../reports/coded-value.ts';
import { hasPassedAll, isSummary, typeRank } from '../reports/report-codes.ts';
import { ReportsByStation } from '../reports/station-reports.ts';
import { tellNoTemperature } from '../reports/tell-no-temperature.ts';
import type { DecodedText } from '../text/decode-text.ts';
import { LineCursor } from '../text/line-cursor.ts';
import { findSeparatedFields, type SeparatedFields, separatedFields, separatedText } from '../text/separated-fields.ts';
import { civilMinutes } from '../time/civil-minutes.ts';
import { wrongDatePart } from '../time/wrong-date-part.ts';
import type { WeatherFileReading } from '../weather-file-reading.ts';

const COMMA = 0x2c;
const MOST_COLUMNS = 400;
const LONGEST_CELL = 80;
const DATE = /^(\d{4})-(\d\d)-(\d\d)[T ](\d\d):(\d\d)/;
/** Signed tenths of a degree, a comma, a quality code. */
const TEMPERATURE = /^([+-]\d{4}),(\w)$/;
const PRESSURE = /^(\d{5}),(\w)$/;
/** Altimeter setting, its code, station pressure, its code. */
const PRESSURE_GROUP = /^\d{5},\w,(\d{5}),(\w)$/;
const MISSING = { temperature: 9999, pressure: 99_999, latitude: 99, longitude: 999, elevation: 9999 } as const;
const NUMBERED = /^(\d{6}|[A-Z]\d{5})(\d{5})$/;
const NO_NUMBER = '999999';

/** Whether a first line names the columns of this format. */
export function namesGlobalHourly(header: string): boolean {
  const names = new Set(header.split(',').map((name) => name.replaceAll('"', '').trim().toUpperCase()));
  return ['STATION', 'DATE', 'TMP', 'DEW'].every((name) => names.has(name));
}

export function readGlobalHourly(
  text: DecodedText,
  options: ReadOptions,
  findings: FindingList,
): readonly WeatherFileReading[] {
  const cursor = new LineCursor(text);
  const fields = separatedFields(MOST_COLUMNS);
  const file: GlobalHourlyFile = {
    cell: () => '',
    columns: 0,
    leftOut: new LeftOutByCode(options.keepSuspect ?? false),
    reports: new ReportsByStation(),
    counts: { reports: 0, temperatures: 0 },
  };
  if (cursor.next()) {
    findSeparatedFields(cursor, COMMA, fields);
    file.columns = fields.count;
    file.cell = cellReader(cursor, fields);
  }
  while (cursor.next()) {
    findSeparatedFields(cursor, COMMA, fields);
    if (fields.count < file.columns) tellShort(cursor, fields, { wanted: file.columns }, findings);
    else readReport(cursor, file, findings);
  }
  file.leftOut.tell(findings);
  if (file.counts.temperatures === 0) tellNoTemperature(file.counts.reports, findings);
  return assembleReports('Global Hourly', { reports: file.reports, options }, findings);
}

interface GlobalHourlyFile {
  /** Text of the cell in the column of that name on the present line; empty without such a column. */
  cell: (name: string) => string;
  columns: number;
  readonly leftOut: LeftOutByCode;
  readonly reports: ReportsByStation;
  readonly counts: { reports: number; temperatures: number };
}

/** Where each column stands, from the header on the present line. */
function cellReader(cursor: LineCursor, fields: SeparatedFields): (name: string) => string {
  const places = new Map<string, number>();
  for (let index = Math.min(fields.count, MOST_COLUMNS) - 1; index >= 0; index--) {
    places.set(separatedText(cursor, fields, index, LONGEST_CELL).trim().toUpperCase(), index);
  }
  return (name) => separatedText(cursor, fields, places.get(name) ?? -1, LONGEST_CELL).trim();
}

function readReport(cursor: LineCursor, file: GlobalHourlyFile, findings: FindingList): void {
  const { line } = cursor;
  const { cell, leftOut } = file;
  const type = cell('REPORT_TYPE');
  if (isSummary(type)) return;
  const time = timeOf(cell('DATE'));
  const wrong = time === null ? `its date ${JSON.stringify(cell('DATE'))} is none` : wrongDatePart(time);
  if (time === null || wrong !== null) {
    tellWrongDate(line, wrong ?? '', findings);
    return;
  }
  const dryBulb = TEMPERATURE.exec(cell('TMP'));
  const dewPoint = TEMPERATURE.exec(cell('DEW'));
  const seaLevel = PRESSURE.exec(cell('SLP'));
  const station = PRESSURE_GROUP.exec(cell('MA1'));
  const dryBulbC = codedNumber(dryBulb, MISSING.temperature) / 10;
  file.counts.reports++;
  if (!Number.isNaN(dryBulbC)) file.counts.temperatures++;
  file.reports.add(stationOf(cell('STATION'), cell('NAME')), placeOf(cell), {
    line,
    minutes: civilMinutes(time),
    dryBulbC: leftOut.accept(dryBulbC, dryBulb?.[2] ?? '', line),
    dewPointC: leftOut.accept(codedNumber(dewPoint, MISSING.temperature) / 10, dewPoint?.[2] ?? '', line),
    pressurePa: leftOut.accept(codedNumber(station, MISSING.pressure) * 10, station?.[2] ?? '', line),
    seaLevelPressurePa: leftOut.accept(codedNumber(seaLevel, MISSING.pressure) * 10, seaLevel?.[2] ?? '', line),
    typeRank: typeRank(type),
    qualityRank: hasPassedAll(dryBulb?.[2] ?? '') ? 0 : 1,
  });
}

function timeOf(date: string) {
  const found = DATE.exec(date);
  if (found === null) return null;
  const [year = 0, month = 0, day = 0, hour = 0, minute = 0] = found.slice(1).map(Number);
  return { year, month, day, hour, minute };
}

function codedNumber(found: RegExpExecArray | null, missing: number): number {
  const value = Number(found?.[1] ?? Number.NaN);
  return value === missing ? Number.NaN : value;
}

function stationOf(key: string, name: string) {
  const numbers = NUMBERED.exec(key);
  const usaf = numbers?.[1] ?? NO_NUMBER;
  const known = numbers === null ? key : `${numbers[1]}-${numbers[2]}`;
  const shown = name === '' ? known : name;
  return { key: known, name: shown, wmoNumber: usaf === NO_NUMBER ? null : usaf };
}

function placeOf(cell: (name: string) => string) {
  const known = (name: string, missing: number) => {
    const text = cell(name);
    const value = text === '' ? Number.NaN : Number(text);
    return Number.isFinite(value) && Math.abs(value) < missing ? value : null;
  };
  return {
    latitude: known('LATITUDE', MISSING.latitude),
    longitude: known('LONGITUDE', MISSING.longitude),
    elevationM: known('ELEVATION', MISSING.elevation),
  };
}

function tellShort(
  cursor: LineCursor,
  fields: SeparatedFields,
  columns: { readonly wanted: number },
  findings: FindingList,
): void {
  const { closed, line } = cursor;
  const { count } = fields;
  findings.add({
    code: closed ? 'field-count' : 'truncated',
    severity: closed ? 'refuse' : 'repair',
    line,
    message: () =>
      closed
        ? `Line ${line} has ${count} ${count === 1 ? 'field' : 'fields'}, where the header names ${columns.wanted} columns. Mend the line, or bring the file anew from its source.`
        : `Line ${line}, the last, is cut short: it has ${count} of ${columns.wanted} fields and no line end. It is left out.`,
  });
}

function tellWrongDate(line: number, wrong: string, findings: FindingList): void {
  findings.add({
    code: 'time-order',
    severity: 'refuse',
    line,
    message: () => `Line ${line}: ${wrong}, so the report has no place in the year. Mend the date.`,
  });
}
