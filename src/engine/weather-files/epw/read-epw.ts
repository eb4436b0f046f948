/** EPW: eight header records, then one comma-separated record an hour (formats: public data dictionary of the format). */
import { assembleYear } from '../assembly/assemble-year.ts';
import type { SourceRows } from '../assembly/source-rows.ts';
import { type FindingList, whole } from '../finding-list.ts';
import { Frequencies } from '../frequencies.ts';
import { withStatedPlace } from '../place/settle-place.ts';
import type { ReadOptions } from '../read-options.ts';
import type { DecodedText } from '../text/decode-text.ts';
import { LineCursor } from '../text/line-cursor.ts';
import type { WeatherFileReading } from '../weather-file-reading.ts';
import { type EpwHeader, readEpwHeader } from './epw-header.ts';
import { readEpwRows } from './epw-rows.ts';

/** Either a pressure or the code for none: the median of the others decides. */
const PRESSURE_CODE_PA = 99_999;
const CODE_WITHIN = 0.01;

export function readEpw(text: DecodedText, findings: FindingList, options: ReadOptions = {}): WeatherFileReading {
  const cursor = new LineCursor(text);
  const header = readEpwHeader(cursor, findings);
  const { flagsInformative, rows } = readEpwRows(cursor, findings);
  numberHours(rows, findings);
  settlePressureCode(rows.pressurePa);
  if (header.station === null) {
    return { status: 'refused', part: '', format: 'EPW', station: null, findings: findings.inOrder() };
  }
  return assembleYear(
    {
      format: 'EPW',
      part: '',
      yearFrom: 'weekday',
      cutByUtc: false,
      station: withStatedPlace(header.station, options.place),
      stationLine: header.stationLine,
      rows,
      stepsPerHour: settleRecordsPerHour(header, rows, findings),
      periods: header.periods,
      leapYearObserved: header.leapYearObserved,
      sourceFlagsInformative: flagsInformative,
      published: header.published,
      comments: header.comments,
    },
    findings,
    options,
  );
}

/** Home-made files number the hours 0 to 23: each is then the hour that begins. */
function numberHours(rows: SourceRows, findings: FindingList): void {
  const first = rows.hours.indexOf(0);
  if (first < 0 || rows.hours.includes(24)) return;
  for (let row = 0; row < rows.hours.length; row++) rows.hours[row] = (rows.hours[row] ?? 0) + 1;
  findings.add({
    code: 'time-order',
    severity: 'note',
    line: rows.lines[first] ?? null,
    count: rows.hours.length,
    message: () =>
      `The hours are numbered 0 to 23, where the format counts 1 to 24; each has been read as the hour that begins then, so 1 was added to all.`,
  });
}

function settlePressureCode(pressurePa: Float64Array): void {
  if (!pressurePa.includes(PRESSURE_CODE_PA)) return;
  const others = pressurePa.filter((value) => !Number.isNaN(value) && value !== PRESSURE_CODE_PA).sort();
  const medianPa = others[others.length >> 1];
  if (medianPa !== undefined && Math.abs(PRESSURE_CODE_PA / medianPa - 1) <= CODE_WITHIN) return;
  for (let row = 0; row < pressurePa.length; row++) {
    if (pressurePa[row] === PRESSURE_CODE_PA) pressurePa[row] = Number.NaN;
  }
}

/** Records an hour as the rows have them: the most frequent number of rows that share an hour at different minutes. */
function settleRecordsPerHour(header: EpwHeader, rows: SourceRows, findings: FindingList): number {
  const { days, hours, lines, minutes, months } = rows;
  if (header.recordsPerHour === 1 && everyHourIsNew(hours)) return 1;
  const found = new Frequencies();
  let run = 1;
  for (let row = 1; row <= lines.length; row++) {
    const sameHour = hours[row] === hours[row - 1] && days[row] === days[row - 1] && months[row] === months[row - 1];
    if (sameHour && minutes[row] !== minutes[row - 1]) {
      run++;
      continue;
    }
    found.add(run);
    run = 1;
  }
  const usual = found.mostFrequent(header.recordsPerHour);
  if (usual === header.recordsPerHour || 60 % usual !== 0) return header.recordsPerHour;
  if (!findings.refused) {
    findings.add({
      code: 'row-count',
      severity: 'doubt',
      count: rows.lines.length,
      message: () =>
        `DATA PERIODS declares ${header.recordsPerHour} ${header.recordsPerHour === 1 ? 'record' : 'records'} an hour, but most of the ${whole(rows.lines.length)} rows come ${usual} to the hour. The rows are believed.`,
    });
  }
  return usual;
}

/** Whether no row has the hour of the one before it, as in nearly every file. */
function everyHourIsNew(hours: Uint8Array): boolean {
  let row = 1;
  while (row < hours.length && hours[row] !== hours[row - 1]) row++;
  return row >= hours.length;
}
