import { block } from '../hour-block.ts';
import { runningStages } from '../hour-columns.ts';
import { type HourList, room } from './room-hours.ts';
import type { RoomPlan } from './room-plan.ts';
import { indirectFallK } from './supply-lines.ts';
import { findSecondWetBulb, type WetBulbs } from './wet-bulbs-of-year.ts';

const DIRECT = runningStages.indexOf('direct');

/** Constants of this module: see `hour-block.ts`. */
const { slot, dryBulbC, humidityRatio, pressurePa } = block;
const { wetBulbC, entersC, mediumWetC } = room;

/**
 * What a stage that wets the supply begins with in the hours that outdoor air does not meet, or in those that nothing meets: outdoor air,
 * or that air cooled by an indirect stage at full effect, and the wet bulb of either.
 */
export function enterMediumWhenWet(plan: RoomPlan, wetBulbs: WetBulbs, _nth: number, stage: number): void {
  enterMedium(plan, stage, room.wet, wetBulbs);
}
export function enterMediumWhenUnmet(plan: RoomPlan, wetBulbs: WetBulbs, _nth: number, stage: number): void {
  enterMedium(plan, stage, room.wettable, wetBulbs);
}

function enterMedium(plan: RoomPlan, stage: number, { places, count }: HourList, wetBulbs: WetBulbs): void {
  if (stage === DIRECT) {
    // All hours at once take less time than those of the list one by one.
    entersC.set(dryBulbC);
    mediumWetC.set(wetBulbC);
    return;
  }
  const { effIndirect } = plan;
  const secondBulbs = wetBulbs.secondWetBulbC;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const tempC = dryBulbC[at] ?? 0;
    const betweenC = tempC - indirectFallK(effIndirect, tempC, wetBulbC[at] ?? 0);
    const from = slot[at] ?? 0;
    if (Number.isNaN(secondBulbs[from] ?? 0)) {
      findSecondWetBulb(wetBulbs, from, betweenC, humidityRatio[at] ?? 0, pressurePa[at] ?? 0);
    }
    entersC[at] = betweenC;
    mediumWetC[at] = secondBulbs[from] ?? 0;
  }
}
