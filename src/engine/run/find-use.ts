import type { Brief } from '../brief/brief.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { judgeIndexHour } from '../hour-classes/judge-index-hour.ts';
import { judgeReturnAirHour } from '../hour-classes/judge-return-air-hour.ts';
import { judgeSupplyAirHour } from '../hour-classes/judge-supply-air-hour.ts';
import { judgeTowerHour } from '../hour-classes/judge-tower-hour.ts';
import { judgeTurbineHour } from '../hour-classes/judge-turbine-hour.ts';
import type { SupplyStage } from '../stages/stage-path.ts';
import { returnAirPlantHour, supplyAirPlantHour } from '../water-energy/air-plant-hour.ts';
import type { PlantHour } from '../water-energy/plant-hour.ts';
import { towerPlantHour } from '../water-energy/tower-plant-hour.ts';
import { turbinePlantHour } from '../water-energy/turbine-plant-hour.ts';

/** A use: a way of judging one hour, and the water and electricity of the plant that serves it. */
export interface Use {
  readonly judgeHour: (hour: DemandHour, brief: Brief) => HourJudgement;
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
  plantHour: supplyAirPlantHour,
  aloneStages: airAndStages,
  idleUpToC: balanceTempC,
  countsElectricity: true,
};

const roomUnderAnIndex: Use = { ...roomAtATemperature, judgeHour: judgeIndexHour };

const dataHall: Use = { ...roomAtATemperature, judgeHour: judgeReturnAirHour, plantHour: returnAirPlantHour };

const processWater: Use = {
  judgeHour: judgeTowerHour,
  plantHour: towerPlantHour,
  aloneStages: () => ['direct'],
  idleUpToC: balanceTempC,
  countsElectricity: true,
};

const turbineInlet: Use = {
  judgeHour: judgeTurbineHour,
  plantHour: turbinePlantHour,
  aloneStages: airAndStages,
  idleUpToC: ({ limit }) => (limit.kind === 'turbine' ? limit.floorC : null),
  countsElectricity: false,
};

export function findUse({ limit }: Pick<Brief, 'limit'>): Use {
  switch (limit.kind) {
    case 'fixed':
    case 'adaptive':
      return roomAtATemperature;
    case 'thi':
    case 'shade-heat':
      return roomUnderAnIndex;
    case 'inlet':
      return dataHall;
    case 'tower':
      return processWater;
    case 'turbine':
      return turbineInlet;
  }
}
