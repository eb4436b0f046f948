import type { Brief } from '../brief/brief.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { judgeIndexHour } from '../hour-classes/judge-index-hour.ts';
import { judgeReturnAirHour } from '../hour-classes/judge-return-air-hour.ts';
import { judgeSupplyAirHour } from '../hour-classes/judge-supply-air-hour.ts';
import { judgeTowerHour } from '../hour-classes/judge-tower-hour.ts';
import { judgeTurbineHour } from '../hour-classes/judge-turbine-hour.ts';
import type { PackedYear } from '../reduction/weather-year.ts';
import type { SupplyStage } from '../stages/stage-path.ts';
import { returnAirPlantHour, supplyAirPlantHour } from '../water-energy/air-plant-hour.ts';
import type { PlantHour } from '../water-energy/plant-hour.ts';
import { addPlant } from '../water-energy/tally-plant.ts';
import { towerPlantHour } from '../water-energy/tower-plant-hour.ts';
import { turbinePlantHour } from '../water-energy/turbine-plant-hour.ts';
import { indexPlan } from './index-limits/index-plan.ts';
import { judgeIndexHours } from './index-limits/judge-index-hours.ts';
import { judgeHallHours } from './other-uses/judge-hall-hours.ts';
import { judgeTowerHours } from './other-uses/judge-tower-hours.ts';
import { judgeTurbineHours } from './other-uses/judge-turbine-hours.ts';
import { fullWettingOfYear, wettingOfYear } from './other-uses/wetting-of-year.ts';
import { judgeRoomHours } from './room/judge-room-hours.ts';
import { roomPlan } from './room/room-plan.ts';
import { roomPlant } from './room/room-plant.ts';
import { wetBulbsOfYear } from './room/wet-bulbs-of-year.ts';

/**
 * Judges the hours of `block`, as `meetDemandHours` leaves them, and adds their water and electricity to the sums of the year.
 * @param monthOf month, 1 to 12, of every slot of the year
 * @param keepsHours whether the water and electricity of each hour are written down too
 */
export type JudgeBlock = (monthOf: Uint8Array, keepsHours: boolean) => void;

/** A use: a way of judging one hour, and the water and electricity of the plant that serves it. */
export interface Use {
  readonly judgeHour: (hour: DemandHour, brief: Brief) => HourJudgement;
  /** The same of many hours at once; null: one by one, as objects. */
  readonly judgeHours: ((brief: Brief, year: PackedYear) => JudgeBlock) | null;
  readonly plantHour: (hour: DemandHour, judgement: HourJudgement, brief: Brief) => PlantHour;
  /** Outdoor air and the permitted stages that could meet an hour alone, by the class that it would have. */
  readonly aloneStages: (brief: Brief) => readonly SupplyStage[];
  /** Slots at or below this have no demand, °C; null: every slot in schedule has. */
  readonly idleUpToC: (brief: Brief) => number | null;
  /** Fans, pumps and a reference are counted; else electricity is not applicable. */
  readonly countsElectricity: boolean;
}

const airAndStages = (brief: Brief): SupplyStage[] => [
  'air',
  ...brief.stages.flatMap((stage) => (stage === 'tower' ? [] : [stage])),
];
const balanceTempC = (brief: Brief): number | null => brief.balanceTempC;

const roomAtATemperature: Use = {
  judgeHour: judgeSupplyAirHour,
  judgeHours: (brief, year) => {
    const plan = roomPlan(brief);
    const wetBulbs = wetBulbsOfYear(year, brief.effIndirect);
    return (monthOf, keepsHours) => {
      judgeRoomHours(plan, wetBulbs);
      roomPlant(plan, monthOf, keepsHours);
    };
  },
  plantHour: supplyAirPlantHour,
  aloneStages: airAndStages,
  idleUpToC: balanceTempC,
  countsElectricity: true,
};

/** The room's exhaust feeds the indirect stages, so that moisture has to be settled hour by hour. */
const roomFedByExhaust: Use = { ...roomAtATemperature, judgeHours: null };

const roomUnderAnIndex: Use = {
  ...roomAtATemperature,
  judgeHour: judgeIndexHour,
  judgeHours: (brief, year) => {
    const plan = indexPlan(brief);
    const wetting = fullWettingOfYear(year);
    return (monthOf) => {
      judgeIndexHours(brief, plan, wetting);
      addPlant(monthOf);
    };
  },
};

const dataHall: Use = {
  ...roomAtATemperature,
  judgeHour: judgeReturnAirHour,
  judgeHours: (brief, year) => {
    const wetting = wettingOfYear(year);
    return (monthOf) => {
      judgeHallHours(brief, wetting);
      addPlant(monthOf);
    };
  },
  plantHour: returnAirPlantHour,
};

const processWater: Use = {
  judgeHour: judgeTowerHour,
  judgeHours: (brief, year) => {
    const wetting = wettingOfYear(year);
    return (monthOf) => {
      judgeTowerHours(brief, wetting);
      addPlant(monthOf);
    };
  },
  plantHour: towerPlantHour,
  aloneStages: () => ['direct'],
  idleUpToC: balanceTempC,
  countsElectricity: true,
};

const turbineInlet: Use = {
  judgeHour: judgeTurbineHour,
  judgeHours: (brief, year) => {
    const wetting = fullWettingOfYear(year);
    return (monthOf) => {
      judgeTurbineHours(brief, wetting);
      addPlant(monthOf);
    };
  },
  plantHour: turbinePlantHour,
  aloneStages: airAndStages,
  idleUpToC: ({ limit }) => (limit.kind === 'turbine' ? limit.floorC : null),
  countsElectricity: false,
};

export function findUse({ limit, secondaryAir }: Pick<Brief, 'limit' | 'secondaryAir'>): Use {
  switch (limit.kind) {
    case 'fixed':
    case 'adaptive':
      return secondaryAir === 'outdoor' ? roomAtATemperature : roomFedByExhaust;
    case 'thi':
    case 'shade-heat':
      // An index sets no temperature, so that a room's exhaust has none either: hour by hour that is refused.
      return secondaryAir === 'outdoor' ? roomUnderAnIndex : { ...roomUnderAnIndex, judgeHours: null };
    case 'inlet':
      return dataHall;
    case 'tower':
      return processWater;
    case 'turbine':
      return turbineInlet;
  }
}
