import { describe, expect, test } from 'vitest';
import { type MonthlyChangeReading, readMonthlyChange } from '#engine/climate/read-monthly-change.ts';
import { monthNames } from '#engine/reduction/calendar.ts';

const lines = (of: (month: number) => string): string[] => monthNames.map((_name, index) => of(index + 1));
const table = (rows: readonly string[], end = '\n'): string => rows.join(end) + end;

function monthlyOf(reading: MonthlyChangeReading) {
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  return reading.monthly;
}

/** Faults as `line:column message`. */
function faultsOf(text: string): readonly string[] {
  const reading = readMonthlyChange(text);
  return reading.ok ? [] : reading.faults.map(({ line, column, message }) => `${line}:${column} ${message}`);
}

const wanted = monthNames.map((_name, index) => ({
  shiftK: (index + 1) / 10,
  maxShiftK: (index + 2) / 10,
  minShiftK: index / 10,
  ratioChangePct: index,
}));
const row = (separator: string, decimal = '.') =>
  lines((month) =>
    [month, month / 10, (month + 1) / 10, (month - 1) / 10, month - 1]
      .map((value) => String(value).replace('.', decimal))
      .join(separator),
  );

describe('a table of monthly changes', () => {
  test.each([
    ['commas and a header', table(['month,shift_K,max_shift_K,min_shift_K,ratio_change_pct', ...row(',')])],
    ['commas alone', table(row(', '))],
    ['semicolons with decimal commas', table(row(';', ','), '\r\n')],
    ['tabs, a byte order mark, comments and blank lines', `\uFEFF# from a climate model\n\n${table(row('\t'))}\n`],
    ['months in another order', table([...row(',')].reverse())],
    [
      'columns in another order',
      table([
        'Ratio change pct,Month,Min shift K,Max shift K,Shift K',
        ...lines(
          (month) => `${month - 1},${monthNames[month - 1]},${(month - 1) / 10},${(month + 1) / 10},${month / 10}`,
        ),
      ]),
    ],
  ])('is read with %s', (_what, text) => {
    const reading = readMonthlyChange(text);
    expect(monthlyOf(reading)).toEqual(wanted);
    expect(reading).toMatchObject({ hasRatioChange: true });
  });

  test('shifts the whole day alike where only the mean is given', () => {
    const short = table(lines((month) => `${monthNames[month - 1]?.slice(0, 3).toUpperCase()};1,5`));
    const blank = table(lines((month) => `${month},1.5,,`));
    for (const text of [short, blank]) {
      const reading = readMonthlyChange(text);
      expect(new Set(monthlyOf(reading).map(({ maxShiftK, minShiftK }) => `${maxShiftK} ${minShiftK}`))).toEqual(
        new Set(['1.5 1.5']),
      );
      expect(reading).toMatchObject({ hasRatioChange: false });
    }
  });

  test('tells every fault at once, each with its line and column', () => {
    const text = table([
      '1,2,2.5,1.5',
      '2,two,2.5,1.5',
      '13,2,2.5,1.5',
      '4,2,2.5,',
      '5,2,40,1.5',
      '6,2,2.5,1.5,7',
      '1,2,2.5,1.5',
      '7,,2.5,1.5',
      'August,NaN,1e3,0x10',
    ]);
    expect(faultsOf(text)).toEqual([
      '2:2 “two” is no number.',
      '3:1 “13” is no month: 1 to 12 or an English name is wanted.',
      '4:4 min_shift_k is not given: the daily highest and lowest are given both or neither.',
      '5:3 max_shift_k 40 K lies outside -25 to 25 K.',
      '6:5 The line has 5 columns; 4 are wanted.',
      '7:1 January stands on line 1 already.',
      '8:2 The shift of the mean is not given.',
      '9:2 “NaN” is no number.',
      '9:3 “1e3” is no number.',
      '9:4 “0x10” is no number.',
      'null:null Without a usable line: March, September, October, November, December. Each month needs its own.',
    ]);
  });

  test('tells what is wrong with a header', () => {
    expect(faultsOf(table(['month,shift_k,shift_k,rain', ...lines((month) => `${month},1,1,0`)]))).toEqual([
      '1:4 The header names a column “rain”; known are month, shift_k, max_shift_k, min_shift_k, ratio_change_pct.',
      '1:3 The column shift_k is named twice.',
    ]);
    expect(faultsOf(table(['max_shift_k,min_shift_k', ...lines(() => '1,1')])).slice(0, 2)).toEqual([
      '1:null The header has no column month.',
      '1:null The header has no column shift_k.',
    ]);
  });

  test('is refused when it is empty or another file altogether', () => {
    expect(faultsOf('')).toEqual([
      `null:null Without a usable line: ${monthNames.join(', ')}. Each month needs its own.`,
    ]);
    expect(faultsOf('LOCATION,Somewhere\n'.repeat(2000))).toEqual([
      'null:null The table has 38000 characters; twelve lines are wanted, one for each month.',
    ]);
  });
});
