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

/** What a brief says of its tower, for every hour. */
interface TowerPlant {
  readonly latentShare: number;
  readonly latentHeatKJPerKg: number;
  readonly secondsPerHour: number;
  /** Heat that a kg/s of circulation carries over the range, kW. */
  readonly kwPerKgPerS: number;
  readonly driftShare: number;
  readonly fanPumpKw: number;
}

/** @throws RangeError for a brief that is not of a tower */
export function towerPlant(brief: Brief): TowerPlant {
  return {
    latentShare: towerField(brief.towerLatentShare, 'towerLatentShare'),
    latentHeatKJPerKg: LATENT_HEAT_KJ_PER_KG,
    secondsPerHour: SECONDS_PER_HOUR,
    kwPerKgPerS: WATER_KJ_PER_KG_K * towerLimit(brief).rangeK,
    driftShare: brief.driftPctOfCirculation / 100,
    fanPumpKw: towerField(brief.towerFanPumpWPerKw, 'towerFanPumpWPerKw') / 1000,
  };
}

export function towerPlantHour(hour: DemandHour, judgement: HourJudgement, brief: Brief): PlantHour {
  const plant = towerPlant(brief);
  const { loadFraction } = hour;
  const { cop } = brief.reference;
  const runs = judgement.running === 'tower';
  const rejectedKw = loadFraction * judgement.carriedShare;
  const evaporatedLitres = ((rejectedKw * plant.latentShare) / LATENT_HEAT_KJ_PER_KG) * SECONDS_PER_HOUR;
  // The whole stream circulates whatever share of its heat it leaves.
  const circulationKgPerS = loadFraction / plant.kwPerKgPerS;
  const driftLitres = runs ? plant.driftShare * circulationKgPerS * SECONDS_PER_HOUR : 0;
  const fanPumpKw = runs ? plant.fanPumpKw : 0;
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
