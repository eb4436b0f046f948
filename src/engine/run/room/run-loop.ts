import type { RoomPlan } from './room-plan.ts';
import type { WetBulbs } from './wet-bulbs-of-year.ts';

/** A loop over hours of `block`; of a stage, the nth of the brief, by its position in `runningStages`. */
export type RoomLoop = (plan: RoomPlan, wetBulbs: WetBulbs, nth: number, stage: number) => void;

/**
 * Runs a loop. All loops are called from this one place, so that the compiler makes each a program of its own: put into one another they
 * outgrow what it compiles as one, small functions in them are then called hour by hour, and every number that goes through such a call
 * is put into an object.
 */
export function runLoop(loop: RoomLoop, plan: RoomPlan, wetBulbs: WetBulbs, nth: number): void {
  loop(plan, wetBulbs, nth, plan.stages[nth] ?? 0);
}
