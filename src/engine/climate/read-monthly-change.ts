/**
 * A table of twelve monthly changes, typed or uploaded: one line a month, columns apart by comma, semicolon or tab.
 *
 *     month, shift_K, max_shift_K, min_shift_K, ratio_change_pct
 *     1, 1.8, 2.1, 1.5, 6
 *
 * The header may be left out, and names the columns in any order where it is there. Without the shifts of the daily highest
 * and lowest, or where both are blank, they are the mean's. A decimal comma is read where commas do not part columns.
 */
import { monthNames } from '../reduction/calendar.ts';
import { quoted } from '../weather-files/text/number-field.ts';
import { type MonthlyChange, monthlyChangeLimits } from './monthly-change.ts';

/** One thing wrong with a table, by line and column, both from 1; null where it concerns no one place. */
export interface MonthlyChangeFault {
  readonly line: number | null;
  readonly column: number | null;
  readonly message: string;
}

export type MonthlyChangeReading =
  | {
      readonly ok: true;
      /** January first. */
      readonly monthly: readonly MonthlyChange[];
      /** Whether the table has a column for the change of humidity, which the rule `ratio-scaled` needs. */
      readonly hasRatioChange: boolean;
    }
  | { readonly ok: false; readonly faults: readonly MonthlyChangeFault[] };

const COLUMNS = ['month', 'shift_k', 'max_shift_k', 'min_shift_k', 'ratio_change_pct'] as const;
type ColumnName = (typeof COLUMNS)[number];
type ValueColumn = Exclude<ColumnName, 'month'>;

const LIMITS: Readonly<Record<ValueColumn, { low: number; high: number; unit: string }>> = {
  shift_k: monthlyChangeLimits.shiftK,
  max_shift_k: monthlyChangeLimits.maxShiftK,
  min_shift_k: monthlyChangeLimits.minShiftK,
  ratio_change_pct: monthlyChangeLimits.ratioChangePct,
};
const MONTHS = 12;
/** Twelve lines are a few hundred characters; a weather file brought by mistake is not read to its end. */
const LONGEST_TABLE = 20_000;
const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)$/;

interface Line {
  readonly line: number;
  readonly fields: readonly string[];
}

/** Reads the table or tells every fault of it at once. */
export function readMonthlyChange(text: string): MonthlyChangeReading {
  if (text.length > LONGEST_TABLE) {
    const message = `The table has ${text.length} characters; twelve lines are wanted, one for each month.`;
    return { ok: false, faults: [{ line: null, column: null, message }] };
  }
  const faults: MonthlyChangeFault[] = [];
  const [first, ...rest] = linesOf(text);
  const named = first !== undefined && monthOf(first.fields[0] ?? '') === null && namesColumns(first);
  const columns = named ? headerColumns(first, faults) : COLUMNS.slice(0, first?.fields.length);
  const body = named || first === undefined ? rest : [first, ...rest];
  const found = new Map<number, { line: number; change: MonthlyChange }>();
  for (const line of body) readLine({ line, columns, found }, faults);
  const missing = monthNames.filter((_name, index) => !found.has(index + 1));
  if (missing.length > 0) {
    const message = `Without a usable line: ${missing.join(', ')}. Each month needs its own.`;
    faults.push({ line: null, column: null, message });
  }
  if (faults.length > 0) return { ok: false, faults };
  const monthly = monthNames.flatMap((_name, index) => found.get(index + 1)?.change ?? []);
  return { ok: true, monthly, hasRatioChange: columns.includes('ratio_change_pct') };
}

/** Lines with something in them, comments (#) left out. */
function linesOf(text: string): readonly Line[] {
  const lines = text.replace(/^\uFEFF/, '').split(/\r\n|\n|\r/);
  const separator = [';', '\t', ','].find((each) => lines.some((line) => line.includes(each))) ?? ',';
  return lines.flatMap((content, index) => {
    if (content.trim() === '' || content.trimStart().startsWith('#')) return [];
    const fields = content.split(separator).map((field) => field.trim());
    const decimal = separator === ',' ? fields : fields.map((field) => field.replace(/^([+-]?\d*),(\d+)$/, '$1.$2'));
    return [{ line: index + 1, fields: decimal }];
  });
}

/** A header holds letters in its later columns too; a line of data with a bad month does not. */
function namesColumns({ fields }: Line): boolean {
  return fields.slice(1).some((field) => /\p{L}/u.test(field));
}

