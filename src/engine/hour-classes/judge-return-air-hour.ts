/**
 * Method 5 for data halls: the hall's own air is cooled in an exchanger by outdoor air, dry or wetted, and never mixes with
 * it. No cap is tested, so no hour is `damp`; cut-in, start temperature and outdoor humidity do not bind (method 3.1).
 */
import type { Brief } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import { secondaryWaterKgPerKg } from '../stages/indirect.ts';
import { dryReturnSupplyC, type ReturnAir, wetReturnSupplyC } from '../stages/return-air.ts';
import type { SupplyStage } from '../stages/stage-path.ts';
import { type DemandClass, type DemandHour, type HourJudgement, withinShare } from './demand-hour.ts';
import { gainsEnough } from './short-from.ts';

/** dT_IT, K. @throws RangeError for a brief without it, which no reader of briefs lets through */
export function hallRiseK(brief: Pick<Brief, 'dTitK'>): number {
  if (brief.dTitK === null) throw new RangeError('the rise over the equipment of a hall, dTitK, is not given');
  return brief.dTitK;
}

/** Judges one demand hour of a data hall whose return air is cooled indirectly. */
export function judgeReturnAirHour(hour: DemandHour, brief: Brief): HourJudgement {
  const air = { returnC: hour.supplyAimC + hallRiseK(brief), supplyAimC: hour.supplyAimC };
  const dryC = dryReturnSupplyC(air, hour.outdoor.dryBulbC, brief);
  const frozen = hundredths(hour.outdoor.dryBulbC) <= hundredths(brief.freezeLockoutC);
  const mayWet = !frozen && brief.stages.includes('indirect');
  if (reaches(dryC, air)) {
    const aloneMet: SupplyStage[] = brief.stages.includes('indirect') ? ['air', 'indirect'] : ['air'];
    return { ...onDry(frozen ? 'frozen' : 'air', { air, dryC }), met: true, airMeets: true, aloneMet };
  }
  if (!mayWet) return onDry(frozen ? 'frozen' : 'beyond', { air, dryC });
  return judgeWet({ hour, air, dryC, brief });
}

function judgeWet(input: { hour: DemandHour; air: ReturnAir; dryC: number; brief: Brief }): HourJudgement {
  const { hour, air, dryC, brief } = input;
  const { dryBulbC, humidityRatio, pressurePa } = hour.outdoor;
  const outdoorWetBulbC = wetBulbC(dryBulbC, humidityRatio, pressurePa);
  const { effIndirect } = brief;
  const fullC = wetReturnSupplyC(air, outdoorWetBulbC, { share: 1, effIndirect });
  const met = reaches(fullC, air);
  const shortfallK = met ? 0 : Math.max(0, Math.min(fullC, dryC) - air.supplyAimC);
  if (!met && !gainsEnough(dryC, fullC)) {
    return { ...onDry('beyond', { air, dryC }), shortfallK, uncappedShortfallK: shortfallK };
  }
  const neededShare = (air.returnC - air.supplyAimC) / (effIndirect * (air.returnC - outdoorWetBulbC));
  const share = met && brief.control === 'modulating' ? withinShare(neededShare) : 1;
  const suppliedC = wetReturnSupplyC(air, outdoorWetBulbC, { share, effIndirect });
  return {
    hourClass: met ? 'indirect' : 'short',
    met,
    dampBy: null,
    shortfallK,
    uncappedShortfallK: shortfallK,
    airMeets: false,
    airSupplyC: dryC,
    running: 'indirect',
    supply: {
      tempC: suppliedC,
      humidityRatio: null,
      evaporatedKgPerKg: Math.max(0, secondaryWaterKgPerKg(air.returnC - suppliedC, brief.k)),
      share,
    },
    carriedShare: met ? 1 : carriedShare(suppliedC, air),
    waterC: outdoorWetBulbC,
    aloneMet: met ? ['indirect'] : [],
  };
}

/** The dry exchanger runs: unmet unless said otherwise. */
function onDry(hourClass: DemandClass, { air, dryC }: { air: ReturnAir; dryC: number }): HourJudgement {
  const shortfallK = reaches(dryC, air) ? 0 : Math.max(0, dryC - air.supplyAimC);
  return {
    hourClass,
    met: false,
    dampBy: null,
    shortfallK,
    uncappedShortfallK: shortfallK,
    airMeets: false,
    airSupplyC: dryC,
    running: 'air',
    supply: { tempC: dryC, humidityRatio: null, evaporatedKgPerKg: 0, share: 0 },
    carriedShare: reaches(dryC, air) ? 1 : carriedShare(dryC, air),
    waterC: null,
    aloneMet: [],
  };
}

function reaches(supplyC: number, { supplyAimC }: ReturnAir): boolean {
  return hundredths(supplyC) <= hundredths(supplyAimC);
}

/** (t_set + dT_IT - t_s) / dT_IT, within 0..1 (method 6). */
function carriedShare(supplyC: number, { returnC, supplyAimC }: ReturnAir): number {
  return withinShare((returnC - supplyC) / (returnC - supplyAimC));
}
