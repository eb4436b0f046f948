/** What a change of climate is, and what it does to a weather year. */
import * as z from 'zod/mini';

export const HumidityRule = z.enum(['ratio-kept', 'rh-kept', 'ratio-scaled']);

export const MonthlyChange = z.strictObject({
  /** By how much the mean dry bulb rises, K. */
  shiftK: z.number(),
  /** By how much the mean daily highest and lowest rise, K. */
  maxShiftK: z.number(),
  minShiftK: z.number(),
  /** Change of the humidity ratio, %; counts under the rule `ratio-scaled` alone. */
  ratioChangePct: z.number(),
});
export type MonthlyChange = z.infer<typeof MonthlyChange>;

const MonthFigures = z.object({
  meanC: z.number(),
  meanMaxC: z.number(),
  meanMinC: z.number(),
  meanWetBulbC: z.nullable(z.number()),
});

export const ClimateDifference = z.object({
  months: z.array(z.object({ before: z.nullable(MonthFigures), after: z.nullable(MonthFigures) })),
  depressionHours: z.array(z.object({ atLeastK: z.int(), before: z.int(), after: z.int() })),
  meanDryBulbC: z.object({ before: z.number(), after: z.number() }),
  meanWetBulbC: z.object({ before: z.nullable(z.number()), after: z.nullable(z.number()) }),
});
export type ClimateDifference = z.infer<typeof ClimateDifference>;