function headerColumns({ line, fields }: Line, faults: MonthlyChangeFault[]): readonly (ColumnName | null)[] {
  const columns = fields.map((field, index) => {
    const name = COLUMNS.find((each) => each === field.toLowerCase().replace(/[\s-]+/g, '_'));
    if (name !== undefined) return name;
    const message = `The header names a column ${quoted(field)}; known are ${COLUMNS.join(', ')}.`;
    faults.push({ line, column: index + 1, message });
    return null;
  });
  for (const [index, name] of columns.entries()) {
    if (name === null || columns.indexOf(name) === index) continue;
    faults.push({ line, column: index + 1, message: `The column ${name} is named twice.` });
  }
  for (const wanted of ['month', 'shift_k'] as const) {
    if (!columns.includes(wanted)) {
      faults.push({ line, column: null, message: `The header has no column ${wanted}.` });
    }
  }
  return columns;
}

function readLine(
  input: {
    line: Line;
    columns: readonly (ColumnName | null)[];
    found: Map<number, { line: number; change: MonthlyChange }>;
  },
  faults: MonthlyChangeFault[],
): void {
  const { columns, found } = input;
  const { line, fields } = input.line;
  const before = faults.length;
  const monthField = fields[columns.indexOf('month')] ?? '';
  const month = monthOf(monthField);
  if (month === null && columns.includes('month')) {
    const message = `${quoted(monthField)} is no month: 1 to 12 or an English name is wanted.`;
    faults.push({ line, column: columns.indexOf('month') + 1, message });
  }
  if (fields.length > columns.length) {
    const message = `The line has ${fields.length} columns; ${columns.length} are wanted.`;
    faults.push({ line, column: columns.length + 1, message });
  }
  const value = (name: ValueColumn): number | null => valueIn({ line, fields, columns, name }, faults);
  const values = {
    shiftK: value('shift_k'),
    maxShiftK: value('max_shift_k'),
    minShiftK: value('min_shift_k'),
    ratioChangePct: value('ratio_change_pct'),
  };
  if (faults.length === before) tellWhatIsMissing({ line, columns, values }, faults);
  if (month === null) return;
  const earlier = found.get(month)?.line;
  if (earlier !== undefined) {
    const message = `${monthNames[month - 1]} stands on line ${earlier} already.`;
    faults.push({ line, column: columns.indexOf('month') + 1, message });
    return;
  }
  const shiftK = values.shiftK ?? 0;
  const maxShiftK = values.maxShiftK ?? shiftK;
  const minShiftK = values.minShiftK ?? shiftK;
  // Kept also from a line with a fault, which stops the table anyway, so that its month is not called missing too.
  found.set(month, { line, change: { shiftK, maxShiftK, minShiftK, ratioChangePct: values.ratioChangePct ?? 0 } });
}

function tellWhatIsMissing(
  input: {
    line: number;
    columns: readonly (ColumnName | null)[];
    values: {
      shiftK: number | null;
      maxShiftK: number | null;
      minShiftK: number | null;
      ratioChangePct: number | null;
    };
  },
  faults: MonthlyChangeFault[],
): void {
  const { line, columns, values } = input;
  const { shiftK, maxShiftK, minShiftK, ratioChangePct } = values;
  const missing = (name: ValueColumn, message: string): void => {
    const column = columns.indexOf(name) + 1;
    faults.push({ line, column: column === 0 ? null : column, message });
  };
  if (shiftK === null) missing('shift_k', 'The shift of the mean is not given.');
  if ((maxShiftK === null) !== (minShiftK === null)) {
    const name = maxShiftK === null ? 'max_shift_k' : 'min_shift_k';
    missing(name, `${name} is not given: the daily highest and lowest are given both or neither.`);
  }
  if (ratioChangePct === null && columns.includes('ratio_change_pct')) {
    missing('ratio_change_pct', 'The change of the humidity ratio is not given; 0 keeps it.');
  }
}

/** null where the table has no such column or the field is blank or faulty. */
function valueIn(
  input: {
    line: number;
    fields: readonly string[];
    columns: readonly (ColumnName | null)[];
    name: ValueColumn;
  },
  faults: MonthlyChangeFault[],
): number | null {
  const { line, fields, columns, name } = input;
  const index = columns.indexOf(name);
  const field = fields[index] ?? '';
  if (field === '') return null;
  const { low, high, unit } = LIMITS[name];
  const value = NUMBER.test(field) ? Number(field) : Number.NaN;
  if (value >= low && value <= high) return value;
  const message = Number.isNaN(value)
    ? `${quoted(field)} is no number.`
    : `${name} ${field} ${unit} lies outside ${low} to ${high} ${unit}.`;
  faults.push({ line, column: index + 1, message });
  return null;
}

/** 1 to 12; null for what is no month. */
function monthOf(field: string): number | null {
  const number = /^0?\d{1,2}$/.test(field) ? Number(field) : 0;
  if (number >= 1 && number <= MONTHS) return number;
  const name = field.toLowerCase();
  const index = monthNames.findIndex((each) => [each.toLowerCase(), each.slice(0, 3).toLowerCase()].includes(name));
  return index < 0 ? null : index + 1;
}
