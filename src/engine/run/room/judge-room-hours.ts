/**
 * Method 5 and 6 for every demand hour of a year: rooms held at a temperature by a stream of outdoor air whose indirect stages
 * take outdoor air as secondary air. The same decisions as `judgeSupplyAirHour`, which judges one hour for any brief; a test holds
 * the two together. Comparisons on whole hundredths, a tie is met.
 *
 * One step after another over all hours, cheapest first, each over the hours that the last one left:
 *
 *   1. outdoor air     `meetByAir`      most hours end here, and no stage is looked at
 *   2. may water run?  `findWetHours`
 *   3. the stages      `meetByStage`, in the brief's order
 *   4. what is left    `findLowestSupplies` within the caps, then `judgeUnmet`: `damp`, `short` or `beyond`
 *   5. the plant       `roomPlant`
 *
 * Figures stand in columns by the place of the hour, and functions are told the place: an object or a boxed number for every hour
 * would cost as much as judging it.
 */
import { hundredths } from '../../conventions.ts';
import { withinShare } from '../../hour-classes/demand-hour.ts';
import { hourClasses } from '../../hour-classes/hour-class.ts';
import { gainsEnough } from '../../hour-classes/short-from.ts';
import { vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledSaturationPa } from '../../psychrometrics/saturation-table.ts';
import { dampReasons, fillWithAir, type HourColumns, inBlocks, runningStages } from '../hour-columns.ts';
import { findLowestSupplies, runLowest } from './lowest-supply.ts';
import { meetByStage, prepareStage } from './meet-by-stage.ts';
import { capsHold, ratioOfVapour, roomVapourPa, supplyVapourPa } from './room-caps.ts';
import { type RoomHours, roomHours } from './room-hours.ts';
import { type RoomPlan, UNDECIDED } from './room-plan.ts';
import { roomPlant } from './room-plant.ts';
import { type WetBulbs, wetBulbAt } from './wet-bulbs-of-year.ts';

const FROZEN = hourClasses.indexOf('frozen');
const CLASS_OF_AIR = hourClasses.indexOf('air');
const DAMP = hourClasses.indexOf('damp');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const AIR = runningStages.indexOf('air');
const OUTSIDE = dampReasons.indexOf('outside');
const PLANT = dampReasons.indexOf('plant');

const workspace = roomHours();

/**
 * Judges every demand hour of a year.
 * @param hours the demand hours as `meetDemandHours` leaves them; the rest is filled in
 * @param wetBulbs of the same year
 */
export function judgeRoomHours(plan: RoomPlan, hours: HourColumns, wetBulbs: WetBulbs): void {
  fillWithAir(hours, plan.riseKPerVolume[AIR] ?? 0);
  inBlocks(hours.count, (from, to) => judgeBlock(plan, hours, wetBulbs, from, to));
}

function judgeBlock(plan: RoomPlan, hours: HourColumns, wetBulbs: WetBulbs, from: number, to: number): void {
  const room = workspace;
  meetByAir(plan, hours, room, from, to);
  findWetHours(plan, hours, room, wetBulbs);
  for (const stage of plan.stages) {
    prepareStage(stage, plan, hours, room, wetBulbs);
    meetByStage(stage, plan, hours, room);
  }
  findUnmet(hours, room);
  findLowestSupplies(plan, hours, room);
  judgeUnmet(plan, hours, room);
  roomPlant(plan, hours, from, to);
}

/** `air`, and `frozen` hours that air meets; every other hour is listed, marked as `damp` where outdoor moisture itself breaks a cap. */
function meetByAir(plan: RoomPlan, hours: HourColumns, room: RoomHours, from: number, to: number): void {
  const freezeEdge = plan.freezeHundredths + 0.5;
  let capsOfSetC = Number.NaN;
  let capsOfAimC = Number.NaN;
  let roomPa = Number.NaN;
  let supplyPa = Number.NaN;
  let aimEdge = Number.NaN;
  const { unmetByAir } = room;
  unmetByAir.count = 0;
  for (let at = from; at < to; at++) {
    const setC = hours.setC[at] ?? 0;
    const aimC = hours.supplyAimC[at] ?? 0;
    if (setC !== capsOfSetC || aimC !== capsOfAimC) {
      capsOfSetC = setC;
      capsOfAimC = aimC;
      roomPa = roomVapourPa(plan, aimC + (setC - aimC));
      supplyPa = supplyVapourPa(plan, aimC);
      aimEdge = hundredths(aimC) + 0.5;
    }
    const pressurePa = hours.pressurePa[at] ?? 0;
    const inRoom = ratioOfVapour(roomPa, pressurePa) - plan.dwRoomKgKg;
    const underCaps = plan.capsSupply ? Math.min(inRoom, ratioOfVapour(supplyPa, pressurePa)) : inRoom;
    room.ratioUnderCaps[at] = underCaps;
    room.aimEdge[at] = aimEdge;
    const ratio = hours.humidityRatio[at] ?? 0;
    const airC = hours.airSupplyC[at] ?? 0;
    const frozen = 100 * (hours.dryBulbC[at] ?? 0) < freezeEdge;
    const dampOutside = !frozen && !(ratio < underCaps);
    if (100 * airC < aimEdge && !dampOutside && capsHold(plan, hours, room, at, airC, ratio)) {
      hours.classCode[at] = frozen ? FROZEN : CLASS_OF_AIR;
      hours.airMeets[at] = 1;
      hours.aloneMet[at] = plan.allAlone;
    } else {
      hours.classCode[at] = UNDECIDED;
      hours.airMeets[at] = 0;
      hours.aloneMet[at] = 0;
      if (dampOutside) hours.damp[at] = OUTSIDE;
      unmetByAir.places[unmetByAir.count++] = at;
    }
  }
}

