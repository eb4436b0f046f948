/** One demand hour as an object, for looking at it; and the columns as a list of such objects. */
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { type HourClass, hourClasses } from '../hour-classes/hour-class.ts';
import type { SupplyStage } from '../stages/stage-path.ts';
import type { PlantHour } from '../water-energy/plant-hour.ts';
import { dampReasons, type HourColumns, hourColumns, runningStages } from './hour-columns.ts';

/** A slot with demand: what it was, what it is under the brief, and the plant in it. */
export interface JudgedHour {
  readonly slot: number;
  readonly hour: DemandHour;
  readonly judgement: HourJudgement;
  readonly plant: PlantHour;
}

/** Writes an hour into its place in the columns. */
export function writeHour(columns: HourColumns, at: number, { slot, hour, judgement, plant }: JudgedHour): void {
  const { outdoor } = hour;
  columns.slot[at] = slot;
  columns.classCode[at] = hourClasses.indexOf(judgement.hourClass);
  columns.met[at] = judgement.met ? 1 : 0;
  columns.airMeets[at] = judgement.airMeets ? 1 : 0;
  columns.damp[at] = dampReasons.indexOf(judgement.dampBy);
  columns.running[at] = runningStages.indexOf(judgement.running);
  columns.aloneMet[at] = judgement.aloneMet.reduce((bits, stage) => bits | (1 << runningStages.indexOf(stage)), 0);
  columns.dryBulbC[at] = outdoor.dryBulbC;
  columns.humidityRatio[at] = outdoor.humidityRatio;
  columns.pressurePa[at] = outdoor.pressurePa;
  columns.volumeM3PerKg[at] = outdoor.volumeM3PerKg;
  columns.setC[at] = hour.setC;
  columns.supplyAimC[at] = hour.supplyAimC;
  columns.loadFraction[at] = hour.loadFraction;
  columns.shortfallK[at] = judgement.shortfallK;
  columns.uncappedShortfallK[at] = judgement.uncappedShortfallK;
  columns.airSupplyC[at] = judgement.airSupplyC;
  columns.supplyC[at] = judgement.supply.tempC;
  columns.supplyRatio[at] = judgement.supply.humidityRatio ?? Number.NaN;
  columns.evaporatedKgPerKg[at] = judgement.supply.evaporatedKgPerKg;
  columns.share[at] = judgement.supply.share;
  columns.carriedShare[at] = judgement.carriedShare;
  columns.waterC[at] = judgement.waterC ?? Number.NaN;
  columns.evaporatedLitres[at] = plant.evaporatedLitres;
  columns.makeUpLitres[at] = plant.makeUpLitres;
  columns.coolingKwh[at] = plant.coolingKwh;
  columns.kwh[at] = plant.kwh ?? Number.NaN;
  columns.referenceKwh[at] = plant.referenceKwh ?? Number.NaN;
  columns.backUpKw[at] = plant.backUpKw;
}

/** Hours given one by one, as columns. */
export function columnsOf(hours: readonly JudgedHour[]): HourColumns {
  const columns = hourColumns(hours.length);
  for (const [at, hour] of hours.entries()) writeHour(columns, at, hour);
  columns.count = hours.length;
  return columns;
}

/** The hour at a place in the columns, 0 first. */
export function hourAt(columns: HourColumns, at: number): JudgedHour {
  return {
    slot: columns.slot[at] ?? 0,
    hour: demandAt(columns, at),
    judgement: judgementAt(columns, at),
    plant: plantAt(columns, at),
  };
}

/** What the hour at a place is before it is judged. */
export function demandAt(columns: HourColumns, at: number): DemandHour {
  return {
    outdoor: {
      dryBulbC: columns.dryBulbC[at] ?? Number.NaN,
      humidityRatio: columns.humidityRatio[at] ?? Number.NaN,
      pressurePa: columns.pressurePa[at] ?? Number.NaN,
      volumeM3PerKg: columns.volumeM3PerKg[at] ?? Number.NaN,
    },
    setC: columns.setC[at] ?? Number.NaN,
    supplyAimC: columns.supplyAimC[at] ?? Number.NaN,
    loadFraction: columns.loadFraction[at] ?? Number.NaN,
  };
}

function judgementAt(columns: HourColumns, at: number): HourJudgement {
  const aloneBits = columns.aloneMet[at] ?? 0;
  return {
    hourClass: demandClassOf(hourClasses[columns.classCode[at] ?? 0]),
    met: columns.met[at] === 1,
    dampBy: dampReasons[columns.damp[at] ?? 0] ?? null,
    shortfallK: columns.shortfallK[at] ?? 0,
    uncappedShortfallK: columns.uncappedShortfallK[at] ?? 0,
    airMeets: columns.airMeets[at] === 1,
    airSupplyC: columns.airSupplyC[at] ?? Number.NaN,
    running: runningStages[columns.running[at] ?? 0] ?? null,
    supply: {
      tempC: columns.supplyC[at] ?? Number.NaN,
      humidityRatio: numberOrNull(columns.supplyRatio[at]),
      evaporatedKgPerKg: columns.evaporatedKgPerKg[at] ?? 0,
      share: columns.share[at] ?? 0,
    },
    carriedShare: columns.carriedShare[at] ?? 0,
    waterC: numberOrNull(columns.waterC[at]),
    aloneMet: runningStages.filter(
      (stage, bit): stage is SupplyStage => stage !== null && (aloneBits & (1 << bit)) !== 0,
    ),
  };
}

function plantAt(columns: HourColumns, at: number): PlantHour {
  return {
    evaporatedLitres: columns.evaporatedLitres[at] ?? 0,
    makeUpLitres: columns.makeUpLitres[at] ?? 0,
    coolingKwh: columns.coolingKwh[at] ?? 0,
    kwh: numberOrNull(columns.kwh[at]),
    referenceKwh: numberOrNull(columns.referenceKwh[at]),
    backUpKw: columns.backUpKw[at] ?? 0,
  };
}

function demandClassOf(hourClass: HourClass | undefined): HourJudgement['hourClass'] {
  if (hourClass === undefined || hourClass === 'closed' || hourClass === 'missing' || hourClass === 'idle') {
    throw new RangeError(`no class of an hour with demand: ${hourClass}`);
  }
  return hourClass;
}

function numberOrNull(value: number | undefined): number | null {
  return value === undefined || Number.isNaN(value) ? null : value;
}
