/**
 * Supplies that outdoor air and the stages can give in one hour, by place, with the index of the room that each makes. Their index is
 * first taken from tabulated saturation pressure, which is good to 0.0001 points; wherever that does not decide (close to a limit or a
 * cap, or between two lowest), the formula itself is asked, so that every answer is that of `judgeIndexHour`.
 */
import { hundredths } from '../../conventions.ts';
import { indexOf, shadeHeatFigure, temperatureHumidityIndex } from '../../hour-classes/index-limit.ts';
import { dewPointC, relativeHumidityPct, vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledSaturationPa } from '../../psychrometrics/saturation-table.ts';
import { block } from '../hour-block.ts';
import type { IndexPlan } from './index-plan.ts';

/** Ten times what the table can be off, hundredths of an index point or of a percent of relative humidity. */
const UNDECIDED_HUNDREDTHS = 0.1;
/** Two such in whole points: of two states further apart the lower one is known. */
const UNDECIDED_POINTS = (2 * UNDECIDED_HUNDREDTHS) / 100;
/** Above any supply; a dew point is never answered above the dry bulb that is given. */
const HOTTER_THAN_ANY_SUPPLY_C = 150;
/** Air, and four stages in steps of a twentieth of full wetting. */
const MOST_STATES = 1 + 4 * 21;

const numbers = () => new Float64Array(MOST_STATES);
const made = {
  tempC: numbers(),
  humidityRatio: numbers(),
  index: numbers(),
  /** 1 where the index is the formula's own; else the table's. */
  exact: new Uint8Array(MOST_STATES),
  /** 1 where the caps hold. */
  withinCaps: new Uint8Array(MOST_STATES),
};
export const indexStates = made;

/** Constants of this module: see `hour-block.ts`. */
const { tempC: temps, humidityRatio: ratios, index, exact, withinCaps } = made;
const { pressurePa: pressures, loadFraction } = block;

/** Finds the index and the caps of the state at a place, whose temperature and moisture are there, in the hour `at`. */
export function assess(plan: IndexPlan, at: number, place: number): void {
  const pressurePa = pressures[at] ?? 0;
  const supplyC = temps[place] ?? 0;
  const ratio = ratios[place] ?? 0;
  const roomC = supplyC + plan.dTroomK * (loadFraction[at] ?? 0);
  const roomRatio = ratio + plan.dwRoomKgKg;
  const roomPct = 100 * (vapourPressurePa(roomRatio, pressurePa) / tabledSaturationPa(roomC));
  if (plan.isShadeHeat) index[place] = shadeHeatFigure(roomC, roomRatio, pressurePa);
  else index[place] = temperatureHumidityIndex(roomC, roomPct);
  exact[place] = plan.isShadeHeat ? 1 : 0;
  const over = 100 * roomPct - plan.roomRhEdge;
  const keeps = Math.abs(over) > UNDECIDED_HUNDREDTHS ? over < 0 : roomKeepsCap(plan, at, place);
  withinCaps[place] = keeps && (!plan.capsSupply || supplyKeepsCaps(plan, at, place)) ? 1 : 0;
}

/** By the formula itself. */
function roomKeepsCap(plan: IndexPlan, at: number, place: number): boolean {
  const roomC = (temps[place] ?? 0) + plan.dTroomK * (loadFraction[at] ?? 0);
  const pct = relativeHumidityPct(roomC, (ratios[place] ?? 0) + plan.dwRoomKgKg, pressures[at] ?? 0);
  return hundredths(pct) < plan.roomRhEdge;
}

function supplyKeepsCaps(plan: IndexPlan, at: number, place: number): boolean {
  const pressurePa = pressures[at] ?? 0;
  const tempC = temps[place] ?? 0;
  const ratio = ratios[place] ?? 0;
  const over = 100 * (100 * (vapourPressurePa(ratio, pressurePa) / tabledSaturationPa(tempC))) - plan.supplyRhEdge;
  const keeps =
    Math.abs(over) > UNDECIDED_HUNDREDTHS
      ? over < 0
      : hundredths(relativeHumidityPct(tempC, ratio, pressurePa)) < plan.supplyRhEdge;
  if (!keeps || plan.dewPointHundredths === Number.POSITIVE_INFINITY) return keeps;
  return hundredths(dewPointC(HOTTER_THAN_ANY_SUPPLY_C, ratio, pressurePa)) <= plan.dewPointHundredths;
}

/** Whether the index of the state at a place is at most the limit. */
export function reachesLimit(plan: IndexPlan, at: number, place: number): boolean {
  const over = 100 * (index[place] ?? 0) - (plan.limitHundredths + 0.5);
  if (Math.abs(over) > UNDECIDED_HUNDREDTHS) return over < 0;
  findIndex(plan, at, place);
  return hundredths(index[place] ?? 0) <= plan.limitHundredths;
}

/** Puts the index of the state at a place by the formula itself. */
export function findIndex(plan: IndexPlan, at: number, place: number): void {
  if (exact[place] === 1) return;
  const tempC = (temps[place] ?? 0) + plan.dTroomK * (loadFraction[at] ?? 0);
  const humidityRatio = (ratios[place] ?? 0) + plan.dwRoomKgKg;
  index[place] = indexOf(plan.limit, { tempC, humidityRatio, pressurePa: pressures[at] ?? 0 });
  exact[place] = 1;
}

/** Whether so many states all keep the caps. */
export function allKeepCaps(count: number): boolean {
  for (let place = 0; place < count; place++) if (withinCaps[place] === 0) return false;
  return true;
}

/**
 * The first place, of so many, with the lowest index, its index found by the formula; -1 where there is none.
 * @param within whether it is to keep the caps
 */
export function lowestPlace(plan: IndexPlan, at: number, count: number, within: boolean): number {
  let least = Number.POSITIVE_INFINITY;
  for (let place = 0; place < count; place++) {
    if (within && withinCaps[place] === 0) continue;
    least = Math.min(least, index[place] ?? 0);
  }
  let lowest = -1;
  for (let place = 0; place < count; place++) {
    if ((within && withinCaps[place] === 0) || (index[place] ?? 0) > least + UNDECIDED_POINTS) continue;
    findIndex(plan, at, place);
    if (lowest < 0 || (index[place] ?? 0) < (index[lowest] ?? 0)) lowest = place;
  }
  return lowest;
}