/** Freeze lockout, cut-in, start temperature and the ceiling of outdoor humidity (method 4). */
function findWetHours(plan: RoomPlan, hours: HourColumns, room: RoomHours, wetBulbs: WetBulbs): void {
  const { places, count } = room.unmetByAir;
  const { wet } = room;
  wet.count = 0;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const tempHundredths = hundredths(hours.dryBulbC[at] ?? 0);
    const wetC = wetBulbAt(wetBulbs, hours, at);
    room.wetBulbC[at] = wetC;
    const mayWet =
      tempHundredths > plan.freezeHundredths &&
      tempHundredths - hundredths(wetC) >= plan.cutInHundredths &&
      warmEnoughToStart(plan, hours, at) &&
      dryEnoughOutdoors(plan, hours, at);
    room.mayWet[at] = mayWet ? 1 : 0;
    if (mayWet && hours.damp[at] !== OUTSIDE) wet.places[wet.count++] = at;
  }
}

function warmEnoughToStart(plan: RoomPlan, hours: HourColumns, at: number): boolean {
  if (plan.startHundredths === Number.NEGATIVE_INFINITY) return true;
  const roomByAirC = (hours.airSupplyC[at] ?? 0) + plan.dTroomK * (hours.loadFraction[at] ?? 0);
  return hundredths(roomByAirC) >= plan.startHundredths;
}

function dryEnoughOutdoors(plan: RoomPlan, hours: HourColumns, at: number): boolean {
  if (plan.outdoorShare === Number.POSITIVE_INFINITY) return true;
  const vapourPa = vapourPressurePa(hours.humidityRatio[at] ?? 0, hours.pressurePa[at] ?? 0);
  return vapourPa < plan.outdoorShare * tabledSaturationPa(hours.dryBulbC[at] ?? 0);
}

function findUnmet(hours: HourColumns, room: RoomHours): void {
  const { places, count } = room.unmetByAir;
  const { unmet } = room;
  unmet.count = 0;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    if (hours.classCode[at] === UNDECIDED) unmet.places[unmet.count++] = at;
  }
}

/** `damp`, `short` or `beyond` (or `frozen`), with the shortfall from T*, the lowest supply within the caps. */
function judgeUnmet(plan: RoomPlan, hours: HourColumns, room: RoomHours): void {
  const { places, count } = room.unmet;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const airC = hours.airSupplyC[at] ?? 0;
    const aimC = hours.supplyAimC[at] ?? 0;
    const lowestC = room.lowestC[at] ?? 0;
    const uncappedC = room.uncappedC[at] ?? 0;
    const frozen = hundredths(hours.dryBulbC[at] ?? 0) <= plan.freezeHundredths;
    const dampOutside = hours.damp[at] === OUTSIDE;
    const enough = room.mayWet[at] === 1 && 100 * uncappedC < (room.aimEdge[at] ?? 0);
    const damp = !frozen && (dampOutside || enough);
    const short = !frozen && !damp && (room.lowestNth[at] ?? 0) >= 0 && gainsEnough(airC, lowestC);
    hours.classCode[at] = frozen ? FROZEN : damp ? DAMP : short ? SHORT : BEYOND;
    hours.met[at] = 0;
    if (damp && !dampOutside) hours.damp[at] = PLANT;
    hours.shortfallK[at] = Math.max(0, (lowestC === Number.POSITIVE_INFINITY ? airC : lowestC) - aimC);
    hours.uncappedShortfallK[at] = Math.max(0, uncappedC - aimC);
    if (short) runLowest(plan, hours, room, at);
    const setC = hours.setC[at] ?? 0;
    hours.carriedShare[at] = damp ? 0 : withinShare((setC - (hours.supplyC[at] ?? 0)) / (setC - aimC));
  }
}
