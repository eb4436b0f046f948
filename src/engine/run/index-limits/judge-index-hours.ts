/**
 * Method 5 and 6 for a block of demand hours of rooms under an index limit: `judgeIndexHour` and `supplyAirPlantHour` in columns, figure
 * by figure; a test holds them together. Outdoor air is asked of every hour; of the hours that it leaves, each stage is tried from dry
 * to full wetting up to the first good state.
 */
import type { Brief } from '../../brief/brief.ts';
import { hundredths } from '../../conventions.ts';
import { withinShare } from '../../hour-classes/demand-hour.ts';
import { hourClasses } from '../../hour-classes/hour-class.ts';
import { gainsEnough } from '../../hour-classes/short-from.ts';
import { fanRiseK } from '../../stages/stage-path.ts';
import { block } from '../hour-block.ts';
import { dampReasons, fillMet, runningStages } from '../hour-columns.ts';
import { fillAirPlant } from '../other-uses/fill-air-plant.ts';
import { mayStart } from '../other-uses/may-start.ts';
import { findWetBulb, type Wetting } from '../other-uses/wetting-of-year.ts';
import { CLASS_OF_STAGE } from '../room/room-plan.ts';
import type { IndexPlan } from './index-plan.ts';
import { allKeepCaps, assess, findIndex, indexStates, lowestPlace, reachesLimit } from './index-states.ts';
import { runState, tryStage } from './try-stage.ts';

const FROZEN = hourClasses.indexOf('frozen');
const DAMP = hourClasses.indexOf('damp');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const BY_AIR = hourClasses.indexOf('air');
const PLANT = dampReasons.indexOf('plant');
const AIR = runningStages.indexOf('air');

/** Constants of this module: see `hour-block.ts`. */
const { slot, dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, airSupplyC, supplyC, supplyRatio } = block;
const { classCode, met, airMeets, aloneMet, damp, running } = block;
const { shortfallK, uncappedShortfallK, carriedShare } = block;
const { tempC: temps, humidityRatio: ratios, index, withinCaps } = indexStates;

/** Judges the hours of `block` as `meetDemandHours` leaves them; the rest is filled in. */
export function judgeIndexHours(brief: Brief, plan: IndexPlan, wetting: Wetting): void {
  fillMet(block);
  for (let at = 0; at < block.count; at++) if (!meetByAir(plan, at)) judgeWithWater(brief, plan, { at, wetting });
  const stream = { riseK: brief.dTroomK, fanWPerLs: plan.fanWPerLs, referenceFanWPerLs: brief.fanWPerLs.air };
  fillAirPlant(brief, stream);
}

/** Outdoor air as it is, which becomes the state at place 0. */
function meetByAir(plan: IndexPlan, at: number): boolean {
  const tempC = dryBulbC[at] ?? 0;
  const airC = tempC + fanRiseK(plan.fanWPerLs[AIR] ?? 0, volumeM3PerKg[at] ?? 0);
  airSupplyC[at] = airC;
  supplyC[at] = airC;
  supplyRatio[at] = humidityRatio[at] ?? 0;
  temps[0] = airC;
  ratios[0] = humidityRatio[at] ?? 0;
  assess(plan, at, 0);
  if (withinCaps[0] === 0 || !reachesLimit(plan, at, 0)) return false;
  classCode[at] = hundredths(tempC) <= plan.freezeHundredths ? FROZEN : BY_AIR;
  airMeets[at] = 1;
  aloneMet[at] = plan.allAlone;
  return true;
}

function judgeWithWater(brief: Brief, plan: IndexPlan, { at, wetting }: { at: number; wetting: Wetting }): void {
  airMeets[at] = 0;
  let count = 1;
  let alone = 0;
  let first = -1;
  const frozen = hundredths(dryBulbC[at] ?? 0) <= plan.freezeHundredths;
  const wetC = !frozen && mayStart(brief, at) ? wetBulbAt(wetting, at) : Number.NaN;
  if (hundredths(dryBulbC[at] ?? 0) - hundredths(wetC) >= plan.cutInHundredths) {
    for (let nth = 0; nth < plan.stages.length; nth++) {
      count = tryStage(plan, at, { nth, wetC, from: count, wetting });
      if (withinCaps[count - 1] === 0 || !reachesLimit(plan, at, count - 1)) continue;
      alone |= 1 << (plan.stages[nth] ?? 0);
      if (first < 0) first = count - 1;
    }
  }
  aloneMet[at] = alone;
  if (first < 0) judgeUnmet(plan, at, { count, frozen, wetC });
  else {
    runState(plan, at, first, wetC);
    classCode[at] = CLASS_OF_STAGE[running[at] ?? 0] ?? 0;
  }
}

function wetBulbAt(wetting: Wetting, at: number): number {
  const from = slot[at] ?? 0;
  const { wetBulbC } = wetting;
  if (Number.isNaN(wetBulbC[from] ?? 0)) {
    findWetBulb(wetting, from, dryBulbC[at] ?? 0, humidityRatio[at] ?? 0, pressurePa[at] ?? 0);
  }
  return wetBulbC[from] ?? 0;
}

/** `damp` where the limit is reached outside the caps only, else `short` or `beyond` (or `frozen`). */
function judgeUnmet(
  plan: IndexPlan,
  at: number,
  { count, frozen, wetC }: { count: number; frozen: boolean; wetC: number },
): void {
  const limit = plan.limit.value;
  const lowest = lowestPlace(plan, at, count, true);
  const lowestOfAll = allKeepCaps(count) ? lowest : lowestPlace(plan, at, count, false);
  findIndex(plan, at, 0);
  const airIndex = index[0] ?? 0;
  const lowestIndex = lowest < 0 ? airIndex : (index[lowest] ?? 0);
  const isDamp = !frozen && reachesLimit(plan, at, lowestOfAll);
  const short = !frozen && !isDamp && lowest >= 0 && gainsEnough(airIndex, lowestIndex);
  classCode[at] = frozen ? FROZEN : isDamp ? DAMP : short ? SHORT : BEYOND;
  met[at] = 0;
  if (isDamp) damp[at] = PLANT;
  shortfallK[at] = Math.max(0, lowestIndex - limit);
  uncappedShortfallK[at] = Math.max(0, (index[lowestOfAll] ?? 0) - limit);
  carriedShare[at] = short ? withinShare((airIndex - lowestIndex) / (airIndex - limit)) : 0;
  // Air, the state at place 0, runs wherever no water gains enough, and may be the lowest itself.
  if (short && lowest > 0) runState(plan, at, lowest, wetC);
}
