import type { Brief } from '../brief/brief.ts';
import { clockOfBrief } from '../clock/clock-of-brief.ts';
import type { Position } from '../clock/daylight.ts';
import { openSlots } from '../clock/open-slots.ts';
import type { ResolvedClock } from '../clock/resolved-clock.ts';
import { hundredths, SLOTS_PER_LEAP_YEAR } from '../conventions.ts';
import type { DemandHour } from '../hour-classes/demand-hour.ts';
import { hourClasses } from '../hour-classes/hour-class.ts';
import { loadFractionOf } from '../hour-classes/load-fraction.ts';
import { setPoints } from '../hour-classes/set-points.ts';
import { volumeM3PerKg } from '../psychrometrics/moist-air.ts';
import { unpackYear, type YearColumns, yearColumns } from '../reduction/packed-columns.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import { findUse, type Use } from './find-use.ts';
import { type HourColumns, hourColumns } from './hour-columns.ts';
import { addHour, hourAt, type JudgedHour } from './judged-hour.ts';
import { judgeRoomHours } from './room/judge-room-hours.ts';
import { roomJudgeOf } from './room/room-judge-of.ts';
import { wetBulbsOfYear } from './room/wet-bulbs-of-year.ts';

export type { JudgedHour } from './judged-hour.ts';

/** Every slot of a weather year under a brief; ledgers, tables and exports are counted from this. */
export interface JudgedYear {
  readonly slots: number;
  readonly clock: ResolvedClock;
  readonly use: Use;
  /** 1 where the slot's weather is known, in schedule or not. */
  readonly known: Uint8Array;
  /** One position in `hourClasses` for every slot. */
  readonly classCodes: Uint8Array;
  /** 1 where an adaptive limit was clamped to its range; null for other limits. */
  readonly outsideRange: Uint8Array | null;
  /** The demand hours, in slot order. */
  readonly hours: HourColumns;
  /** The same as objects, made when first asked for. */
  readonly demandHours: readonly JudgedHour[];
}

/** What a year is judged by. */
export interface JudgeYearInput {
  readonly year: WeatherYear;
  readonly brief: Brief;
  /** IANA name of the station's time zone. */
  readonly zone: string;
  /** The height used for the place, m. */
  readonly heightM: number;
  /** Where the place is; a schedule of daylight hours cannot do without. */
  readonly position?: Position | null;
  /** The clock as it was resolved before, which the zone's rules no longer move; else it is resolved here. */
  readonly clock?: ResolvedClock;
}

/** Columns with room for every slot of a year, used for one year after another. */
export interface JudgingWorkspace {
  readonly hours: HourColumns;
  readonly weather: YearColumns;
}

export function judgingWorkspace(): JudgingWorkspace {
  return { hours: hourColumns(SLOTS_PER_LEAP_YEAR), weather: yearColumns(SLOTS_PER_LEAP_YEAR) };
}

/** How hours are judged, where the caller has reason to say. */
export interface JudgingWays {
  /** Columns to write into: they belong to the next year as soon as it is judged. */
  readonly into?: JudgingWorkspace;
  /** The hours are only counted: leave out what `HourColumns.detail` names, where that is quicker. */
  readonly countedOnly?: boolean;
  /** Judge hour by hour as objects even where a whole year can be judged in one pass; the classes are the same. */
  readonly oneByOne?: boolean;
}

