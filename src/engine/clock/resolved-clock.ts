/**
 * The clock that a run used, as numbers: which calendar the slots were laid on and how far civil time was ahead of UTC.
 * It is stored with the run and part of its key, so that a later change of a time zone's rules moves no stored result.
 */
import { HOURS_PER_DAY, SLOTS_PER_LEAP_YEAR, SLOTS_PER_YEAR } from '../conventions.ts';
import { isLeapYear } from '../reduction/calendar.ts';
import type { YearKind } from '../reduction/weather-year.ts';
import type { Position } from './daylight.ts';
import { zoneOffset } from './zone-offset.ts';

/** From this slot on (0 first), civil time is so many minutes ahead of UTC. */
export interface CivilOffset {
  readonly fromSlot: number;
  readonly offsetMin: number;
}

export interface ResolvedClock {
  /** Whether a schedule's hours are read in civil time or in the slots' own standard time. */
  readonly clock: 'civil' | 'standard';
  /** The calendar that gives dates and weekdays: an actual year's own, else 2029, or 2024 with 29 February. */
  readonly calendarYear: number;
  /** 8760 or 8784. */
  readonly slots: number;
  /** Minutes that the slots' standard time is ahead of UTC. */
  readonly utcOffsetMin: number;
  /** At least one, the first from slot 0. */
  readonly offsets: readonly CivilOffset[];
  /** The place whose daylight a schedule of daylight follows; left out by every other. */
  readonly daylightAt?: Position;
}

/** Both start on a Monday, so that places compare (method 3). */
const COMMON_YEAR = 2029;
const LEAP_YEAR = 2024;
const MS_PER_MIN = 60_000;
const MS_PER_HOUR = 3_600_000;
const MS_PER_DAY = 86_400_000;
/** Days of the year, 0 first, before 29 February. */
const FEBRUARY_29 = 59;

/**
 * Resolves a zone's rules over one weather year.
 * @param input.zone IANA name of the station's zone, such as `America/Phoenix`
 * @param input.year calendar year of an actual year, else null
 * @param input.slots 8760 or 8784
 * @throws RangeError on a zone that is not known or a number of slots that is no year
 */
export function resolveClock(input: {
  zone: string;
  kind: YearKind;
  year: number | null;
  slots: number;
  utcOffsetMin: number;
  clock: 'civil' | 'standard';
}): ResolvedClock {
  const { slots, utcOffsetMin, clock } = input;
  if (slots !== SLOTS_PER_YEAR && slots !== SLOTS_PER_LEAP_YEAR) {
    throw new RangeError(`a weather year has 8760 or 8784 slots, not ${slots}`);
  }
  const laidOn = slots === SLOTS_PER_LEAP_YEAR ? LEAP_YEAR : COMMON_YEAR;
  const calendarYear = input.kind === 'actual' ? (input.year ?? laidOn) : laidOn;
  const unresolved: ResolvedClock = { clock, calendarYear, slots, utcOffsetMin, offsets: [] };
  const offsets =
    clock === 'standard' ? [{ fromSlot: 0, offsetMin: utcOffsetMin }] : rememberedOffsets(unresolved, input.zone);
  return { ...unresolved, offsets };
}

/** A zone's rules are looked up day by day, which takes longer than judging the year: so once for each zone and calendar. */
const remembered = new Map<string, readonly CivilOffset[]>();
const MOST_REMEMBERED = 2000;

function rememberedOffsets(clock: ResolvedClock, zone: string): readonly CivilOffset[] {
  const key = `${zone} ${clock.calendarYear} ${clock.slots} ${clock.utcOffsetMin}`;
  const offsets = remembered.get(key) ?? civilOffsets(clock, zone);
  if (remembered.size >= MOST_REMEMBERED) remembered.clear();
  remembered.set(key, offsets);
  return offsets;
}

/** Midnight UTC, ms, that begins a day of the slots' calendar (0 first; one before or after the year is allowed). */
export function calendarDayMs(clock: ResolvedClock, day: number): number {
  const skips = clock.slots === SLOTS_PER_YEAR && isLeapYear(clock.calendarYear) && day >= FEBRUARY_29;
  return Date.UTC(clock.calendarYear, 0, 1) + (day + (skips ? 1 : 0)) * MS_PER_DAY;
}

/** Minutes that civil time is ahead of the slots' standard time, one value per slot. */
export function civilLeadMin(clock: ResolvedClock): Int16Array {
  const lead = new Int16Array(clock.slots);
  for (const { fromSlot, offsetMin } of clock.offsets) lead.fill(offsetMin - clock.utcOffsetMin, fromSlot);
  return lead;
}

/** A slot's offset is that of its middle: a change of clocks falls between slots, never inside the answer. */
function civilOffsets(clock: ResolvedClock, zone: string): CivilOffset[] {
  const offsetAt = zoneOffset(zone);
  const slotOffset = (slot: number): number => {
    const day = Math.floor(slot / HOURS_PER_DAY);
    const middleMs = calendarDayMs(clock, day) + ((slot % HOURS_PER_DAY) + 0.5) * MS_PER_HOUR;
    return offsetAt(middleMs - clock.utcOffsetMin * MS_PER_MIN);
  };
  const offsets: CivilOffset[] = [{ fromSlot: 0, offsetMin: slotOffset(0) }];
  let current = slotOffset(0);
  for (let slot = HOURS_PER_DAY; slot <= clock.slots; slot += HOURS_PER_DAY) {
    const next = slotOffset(Math.min(slot, clock.slots - 1));
    if (next === current) continue;
    let before = slot - HOURS_PER_DAY;
    let after = Math.min(slot, clock.slots - 1);
    while (after - before > 1) {
      const middle = (before + after) >> 1;
      if (slotOffset(middle) === current) before = middle;
      else after = middle;
    }
    offsets.push({ fromSlot: after, offsetMin: next });
    current = next;
  }
  return offsets;
}
