import type { Problem } from '#contract/errors.ts';
import { type HumidityRule, type MonthlyChange, monthlyChangeFaults } from '#engine/climate/monthly-change.ts';
import { readMonthlyChange } from '#engine/climate/read-monthly-change.ts';
import { AppError } from '../../http/app-error.ts';

/** A change as it is asked for: typed values, or a table. */
export interface AskedChange {
  readonly humidityRule: HumidityRule;
  readonly monthly?: readonly MonthlyChange[] | undefined;
  readonly table?: string | undefined;
}

/**
 * The twelve changes of a request, January first, without what the humidity rule leaves out: the same effect is the same change.
 * @throws AppError invalid_input with every fault, at its path or at its line and column of the table
 */
export function readChange({ humidityRule, monthly, table }: AskedChange): readonly MonthlyChange[] {
  if ((monthly === undefined) === (table === undefined)) {
    throw faulty([{ path: 'body.monthly', message: 'Give the twelve changes, or a table of them: one of the two.' }]);
  }
  const read = monthly === undefined ? readTable(table ?? '', humidityRule) : checkTyped(monthly);
  return humidityRule === 'ratio-scaled' ? read : read.map((change) => ({ ...change, ratioChangePct: 0 }));
}

function readTable(table: string, humidityRule: HumidityRule): readonly MonthlyChange[] {
  const reading = readMonthlyChange(table);
  if (!reading.ok) {
    throw faulty(
      reading.faults.map(({ line, column, message }) => ({
        path: 'body.table',
        ...(line === null ? {} : { line }),
        ...(column === null ? {} : { column }),
        message,
      })),
    );
  }
  if (humidityRule === 'ratio-scaled' && !reading.hasRatioChange) {
    const message = 'The table has no column ratio_change_pct, which scaling the humidity ratio needs.';
    throw faulty([{ path: 'body.table', message }]);
  }
  return reading.monthly;
}

function checkTyped(monthly: readonly MonthlyChange[]): readonly MonthlyChange[] {
  const faults = monthlyChangeFaults(monthly);
  if (faults.length === 0) return monthly;
  throw faulty(faults.map(({ month, field, message }) => ({ path: `body.monthly.${month}.${field}`, message })));
}

function faulty(problems: readonly Problem[]): AppError {
  return new AppError('invalid_input', 'The change of climate cannot be used as it stands.', problems);
}
