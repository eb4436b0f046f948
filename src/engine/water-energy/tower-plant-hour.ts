/**
 * The plant of method 6 for a cooling tower, per kW of heat to reject. Fans and pumps are one figure, drawn while the tower
 * runs; the reference has no fan. With basin heat a frozen hour runs as a met one, and the heater's own electricity is not
 * counted.
 */
import type { Brief } from '../brief/brief.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { towerLimit } from '../hour-classes/judge-tower-hour.ts';
import { LATENT_HEAT_KJ_PER_KG } from '../stages/stage-path.ts';
import { makeUpLitres, type PlantHour, SECONDS_PER_HOUR } from './plant-hour.ts';

/** kJ/(kg K) of water (method 3.1). */
const WATER_KJ_PER_KG_K = 4.186;

export function towerPlantHour(hour: DemandHour, judgement: HourJudgement, brief: Brief): PlantHour {
  const { rangeK } = towerLimit(brief);
  const { loadFraction } = hour;
  const { cop } = brief.reference;
  const runs = judgement.running === 'tower';
  const rejectedKw = loadFraction * judgement.carriedShare;
  const evaporatedLitres =
    ((rejectedKw * towerField(brief.towerLatentShare, 'towerLatentShare')) / LATENT_HEAT_KJ_PER_KG) * SECONDS_PER_HOUR;
  // The whole stream circulates whatever share of its heat it leaves.
  const circulationKgPerS = loadFraction / (WATER_KJ_PER_KG_K * rangeK);
  const driftLitres = runs ? (brief.driftPctOfCirculation / 100) * circulationKgPerS * SECONDS_PER_HOUR : 0;
  const fanPumpKw = runs ? towerField(brief.towerFanPumpWPerKw, 'towerFanPumpWPerKw') / 1000 : 0;
  const backUpKw = loadFraction - rejectedKw;
  return {
    evaporatedLitres,
    makeUpLitres: makeUpLitres(evaporatedLitres, brief, driftLitres),
    coolingKwh: rejectedKw,
    kwh: fanPumpKw + backUpKw / cop,
    referenceKwh: loadFraction / cop,
    backUpKw,
  };
}

/** A field that the reader of briefs fills for every tower. */
function towerField(value: number | null, name: string): number {
  if (value === null) throw new RangeError(`the brief of a tower lacks ${name}`);
  return value;
}
