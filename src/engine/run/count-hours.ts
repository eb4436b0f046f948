/**
 * What a year is counted by: the demand hours are added a block at a time, as they are judged, so that no figure of a single hour
 * outlives its block. Sums run in slot order, hour by hour, so that they do not depend on where a block ends.
 */
import { hundredths, SLOTS_PER_LEAP_YEAR } from '../conventions.ts';
import { hourClasses } from '../hour-classes/hour-class.ts';
import { block } from './hour-block.ts';
import { MONTH_HOUR_CELLS } from './hour-cells.ts';
import { dampReasons, type HourColumns, runningStages } from './hour-columns.ts';

/** Supply bins of the first look, °C: colder and warmer supplies than these are listed apart. */
export const COLDEST_BIN_C = -64;
const BINS = 192;

/** Where growth of legionella is commonly taken to begin, °C (checks of the trade: 20 to 45 °C, from memory). */
const WARM_WATER_C = 20;
const WARM_EDGE = hundredths(WARM_WATER_C) - 0.5;

/** The unmet demand hours of a year, in slot order. */
export type UnmetHours = Pick<HourColumns, 'count' | 'slot' | 'met' | 'setC' | 'shortfallK' | 'uncappedShortfallK'>;

/** Counts of a year so far. */
export interface HourCounts {
  /** How many have the same class, reason and marks, by position in `hourClasses`, in `dampReasons` and by the bits of `aloneMet`. */
  readonly byClass: Uint16Array;
  readonly byReason: Uint16Array;
  readonly byMarks: Uint16Array;
  /** Unmet hours by month and hour of day: see `hour-cells.ts`. */
  readonly unmetCells: Uint16Array;
  /** By whole °C of the supply, the coldest bin first; and supplies that no weather gives. */
  readonly supplyBins: Uint16Array;
  readonly strangeSuppliesC: number[];
  /** Hours with recirculated water, and of them those at 20 °C or more: input to the water safety plan, no verdict (method 6). */
  recirculated: number;
  warm: number;
  readonly unmet: UnmetHours;
}

const unmetHours = {
  count: 0,
  slot: new Uint16Array(SLOTS_PER_LEAP_YEAR),
  met: new Uint8Array(SLOTS_PER_LEAP_YEAR),
  setC: new Float64Array(SLOTS_PER_LEAP_YEAR),
  shortfallK: new Float64Array(SLOTS_PER_LEAP_YEAR),
  uncappedShortfallK: new Float64Array(SLOTS_PER_LEAP_YEAR),
};

const {
  slot: unmetSlot,
  setC: unmetSetC,
  shortfallK: unmetShortfallK,
  uncappedShortfallK: unmetUncappedK,
} = unmetHours;

const now: HourCounts = {
  byClass: new Uint16Array(hourClasses.length),
  byReason: new Uint16Array(dampReasons.length),
  byMarks: new Uint16Array(1 << runningStages.length),
  unmetCells: new Uint16Array(MONTH_HOUR_CELLS),
  supplyBins: new Uint16Array(BINS),
  strangeSuppliesC: [],
  recirculated: 0,
  warm: 0,
  unmet: unmetHours,
};

/** Marks and class of an hour as one number, so that an hour is counted once for both. */
const CLASS_BITS = 4;
const byMarksAndClass = new Uint16Array(1 << (runningStages.length + CLASS_BITS));

/** Begins a year. */
export function noHours(): void {
  const { byClass, byReason, byMarks, unmetCells, supplyBins } = now;
  for (const counts of [byClass, byReason, byMarks, unmetCells, supplyBins, byMarksAndClass]) counts.fill(0);
  now.strangeSuppliesC.length = 0;
  now.recirculated = 0;
  now.warm = 0;
  unmetHours.count = 0;
}

/** Ends a year. @returns its counts, which belong to the next year as soon as that begins */
export function countedHours(): HourCounts {
  for (let both = 0; both < byMarksAndClass.length; both++) {
    const hours = byMarksAndClass[both] ?? 0;
    if (hours === 0) continue;
    const code = both & ((1 << CLASS_BITS) - 1);
    byClass[code] = (byClass[code] ?? 0) + hours;
    byMarks[both >> CLASS_BITS] = (byMarks[both >> CLASS_BITS] ?? 0) + hours;
  }
  return now;
}

/** Constants of this module: see `hour-block.ts`. */
const { slot, classCode, met, damp, aloneMet, supplyC, waterC, setC, shortfallK, uncappedShortfallK } = block;
const { byClass, byReason, byMarks, unmetCells, supplyBins } = now;

/**
 * Adds the hours of `block`.
 * @param cellOf the cell of every slot of the year
 */
export function addHours(cellOf: Uint16Array): void {
  const { count } = block;
  let recirculated = 0;
  let warm = 0;
  for (let at = 0; at < count; at++) {
    const both = ((aloneMet[at] ?? 0) << CLASS_BITS) | (classCode[at] ?? 0);
    byMarksAndClass[both] = (byMarksAndClass[both] ?? 0) + 1;
    const bin = (Math.floor(supplyC[at] ?? 0) - COLDEST_BIN_C) | 0;
    // What is no number, or too large for a whole one, ends in bin 0.
    if (bin > 0 && bin < BINS) supplyBins[bin] = (supplyBins[bin] ?? 0) + 1;
    else now.strangeSuppliesC.push(supplyC[at] ?? 0);
    const water = waterC[at] ?? 0;
    if (Number.isNaN(water)) continue;
    recirculated++;
    if (100 * water >= WARM_EDGE) warm++;
  }
  now.recirculated += recirculated;
  now.warm += warm;
  addUnmet(cellOf);
}

function addUnmet(cellOf: Uint16Array): void {
  const { count } = block;
  let { count: place } = unmetHours;
  for (let at = 0; at < count; at++) {
    if (met[at] === 1) continue;
    const reason = damp[at] ?? 0;
    byReason[reason] = (byReason[reason] ?? 0) + 1;
    const cell = cellOf[slot[at] ?? 0] ?? 0;
    unmetCells[cell] = (unmetCells[cell] ?? 0) + 1;
    unmetSlot[place] = slot[at] ?? 0;
    unmetSetC[place] = setC[at] ?? 0;
    unmetShortfallK[place] = shortfallK[at] ?? 0;
    unmetUncappedK[place] = uncappedShortfallK[at] ?? 0;
    place++;
  }
  unmetHours.count = place;
}
