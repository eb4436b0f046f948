/** One hour of a weather year under a brief: what is asked, what the plant gives, its class and why, by the engine's functions. */
import { type AirPoint, type ProcessLine, processLines } from '../../charts/process-lines.ts';
import type { Brief } from '../../engine/brief/brief.ts';
import type { DemandHour } from '../../engine/hour-classes/demand-hour.ts';
import type { HourClass } from '../../engine/hour-classes/hour-class.ts';
import { designDryBulbC, loadFractionAt, loadLine } from '../../engine/hour-classes/load-fraction.ts';
import { setPoints } from '../../engine/hour-classes/set-points.ts';
import { volumeM3PerKg } from '../../engine/psychrometrics/moist-air.ts';
import type { WeatherYear } from '../../engine/reduction/weather-year.ts';
import { type HourRow, hoursTable } from '../../engine/run/hours-table.ts';
import type { RecordYear } from './record-year.ts';

export interface PlaceOfYear {
  readonly zone: string;
  readonly heightM: number;
  readonly position: { readonly latitude: number; readonly longitude: number };
}

/** A year judged by a brief, asked hour by hour. */
export interface BriefYear {
  readonly brief: Brief;
  /** Null while the station, and with it clock and height, is not settled. */
  readonly rows: readonly HourRow[] | null;
  readonly setC: Float64Array;
  readonly year: WeatherYear;
}

export function briefYear(input: {
  brief: Brief;
  columns: RecordYear;
  year: WeatherYear;
  place: PlaceOfYear | null;
}): BriefYear {
  const { brief, columns, year, place } = input;
  const { dryBulbC } = columns;
  const { setC } = setPoints({ brief, dryBulbC, wrapped: year.kind !== 'actual', heightM: place?.heightM ?? 0 });
  const rows = place === null ? null : hoursTable({ year, brief, ...place }).rows;
  return { brief, rows, setC, year };
}

export interface BriefHour {
  readonly hourClass: HourClass | null;
  /** Why, in the engine's own sentence. */
  readonly reason: string | null;
  readonly lines: readonly ProcessLine[];
  readonly outdoor: AirPoint;
  /** null under a limit that sets no temperature. */
  readonly setC: number | null;
  readonly supplyAimC: number | null;
  readonly room: AirPoint | null;
}

/** Null where the weather of the hour is not known. */
export function briefHour(judged: BriefYear, columns: RecordYear, slot: number): BriefHour | null {
  const { brief, rows } = judged;
  const hour = demandHourAt(judged, columns, slot);
  if (hour === null) return null;
  const row = rows?.[slot] ?? null;
  const outdoor = { tempC: hour.outdoor.dryBulbC, humidityRatio: hour.outdoor.humidityRatio };
  return {
    hourClass: row?.hourClass ?? null,
    reason: row?.reason ?? null,
    lines: processLines(hour, brief),
    outdoor,
    setC: Number.isNaN(hour.setC) ? null : hour.setC,
    supplyAimC: Number.isNaN(hour.supplyAimC) ? null : hour.supplyAimC,
    room: roomOf(row, brief),
  };
}

function demandHourAt(judged: BriefYear, columns: RecordYear, slot: number): DemandHour | null {
  const { brief, year } = judged;
  const dryBulbC = columns.dryBulbC[slot] ?? Number.NaN;
  const humidityRatio = columns.humidityRatio[slot] ?? Number.NaN;
  const pressurePa = columns.pressurePa[slot] ?? Number.NaN;
  if (Number.isNaN(dryBulbC + humidityRatio + pressurePa)) return null;
  const line = loadLine(brief, () => designDryBulbC(year.packed));
  const loadFraction = line === null ? 1 : loadFractionAt(line, dryBulbC);
  const setC = judged.setC[slot] ?? Number.NaN;
  return {
    outdoor: { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg: volumeM3PerKg(dryBulbC, humidityRatio, pressurePa) },
    setC,
    supplyAimC: setC - brief.dTroomK * loadFraction,
    loadFraction,
  };
}

/** The room with what is supplied and no back-up. */
function roomOf(row: HourRow | null, { dwRoomKgKg }: Brief): AirPoint | null {
  if (!row || row.roomC === null || row.supplyHumidityRatio === null) return null;
  return { tempC: row.roomC, humidityRatio: row.supplyHumidityRatio + dwRoomKgKg };
}
