/**
 * The plant of method 6 where a constant stream of air carries the load: rooms, m_dry = design load / (cp dT_room), and
 * data halls, m_dry = design load / (cp dT_IT). What the plant does not carry the back-up takes: phi load (1 - share),
 * which for a temperature is m_dry cp S of the supply that runs.
 */
import type { Brief } from '../brief/brief.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { hallRiseK } from '../hour-classes/judge-return-air-hour.ts';
import { DRY_AIR_KJ_PER_KG_K } from '../stages/stage-path.ts';
import { makeUpLitres, type PlantHour, SECONDS_PER_HOUR } from './plant-hour.ts';

interface AirStream {
  /** Rise over which the stream carries the design load, K. */
  readonly riseK: number;
  /** W per L/s of the stage that runs, and of the reference. */
  readonly fanWPerLs: number;
  readonly referenceFanWPerLs: number;
}

/**
 * Rise over which the stream of air carries the design load, K: of the room, over the equipment of a hall; of a turbine
 * inlet 1 K, since its figures are for 1 kW per K (ours); null for a tower, which cools water.
 */
export function streamRiseK(brief: Pick<Brief, 'limit' | 'dTroomK' | 'dTitK'>): number | null {
  if (brief.limit.kind === 'tower') return null;
  if (brief.limit.kind === 'turbine') return 1;
  return brief.limit.kind === 'inlet' ? hallRiseK(brief) : brief.dTroomK;
}

/** Rooms served by outdoor air: each stage's own fan figure, the air stage's in the reference. */
export function supplyAirPlantHour(hour: DemandHour, judgement: HourJudgement, brief: Brief): PlantHour {
  const { running } = judgement;
  const fan = running === null || running === 'tower' ? brief.fanWPerLs.air : brief.fanWPerLs[running];
  const stream = { riseK: brief.dTroomK, fanWPerLs: fan, referenceFanWPerLs: brief.fanWPerLs.air };
  return airPlantHour(stream, { hour, judgement, brief });
}

/** Halls: the return-air fan figure, wet or dry, in the plant and in the reference. */
export function returnAirPlantHour(hour: DemandHour, judgement: HourJudgement, brief: Brief): PlantHour {
  const fan = brief.fanWPerLs.returnAir;
  const stream = { riseK: hallRiseK(brief), fanWPerLs: fan, referenceFanWPerLs: fan };
  return airPlantHour(stream, { hour, judgement, brief });
}

function airPlantHour(
  stream: AirStream,
  { hour, judgement, brief }: { hour: DemandHour; judgement: HourJudgement; brief: Brief },
): PlantHour {
  const airflowKgPerS = 1 / (DRY_AIR_KJ_PER_KG_K * stream.riseK);
  // 1 W per L/s is 1 kW per m³/s.
  const airflowM3PerS = airflowKgPerS * hour.outdoor.volumeM3PerKg;
  const { loadFraction } = hour;
  const { cop, economy } = brief.reference;
  const evaporatedLitres = airflowKgPerS * judgement.supply.evaporatedKgPerKg * SECONDS_PER_HOUR;
  const pumpKw = judgement.waterC === null ? 0 : brief.pumpKwPerKw * loadFraction;
  const backUpKw = loadFraction * (1 - judgement.carriedShare);
  const referenceRests = economy && judgement.airMeets;
  return {
    evaporatedLitres,
    makeUpLitres: makeUpLitres(evaporatedLitres, brief),
    coolingKwh: loadFraction * judgement.carriedShare,
    kwh: stream.fanWPerLs * airflowM3PerS + pumpKw + backUpKw / cop,
    referenceKwh: stream.referenceFanWPerLs * airflowM3PerS + (referenceRests ? 0 : loadFraction / cop),
    backUpKw,
  };
}
