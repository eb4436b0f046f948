import { hundredths } from '../../conventions.ts';
import { withinShare } from '../../hour-classes/demand-hour.ts';
import { hourClasses } from '../../hour-classes/hour-class.ts';
import { gainsEnough } from '../../hour-classes/short-from.ts';
import { secondaryWaterKgPerKg } from '../../stages/indirect.ts';
import { block } from '../hour-block.ts';
import { dampReasons, runningStages } from '../hour-columns.ts';
import { room } from './room-hours.ts';
import { isMoist, type RoomPlan } from './room-plan.ts';
import { dewPointFallK, indirectFallK, lineBottom, lineTop, ratioOnLine } from './supply-lines.ts';
import type { WetBulbs } from './wet-bulbs-of-year.ts';

const FROZEN = hourClasses.indexOf('frozen');
const DAMP = hourClasses.indexOf('damp');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const OUTSIDE = dampReasons.indexOf('outside');
const PLANT = dampReasons.indexOf('plant');
const INDIRECT = runningStages.indexOf('indirect');
const TWO_STAGE = runningStages.indexOf('twostage');

/** Constants of this module: see `hour-block.ts`. */
const { slot, dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, setC, supplyAimC, airSupplyC } = block;
const { classCode, met, damp, shortfallK, uncappedShortfallK, carriedShare } = block;
const { running, supplyC, supplyRatio, share: shares, evaporatedKgPerKg, waterC } = block;
const { mayWet, wetBulbC, uncappedC: uncappeds, lowestC: lowests, lowestNth, lowestShare } = room;
const { places } = room.unmet;

/** `damp`, `short` or `beyond` (or `frozen`) of every hour that is listed as unmet, with the shortfall from T* of method 3.1. */
export function judgeUnmet(plan: RoomPlan, wetBulbs: WetBulbs): void {
  const { count } = room.unmet;
  const freezeEdge = plan.freezeHundredths + 0.5;
  let edgeOfAimC = Number.NaN;
  let aimEdge = Number.NaN;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const aimC = supplyAimC[at] ?? 0;
    const airC = airSupplyC[at] ?? 0;
    const lowestC = lowests[at] ?? 0;
    const uncappedC = uncappeds[at] ?? 0;
    if (aimC !== edgeOfAimC) {
      edgeOfAimC = aimC;
      aimEdge = hundredths(aimC) + 0.5;
    }
    const frozen = 100 * (dryBulbC[at] ?? 0) < freezeEdge;
    const dampOutside = damp[at] === OUTSIDE;
    const enough = mayWet[at] === 1 && 100 * uncappedC < aimEdge;
    const isDamp = !frozen && (dampOutside || enough);
    const short = !frozen && !isDamp && (lowestNth[at] ?? 0) >= 0 && gainsEnough(airC, lowestC);
    classCode[at] = frozen ? FROZEN : isDamp ? DAMP : short ? SHORT : BEYOND;
    met[at] = 0;
    if (isDamp && !dampOutside) damp[at] = PLANT;
    shortfallK[at] = Math.max(0, (lowestC === Number.POSITIVE_INFINITY ? airC : lowestC) - aimC);
    uncappedShortfallK[at] = Math.max(0, uncappedC - aimC);
    if (short) runLowest(plan, wetBulbs, at);
    const roomC = setC[at] ?? 0;
    carriedShare[at] = isDamp ? 0 : withinShare((roomC - (supplyC[at] ?? 0)) / (roomC - aimC));
  }
}

/** In `short` the stage and share that give T* run. */
function runLowest(plan: RoomPlan, wetBulbs: WetBulbs, at: number): void {
  const stage = plan.stages[lowestNth[at] ?? 0] ?? 0;
  const share = lowestShare[at] ?? 0;
  const tempC = dryBulbC[at] ?? 0;
  const outdoorRatio = humidityRatio[at] ?? 0;
  const wetC = wetBulbC[at] ?? 0;
  const firstFallK = indirectFallK(plan.effIndirect, tempC, wetC);
  running[at] = stage;
  supplyC[at] = lowests[at] ?? 0;
  shares[at] = share;
  waterC[at] = wetC;
  if (!isMoist(stage)) {
    const fallK =
      stage === INDIRECT ? firstFallK : dewPointFallK(plan.effDewPoint, tempC, outdoorRatio, pressurePa[at] ?? 0);
    evaporatedKgPerKg[at] = secondaryWaterKgPerKg(share * fallK, plan.k);
    return;
  }
  const twoStage = stage === TWO_STAGE;
  const mediumC = twoStage ? tempC - firstFallK : tempC;
  const mediumWetC = twoStage ? (wetBulbs.secondWetBulbC[slot[at] ?? 0] ?? 0) : wetC;
  const riseK = (plan.riseKPerVolume[stage] ?? 0) * (volumeM3PerKg[at] ?? 0);
  const onLine = ratioOnLine(
    lineTop(outdoorRatio, mediumC, mediumWetC),
    lineBottom(mediumWetC),
    (lowests[at] ?? 0) - riseK,
  );
  const ratio = share > 0 ? Math.max(outdoorRatio, onLine) : outdoorRatio;
  const gained = ratio - outdoorRatio;
  supplyRatio[at] = ratio;
  evaporatedKgPerKg[at] = twoStage ? secondaryWaterKgPerKg(firstFallK, plan.k) + gained : gained;
  if (twoStage) waterC[at] = Math.max(wetC, mediumWetC);
}