/** The class of every slot, first match wins: closed, missing, idle, then what the brief's use says (method 5). */
export function judgeHours(input: JudgeYearInput, ways: JudgingWays = {}): JudgedYear {
  const { year, brief, zone, heightM, position = null } = input;
  const weather = unpackYear(year.packed, ways.into?.weather);
  const slots = weather.dryBulbC.length;
  const clock = input.clock ?? clockOfBrief({ year, brief, zone, position });
  const use = findUse(brief);
  const wrapped = year.kind !== 'actual';
  const { setC, outsideRange } = setPoints({ brief, dryBulbC: weather.dryBulbC, wrapped, heightM });
  const { classCodes, known, demandSlots } = sortSlots(weather, openSlots(brief, clock), use.idleUpToC(brief));
  const hours = ways.into?.hours ?? hourColumns(demandSlots.length);
  hours.detail = ways.countedOnly !== true;
  const asked = { ...weather, demandSlots, setC, loadFraction: loadFractionOf(brief, weather.dryBulbC) };
  const roomJudge = ways.oneByOne === true ? null : roomJudgeOf(brief);
  if (roomJudge !== null) {
    const wetBulbs = wetBulbsOfYear({ packed: year.packed, weather }, brief.effIndirect);
    judgeRoomHours(roomJudge, { ...asked, ...wetBulbs }, hours);
  } else judgeOneByOne(asked, { brief, use }, hours);
  for (let at = 0; at < hours.count; at++) classCodes[hours.slot[at] ?? 0] = hours.classCode[at] ?? 0;
  let asObjects: readonly JudgedHour[] | null = null;
  return {
    ...{ slots, clock, use, known, classCodes, outsideRange, hours },
    get demandHours() {
      asObjects ??= Array.from({ length: hours.count }, (_none, at) => hourAt(hours, at));
      return asObjects;
    },
  };
}

/** Slots without demand have their class; the others are listed. */
interface SortedSlots {
  readonly classCodes: Uint8Array;
  readonly known: Uint8Array;
  readonly demandSlots: Uint16Array;
}

const CLOSED = hourClasses.indexOf('closed');
const MISSING = hourClasses.indexOf('missing');
const IDLE = hourClasses.indexOf('idle');

/** `closed`, `missing`, `idle`, in this order; what is left has demand. */
function sortSlots(weather: YearColumns, open: Uint8Array, idleUpToC: number | null): SortedSlots {
  const { dryBulbC, humidityRatio, pressurePa } = weather;
  const slots = dryBulbC.length;
  const classCodes = new Uint8Array(slots);
  const known = new Uint8Array(slots);
  const demandSlots = new Uint16Array(slots);
  const idleHundredths = idleUpToC === null ? Number.NEGATIVE_INFINITY : hundredths(idleUpToC);
  let count = 0;
  for (let slot = 0; slot < slots; slot++) {
    const tempC = dryBulbC[slot] ?? Number.NaN;
    const missing = Number.isNaN(tempC + (humidityRatio[slot] ?? Number.NaN) + (pressurePa[slot] ?? Number.NaN));
    known[slot] = missing ? 0 : 1;
    if (open[slot] !== 1) classCodes[slot] = CLOSED;
    else if (missing) classCodes[slot] = MISSING;
    else if (hundredths(tempC) <= idleHundredths) classCodes[slot] = IDLE;
    else demandSlots[count++] = slot;
  }
  return { classCodes, known, demandSlots: demandSlots.subarray(0, count) };
}

/** Weather and limit of every slot, and which slots have demand. */
interface AskedYear extends YearColumns {
  readonly demandSlots: Uint16Array;
  readonly setC: Float64Array;
  readonly loadFraction: (dryBulbC: number) => number;
}

/** Uses that are judged hour by hour, as objects. */
function judgeOneByOne(asked: AskedYear, { brief, use }: { brief: Brief; use: Use }, into: HourColumns): void {
  into.count = 0;
  for (const slot of asked.demandSlots) {
    const hour = demandHour(asked, brief, slot);
    const judgement = use.judgeHour(hour, brief);
    addHour(into, { slot, hour, judgement, plant: use.plantHour(hour, judgement, brief) });
  }
}

function demandHour(asked: AskedYear, brief: Brief, slot: number): DemandHour {
  const dryBulbC = asked.dryBulbC[slot] ?? Number.NaN;
  const humidityRatio = asked.humidityRatio[slot] ?? Number.NaN;
  const pressurePa = asked.pressurePa[slot] ?? Number.NaN;
  const setC = asked.setC[slot] ?? Number.NaN;
  const loadFraction = asked.loadFraction(dryBulbC);
  const volume = volumeM3PerKg(dryBulbC, humidityRatio, pressurePa);
  return {
    outdoor: { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg: volume },
    setC,
    supplyAimC: setC - brief.dTroomK * loadFraction,
    loadFraction,
  };
}
