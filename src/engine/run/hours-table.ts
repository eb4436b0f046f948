/**
 * Every slot of a judged year as one row, so that anybody can check a class by hand: the weather, what the brief asked, what
 * the plant gave, and why. The classes are those of the run; nothing here is judged anew.
 */
import type { Brief } from '../brief/brief.ts';
import { calendarDayMs, civilLeadMin, type ResolvedClock, resolveClock } from '../clock/resolved-clock.ts';
import { HOURS_PER_DAY } from '../conventions.ts';
import { type HourClass, hourClasses } from '../hour-classes/hour-class.ts';
import { indexOf, isIndexLimit } from '../hour-classes/index-limit.ts';
import { relativeHumidityPct } from '../psychrometrics/moist-air.ts';
import { wetBulbColumn } from '../reduction/derived-columns.ts';
import { unpackYear, type YearColumns } from '../reduction/packed-columns.ts';
import { reasonOfDemand, reasonWithoutDemand } from './hour-reason.ts';
import { type JudgedHour, type JudgeYearInput, judgeHours } from './judged-year.ts';

/** One slot. Null: not known, or without meaning for such an hour. */
export interface HourRow {
  /** 0 first. */
  readonly slot: number;
  /** When the slot ends, ms since 1970 as if local time were UTC: in the slots' standard time, and in civil time. */
  readonly standardMs: number;
  readonly civilMs: number;
  readonly dryBulbC: number | null;
  readonly humidityRatio: number | null;
  /** Over ice below 0 °C. */
  readonly relativeHumidityPct: number | null;
  readonly pressurePa: number | null;
  readonly wetBulbC: number | null;
  readonly hourClass: HourClass;
  /** null where there is no demand. */
  readonly met: boolean | null;
  /** What runs; null also while a tower stands. */
  readonly stage: string | null;
  /** x, the share of full wetting, 0..1. */
  readonly share: number | null;
  /** phi, 0..1. */
  readonly loadFraction: number | null;
  /** t_s and w_s: of a tower the water; null where the supply is not outdoor air that has been treated. */
  readonly supplyC: number | null;
  readonly supplyHumidityRatio: number | null;
  /** The room with what is supplied and no back-up; null where no room is held. */
  readonly roomC: number | null;
  readonly roomRhPct: number | null;
  /** t_set, or an index in points. */
  readonly limit: number | null;
  /** The index of that room, points; null for limits of temperature. */
  readonly roomIndex: number | null;
  /** S: K, under an index limit points. */
  readonly shortfall: number | null;
  /** Make-up, L per kW of design load. */
  readonly waterLitres: number | null;
  /** Per kW of design load; null also where electricity is not applicable. */
  readonly kwh: number | null;
  readonly reason: string;
  /** Line of the file; null where no line of it holds the hour. */
  readonly line: number | null;
}

export interface HoursTable {
  readonly rows: readonly HourRow[];
  readonly clock: ResolvedClock;
  /** Unit of `limit`, `shortfall` in K or points following from it. */
  readonly limitUnit: '°C' | 'points';
}

const MS_PER_HOUR = 3_600_000;
const MS_PER_MIN = 60_000;

/**
 * @param input.lines line of the file that each slot came from, 0 where none did; without it the rows name no lines
 * @throws RangeError as `judgeHours`
 */
export function hoursTable(input: JudgeYearInput & { lines?: Uint32Array }): HoursTable {
  const { year, brief, lines } = input;
  const judged = judgeHours(input);
  const columns = unpackYear(year.packed);
  const wetBulbC = wetBulbColumn(year.packed);
  const civilLead = civilLeadOf(input, judged.clock);
  const idleUpToC = judged.use.idleUpToC(brief);
  const demand = new Map(judged.demandHours.map((each) => [each.slot, each]));
  const rows = Array.from({ length: judged.slots }, (_none, slot): HourRow => {
    const hourClass = hourClasses[judged.classCodes[slot] ?? 0] ?? 'closed';
    const standardMs = slotEndMs(judged.clock, slot);
    const line = lines?.[slot] ?? 0;
    const demandHour = demand.get(slot);
    return {
      slot,
      standardMs,
      civilMs: standardMs + (civilLead[slot] ?? 0) * MS_PER_MIN,
      ...weatherOf(columns, wetBulbC, slot),
      hourClass,
      ...(demandHour === undefined ? NO_DEMAND : judgedFigures(demandHour, brief)),
      reason: reasonAt({ demandHour, hourClass, columns, wetBulbC, slot, brief, idleUpToC }),
      line: line === 0 ? null : line,
    };
  });
  return { rows, clock: judged.clock, limitUnit: isIndexLimit(brief.limit) ? 'points' : '°C' };
}

