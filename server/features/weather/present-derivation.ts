import type { ClimateDifference as DifferenceOnWire } from '#contract/weather-change.ts';
import type { ClimateDifference } from '#engine/climate/climate-difference.ts';

export function presentDifference(difference: ClimateDifference): DifferenceOnWire {
  return {
    months: difference.months.map(({ before, after }) => ({
      before: before === null ? null : { ...before },
      after: after === null ? null : { ...after },
    })),
    depressionHours: difference.depressionHours.map((row) => ({ ...row })),
    meanDryBulbC: { ...difference.meanDryBulbC },
    meanWetBulbC: { ...difference.meanWetBulbC },
  };
}
