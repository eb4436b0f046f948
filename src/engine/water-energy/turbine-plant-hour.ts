import type { Brief } from '../brief/brief.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { DRY_AIR_KJ_PER_KG_K } from '../stages/stage-path.ts';
import { makeUpLitres, type PlantHour, SECONDS_PER_HOUR } from './plant-hour.ts';

/**
 * The plant of method 6 for a turbine inlet: delivered = m_dry cp (t - t_s), no reference, no back-up, electricity not
 * applicable. An inlet has no rise over which a load could be stated, so that its figures are for 1 kW per K of inlet air,
 * m_dry = 1 / cp (ours); a kWh delivered is then a degree hour.
 */
export function turbinePlantHour(hour: DemandHour, { supply }: HourJudgement, brief: Brief): PlantHour {
  const airflowKgPerS = 1 / DRY_AIR_KJ_PER_KG_K;
  const evaporatedLitres = airflowKgPerS * supply.evaporatedKgPerKg * SECONDS_PER_HOUR;
  return {
    evaporatedLitres,
    makeUpLitres: makeUpLitres(evaporatedLitres, brief),
    coolingKwh: hour.outdoor.dryBulbC - supply.tempC,
    kwh: null,
    referenceKwh: null,
    backUpKw: 0,
  };
}
