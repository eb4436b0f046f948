import { hundredths } from '../conventions.ts';
import { type HourColumns, inBlocks } from '../run/hour-columns.ts';
import type { RecirculatedHours } from '../run/run-result.ts';

/** Where growth of legionella is commonly taken to begin, °C (checks of the trade: 20 to 45 °C, from memory). */
const WARM_WATER_C = 20;

const WARM_EDGE = hundredths(WARM_WATER_C) - 0.5;

/** Hours with recirculated water, and of them those at 20 °C or more: input to the water safety plan, no verdict (method 6). */
export function tallyRecirculatedHours(hours: Pick<HourColumns, 'count' | 'waterC'>): RecirculatedHours {
  let all = 0;
  let warm = 0;
  inBlocks(hours.count, (from, to) => {
    all += countFrom(hours.waterC, Number.NEGATIVE_INFINITY, from, to);
    warm += countFrom(hours.waterC, WARM_EDGE, from, to);
  });
  return { all, warm };
}

function countFrom(waterC: Float64Array, leastHundredths: number, from: number, to: number): number {
  let count = 0;
  for (let at = from; at < to; at++) if (100 * (waterC[at] ?? 0) >= leastHundredths) count++;
  return count;
}
