/**
 * Method 5 and 6 for many demand hours of a data hall: `judgeReturnAirHour` and `returnAirPlantHour` in columns, figure by figure; a
 * test holds them together.
 */
import type { Brief } from '../../brief/brief.ts';
import { hundredths } from '../../conventions.ts';
import { withinShare } from '../../hour-classes/demand-hour.ts';
import { hourClasses } from '../../hour-classes/hour-class.ts';
import { hallRiseK } from '../../hour-classes/judge-return-air-hour.ts';
import { gainsEnough } from '../../hour-classes/short-from.ts';
import { secondaryWaterKgPerKg } from '../../stages/indirect.ts';
import { block } from '../hour-block.ts';
import { fillWithAir, runningStages } from '../hour-columns.ts';
import { fillAirPlant } from './fill-air-plant.ts';
import { findWetBulb, type Wetting } from './wetting-of-year.ts';

const FROZEN = hourClasses.indexOf('frozen');
const DRY = hourClasses.indexOf('air');
const WET = hourClasses.indexOf('indirect');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const INDIRECT = runningStages.indexOf('indirect');
const DRY_BIT = 1 << runningStages.indexOf('air');
const WET_BIT = 1 << INDIRECT;

/** Constants of this module: see `hour-block.ts`. */
const { slot, dryBulbC, humidityRatio, pressurePa, classCode, met, airMeets, aloneMet, running, share, waterC } = block;
const { shortfallK, uncappedShortfallK, carriedShare, supplyAimC, airSupplyC, supplyC, evaporatedKgPerKg } = block;

/** Judges the hours of `block` as `meetDemandHours` leaves them; the rest is filled in. */
export function judgeHallHours(brief: Brief, wetting: Wetting): void {
  fillWithAir(block);
  block.supplyRatio.fill(Number.NaN, 0, block.count);
  judgeDry(brief);
  if (brief.stages.includes('indirect')) judgeWet(brief, wetting);
  // The return-air fan figure, wet or dry, in the plant and in the reference.
  const fan = brief.fanWPerLs.returnAir;
  const fanWPerLs = new Float64Array(runningStages.length).fill(fan);
  fillAirPlant(brief, { riseK: hallRiseK(brief), fanWPerLs, referenceFanWPerLs: fan });
}

/** What the dry exchanger supplies, t_ret - e_x (t_ret - t), not below t_sup. */
function judgeDry(brief: Brief): void {
  const { count } = block;
  const riseK = hallRiseK(brief);
  const { effExchanger } = brief;
  // What rounds to at most a limit lies under it and half a hundredth.
  const freezeEdge = hundredths(brief.freezeLockoutC) + 0.5;
  const alone = brief.stages.includes('indirect') ? DRY_BIT | WET_BIT : DRY_BIT;
  for (let at = 0; at < count; at++) {
    const tempC = dryBulbC[at] ?? 0;
    const aimC = supplyAimC[at] ?? 0;
    const returnC = aimC + riseK;
    const dryC = Math.max(returnC - effExchanger * (returnC - tempC), aimC);
    const isMet = hundredths(dryC) <= hundredths(aimC);
    const lackingK = isMet ? 0 : Math.max(0, dryC - aimC);
    airSupplyC[at] = dryC;
    supplyC[at] = dryC;
    classCode[at] = 100 * tempC < freezeEdge ? FROZEN : isMet ? DRY : BEYOND;
    met[at] = isMet ? 1 : 0;
    airMeets[at] = isMet ? 1 : 0;
    aloneMet[at] = isMet ? alone : 0;
    shortfallK[at] = lackingK;
    uncappedShortfallK[at] = lackingK;
    carriedShare[at] = isMet ? 1 : withinShare((returnC - dryC) / (returnC - aimC));
  }
}

/** Hours that the dry exchanger leaves, under its wetted surface. */
function judgeWet(brief: Brief, wetting: Wetting): void {
  const { count } = block;
  const riseK = hallRiseK(brief);
  const { effIndirect, k } = brief;
  const { wetBulbC: wetBulbs } = wetting;
  const modulating = brief.control === 'modulating';
  for (let at = 0; at < count; at++) {
    if (classCode[at] !== BEYOND) continue;
    const aimC = supplyAimC[at] ?? 0;
    const dryC = airSupplyC[at] ?? 0;
    const returnC = aimC + riseK;
    const from = slot[at] ?? 0;
    if (Number.isNaN(wetBulbs[from] ?? 0)) {
      findWetBulb(wetting, from, dryBulbC[at] ?? 0, humidityRatio[at] ?? 0, pressurePa[at] ?? 0);
    }
    const wetC = wetBulbs[from] ?? 0;
    const fullC = Math.max(returnC - effIndirect * (returnC - wetC), aimC);
    const isMet = hundredths(fullC) <= hundredths(aimC);
    const lackingK = isMet ? 0 : Math.max(0, Math.min(fullC, dryC) - aimC);
    shortfallK[at] = lackingK;
    uncappedShortfallK[at] = lackingK;
    if (!isMet && !gainsEnough(dryC, fullC)) continue;
    const x = isMet && modulating ? withinShare((returnC - aimC) / (effIndirect * (returnC - wetC))) : 1;
    const suppliedC = Math.max(returnC - x * effIndirect * (returnC - wetC), aimC);
    classCode[at] = isMet ? WET : SHORT;
    met[at] = isMet ? 1 : 0;
    aloneMet[at] = isMet ? WET_BIT : 0;
    running[at] = INDIRECT;
    supplyC[at] = suppliedC;
    share[at] = x;
    evaporatedKgPerKg[at] = Math.max(0, secondaryWaterKgPerKg(returnC - suppliedC, k));
    carriedShare[at] = isMet ? 1 : withinShare((returnC - suppliedC) / (returnC - aimC));
    waterC[at] = wetC;
  }
}
