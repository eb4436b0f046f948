/** Method 5 for process water from a cooling tower: cold water = t_wb + approach + exchanger; only the freeze lockout binds. */
import type { Brief, Limit } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import { type DemandClass, type DemandHour, type HourJudgement, withinShare } from './demand-hour.ts';

export type TowerLimit = Extract<Limit, { kind: 'tower' }>;

/** @throws RangeError for a brief of another limit */
export function towerLimit({ limit }: Pick<Brief, 'limit'>): TowerLimit {
  if (limit.kind !== 'tower') throw new RangeError(`a limit of kind ${limit.kind} is not of cold water`);
  return limit;
}

/** Judges one demand hour of a brief for cold water. */
export function judgeTowerHour(hour: DemandHour, brief: Brief): HourJudgement {
  const limit = towerLimit(brief);
  const { dryBulbC, humidityRatio, pressurePa } = hour.outdoor;
  if (hundredths(dryBulbC) <= hundredths(brief.freezeLockoutC)) {
    // A heated basin runs as in any hour that is met; without heat the tower is drained and the water comes back as warm.
    return brief.basinHeat ? running('frozen', limit.coldC, limit) : standing('frozen', limit.rangeK, limit);
  }
  const reachedC = wetBulbC(dryBulbC, humidityRatio, pressurePa) + limit.approachK + limit.exchangerK;
  if (hundredths(reachedC) <= hundredths(limit.coldC)) {
    return running('direct', brief.control === 'modulating' ? limit.coldC : reachedC, limit);
  }
  const helps = hundredths(reachedC) < hundredths(limit.coldC + limit.rangeK);
  return helps ? running('short', reachedC, limit) : standing('beyond', reachedC - limit.coldC, limit);
}

/** The tower runs and sends the water out at this temperature; `short` is the one class so that is not met. */
function running(hourClass: DemandClass, suppliedC: number, limit: TowerLimit): HourJudgement {
  const { coldC, rangeK, exchangerK } = limit;
  const met = hourClass !== 'short';
  const shortfallK = met ? 0 : Math.max(0, suppliedC - coldC);
  return {
    hourClass,
    met,
    dampBy: null,
    shortfallK,
    uncappedShortfallK: shortfallK,
    airMeets: false,
    airSupplyC: coldC + rangeK,
    running: 'tower',
    supply: { tempC: suppliedC, humidityRatio: null, evaporatedKgPerKg: 0, share: 1 },
    carriedShare: met ? 1 : withinShare((coldC + rangeK - suppliedC) / rangeK),
    // The basin stands before the exchanger.
    waterC: suppliedC - exchangerK,
    aloneMet: met ? ['direct'] : [],
  };
}

/** The tower stands; the water stays as warm as it comes back. */
function standing(hourClass: DemandClass, shortfallK: number, { coldC, rangeK }: TowerLimit): HourJudgement {
  return {
    hourClass,
    met: false,
    dampBy: null,
    shortfallK,
    uncappedShortfallK: shortfallK,
    airMeets: false,
    airSupplyC: coldC + rangeK,
    running: null,
    supply: { tempC: coldC + rangeK, humidityRatio: null, evaporatedKgPerKg: 0, share: 0 },
    carriedShare: 0,
    waterC: null,
    aloneMet: [],
  };
}
