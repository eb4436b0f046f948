/** What a month of another climate does to a month of the parent year (method 10). */
export interface MonthlyChange {
  /** By how much the mean dry bulb rises, K. */
  readonly shiftK: number;
  /** By how much the mean daily highest and lowest dry bulb rise, K. */
  readonly maxShiftK: number;
  readonly minShiftK: number;
  /** Change of the humidity ratio, %; counts under the rule `ratio-scaled` alone. */
  readonly ratioChangePct: number;
}

/** What a change may come to. */
export const monthlyChangeLimits = {
  shiftK: { low: -20, high: 20, unit: 'K' },
  maxShiftK: { low: -25, high: 25, unit: 'K' },
  minShiftK: { low: -25, high: 25, unit: 'K' },
  ratioChangePct: { low: -90, high: 200, unit: '%' },
} as const satisfies Readonly<Record<keyof MonthlyChange, { low: number; high: number; unit: string }>>;

/** What becomes of the humidity: w kept, relative humidity kept, or w scaled by the month's change. */
export const humidityRules = ['ratio-kept', 'rh-kept', 'ratio-scaled'] as const;
export type HumidityRule = (typeof humidityRules)[number];

/** Dry bulb of a month of the parent, °C. */
export interface MonthClimate {
  readonly meanC: number;
  /** Means over its days of the highest and the lowest hour. */
  readonly meanMaxC: number;
  readonly meanMinC: number;
}

/** Under this daily swing, K, there is nothing to stretch. */
const LEAST_SWING_K = 0.01;

/**
 * How much a month's swing about its mean is stretched: alpha = (dTmax - dTmin) / (mean max - mean min); 0 for a month
 * without a daily swing. Belcher, Hacker and Powell, Building Serv. Eng. Res. Technol. 26(1), 49-61, 2005.
 */
export function stretchOf(month: MonthClimate, change: Pick<MonthlyChange, 'maxShiftK' | 'minShiftK'>): number {
  const swingK = month.meanMaxC - month.meanMinC;
  return swingK < LEAST_SWING_K ? 0 : (change.maxShiftK - change.minShiftK) / swingK;
}

/** Shift and stretch of one hour, °C: t + dT + alpha (t - mean); over a month the mean rises by dT (same source). */
export function shiftedAndStretchedC(
  dryBulbC: number,
  month: { readonly meanC: number; readonly shiftK: number; readonly stretch: number },
): number {
  return dryBulbC + month.shiftK + month.stretch * (dryBulbC - month.meanC);
}

/** Whether a month's days are drawn apart or together: its daily highest and lowest rise by different amounts. */
export function stretches({ maxShiftK, minShiftK }: MonthlyChange): boolean {
  return maxShiftK !== minShiftK;
}

/** One value of twelve changes that cannot be used. */
export interface MonthlyChangeValueFault {
  /** 0 is January. */
  readonly month: number;
  readonly field: keyof MonthlyChange;
  readonly message: string;
}

const CHANGE_FIELDS = ['shiftK', 'maxShiftK', 'minShiftK', 'ratioChangePct'] as const;

/** Every value that is no number or lies beyond its limits. */
export function monthlyChangeFaults(monthly: readonly MonthlyChange[]): readonly MonthlyChangeValueFault[] {
  return monthly.flatMap((change, month) =>
    CHANGE_FIELDS.flatMap((field) => {
      const { low, high, unit } = monthlyChangeLimits[field];
      const value = change[field];
      if (value >= low && value <= high) return [];
      const message = Number.isNaN(value)
        ? 'This is no number.'
        : `${value} ${unit} lies outside ${low} to ${high} ${unit}.`;
      return [{ month, field, message }];
    }),
  );
}
