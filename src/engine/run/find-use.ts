import type { Brief } from '../brief/brief.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { judgeSupplyAirHour } from '../hour-classes/judge-supply-air-hour.ts';
import { type PlantHour, supplyAirPlantHour } from '../water-energy/plant-hour.ts';

/** A use: a way of judging one hour, and the water and electricity of the plant that serves it. */
export interface Use {
  readonly judgeHour: (hour: DemandHour, brief: Brief) => HourJudgement;
  readonly plantHour: (hour: DemandHour, judgement: HourJudgement, brief: Brief) => PlantHour;
}

const roomAtATemperature: Use = { judgeHour: judgeSupplyAirHour, plantHour: supplyAirPlantHour };

/** @throws RangeError for a use that is not built (`notBuiltYet` says so in words) */
export function findUse(brief: Brief): Use {
  const heldAtATemperature = brief.limit.kind === 'fixed' || brief.limit.kind === 'adaptive';
  if (heldAtATemperature && brief.primaryAir === 'outdoor') return roomAtATemperature;
  throw new RangeError(`no way to judge an hour with a limit of kind ${brief.limit.kind} and ${brief.primaryAir} air`);
}
