/** Full integrated surface data: a record for each report, several an hour, in UTC. */
import type { FindingList } from '../finding-list.ts';
import type { ReadOptions } from '../read-options.ts';
import { assembleReports } from '../reports/assemble-reports.ts';
import { LeftOutByCode } from '../reports/coded-value.ts';
import { hasPassedAll, isSummary, typeRank } from '../reports/report-codes.ts';
import { ReportsByStation } from '../reports/station-reports.ts';
import { tellNoTemperature } from '../reports/tell-no-temperature.ts';
import type { DecodedText } from '../text/decode-text.ts';
import { LineCursor } from '../text/line-cursor.ts';
import { civilMinutes } from '../time/civil-minutes.ts';
import { wrongDatePart } from '../time/wrong-date-part.ts';
import type { WeatherFileReading } from '../weather-file-reading.ts';
import { type IsdRecord, isdRecord, SHORTEST_RECORD } from './isd-record.ts';

const NO_NUMBER = '999999';

export function readIsd(text: DecodedText, options: ReadOptions, findings: FindingList): readonly WeatherFileReading[] {
  const cursor = new LineCursor(text);
  const reports = new ReportsByStation();
  const leftOut = new LeftOutByCode(options.keepSuspect ?? false);
  const counts = { reports: 0, temperatures: 0 };
  while (cursor.next()) {
    const length = cursor.end - cursor.start;
    if (length < SHORTEST_RECORD) {
      tellShort({ line: cursor.line, length, last: !cursor.closed }, findings);
      continue;
    }
    const record = isdRecord(cursor);
    const wrong = wrongDatePart(record);
    if (wrong !== null) tellWrongDate(cursor.line, wrong, findings);
    else if (!isSummary(record.type)) {
      counts.reports++;
      if (!Number.isNaN(record.dryBulbC)) counts.temperatures++;
      addReport({ record, line: cursor.line }, leftOut, reports);
    }
  }
  leftOut.tell(findings);
  if (counts.temperatures === 0) tellNoTemperature(counts.reports, findings);
  return assembleReports('ISD', { reports, options }, findings);
}

function addReport(
  at: { readonly record: IsdRecord; readonly line: number },
  leftOut: LeftOutByCode,
  reports: ReportsByStation,
): void {
  const { line, record } = at;
  const key = `${record.usaf}-${record.wban}`;
  const wmoNumber = record.usaf === NO_NUMBER ? null : record.usaf;
  reports.add({ key, name: key, wmoNumber }, record, {
    line,
    minutes: civilMinutes(record),
    dryBulbC: leftOut.accept(record.dryBulbC, record.dryBulbCode, line),
    dewPointC: leftOut.accept(record.dewPointC, record.dewPointCode, line),
    pressurePa: leftOut.accept(record.stationPressurePa, record.stationCode, line),
    seaLevelPressurePa: leftOut.accept(record.seaLevelPressurePa, record.seaLevelCode, line),
    typeRank: typeRank(record.type),
    qualityRank: hasPassedAll(record.dryBulbCode) ? 0 : 1,
  });
}

function tellShort(
  found: { readonly line: number; readonly length: number; readonly last: boolean },
  findings: FindingList,
): void {
  const { last, length, line } = found;
  findings.add({
    code: last ? 'truncated' : 'field-count',
    severity: last ? 'repair' : 'refuse',
    line,
    message: () =>
      last
        ? `Line ${line}, the last, is cut short: it has ${length} characters and no line end. It is left out.`
        : `Line ${line} has ${length} characters, where a record has at least ${SHORTEST_RECORD}. Mend the line, or bring the file anew from its source.`,
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
