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
import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import { fanRiseK } from '../../stages/stage-path.ts';
import { block } from '../hour-block.ts';
import { dampReasons, fillMet, runningStages } from '../hour-columns.ts';
import { fillAirPlant } from '../other-uses/fill-air-plant.ts';
import { mayStart } from '../other-uses/may-start.ts';
import { CLASS_OF_STAGE } from '../room/room-plan.ts';
import type { IndexPlan } from './index-plan.ts';
import { assess, findIndex, indexStates, lowestPlace, reachesLimit } from './index-states.ts';
import { tryStage } from './try-stage.ts';

const FROZEN = hourClasses.indexOf('frozen');
const DAMP = hourClasses.indexOf('damp');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const BY_AIR = hourClasses.indexOf('air');
const PLANT = dampReasons.indexOf('plant');
const AIR = runningStages.indexOf('air');

/** Constants of this module: see `hour-block.ts`. */
const { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, airSupplyC, supplyC, supplyRatio } = block;
const { classCode, met, airMeets, aloneMet, damp, running, share, evaporatedKgPerKg, waterC } = block;
const { shortfallK, uncappedShortfallK, carriedShare } = block;
const { stage: stages, tempC: temps, humidityRatio: ratios, share: shares, index, withinCaps } = indexStates;
const { evaporatedKgPerKg: evaporated, waterC: waters } = indexStates;

/** Judges the hours of `block` as `meetDemandHours` leaves them; the rest is filled in. */
export function judgeIndexHours(brief: Brief, plan: IndexPlan): void {
  fillMet(block);
  for (let at = 0; at < block.count; at++) if (!meetByAir(plan, at)) judgeWithWater(brief, plan, at);
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
  stages[0] = AIR;
  assess(plan, at, 0);
  if (withinCaps[0] === 0 || !reachesLimit(plan, at, 0)) return false;
  classCode[at] = hundredths(tempC) <= plan.freezeHundredths ? FROZEN : BY_AIR;
  airMeets[at] = 1;
  aloneMet[at] = plan.allAlone;
  return true;
}

function judgeWithWater(brief: Brief, plan: IndexPlan, at: number): void {
  airMeets[at] = 0;
  let count = 1;
  let alone = 0;
  let first = -1;
  const frozen = hundredths(dryBulbC[at] ?? 0) <= plan.freezeHundredths;
  const wetC =
    !frozen && mayStart(brief, at)
      ? wetBulbC(dryBulbC[at] ?? 0, humidityRatio[at] ?? 0, pressurePa[at] ?? 0)
      : Number.NaN;
  if (hundredths(dryBulbC[at] ?? 0) - hundredths(wetC) >= plan.cutInHundredths) {
    for (let nth = 0; nth < plan.stages.length; nth++) {
      const stage = plan.stages[nth] ?? 0;
      count = tryStage(plan, at, { stage, wetC, from: count });
      if (withinCaps[count - 1] === 0 || !reachesLimit(plan, at, count - 1)) continue;
      alone |= 1 << stage;
      if (first < 0) first = count - 1;
    }
  }
  aloneMet[at] = alone;
  if (first < 0) judgeUnmet(plan, at, { count, frozen });
  else {
    classCode[at] = CLASS_OF_STAGE[stages[first] ?? 0] ?? 0;
    run(at, first);
  }
}

/** The state at a place is what is supplied. */
function run(at: number, place: number): void {
  running[at] = stages[place] ?? 0;
  supplyC[at] = temps[place] ?? 0;
  supplyRatio[at] = ratios[place] ?? 0;
  share[at] = shares[place] ?? 0;
  evaporatedKgPerKg[at] = evaporated[place] ?? 0;
  waterC[at] = waters[place] ?? 0;
}

/** `damp` where the limit is reached outside the caps only, else `short` or `beyond` (or `frozen`). */
function judgeUnmet(plan: IndexPlan, at: number, { count, frozen }: { count: number; frozen: boolean }): void {
  const limit = plan.limit.value;
  const lowest = lowestPlace(plan, at, count, true);
  const lowestOfAll = lowestPlace(plan, at, count, false);
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
  if (short && lowest > 0) run(at, lowest);
}
