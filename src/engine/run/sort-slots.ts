import type { OpenSchedule } from '../clock/open-schedule.ts';
import { MISSING_INT16, SLOTS_PER_LEAP_YEAR } from '../conventions.ts';
import { hourClasses } from '../hour-classes/hour-class.ts';
import type { PackedYear } from '../reduction/weather-year.ts';
import { HOURS_PER_BLOCK } from './hour-columns.ts';
import { missingSlots } from './missing-slots.ts';

const MISSING = hourClasses.indexOf('missing');
const IDLE = hourClasses.indexOf('idle');

/** Slots without demand, by class. */
export interface WithoutDemand {
  readonly closed: number;
  readonly missing: number;
  readonly idle: number;
}

/** Under every packed temperature, and over none that is missing. */
const NO_SLOT_IDLE = MISSING_INT16;

/** The slots of a year under a schedule and a temperature. */
export interface SortedSlots {
  readonly withoutDemand: WithoutDemand;
  /** Those that have demand, in order. */
  readonly demandSlots: Uint16Array;
}

interface KeptSlots extends SortedSlots {
  readonly schedule: OpenSchedule;
  readonly idleHundredths: number;
}

/** What a year was last sorted into, kept beside it while it is in memory: few sliders move the schedule or what is idle. */
const kept = new WeakMap<PackedYear, KeptSlots>();

/**
 * `closed`, `missing`, `idle`, in this order; the slots that are left have demand and are listed. On the packed numbers, which are
 * whole hundredths of °C.
 * @param idleHundredths slots at or under this have no demand; null: every known one has
 * @returns what is read only; `slotCodes` holds one position in `hourClasses` for every slot, `idle` where there is demand
 */
export function sortSlots(year: PackedYear, schedule: OpenSchedule, idleHundredths: number | null): SortedSlots {
  codes.set(idleWhereOpen(schedule));
  const missing = markMissing(year, schedule);
  const idleUpTo = idleHundredths ?? NO_SLOT_IDLE;
  const found = kept.get(year);
  if (found?.schedule === schedule && found.idleHundredths === idleUpTo) return found;
  const demandSlots = listed.slice(0, listDemand(knownDryBulb(year), schedule.slots, idleUpTo));
  const open = schedule.slots.length;
  const idle = open - missing - demandSlots.length;
  const sorted = { withoutDemand: { closed: year.dryBulb.length - open, missing, idle }, demandSlots };
  kept.set(year, { ...sorted, schedule, idleHundredths: idleUpTo });
  return sorted;
}

/** @returns how many open slots are missing */
function markMissing(year: PackedYear, { open }: OpenSchedule): number {
  const slots = missingSlots(year);
  let missing = 0;
  for (let index = 0; index < slots.length; index++) {
    const slot = slots[index] ?? 0;
    if (open[slot] !== 1) continue;
    codes[slot] = MISSING;
    missing++;
  }
  return missing;
}

/** Of the year that is sorted. Constants of this module, exported under another name: see `hour-block.ts`. */
const codes = new Uint8Array(SLOTS_PER_LEAP_YEAR);
const listed = new Uint16Array(SLOTS_PER_LEAP_YEAR);
export const slotCodes = codes;

const idleColumns = new WeakMap<OpenSchedule, Uint8Array>();

/** `idle` for every open slot, `closed` for the others: what is known before the weather is looked at. */
function idleWhereOpen(schedule: OpenSchedule): Uint8Array {
  const made = idleColumns.get(schedule);
  if (made !== undefined) return made;
  const column = schedule.open.map((open) => open * IDLE);
  idleColumns.set(schedule, column);
  return column;
}

/** Lists the slots over a temperature. */
function listDemand(dryBulb: Int16Array, openSlots: Uint16Array, idleHundredths: number): number {
  let count = 0;
  for (let from = 0; from < openSlots.length; from += HOURS_PER_BLOCK) {
    count = listBlock(
      dryBulb,
      openSlots,
      idleHundredths,
      count,
      from,
      Math.min(from + HOURS_PER_BLOCK, openSlots.length),
    );
  }
  return count;
}

/** Without a branch, which no processor could foretell. */
function listBlock(
  dryBulb: Int16Array,
  openSlots: Uint16Array,
  idleHundredths: number,
  already: number,
  from: number,
  to: number,
): number {
  let count = already;
  for (let index = from; index < to; index++) {
    const slot = openSlots[index] ?? 0;
    const over = (idleHundredths - (dryBulb[slot] ?? 0)) >>> 31;
    listed[count] = slot;
    count += over;
  }
  return count;
}

const known = new WeakMap<PackedYear, Int16Array>();

/** Dry bulbs, of which those are missing too that the rest of the weather is missing with. */
function knownDryBulb(year: PackedYear): Int16Array {
  const found = known.get(year) ?? withoutPartlyKnown(year);
  known.set(year, found);
  return found;
}

function withoutPartlyKnown(year: PackedYear): Int16Array {
  const { dryBulb } = year;
  const slots = missingSlots(year);
  if (slots.every((slot) => dryBulb[slot] === MISSING_INT16)) return dryBulb;
  const copy = dryBulb.slice();
  for (const slot of slots) copy[slot] = MISSING_INT16;
  return copy;
}