const NO_DEMAND = {
  met: null,
  stage: null,
  share: null,
  loadFraction: null,
  supplyC: null,
  supplyHumidityRatio: null,
  roomC: null,
  roomRhPct: null,
  limit: null,
  roomIndex: null,
  shortfall: null,
  waterLitres: null,
  kwh: null,
} as const;

/** A schedule in standard time leaves civil time out of the run's clock, but a reader wants it. */
function civilLeadOf({ year, zone }: JudgeYearInput, clock: ResolvedClock): Int16Array {
  const { slots, utcOffsetMin } = clock;
  const civil = { zone, kind: year.kind, year: year.year, slots, utcOffsetMin, clock: 'civil' } as const;
  return civilLeadMin(clock.clock === 'civil' ? clock : resolveClock(civil));
}

function slotEndMs(clock: ResolvedClock, slot: number): number {
  const day = Math.floor(slot / HOURS_PER_DAY);
  return calendarDayMs(clock, day) + ((slot % HOURS_PER_DAY) + 1) * MS_PER_HOUR;
}

function weatherOf(columns: YearColumns, wetBulbC: Float64Array, slot: number) {
  const dryBulbC = columns.dryBulbC[slot] ?? Number.NaN;
  const humidityRatio = columns.humidityRatio[slot] ?? Number.NaN;
  const pressurePa = columns.pressurePa[slot] ?? Number.NaN;
  const known = !Number.isNaN(dryBulbC + humidityRatio + pressurePa);
  return {
    dryBulbC: orNull(dryBulbC),
    humidityRatio: orNull(humidityRatio),
    pressurePa: orNull(pressurePa),
    relativeHumidityPct: known ? relativeHumidityPct(dryBulbC, humidityRatio, pressurePa) : null,
    wetBulbC: orNull(wetBulbC[slot] ?? Number.NaN),
  };
}

function orNull(value: number): number | null {
  return Number.isNaN(value) ? null : value;
}

function judgedFigures({ hour, judgement, plant }: JudgedHour, brief: Brief) {
  const { supply } = judgement;
  return {
    met: judgement.met,
    stage: judgement.running,
    share: supply.share,
    loadFraction: hour.loadFraction,
    supplyC: supply.tempC,
    supplyHumidityRatio: supply.humidityRatio,
    ...roomOf({ hour, judgement }, brief),
    limit: isIndexLimit(brief.limit) ? brief.limit.value : hour.setC,
    shortfall: judgement.shortfallK,
    waterLitres: plant.makeUpLitres,
    kwh: plant.kwh,
  };
}

/** (t_e + dT_room phi, w_s + dw_room) with t_e = max(t_s, t_sup), under an index limit t_s (method 4 and 3.1). */
function roomOf({ hour, judgement }: Pick<JudgedHour, 'hour' | 'judgement'>, brief: Brief) {
  const { limit } = brief;
  const { tempC, humidityRatio } = judgement.supply;
  const held = limit.kind === 'fixed' || limit.kind === 'adaptive' || isIndexLimit(limit);
  if (!held || humidityRatio === null) return { roomC: null, roomRhPct: null, roomIndex: null };
  const enteringC = isIndexLimit(limit) ? tempC : Math.max(tempC, hour.supplyAimC);
  const { pressurePa } = hour.outdoor;
  const roomC = enteringC + brief.dTroomK * hour.loadFraction;
  const roomRatio = humidityRatio + brief.dwRoomKgKg;
  return {
    roomC,
    roomRhPct: relativeHumidityPct(roomC, roomRatio, pressurePa),
    roomIndex: isIndexLimit(limit) ? indexOf(limit, { tempC: roomC, humidityRatio: roomRatio, pressurePa }) : null,
  };
}

function reasonAt(at: {
  demandHour: JudgedHour | undefined;
  hourClass: HourClass;
  columns: YearColumns;
  wetBulbC: Float64Array;
  slot: number;
  brief: Brief;
  idleUpToC: number | null;
}): string {
  const { demandHour, hourClass, columns, slot, brief, idleUpToC } = at;
  const dryBulbC = columns.dryBulbC[slot] ?? Number.NaN;
  if (demandHour !== undefined) {
    const depressionK = dryBulbC - (at.wetBulbC[slot] ?? Number.NaN);
    return reasonOfDemand({ judged: demandHour, brief, depressionK });
  }
  const humidityRatio = columns.humidityRatio[slot] ?? Number.NaN;
  const pressurePa = columns.pressurePa[slot] ?? Number.NaN;
  const apart = hourClass === 'closed' || hourClass === 'missing' ? hourClass : 'idle';
  return reasonWithoutDemand(apart, { dryBulbC, humidityRatio, pressurePa, idleUpToC });
}
