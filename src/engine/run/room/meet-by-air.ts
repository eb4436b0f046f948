import { hundredths } from '../../conventions.ts';
import { hourClasses } from '../../hour-classes/hour-class.ts';
import { vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledSaturationPa } from '../../psychrometrics/saturation-table.ts';
import { block } from '../hour-block.ts';
import { dampReasons, runningStages } from '../hour-columns.ts';
import { capsHoldOnWarmSupply, ROUNDING_K, ratioOfVapour, roomVapourPa, supplyVapourPa } from './room-caps.ts';
import { room } from './room-hours.ts';
import type { RoomPlan } from './room-plan.ts';
import { findWetBulb, type WetBulbs } from './wet-bulbs-of-year.ts';

const FROZEN = hourClasses.indexOf('frozen');
const CLASS_OF_AIR = hourClasses.indexOf('air');
const AIR = runningStages.indexOf('air');
const OUTSIDE = dampReasons.indexOf('outside');

/** Constants of this module: see `hour-block.ts`. */
const { slot, dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, setC, supplyAimC, loadFraction } = block;
const { airSupplyC, supplyC, classCode, airMeets, aloneMet, damp } = block;
const { ratioUnderCaps, mayWet, wetBulbC } = room;
const { places: wetPlaces } = room.wet;
const { places: unmetPlaces } = room.unmet;

/**
 * `air`, and `frozen` hours that air meets. Every other hour is listed: as `wet` where a stage may run, else as unmet; it is marked as
 * `damp` where outdoor moisture itself breaks a cap, which no stage mends.
 */
export function meetByAir(plan: RoomPlan, wetBulbs: WetBulbs): void {
  const { count } = block;
  const bulbs = wetBulbs.wetBulbC;
  const { freezeHundredths, cutInHundredths, dwRoomKgKg, capsSupply, allAlone } = plan;
  const freezeEdge = freezeHundredths + 0.5;
  const airRise = plan.riseKPerVolume[AIR] ?? 0;
  const mayAlwaysStart =
    plan.startHundredths === Number.NEGATIVE_INFINITY && plan.outdoorShare === Number.POSITIVE_INFINITY;
  let wetCount = 0;
  let unmetCount = 0;
  let capsOfSetC = Number.NaN;
  let capsOfAimC = Number.NaN;
  let roomPa = Number.NaN;
  let supplyPa = Number.NaN;
  let aimEdge = Number.NaN;
  for (let at = 0; at < count; at++) {
    const tempC = dryBulbC[at] ?? 0;
    const ratio = humidityRatio[at] ?? 0;
    const pressure = pressurePa[at] ?? 0;
    const aimC = supplyAimC[at] ?? 0;
    const roomC = setC[at] ?? 0;
    if (roomC !== capsOfSetC || aimC !== capsOfAimC) {
      capsOfSetC = roomC;
      capsOfAimC = aimC;
      roomPa = roomVapourPa(plan, aimC + (roomC - aimC));
      supplyPa = supplyVapourPa(plan, aimC);
      aimEdge = hundredths(aimC) + 0.5;
    }
    const inRoom = ratioOfVapour(roomPa, pressure) - dwRoomKgKg;
    const underCaps = capsSupply ? Math.min(inRoom, ratioOfVapour(supplyPa, pressure)) : inRoom;
    const airC = tempC + airRise * (volumeM3PerKg[at] ?? 0);
    airSupplyC[at] = airC;
    supplyC[at] = airC;
    const frozen = 100 * tempC < freezeEdge;
    const dampOutside = !frozen && !(ratio < underCaps);
    if (
      100 * airC < aimEdge &&
      !dampOutside &&
      (airC <= aimC + ROUNDING_K ? ratio < underCaps : capsHoldOnWarmSupply(plan, at, airC, ratio))
    ) {
      classCode[at] = frozen ? FROZEN : CLASS_OF_AIR;
      airMeets[at] = 1;
      aloneMet[at] = allAlone;
      continue;
    }
    const from = slot[at] ?? 0;
    if (Number.isNaN(bulbs[from] ?? 0)) findWetBulb(wetBulbs, from, tempC, ratio, pressure);
    const wetC = bulbs[from] ?? 0;
    const allowed =
      !frozen &&
      // So far over the cut-in that rounding tells nothing.
      (100 * (tempC - wetC) > cutInHundredths + 2 || hundredths(tempC) - hundredths(wetC) >= cutInHundredths) &&
      (mayAlwaysStart || (warmEnoughToStart(plan, at) && dryEnoughOutdoors(plan, at)));
    airMeets[at] = 0;
    aloneMet[at] = 0;
    mayWet[at] = allowed ? 1 : 0;
    wetBulbC[at] = wetC;
    ratioUnderCaps[at] = underCaps;
    if (dampOutside) damp[at] = OUTSIDE;
    if (allowed && !dampOutside) wetPlaces[wetCount++] = at;
    else unmetPlaces[unmetCount++] = at;
  }
  room.wet.count = wetCount;
  room.unmet.count = unmetCount;
}

function warmEnoughToStart(plan: RoomPlan, at: number): boolean {
  if (plan.startHundredths === Number.NEGATIVE_INFINITY) return true;
  const roomByAirC = (airSupplyC[at] ?? 0) + plan.dTroomK * (loadFraction[at] ?? 0);
  return hundredths(roomByAirC) >= plan.startHundredths;
}

/** The ceiling of outdoor humidity (method 4). */
function dryEnoughOutdoors(plan: RoomPlan, at: number): boolean {
  if (plan.outdoorShare === Number.POSITIVE_INFINITY) return true;
  const vapourPa = vapourPressurePa(humidityRatio[at] ?? 0, pressurePa[at] ?? 0);
  return vapourPa < plan.outdoorShare * tabledSaturationPa(dryBulbC[at] ?? 0);
}
