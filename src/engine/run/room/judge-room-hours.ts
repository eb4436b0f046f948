/**
 * Method 5 and 6 for a block of demand hours: rooms held at a temperature by a stream of outdoor air whose indirect stages
 * take outdoor air as secondary air. The same decisions as `judgeSupplyAirHour`, which judges one hour for any brief; a test holds
 * the two together. Comparisons on whole hundredths, a tie is met.
 *
 * Cheapest first, each step over the hours that the one before it left:
 *
 *   1. outdoor air    `meetByAir`     most hours end here; lists the others by whether water may run
 *   2. the stages     `meetByStages`  in the brief's order; lists what none of them meets
 *   3. what is left   `judgeUnmet`    the lowest supply within the caps, then `damp`, `short` or `beyond`
 *
 * Water and electricity are worked out behind it, by `roomPlant`.
 *
 * Each is a loop over numbers, of the stages one for each: an object, a boxed number or a call for every hour would cost as much as
 * judging it. Hence loops that are longer than functions elsewhere, and the columns of `block` as constants of each module.
 */
import { block } from '../hour-block.ts';
import { fillMet } from '../hour-columns.ts';
import { judgeUnmet } from './judge-unmet.ts';
import { findLowestSupplies } from './lowest-supply.ts';
import { meetByAir } from './meet-by-air.ts';
import { meetByStages } from './meet-by-stages.ts';
import type { RoomPlan } from './room-plan.ts';
import { type RoomLoop, runLoop } from './run-loop.ts';
import type { WetBulbs } from './wet-bulbs-of-year.ts';

const steps: readonly RoomLoop[] = [beginAsMet, meetByAir, meetByStages, findLowestSupplies, judgeUnmet];

/**
 * Judges the hours of `block` as `meetDemandHours` leaves them; the rest is filled in.
 * @param wetBulbs of the same year
 */
export function judgeRoomHours(plan: RoomPlan, wetBulbs: WetBulbs): void {
  for (const step of steps) runLoop(step, plan, wetBulbs, 0);
}

function beginAsMet(): void {
  fillMet(block);
  block.supplyRatio.set(block.humidityRatio);
}
