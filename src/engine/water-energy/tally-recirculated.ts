import { hundredths } from '../conventions.ts';
import type { HourColumns } from '../run/hour-columns.ts';
import type { RecirculatedHours } from '../run/run-result.ts';

/** Where growth of legionella is commonly taken to begin, °C (checks of the trade: 20 to 45 °C, from memory). */
const WARM_WATER_C = 20;

/** Hours with recirculated water, and of them those at 20 °C or more: input to the water safety plan, no verdict (method 6). */
export function tallyRecirculatedHours(hours: Pick<HourColumns, 'count' | 'waterC'>): RecirculatedHours {
  let all = 0;
  let warm = 0;
  for (let at = 0; at < hours.count; at++) {
    const waterC = hours.waterC[at] ?? Number.NaN;
    if (Number.isNaN(waterC)) continue;
    all++;
    if (hundredths(waterC) >= hundredths(WARM_WATER_C)) warm++;
  }
  return { all, warm };
}
