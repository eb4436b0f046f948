/**
 * Method 5 for the inlet of a turbine: t_s = max(t - e (t - t_wb), floor), no fan rise. The colder the air the more a
 * turbine gives, so that the stage runs at full effect down to the floor; the target says whether the hour is met.
 */
import type { Brief, Limit } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import { humidityRatioOnWetBulbLine } from '../psychrometrics/wet-bulb-line.ts';
import { type DemandClass, type DemandHour, type HourJudgement, type Supplied, withinShare } from './demand-hour.ts';
import { outdoorForWetting } from './permitted-paths.ts';
import { gainsEnough } from './short-from.ts';

export type TurbineLimit = Extract<Limit, { kind: 'turbine' }>;

/** @throws RangeError for a brief of another limit */
export function turbineLimit({ limit }: Pick<Brief, 'limit'>): TurbineLimit {
  if (limit.kind !== 'turbine') throw new RangeError(`a limit of kind ${limit.kind} is not of a turbine inlet`);
  return limit;
}

/** Judges one demand hour of a turbine inlet. */
export function judgeTurbineHour(hour: DemandHour, brief: Brief): HourJudgement {
  const { dryBulbC, humidityRatio } = hour.outdoor;
  const { targetC } = turbineLimit(brief);
  const frozen = hundredths(dryBulbC) <= hundredths(brief.freezeLockoutC);
  const outdoorReaches = hundredths(dryBulbC) <= hundredths(targetC);
  const wetted = frozen || !brief.stages.includes('direct') ? null : wettedInlet(hour, brief);
  const supply = wetted?.supply ?? { tempC: dryBulbC, humidityRatio, evaporatedKgPerKg: 0, share: 0 };
  const reached = hundredths(supply.tempC) <= hundredths(targetC);
  const gains = wetted !== null && gainsEnough(dryBulbC, supply.tempC);
  const hourClass = classOf({ frozen, wetted: wetted !== null, reached, gains });
  const runs = wetted !== null && (reached || gains);
  const shortfallK = reached ? 0 : Math.max(0, supply.tempC - targetC);
  return {
    hourClass,
    met: reached,
    dampBy: null,
    shortfallK,
    uncappedShortfallK: shortfallK,
    airMeets: outdoorReaches,
    airSupplyC: dryBulbC,
    running: runs ? 'direct' : 'air',
    supply: runs ? supply : { tempC: dryBulbC, humidityRatio, evaporatedKgPerKg: 0, share: 0 },
    carriedShare: reached ? 1 : 0,
    waterC: runs && wetted !== null ? wetted.waterC : null,
    aloneMet: reached
      ? [...(outdoorReaches ? (['air'] as const) : []), ...(wetted === null ? [] : (['direct'] as const))]
      : [],
  };
}

function classOf(hour: { frozen: boolean; wetted: boolean; reached: boolean; gains: boolean }): DemandClass {
  if (hour.frozen) return 'frozen';
  if (hour.reached) return hour.wetted ? 'direct' : 'air';
  return hour.gains ? 'short' : 'beyond';
}

/** Inlet air of the direct stage at full effect, not below the floor; null where the brief lets it not run. */
function wettedInlet(hour: DemandHour, brief: Brief): { supply: Supplied; waterC: number } | null {
  const wet = outdoorForWetting(hour, brief, hour.outdoor.dryBulbC);
  if (wet === null) return null;
  const { dryBulbC, humidityRatio, pressurePa, wetBulbC } = wet;
  const fullFallK = brief.effDirect * (dryBulbC - wetBulbC);
  const tempC = Math.max(dryBulbC - fullFallK, turbineLimit(brief).floorC);
  const leavingRatio = Math.max(humidityRatio, humidityRatioOnWetBulbLine(tempC, wetBulbC, pressurePa));
  const share = withinShare((dryBulbC - tempC) / fullFallK);
  const supply = { tempC, humidityRatio: leavingRatio, evaporatedKgPerKg: leavingRatio - humidityRatio, share };
  return { supply, waterC: wetBulbC };
}
