import type { HourColumns } from '#engine/run/hour-columns.ts';
import { columnsOf, type JudgedHour } from '#engine/run/judged-hour.ts';

/** An hour that outdoor air meets and that costs nothing. */
const easy: JudgedHour = {
  slot: 0,
  hour: {
    outdoor: { dryBulbC: 15, humidityRatio: 0.006, pressurePa: 101_325, volumeM3PerKg: 0.82 },
    setC: 26,
    supplyAimC: 21,
    loadFraction: 1,
  },
  judgement: {
    hourClass: 'air',
    met: true,
    dampBy: null,
    shortfallK: 0,
    uncappedShortfallK: 0,
    airMeets: true,
    airSupplyC: 15.5,
    running: 'air',
    supply: { tempC: 15.5, humidityRatio: 0.006, evaporatedKgPerKg: 0, share: 0 },
    carriedShare: 1,
    waterC: null,
    aloneMet: ['air'],
  },
  plant: { evaporatedLitres: 0, makeUpLitres: 0, coolingKwh: 1, kwh: 0, referenceKwh: 0, backUpKw: 0 },
};

/** Columns of demand hours of which only some parts matter to a test. */
export function hoursLike(changes: readonly Partial<JudgedHour>[]): HourColumns {
  return columnsOf(changes.map((change) => ({ ...easy, ...change })));
}
