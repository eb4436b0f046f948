import { hundredths } from '../conventions.ts';
import type { HourJudgement } from '../hour-classes/demand-hour.ts';
import type { RecirculatedHours } from '../run/run-result.ts';

/** Where growth of legionella is commonly taken to begin, °C (checks of the trade: 20 to 45 °C, from memory). */
const WARM_WATER_C = 20;

/** Hours with recirculated water, and of them those at 20 °C or more: input to the water safety plan, no verdict (method 6). */
export function tallyRecirculatedHours(demandHours: readonly { judgement: HourJudgement }[]): RecirculatedHours {
  const watersC = demandHours.flatMap(({ judgement }) => judgement.waterC ?? []);
  const warm = watersC.filter((waterC) => hundredths(waterC) >= hundredths(WARM_WATER_C));
  return { all: watersC.length, warm: warm.length };
}
