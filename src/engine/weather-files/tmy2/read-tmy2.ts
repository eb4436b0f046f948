/**
 * TMY2: a header of the station, then 142 characters an hour, local standard time, end of the hour (User's Manual for TMY2s,
 * tables 3 to 5). Positions here are counted from 0.
 */
import { assembleYear } from '../assembly/assemble-year.ts';
import { RowCollector } from '../assembly/row-collector.ts';
import { VALUE } from '../assembly/source-rows.ts';
import type { FindingList } from '../finding-list.ts';
import { withStatedPlace } from '../place/settle-place.ts';
import type { ReadOptions } from '../read-options.ts';
import { isEstimatedLetter } from '../source-letters.ts';
import { type DecodedText, textBetween } from '../text/decode-text.ts';
import { fixedInteger } from '../text/fixed-integer.ts';
import { LineCursor } from '../text/line-cursor.ts';
import { wrongDatePart } from '../time/wrong-date-part.ts';
import type { DeclaredStation, WeatherFileReading } from '../weather-file-reading.ts';

const RECORD_BYTES = 142;
/** Up to the wind nothing is needed; a record that ends before the pressure's code is cut short. */
const NEEDED_BYTES = 90;
const CENTURY = 1900;
const MISSING = { temperature: 9999, humidity: 999, pressure: 9999 } as const;
/** The header line, as the recogniser looks for it. */
export const TMY2_HEADER = /^\s?\d{5}\s.{22}\s[A-Z]{2}\s+-?\d+\s+[NS]\s/;

export function readTmy2(
  text: DecodedText,
  options: ReadOptions,
  findings: FindingList,
): readonly WeatherFileReading[] {
  const cursor = new LineCursor(text);
  cursor.next();
  const station = withStatedPlace(readHeader(cursor, findings), options.place);
  const stationLine = cursor.line;
  const rows = new RowCollector();
  while (cursor.next()) readRecord(cursor, rows, findings);
  const reading = assembleYear(
    {
      format: 'TMY2',
      part: '',
      station,
      stationLine,
      rows: rows.finish(),
      stepsPerHour: 1,
      yearFrom: 'typical',
      cutByUtc: false,
      periods: [],
      leapYearObserved: null,
      sourceFlagsInformative: true,
      published: null,
      comments: null,
    },
    findings,
    options,
  );
  return [reading];
}

function readHeader(cursor: LineCursor, findings: FindingList): DeclaredStation {
  const { bytes } = cursor.text;
  const number = (from: number, to: number) => fixedInteger(bytes, cursor.start + from, cursor.start + to);
  const letter = (at: number) => String.fromCharCode(bytes[cursor.start + at] ?? 0);
  const latitude = (number(39, 41) + number(42, 44) / 60) * (letter(37) === 'S' ? -1 : 1);
  const longitude = (number(47, 50) + number(51, 53) / 60) * (letter(45) === 'W' ? -1 : 1);
  const known = (value: number) => (Number.isNaN(value) ? null : value);
  if (Number.isNaN(latitude + longitude)) tellHeader(cursor, findings);
  const city = textBetween(cursor.text, cursor.start + 7, Math.min(cursor.end, cursor.start + 29));
  return {
    name: city.replace(/\p{C}/gu, '').trim() || 'Unnamed station',
    latitude: known(thousandths(latitude)),
    longitude: known(thousandths(longitude)),
    elevationM: known(number(53, Math.min(59, cursor.end - cursor.start))),
    utcOffsetH: known(number(33, 36)),
    wmoNumber: null,
  };
}

/** Minutes of arc as decimals, without the digits that a division leaves. */
function thousandths(degrees: number): number {
  return Math.round(degrees * 1000) / 1000;
}

function tellHeader(cursor: LineCursor, findings: FindingList): void {
  const { line } = cursor;
  findings.add({
    code: 'header',
    severity: 'doubt',
    line,
    message: () =>
      `Line ${line}: the position in the header is not written as degrees and minutes, so it is not known.`,
  });
}

function readRecord(cursor: LineCursor, rows: RowCollector, findings: FindingList): void {
  const { line } = cursor;
  const length = cursor.end - cursor.start;
  if (length < NEEDED_BYTES || (length < RECORD_BYTES && !cursor.closed)) {
    tellShort({ line, length, last: !cursor.closed }, findings);
    return;
  }
  const { bytes } = cursor.text;
  const number = (from: number, to: number) => fixedInteger(bytes, cursor.start + from, cursor.start + to);
  const time = {
    year: CENTURY + number(1, 3),
    month: number(3, 5),
    day: number(5, 7),
    hour: number(7, 9),
    minute: 0,
  };
  const wrong = wrongDatePart(time) ?? (time.hour === 0 ? 'hour 0 does not exist (1 to 24)' : null);
  const values = [number(67, 71), number(73, 77), number(79, 82), number(84, 88)];
  if (wrong !== null)
    tellWrong({ line, code: 'time-order', what: `${wrong}, so the row has no place in the year` }, findings);
  const [dryBulb = 0, dewPoint = 0, humidity = 0, pressure = 0] = values;
  if (values.some((value) => Number.isNaN(value))) {
    const what = 'a field among dry bulb, dew point, relative humidity and pressure (characters 68 to 88) is no number';
    tellWrong({ line, code: 'not-a-number', what }, findings);
    return;
  }
  if (wrong !== null) return;
  rows.add({
    line,
    ...time,
    dryBulbC: dryBulb === MISSING.temperature ? Number.NaN : dryBulb / 10,
    dewPointC: dewPoint === MISSING.temperature ? Number.NaN : dewPoint / 10,
    relativeHumidityPct: humidity === MISSING.humidity ? Number.NaN : humidity,
    pressurePa: pressure === MISSING.pressure || pressure <= 0 ? Number.NaN : pressure * 100,
    estimated:
      (isEstimatedLetter(bytes[cursor.start + 71]) ? VALUE.dryBulb : 0) |
      (isEstimatedLetter(bytes[cursor.start + 77]) ? VALUE.dewPoint : 0) |
      (isEstimatedLetter(bytes[cursor.start + 82]) ? VALUE.relativeHumidity : 0),
  });
}

function tellShort(found: { line: number; length: number; last: boolean }, findings: FindingList): void {
  const { last, length, line } = found;
  findings.add({
    code: last ? 'truncated' : 'field-count',
    severity: last ? 'repair' : 'refuse',
    line,
    message: () =>
      last
        ? `Line ${line}, the last, is cut short: it has ${length} of ${RECORD_BYTES} characters and no line end. It is left out. If more is missing, bring the file anew from its source.`
        : `Line ${line} has ${length} characters, where a record has ${RECORD_BYTES}. Mend the line, or bring the file anew from its source.`,
  });
}

function tellWrong(
  fault: { line: number; code: 'time-order' | 'not-a-number'; what: string },
  findings: FindingList,
): void {
  const { code, line, what } = fault;
  findings.add({ code, severity: 'refuse', line, message: () => `Line ${line}: ${what}. Mend the line.` });
}
