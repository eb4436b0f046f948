/**
 * Header records of an EPW, read by keyword and not by line number: spreadsheets add commas and editors move lines. LOCATION
 * and DATA PERIODS must be there; the others may be missing or out of order. Data begin after DATA PERIODS.
 */
import type { PublishedDesign } from '../assembly/design-check.ts';
import type { DeclaredPeriod } from '../assembly/match-calendar.ts';
import type { FindingList } from '../finding-list.ts';
import { tellLicence } from '../licence-words.ts';
import type { LineCursor } from '../text/line-cursor.ts';
import type { DeclaredStation } from '../weather-file-reading.ts';
import { readDataPeriods } from './data-periods.ts';
import { readDesignConditions } from './design-conditions.ts';
import { headerFields } from './header-fields.ts';
import { readLocation } from './location.ts';

export interface EpwHeader {
  readonly station: DeclaredStation | null;
  readonly stationLine: number | null;
  readonly published: PublishedDesign | null;
  readonly leapYearObserved: boolean | null;
  /** COMMENTS 1 and 2 as they stand; null when both are empty. */
  readonly comments: string | null;
  readonly periods: readonly DeclaredPeriod[];
  readonly recordsPerHour: number;
}

interface Draft {
  station: DeclaredStation | null;
  stationLine: number | null;
  published: PublishedDesign | null;
  leapYearObserved: boolean | null;
  comments: string[];
  periods: readonly DeclaredPeriod[];
  recordsPerHour: number;
  complete: boolean;
}

/** More of a header line than this is not read. */
const LONGEST_RECORD = 20_000;
/** Year, month, day and hour. */
const DATA_RECORD = /^\s*[+-]?\d+\s*,\s*\d+\s*,\s*\d+\s*,\s*\d+\s*,/;

/** Reads up to DATA PERIODS, or to the first line that can only be data. */
export function readEpwHeader(cursor: LineCursor, findings: FindingList): EpwHeader {
  const draft: Draft = {
    station: null,
    stationLine: null,
    published: null,
    leapYearObserved: null,
    comments: [],
    periods: [],
    recordsPerHour: 1,
    complete: false,
  };
  while (!draft.complete && cursor.next()) {
    const record = cursor.string(LONGEST_RECORD);
    if (DATA_RECORD.test(record)) {
      cursor.putBack();
      break;
    }
    takeRecord(draft, { record, line: cursor.line }, findings);
  }
  tellMissingRecords(draft, cursor.line, findings);
  const comments = draft.comments.join('\n');
  tellLicence(comments, findings);
  return { ...draft, comments: comments === '' ? null : comments };
}

function takeRecord(draft: Draft, where: { record: string; line: number }, findings: FindingList): void {
  const { line, record } = where;
  const fields = headerFields(record);
  const keyword = (fields[0] ?? '').toUpperCase().replace(/\s+/g, ' ');
  if (keyword === 'LOCATION') {
    draft.station = readLocation(fields);
    draft.stationLine = line;
  } else if (keyword === 'DESIGN CONDITIONS') draft.published = readDesignConditions(fields, line);
  else if (/^HOLIDAYS\/DAYLIGHT SAVINGS?$/.test(keyword)) draft.leapYearObserved = yesOrNo(fields[1]);
  else if (/^COMMENTS? [12]$/.test(keyword)) takeComment(draft, record);
  else if (keyword === 'DATA PERIODS') {
    const declared = readDataPeriods(fields, line, findings);
    draft.periods = declared.periods;
    draft.recordsPerHour = declared.recordsPerHour;
    draft.complete = true;
  }
}

function takeComment(draft: Draft, record: string): void {
  const text = record
    .slice(record.indexOf(',') + 1)
    .replace(/,+\s*$/, '')
    .replace(/^\s*"(.*)"\s*$/, '$1')
    .trim();
  if (text !== '' && record.includes(',')) draft.comments.push(text);
}

function yesOrNo(field: string | undefined): boolean | null {
  const word = (field ?? '').toLowerCase();
  return word === 'yes' ? true : word === 'no' ? false : null;
}

function tellMissingRecords(draft: Draft, lastLine: number, findings: FindingList): void {
  if (draft.station === null) {
    findings.add({
      code: 'header',
      severity: 'refuse',
      line: 1,
      message: () => 'The header has no LOCATION record. Bring the file with its eight header records.',
    });
  }
  if (!draft.complete) {
    findings.add({
      code: 'header',
      severity: 'refuse',
      line: lastLine,
      message: () =>
        `The header ends on line ${lastLine} without a DATA PERIODS record, which says where the data begin: the file is cut short, or its header is damaged. Bring the file anew from its source.`,
    });
  }
}
