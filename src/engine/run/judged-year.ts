import type { Brief } from '../brief/brief.ts';
import { clockOfBrief } from '../clock/clock-of-brief.ts';
import type { Position } from '../clock/daylight.ts';
import { type OpenSchedule, openSchedule } from '../clock/open-schedule.ts';
import type { ResolvedClock } from '../clock/resolved-clock.ts';
import { hundredths } from '../conventions.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import { meetDemandHours } from './demand-hours.ts';
import { findUse, type Use } from './find-use.ts';
import { type HourColumns, hourColumns } from './hour-columns.ts';
import { demandAt, hourAt, type JudgedHour, writeHour } from './judged-hour.ts';
import { missingSlots } from './missing-slots.ts';
import { sortSlots } from './sort-slots.ts';

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

/** How hours are judged, where the caller has reason to say. */
export interface JudgingWays {
  /** Columns to write into, with room for a year: they belong to the next one as soon as that is judged. */
  readonly into?: HourColumns;
  /** Judge hour by hour as objects even where a whole year can be judged in one pass; the classes are the same. */
  readonly oneByOne?: boolean;
}

/** The class of every slot, first match wins: closed, missing, idle, then what the brief's use says (method 5). */
export function judgeHours(input: JudgeYearInput, ways: JudgingWays = {}): JudgedYear {
  const { year, brief, zone, position = null } = input;
  const { packed } = year;
  const clock = input.clock ?? clockOfBrief({ year, brief, zone, position });
  const schedule = openSchedule(brief, clock);
  const use = findUse(brief);
  const idleUpToC = use.idleUpToC(brief);
  const hours = ways.into ?? hourColumns(packed.dryBulb.length);
  const idleHundredths = idleUpToC === null ? Number.NEGATIVE_INFINITY : hundredths(idleUpToC);
  const classCodes = sortSlots(packed, schedule, idleHundredths, hours);
  const outsideRange = meetDemandHours(input, hours);
  if (use.judgeHours === null || ways.oneByOne === true) judgeOneByOne(brief, use, hours);
  else use.judgeHours(brief, packed, hours);
  for (let at = 0; at < hours.count; at++) classCodes[hours.slot[at] ?? 0] = hours.classCode[at] ?? 0;
  let asObjects: readonly JudgedHour[] | null = null;
  return {
    ...{ slots: classCodes.length, clock, schedule, use, classCodes, outsideRange, hours },
    missing: missingSlots(packed),
    get demandHours() {
      asObjects ??= Array.from({ length: hours.count }, (_none, at) => hourAt(hours, at));
      return asObjects;
    },
  };
}

/** Judges every hour as an object, for uses that have no quicker way. */
function judgeOneByOne(brief: Brief, use: Use, hours: HourColumns): void {
  for (let at = 0; at < hours.count; at++) {
    const hour = demandAt(hours, at);
    const judgement = use.judgeHour(hour, brief);
    writeHour(hours, at, { slot: hours.slot[at] ?? 0, hour, judgement, plant: use.plantHour(hour, judgement, brief) });
  }
}
