/** Which columns hold the time, and how; a guess that a person confirms. */
import { plainName } from './guess-columns.ts';
import { numbersOfDate, readClock, readDate, readStamp } from './read-stamp.ts';
import type { DateOrder, TimeColumns } from './table-mapping.ts';

const NEARLY_ALL = 0.95;
const FIRST_NAMES = /time|date|stamp|valid|utc|gmt|local/;
const SERIAL_DAYS = { low: 18_000, high: 80_000 } as const;
const EPOCH_S = { low: 1e8, high: 8e9 } as const;

/** Cells of one column, in the order of the rows. */
export interface ColumnCells {
  readonly name: string;
  readonly cells: readonly string[];
}

export interface GuessedTime {
  readonly columns: TimeColumns;
  /** Whether the order of day and month follows from the dates; null where the year comes first or no date is written. */
  readonly orderIsSure: boolean | null;
}

export function guessTime(columns: readonly ColumnCells[]): GuessedTime | null {
  return guessStamp(columns) ?? guessParts(columns) ?? guessDateAndTime(columns) ?? guessNumber(columns);
}

function share(cells: readonly string[], holds: (cell: string) => boolean): boolean {
  const present = cells.filter((cell) => cell !== '');
  return present.length > 0 && present.filter(holds).length >= NEARLY_ALL * cells.length;
}

function guessStamp(columns: readonly ColumnCells[]): GuessedTime | null {
  const found = columns.filter(({ cells }) => {
    const { order } = guessOrder(cells);
    return share(cells, (cell) => readStamp(cell, order) !== null);
  });
  const column = found.find(({ name }) => FIRST_NAMES.test(plainName(name))) ?? found[0];
  if (column === undefined) return null;
  const { order, sure } = guessOrder(column.cells);
  return { columns: { form: 'stamp', column: column.name, order }, orderIsSure: sure };
}

function guessDateAndTime(columns: readonly ColumnCells[]): GuessedTime | null {
  const date = columns.find(({ cells }) => {
    const { order } = guessOrder(cells);
    return share(cells, (cell) => readDate(cell, order) !== null);
  });
  if (date === undefined) return null;
  const others = columns.filter((column) => column !== date && share(column.cells, (cell) => readClock(cell) !== null));
  const time =
    others.find(({ cells }) => cells.some((cell) => cell.includes(':'))) ??
    others.find(({ name }) => /time|hour|\bhr\b/.test(plainName(name)));
  if (time === undefined) return null;
  const { order, sure } = guessOrder(date.cells);
  return { columns: { form: 'date and time', date: date.name, time: time.name, order }, orderIsSure: sure };
}

function guessParts(columns: readonly ColumnCells[]): GuessedTime | null {
  const whole = columns.filter(({ cells }) => share(cells, (cell) => /^\d{1,4}$/.test(cell)));
  const named = (pattern: RegExp) => whole.find(({ name }) => pattern.test(plainName(name)));
  const month = named(/^(month|mo|mon|mm)$|month$/);
  const day = named(/^(day|dd|dy|day of month|dom)$/);
  const hour = named(/^(hour|hr|hh|hora|stunde|heure|hour ending|time|hhmm)$/);
  if (month === undefined || day === undefined || hour === undefined) return null;
  return {
    columns: {
      form: 'parts',
      year: named(/^(year|yr|yyyy|yy)$/)?.name ?? null,
      month: month.name,
      day: day.name,
      hour: hour.name,
      minute: named(/^(minute|min|mn|minutes)$/)?.name ?? null,
      hours: hour.cells.some((cell) => Number(cell) > 24) ? 'hours and minutes' : 'hours',
    },
    orderIsSure: null,
  };
}

/** Days of a spreadsheet, or seconds or milliseconds since 1970: numbers that only rise. */
function guessNumber(columns: readonly ColumnCells[]): GuessedTime | null {
  for (const { cells, name } of columns) {
    const values = cells.map((cell) => Number(cell.replace(',', '.')));
    const rising = values.length > 1 && values.every((value, at) => at === 0 || value > (values[at - 1] ?? 0));
    const [first, last] = [values[0] ?? Number.NaN, values.at(-1) ?? Number.NaN];
    const within = (limits: { low: number; high: number }, by = 1) =>
      first >= limits.low * by && last <= limits.high * by;
    if (!rising) continue;
    const columnsOf = (columns: TimeColumns): GuessedTime => ({ columns, orderIsSure: null });
    if (within(EPOCH_S)) return columnsOf({ form: 'epoch', column: name, unit: 's' });
    if (within(EPOCH_S, 1000)) return columnsOf({ form: 'epoch', column: name, unit: 'ms' });
    const daily = (values[1] ?? 0) - first <= 1;
    if (within(SERIAL_DAYS) && daily) return columnsOf({ form: 'serial days', column: name, system: 1900 });
  }
  return null;
}

/** A first number over 12: day first; a second one over 12: month first; neither, or no such date: month first, not sure. */
function guessOrder(cells: readonly string[]): { readonly order: DateOrder; readonly sure: boolean | null } {
  let first = 0;
  let second = 0;
  for (const cell of cells) {
    const numbers = numbersOfDate(cell);
    if (numbers === null) continue;
    first = Math.max(first, numbers[0]);
    second = Math.max(second, numbers[1]);
  }
  if (first === 0) return { order: 'year first', sure: null };
  if (first > 12) return { order: 'day first', sure: true };
  return { order: 'month first', sure: second > 12 };
}
