import type { Brief } from '../brief/brief.ts';
import { clockOfBrief } from '../clock/clock-of-brief.ts';
import type { Position } from '../clock/daylight.ts';
import { type OpenSchedule, openSchedule } from '../clock/open-schedule.ts';
import type { ResolvedClock } from '../clock/resolved-clock.ts';
import { hundredths } from '../conventions.ts';
import { monthOfEachSlot } from '../reduction/calendar.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import { addPlant, noPlant } from '../water-energy/tally-plant.ts';
import { beginDemand, meetDemandHours, yearDemand } from './demand-hours.ts';
import { findUse, type JudgeBlock, type Use } from './find-use.ts';
import { block } from './hour-block.ts';
import { appendHours, HOURS_PER_BLOCK, type HourColumns, hourColumns } from './hour-columns.ts';
import { demandAt, hourAt, type JudgedHour, writeHour } from './judged-hour.ts';
import { missingSlots } from './missing-slots.ts';
import { slotCodes, sortSlots, type WithoutDemand } from './sort-slots.ts';

export type { JudgedHour } from './judged-hour.ts';

/** Every slot of a weather year under a brief; ledgers, tables and exports are counted from this. */
export interface JudgedYear {
  readonly slots: number;
  readonly clock: ResolvedClock;
  readonly use: Use;
  readonly schedule: OpenSchedule;
  /** Slots whose weather is not known, in schedule or not. */
  readonly missing: Uint16Array;
  /** One position in `hourClasses` for every slot. */
  readonly classCodes: Uint8Array;
  /** 1 for every day on which an adaptive limit was clamped to its range; null for other limits. */
  readonly outsideRangeOfDay: Uint8Array | null;
  /** How many slots have no demand, by class, and which have, in order. */
  readonly withoutDemand: WithoutDemand;
  readonly demandSlots: Uint16Array;
  /** The demand hours, in slot order; none where none are kept. */
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

/** How hours are judged, where the caller has reason to say. */
export interface JudgingWays {
  /** Whether the demand hours are kept; true unless said otherwise. */
  readonly keepsHours?: boolean;
  /** Takes the hours of every block, in slot order, whose columns belong to the next block at once. */
  readonly take?: (block: HourColumns) => void;
  /** Judge hour by hour as objects even where a whole year can be judged in one pass; the classes are the same. */
  readonly oneByOne?: boolean;
}

/**
 * The class of every slot, first match wins: closed, missing, idle, then what the brief's use says (method 5). `plantSums` are then those
 * of the year.
 */
export function judgeHours(input: JudgeYearInput, ways: JudgingWays = {}): JudgedYear {
  const { year, brief, zone, position = null } = input;
  const { packed } = year;
  const slots = packed.dryBulb.length;
  const clock = input.clock ?? clockOfBrief({ year, brief, zone, position });
  const schedule = openSchedule(brief, clock);
  const use = findUse(brief);
  const idleUpToC = use.idleUpToC(brief);
  const idleHundredths = idleUpToC === null ? null : hundredths(idleUpToC);
  const { demandSlots, withoutDemand } = sortSlots(packed, schedule, idleHundredths);
  const count = demandSlots.length;
  const keepsHours = ways.keepsHours ?? true;
  const hours = keepsHours ? hourColumns(slots) : NONE_KEPT;
  const demand = yearDemand(input);
  beginDemand(demand);
  const monthOf = monthOfEachSlot(slots);
  noPlant();
  const judge =
    ways.oneByOne === true ? judgeOneByOne(brief, use) : (use.judgeHours?.(brief, packed) ?? judgeOneByOne(brief, use));
  for (let from = 0; from < count; from += HOURS_PER_BLOCK) {
    block.count = Math.min(HOURS_PER_BLOCK, count - from);
    block.slot.set(demandSlots.subarray(from, from + block.count));
    meetDemandHours(demand);
    judge(monthOf, keepsHours);
    writeCodes();
    ways.take?.(block);
    if (keepsHours) appendHours(hours, block);
  }
  const classCodes = slotCodes.slice(0, slots);
  let asObjects: readonly JudgedHour[] | null = null;
  return {
    ...{
      slots,
      clock,
      schedule,
      use,
      classCodes,
      outsideRangeOfDay: demand.outsideRangeOfDay,
      withoutDemand,
      demandSlots,
      hours,
    },
    missing: missingSlots(packed),
    get demandHours() {
      asObjects ??= Array.from({ length: hours.count }, (_none, at) => hourAt(hours, at));
      return asObjects;
    },
  };
}

/** Constants of this module: see `hour-block.ts`. */
const { slot: slotOf, classCode } = block;
const codes = slotCodes;

/** Stands for columns where none are kept. */
const NONE_KEPT = hourColumns(0);

/** Judges every hour as an object, for uses that have no quicker way. */
function judgeOneByOne(brief: Brief, use: Use): JudgeBlock {
  return (monthOf) => {
    for (let at = 0; at < block.count; at++) {
      const hour = demandAt(block, at);
      const judgement = use.judgeHour(hour, brief);
      writeHour(block, at, {
        slot: slotOf[at] ?? 0,
        hour,
        judgement,
        plant: use.plantHour(hour, judgement, brief),
      });
    }
    addPlant(monthOf);
  };
}

function writeCodes(): void {
  const { count } = block;
  for (let at = 0; at < count; at++) codes[slotOf[at] ?? 0] = classCode[at] ?? 0;
}
