/** The time of a row, as it stands in its cells. */
import type { LineCursor } from '../text/line-cursor.ts';
import { type SeparatedFields, separatedText } from '../text/separated-fields.ts';
import { civilTime } from '../time/civil-minutes.ts';
import { wrongDatePart } from '../time/wrong-date-part.ts';
import { readClock, readDate, readStamp, type Stamp } from './read-stamp.ts';
import { cellNumber } from './table-cells.ts';
import type { TableLayout } from './table-layout.ts';
import type { TimeColumns } from './table-mapping.ts';

const LONGEST_STAMP = 60;
const MINUTES_PER_DAY = 1440;
/** Day 0 of a spreadsheet, in days since 1970: 30 December 1899 (from March 1900 on), and 1 January 1904. */
const SERIAL_EPOCH_DAYS = { 1900: -25_569, 1904: -24_107 } as const;
const MS_PER_MINUTE = 60_000;

export type TimeReader = (cursor: LineCursor, fields: SeparatedFields) => Stamp | null;

/** A reader of the mapped columns; null for a row whose cells are no time. */
export function timeReader(columns: TimeColumns, layout: TableLayout): TimeReader {
  const place = (name: string) => layout.names.indexOf(name);
  const text = (name: string) => {
    const index = place(name);
    return (cursor: LineCursor, fields: SeparatedFields) =>
      separatedText(cursor, fields, index, LONGEST_STAMP).replace(/\s+/g, ' ').trim();
  };
  const number = (name: string) => {
    const cell = { index: place(name), decimalComma: layout.decimalComma };
    return (cursor: LineCursor, fields: SeparatedFields) => cellNumber(cursor, fields, cell) ?? Number.NaN;
  };
  switch (columns.form) {
    case 'stamp': {
      const cell = text(columns.column);
      return (cursor, fields) => readStamp(cell(cursor, fields), columns.order);
    }
    case 'date and time': {
      const [date, time] = [text(columns.date), text(columns.time)];
      return (cursor, fields) => joined(date(cursor, fields), time(cursor, fields), columns);
    }
    case 'serial days': {
      const days = number(columns.column);
      const epoch = SERIAL_EPOCH_DAYS[columns.system];
      return (cursor, fields) => stampOfMinutes(Math.round((days(cursor, fields) + epoch) * MINUTES_PER_DAY), null);
    }
    case 'epoch': {
      const moment = number(columns.column);
      const perMinute = columns.unit === 's' ? MS_PER_MINUTE / 1000 : MS_PER_MINUTE;
      return (cursor, fields) => stampOfMinutes(Math.floor(moment(cursor, fields) / perMinute), 0);
    }
    default:
      return partsReader(columns, number);
  }
}

function joined(date: string, time: string, columns: Extract<TimeColumns, { form: 'date and time' }>): Stamp | null {
  const day = readDate(date, columns.order);
  const clock = readClock(time);
  return day === null || clock === null ? null : { time: { ...day, ...clock }, offsetMin: null };
}

function stampOfMinutes(minutes: number, offsetMin: number | null): Stamp | null {
  if (!Number.isSafeInteger(minutes)) return null;
  const time = civilTime(minutes);
  return wrongDatePart(time) === null ? { time, offsetMin } : null;
}

/** A table without a year is laid on a common one; its dates are those of a typical year. */
const YEAR_OF_NONE = 2001;

function partsReader(
  columns: Extract<TimeColumns, { form: 'parts' }>,
  number: (name: string) => (cursor: LineCursor, fields: SeparatedFields) => number,
): TimeReader {
  const year = columns.year === null ? () => YEAR_OF_NONE : number(columns.year);
  const [month, day, hour] = [number(columns.month), number(columns.day), number(columns.hour)];
  const minute = columns.minute === null ? () => 0 : number(columns.minute);
  return (cursor, fields) => {
    const written = hour(cursor, fields);
    const together = columns.hours === 'hours and minutes';
    const time = {
      year: year(cursor, fields),
      month: month(cursor, fields),
      day: day(cursor, fields),
      hour: together ? Math.floor(written / 100) : written,
      minute: (together ? written % 100 : 0) + minute(cursor, fields),
    };
    return wrongDatePart(time) === null ? { time, offsetMin: null } : null;
  };
}
