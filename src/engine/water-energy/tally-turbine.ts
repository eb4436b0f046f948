import type { Brief } from '../brief/brief.ts';
import type { HourColumns } from '../run/hour-columns.ts';

/**
 * Degree hours that a turbine inlet gains, K h: the sum over open hours of max(0, t - max(t_s, floor)) (method 5), which is
 * 0 in hours without demand; null for every other use.
 * @param soFar of the hours before these, whose sum goes on in slot order
 */
export function tallyDegreeHours(
  { limit }: Pick<Brief, 'limit'>,
  hours: Pick<HourColumns, 'count' | 'dryBulbC' | 'supplyC'>,
  soFar = 0,
): number | null {
  if (limit.kind !== 'turbine') return null;
  let sum = soFar;
  for (let at = 0; at < hours.count; at++) {
    const inletC = Math.max(hours.supplyC[at] ?? Number.NaN, limit.floorC);
    sum += Math.max(0, (hours.dryBulbC[at] ?? Number.NaN) - inletC);
  }
  return sum;
}
