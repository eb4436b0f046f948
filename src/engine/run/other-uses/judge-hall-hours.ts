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
import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import { secondaryWaterKgPerKg } from '../../stages/indirect.ts';
import { fillWithAir, type HourColumns, runningStages } from '../hour-columns.ts';
import { fillAirPlant } from './fill-air-plant.ts';

const FROZEN = hourClasses.indexOf('frozen');
const DRY = hourClasses.indexOf('air');
const WET = hourClasses.indexOf('indirect');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const INDIRECT = runningStages.indexOf('indirect');
const DRY_BIT = 1 << runningStages.indexOf('air');
const WET_BIT = 1 << INDIRECT;

export function judgeHallHours(brief: Brief, hours: HourColumns): void {
  fillWithAir(hours);
  hours.supplyRatio.fill(Number.NaN, 0, hours.count);
  judgeDry(brief, hours);
  if (brief.stages.includes('indirect')) judgeWet(brief, hours);
  // The return-air fan figure, wet or dry, in the plant and in the reference.
  const fan = brief.fanWPerLs.returnAir;
  const fanWPerLs = new Float64Array(runningStages.length).fill(fan);
  fillAirPlant(brief, { riseK: hallRiseK(brief), fanWPerLs, referenceFanWPerLs: fan }, hours);
}

/** What the dry exchanger supplies, t_ret - e_x (t_ret - t), not below t_sup. */
function judgeDry(brief: Brief, hours: HourColumns): void {
  const riseK = hallRiseK(brief);
  const freezeHundredths = hundredths(brief.freezeLockoutC);
  const alone = brief.stages.includes('indirect') ? DRY_BIT | WET_BIT : DRY_BIT;
  for (let at = 0; at < hours.count; at++) {
    const tempC = hours.dryBulbC[at] ?? 0;
    const aimC = hours.supplyAimC[at] ?? 0;
    const returnC = aimC + riseK;
    const dryC = Math.max(returnC - brief.effExchanger * (returnC - tempC), aimC);
    const met = hundredths(dryC) <= hundredths(aimC);
    const frozen = hundredths(tempC) <= freezeHundredths;
    const shortfallK = met ? 0 : Math.max(0, dryC - aimC);
    hours.airSupplyC[at] = dryC;
    hours.supplyC[at] = dryC;
    hours.classCode[at] = frozen ? FROZEN : met ? DRY : BEYOND;
    hours.met[at] = met ? 1 : 0;
    hours.airMeets[at] = met ? 1 : 0;
    hours.aloneMet[at] = met ? alone : 0;
    hours.shortfallK[at] = shortfallK;
    hours.uncappedShortfallK[at] = shortfallK;
    hours.carriedShare[at] = met ? 1 : withinShare((returnC - dryC) / (returnC - aimC));
  }
}

/** Hours that the dry exchanger leaves, under its wetted surface. */
function judgeWet(brief: Brief, hours: HourColumns): void {
  const riseK = hallRiseK(brief);
  const { effIndirect, k } = brief;
  const modulating = brief.control === 'modulating';
  for (let at = 0; at < hours.count; at++) {
    if (hours.classCode[at] !== BEYOND) continue;
    const aimC = hours.supplyAimC[at] ?? 0;
    const dryC = hours.airSupplyC[at] ?? 0;
    const returnC = aimC + riseK;
    const wetC = wetBulbC(hours.dryBulbC[at] ?? 0, hours.humidityRatio[at] ?? 0, hours.pressurePa[at] ?? 0);
    const fullC = Math.max(returnC - effIndirect * (returnC - wetC), aimC);
    const met = hundredths(fullC) <= hundredths(aimC);
    const shortfallK = met ? 0 : Math.max(0, Math.min(fullC, dryC) - aimC);
    hours.shortfallK[at] = shortfallK;
    hours.uncappedShortfallK[at] = shortfallK;
    if (!met && !gainsEnough(dryC, fullC)) continue;
    const share = met && modulating ? withinShare((returnC - aimC) / (effIndirect * (returnC - wetC))) : 1;
    const suppliedC = Math.max(returnC - share * effIndirect * (returnC - wetC), aimC);
    hours.classCode[at] = met ? WET : SHORT;
    hours.met[at] = met ? 1 : 0;
    hours.aloneMet[at] = met ? WET_BIT : 0;
    hours.running[at] = INDIRECT;
    hours.supplyC[at] = suppliedC;
    hours.share[at] = share;
    hours.evaporatedKgPerKg[at] = Math.max(0, secondaryWaterKgPerKg(returnC - suppliedC, k));
    hours.carriedShare[at] = met ? 1 : withinShare((returnC - suppliedC) / (returnC - aimC));
    hours.waterC[at] = wetC;
  }
}
