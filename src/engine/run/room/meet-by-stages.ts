import { hundredths } from '../../conventions.ts';
import { secondaryWaterKgPerKg } from '../../stages/indirect.ts';
import { block } from '../hour-block.ts';
import { runningStages } from '../hour-columns.ts';
import { capsHoldOnWarmSupply, ROUNDING_K } from './room-caps.ts';
import { room } from './room-hours.ts';
import { CLASS_OF_STAGE, type RoomPlan } from './room-plan.ts';
import { dewPointFallK, indirectFallK, lineBottom, lineTop, ratioOnLine, shareFor } from './supply-lines.ts';
import { findSecondWetBulb, type WetBulbs } from './wet-bulbs-of-year.ts';

const DIRECT = runningStages.indexOf('direct');
const INDIRECT = runningStages.indexOf('indirect');
const TWO_STAGE = runningStages.indexOf('twostage');

/** Constants of this module: see `hour-block.ts`. */
const { slot, dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, supplyAimC, supplyC, supplyRatio } = block;
const { classCode, aloneMet, running, share: shares, evaporatedKgPerKg, waterC } = block;
const { ratioUnderCaps, wetBulbC } = room;
const { places } = room.wet;
const { places: unmetPlaces } = room.unmet;

/**
 * Hours in which a stage reaches t_sup within the caps, with the x that just does (on-off: x = 1). The first that does in the brief's
 * order runs; the others are only marked as able to. Hours that no stage meets are added to the unmet ones.
 */
export function meetByStages(plan: RoomPlan, wetBulbs: WetBulbs): void {
  const { count } = room.wet;
  const secondBulbs = wetBulbs.secondWetBulbC;
  const { stages, riseKPerVolume, onOff, effDirect, effIndirect, k } = plan;
  let unmetCount = room.unmet.count;
  let edgeOfAimC = Number.NaN;
  let aimEdge = Number.NaN;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const tempC = dryBulbC[at] ?? 0;
    const outdoorRatio = humidityRatio[at] ?? 0;
    const volume = volumeM3PerKg[at] ?? 0;
    const aimC = supplyAimC[at] ?? 0;
    if (aimC !== edgeOfAimC) {
      edgeOfAimC = aimC;
      aimEdge = hundredths(aimC) + 0.5;
    }
    const wetC = wetBulbC[at] ?? 0;
    const firstFallK = indirectFallK(effIndirect, tempC, wetC);
    let secondC = Number.NaN;
    let alone = 0;
    for (let nth = 0; nth < stages.length; nth++) {
      const stage = stages[nth] ?? 0;
      const riseK = (riseKPerVolume[stage] ?? 0) * volume;
      // Air that enters the last part of the stage, with the wet bulb to which that may cool it.
      let mediumC = tempC;
      let mediumWetC = wetC;
      let fallK = firstFallK;
      const moist = stage === DIRECT || stage === TWO_STAGE;
      if (stage === TWO_STAGE) {
        mediumC = tempC - firstFallK;
        secondC = secondBulbs[slot[at] ?? 0] ?? Number.NaN;
        if (Number.isNaN(secondC))
          secondC = findSecondWetBulb(wetBulbs, slot[at] ?? 0, mediumC, outdoorRatio, pressurePa[at] ?? 0);
        mediumWetC = secondC;
      }
      if (moist) fallK = effDirect * (mediumC - mediumWetC);
      else if (stage !== INDIRECT) fallK = dewPointFallK(plan.effDewPoint, tempC, outdoorRatio, pressurePa[at] ?? 0);
      const dryC = mediumC + riseK;
      if (!(100 * (dryC - fallK) < aimEdge)) continue;
      const share = onOff ? 1 : shareFor(dryC, fallK, aimC);
      const suppliedC = dryC - share * fallK;
      let ratio = outdoorRatio;
      if (moist && share > 0) {
        const top = lineTop(outdoorRatio, mediumC, mediumWetC);
        ratio = Math.max(outdoorRatio, ratioOnLine(top, lineBottom(mediumWetC), suppliedC - riseK));
      }
      const holds =
        suppliedC <= aimC + ROUNDING_K
          ? ratio < (ratioUnderCaps[at] ?? 0)
          : capsHoldOnWarmSupply(plan, at, suppliedC, ratio);
      if (!holds) continue;
      const first = alone === 0;
      alone |= 1 << stage;
      if (!first) continue;
      classCode[at] = CLASS_OF_STAGE[stage] ?? 0;
      running[at] = stage;
      supplyC[at] = suppliedC;
      shares[at] = share;
      supplyRatio[at] = ratio;
      // Before a wetted medium an indirect stage runs at full effect.
      evaporatedKgPerKg[at] = !moist
        ? secondaryWaterKgPerKg(share * fallK, k)
        : stage === DIRECT
          ? ratio - outdoorRatio
          : secondaryWaterKgPerKg(firstFallK, k) + (ratio - outdoorRatio);
      waterC[at] = stage === TWO_STAGE ? Math.max(wetC, secondC) : wetC;
    }
    if (alone === 0) unmetPlaces[unmetCount++] = at;
    else aloneMet[at] = alone;
  }
  room.unmet.count = unmetCount;
}
