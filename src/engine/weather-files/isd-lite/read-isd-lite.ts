/**
 * ISD-Lite: no header, 61 characters an hour, in UTC, sea-level pressure. Station and year stand in the file's name, place and
 * elevation in a list beside it, so they are asked. (Format documentation of 2006; the positions of day and dew point are those
 * of the files, which the published list has wrong.)
 */
import { assembleStationYears } from '../assembly/assemble-station-years.ts';
import type { FindingList } from '../finding-list.ts';
import { settlePlace, unknownStation } from '../place/settle-place.ts';
import type { ReadOptions } from '../read-options.ts';
import { rowsAsTheyStand } from '../reports/hourly-rows.ts';
import { ReportColumns } from '../reports/report-columns.ts';
import { tellSeaLevelPressure } from '../reports/tell-sea-level.ts';
import type { DecodedText } from '../text/decode-text.ts';
import { fixedInteger } from '../text/fixed-integer.ts';
import { LineCursor } from '../text/line-cursor.ts';
import { civilMinutes } from '../time/civil-minutes.ts';
import { wrongDatePart } from '../time/wrong-date-part.ts';
import type { DeclaredStation, WeatherFileReading } from '../weather-file-reading.ts';

const RECORD_BYTES = 61;
const MISSING = -9999;
/** Fields from the first byte of the line: first byte, and the byte after the last. */
const FIELDS = {
  year: [0, 4],
  month: [5, 7],
  day: [8, 10],
  hour: [11, 13],
  dryBulb: [13, 19],
  dewPoint: [19, 25],
  seaLevelPressure: [25, 31],
} as const;
/** A record of ISD-Lite, as the recogniser looks for it. */
export const ISD_LITE_RECORD = /^\d{4} \d\d \d\d \d\d( *-?\d+){8}$/;
const FILE_NAME = /(?:^|[^0-9A-Za-z])([0-9A-Z]\d{5})-(\d{5})-\d{4}(?:\D|$)/;
const NO_NUMBER = '999999';

export function readIsdLite(
  text: DecodedText,
  file: { readonly name: string; readonly options: ReadOptions },
  findings: FindingList,
): readonly WeatherFileReading[] {
  const cursor = new LineCursor(text);
  const reports = new ReportColumns();
  while (cursor.next()) readRecord(cursor, reports, findings);
  const station = settlePlace(stationOfName(file.name), { options: file.options, inUtc: true }, findings);
  const { elevationM, utcOffsetH } = station;
  const { fromSeaLevel, rows } = rowsAsTheyStand(reports, {
    offsetMin: Math.round(60 * (utcOffsetH ?? 0)),
    elevationM,
  });
  tellSeaLevelPressure({ fromSeaLevel, elevationM, reports }, findings);
  const contents = {
    format: 'ISD-Lite',
    key: '',
    station,
    stationLine: null,
    rows,
    stepsPerHour: 1,
    cutByUtc: true,
    leapYearObserved: null,
    sourceFlagsInformative: null,
    published: null,
    comments: null,
  } as const;
  return assembleStationYears([contents], findings, file.options);
}

/** The station that a file's name gives: `USAF-WBAN-YYYY`. */
function stationOfName(name: string): DeclaredStation {
  const found = FILE_NAME.exec(name);
  if (found === null) return unknownStation();
  const [, usaf = '', wban = ''] = found;
  return { ...unknownStation(`${usaf}-${wban}`), wmoNumber: usaf === NO_NUMBER ? null : usaf };
}

function readRecord(cursor: LineCursor, reports: ReportColumns, findings: FindingList): void {
  const { line } = cursor;
  const length = cursor.end - cursor.start;
  if (length < RECORD_BYTES) {
    if (cursor.closed) tellLength(line, length, findings);
    else tellCut(line, length, findings);
    return;
  }
  const field = ([start, end]: readonly [number, number]) =>
    fixedInteger(cursor.text.bytes, cursor.start + start, cursor.start + end);
  const time = {
    year: field(FIELDS.year),
    month: field(FIELDS.month),
    day: field(FIELDS.day),
    hour: field(FIELDS.hour),
    minute: 0,
  };
  const wrong = wrongDatePart(time);
  const values = [field(FIELDS.dryBulb), field(FIELDS.dewPoint), field(FIELDS.seaLevelPressure)];
  if (wrong !== null || values.some((value) => Number.isNaN(value))) {
    tellWrong(cursor, wrong, findings);
    return;
  }
  const [dryBulb = MISSING, dewPoint = MISSING, seaLevel = MISSING] = values;
  reports.add({
    line,
    minutes: civilMinutes(time),
    dryBulbC: tenths(dryBulb),
    dewPointC: tenths(dewPoint),
    pressurePa: Number.NaN,
    seaLevelPressurePa: seaLevel <= 0 ? Number.NaN : seaLevel * 10,
    typeRank: 0,
    qualityRank: 0,
  });
}

function tenths(value: number): number {
  return value === MISSING ? Number.NaN : value / 10;
}

function tellLength(line: number, length: number, findings: FindingList): void {
  findings.add({
    code: 'field-count',
    severity: 'refuse',
    line,
    message: () =>
      `Line ${line} has ${length} characters, where a record has ${RECORD_BYTES}. Mend the line, or bring the file anew from its source.`,
  });
}

function tellCut(line: number, length: number, findings: FindingList): void {
  findings.add({
    code: 'truncated',
    severity: 'repair',
    line,
    message: () =>
      `Line ${line}, the last, is cut short: it has ${length} of ${RECORD_BYTES} characters and no line end. It is left out. If more is missing, bring the file anew from its source.`,
  });
}

function tellWrong(cursor: LineCursor, wrong: string | null, findings: FindingList): void {
  const { line } = cursor;
  const shown = cursor.string(RECORD_BYTES).replace(/\p{C}/gu, '?').trim();
  findings.add({
    code: wrong === null ? 'not-a-number' : 'time-order',
    severity: 'refuse',
    line,
    message: () =>
      wrong === null
        ? `Line ${line} holds a field that is no whole number: “${shown}”. Mend the line.`
        : `Line ${line}: ${wrong}, so the row has no place in the year. Mend the date.`,
  });
}
