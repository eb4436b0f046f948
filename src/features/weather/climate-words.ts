import { monthNames } from '../../charts/calendar.ts';
import type { Problem } from '../../contract/errors.ts';
import type { HumidityRule } from '../../engine/climate/monthly-change.ts';
import type { MonthlyChangeFault } from '../../engine/climate/read-monthly-change.ts';
import type { ChangeField, DraftProblem } from './climate-draft.ts';

export const ruleChoices: readonly { rule: HumidityRule; words: string; meaning: string }[] = [
  {
    rule: 'ratio-kept',
    words: 'Humidity ratio kept',
    meaning: 'As much water in each kilogram of air as before: warmer air is relatively drier.',
  },
  {
    rule: 'rh-kept',
    words: 'Relative humidity kept',
    meaning: 'Warmer air holds more water, as over sea and wet land.',
  },
  {
    rule: 'ratio-scaled',
    words: 'Humidity ratio scaled',
    meaning: 'By a percentage for each month, as a climate model gives it.',
  },
];

export const fieldTitle: Readonly<Record<ChangeField, { title: string; unit: string; spoken: string }>> = {
  shiftK: { title: 'Mean', unit: 'K', spoken: 'mean dry bulb' },
  maxShiftK: { title: 'Highest', unit: 'K', spoken: 'mean daily highest' },
  minShiftK: { title: 'Lowest', unit: 'K', spoken: 'mean daily lowest' },
  ratioChangePct: { title: 'Humidity', unit: '%', spoken: 'humidity ratio' },
};

/** "March, daily highest: 30 K lies outside −25 to 25 K." */
export function problemWords({ month, field, message }: DraftProblem): string {
  return `${monthNames[month] ?? ''}, ${fieldTitle[field].spoken}: ${message}`;
}

/** "Line 4, column 2: “warm” is no number." */
export function tableFaultWords({ line, column, message }: MonthlyChangeFault): string {
  if (line === null) return message;
  return `Line ${line}${column === null ? '' : `, column ${column}`}: ${message}`;
}

/** "Apr: the swing of its days would vanish or turn over." of a fault that the server located in a month. */
export function serverFaultWords({ path = '', message }: Problem): string {
  const month = /^body\.monthly\.(\d+)/.exec(path)?.[1];
  return month === undefined ? message : `${monthNames[Number(month)] ?? ''}: ${message}`;
}
