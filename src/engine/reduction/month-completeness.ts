/** A month counts with this share of its hours, %. */
export const MONTH_COUNTS_FROM_PCT = 90;
/** Above this share of repaired hours, %, a year gives no annual result. */
export const MOST_REPAIRED_PCT = 35;

/**
 * Whether a year may be judged by a brief: every month in which the brief has schedule counts, and the year is not mostly
 * repaired.
 * @param year.monthCompletePct share of hours with dry bulb, humidity and pressure, %, January first
 * @param year.repairedPct share of hours with a repaired value, %
 * @param months months with schedule, 1 to 12
 */
export function usableFor(
  year: { monthCompletePct: readonly number[]; repairedPct: number },
  months: readonly number[],
): boolean {
  if (year.repairedPct > MOST_REPAIRED_PCT) return false;
  return months.every((month) => (year.monthCompletePct[month - 1] ?? 0) >= MONTH_COUNTS_FROM_PCT);
}
