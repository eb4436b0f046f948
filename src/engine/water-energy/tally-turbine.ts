import type { Brief } from '../brief/brief.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';

/**
 * Degree hours that a turbine inlet gains, K h: the sum over open hours of max(0, t - max(t_s, floor)) (method 5), which is
 * 0 in hours without demand; null for every other use.
 */
export function tallyDegreeHours(
  { limit }: Pick<Brief, 'limit'>,
  demandHours: readonly { hour: DemandHour; judgement: HourJudgement }[],
): number | null {
  if (limit.kind !== 'turbine') return null;
  return demandHours.reduce(
    (sum, { hour, judgement }) =>
      sum + Math.max(0, hour.outdoor.dryBulbC - Math.max(judgement.supply.tempC, limit.floorC)),
    0,
  );
}
