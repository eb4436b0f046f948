/** A change of climate as it is being typed: twelve rows of text, read into the engine's changes or into what is wrong with them. */
import { monthNames } from '../../charts/calendar.ts';
import {
  type HumidityRule,
  type MonthlyChange,
  monthlyChangeFaults,
  stretches,
} from '../../engine/climate/monthly-change.ts';

export const changeFields = ['shiftK', 'maxShiftK', 'minShiftK', 'ratioChangePct'] as const;
export type ChangeField = (typeof changeFields)[number];

export interface ClimateDraft {
  readonly humidityRule: HumidityRule;
  /** Whether daily highest and lowest are given apart from the mean. */
  readonly stretched: boolean;
  /** January first. */
  readonly months: readonly Readonly<Record<ChangeField, string>>[];
}

export type DraftReading =
  | { readonly ok: true; readonly monthly: readonly MonthlyChange[]; readonly changes: boolean }
  | { readonly ok: false; readonly problems: readonly DraftProblem[] };

export interface DraftProblem {
  /** 0 is January. */
  readonly month: number;
  readonly field: ChangeField;
  readonly message: string;
}

const NUMBER = /^[+-]?(\d+[.,]?\d*|[.,]\d+)$/;

export const emptyDraft: ClimateDraft = {
  humidityRule: 'ratio-kept',
  stretched: false,
  months: monthNames.map(() => ({ shiftK: '0', maxShiftK: '0', minShiftK: '0', ratioChangePct: '0' })),
};

/** The columns that a draft shows: those that count. */
export function shownFields({ stretched, humidityRule }: ClimateDraft): readonly ChangeField[] {
  return changeFields.filter((field) => {
    if (field === 'ratioChangePct') return humidityRule === 'ratio-scaled';
    return field === 'shiftK' || stretched;
  });
}

export function withValue(
  draft: ClimateDraft,
  { month, field, value }: { month: number; field: ChangeField; value: string },
): ClimateDraft {
  return { ...draft, months: draft.months.map((row, at) => (at === month ? { ...row, [field]: value } : row)) };
}

/** The value of January in every month. */
export function filledDown(draft: ClimateDraft, field: ChangeField): ClimateDraft {
  const value = draft.months[0]?.[field] ?? '';
  return { ...draft, months: draft.months.map((row) => ({ ...row, [field]: value })) };
}

/** Begins from the mean's own shifts, so that nothing is stretched until somebody says so. */
export function withStretch(draft: ClimateDraft, stretched: boolean): ClimateDraft {
  if (!stretched) return { ...draft, stretched };
  const months = draft.months.map((row) => ({ ...row, maxShiftK: row.shiftK, minShiftK: row.shiftK }));
  return { ...draft, stretched, months };
}

/** A table that was read, or an example. A table that changes the humidity ratio asks for the rule that does. */
export function draftOf(
  monthly: readonly MonthlyChange[],
  { hasRatioChange, humidityRule }: { hasRatioChange: boolean; humidityRule: HumidityRule },
): ClimateDraft {
  return {
    humidityRule: hasRatioChange ? 'ratio-scaled' : humidityRule,
    stretched: monthly.some(stretches),
    months: monthly.map(({ shiftK, maxShiftK, minShiftK, ratioChangePct }) => ({
      shiftK: String(shiftK),
      maxShiftK: String(maxShiftK),
      minShiftK: String(minShiftK),
      ratioChangePct: String(ratioChangePct),
    })),
  };
}

/** Every fault of the fields that count at once; without stretch the daily highest and lowest rise as the mean does. */
export function readClimateDraft(draft: ClimateDraft): DraftReading {
  const fields = shownFields(draft);
  const monthly = draft.months.map((row): MonthlyChange => {
    const value = (field: ChangeField) => (fields.includes(field) ? numberOf(row[field]) : 0);
    const shiftK = value('shiftK');
    const apart = draft.stretched
      ? { maxShiftK: value('maxShiftK'), minShiftK: value('minShiftK') }
      : { maxShiftK: shiftK, minShiftK: shiftK };
    return { shiftK, ...apart, ratioChangePct: value('ratioChangePct') };
  });
  const problems = monthlyChangeFaults(monthly).filter(({ field }) => fields.includes(field));
  if (problems.length > 0) return { ok: false, problems: problems.map(inWords) };
  const changes = monthly.some((change) => changeFields.some((field) => change[field] !== 0));
  return { ok: true, monthly, changes };
}

function numberOf(text: string): number {
  const typed = text.trim().replace('−', '-');
  return NUMBER.test(typed) ? Number(typed.replace(',', '.')) : Number.NaN;
}

function inWords({ month, field, message }: DraftProblem): DraftProblem {
  return { month, field, message: message === 'This is no number.' ? 'Give a number; 0 changes nothing.' : message };
}
