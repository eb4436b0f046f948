/** What a change of climate does to a year, in the figures that people compare: months and depression hours, before and after. */
import { unpackYear } from '../reduction/packed-columns.ts';
import type { ReducedYear } from '../reduction/reduce-year.ts';
import { monthClimates } from './month-climates.ts';
import type { MonthClimate } from './monthly-change.ts';

/** A month's dry bulb and wet bulb, °C; null where no hour is known. */
export interface MonthFigures extends MonthClimate {
  readonly meanWetBulbC: number | null;
}

export interface ClimateDifference {
  /** January first; a month without a known hour is null on both sides. */
  readonly months: readonly {
    readonly before: MonthFigures | null;
    readonly after: MonthFigures | null;
  }[];
  /** Hours with a depression of at least so many K, 1 to 25, as read. */
  readonly depressionHours: readonly {
    readonly atLeastK: number;
    readonly before: number;
    readonly after: number;
  }[];
  /** Means of the year, °C. */
  readonly meanDryBulbC: { readonly before: number; readonly after: number };
  readonly meanWetBulbC: { readonly before: number | null; readonly after: number | null };
}

/** Parent and derived year beside one another, from the facts that each was reduced to. */
export function climateDifference(parent: ReducedYear, derived: ReducedYear): ClimateDifference {
  const [before, after] = [monthFigures(parent), monthFigures(derived)];
  return {
    months: before.map((month, index) => ({ before: month, after: after[index] ?? null })),
    depressionHours: parent.facts.depressionHours.map(({ atLeastK, hours }, index) => ({
      atLeastK,
      before: hours,
      after: derived.facts.depressionHours[index]?.hours ?? 0,
    })),
    meanDryBulbC: { before: parent.facts.meanDryBulbC, after: derived.facts.meanDryBulbC },
    meanWetBulbC: { before: parent.facts.meanWetBulbC, after: derived.facts.meanWetBulbC },
  };
}

function monthFigures({ year, facts }: ReducedYear): readonly (MonthFigures | null)[] {
  return monthClimates(unpackYear(year.packed).dryBulbC).map((climate, month) =>
    climate === null ? null : { ...climate, meanWetBulbC: facts.monthlyWetBulbC[month] ?? null },
  );
}
