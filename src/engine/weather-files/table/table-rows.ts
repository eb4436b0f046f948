/** From the records of one station to rows on the slots of local standard time. */
import { relativeHumidityOfWetBulbPct } from '../../psychrometrics/humidity-of-wet-bulb.ts';
import { standardPressurePa, stationPressureOfAltimeterPa, stationPressurePa } from '../../psychrometrics/pressure.ts';
import { RowCollector } from '../assembly/row-collector.ts';
import type { SourceRows } from '../assembly/source-rows.ts';
import { type CivilTime, civilMinutes, civilTime } from '../time/civil-minutes.ts';
import { nearestHour, slotEndingAt } from '../time/slot-time.ts';
import { clockTimeReader } from './clock-time.ts';
import type { TableMapping } from './table-mapping.ts';
import type { TableRecords } from './table-records.ts';

const MINUTES_PER_HOUR = 60;
/** Calendars on which the dates of a typical year are laid, without and with 29 February. */
const COMMON_YEAR = 2001;
const LEAP_YEAR = 2004;

export interface PlaceOfTable {
  readonly offsetMin: number;
  readonly elevationM: number | null;
}

/**
 * Rows in the order of the file. Several an hour keep their minutes; of one an hour the reading nearest to the full hour counts.
 * @param table.stepMin minutes between rows
 */
export function tableRows(
  records: TableRecords,
  table: { readonly mapping: TableMapping; readonly stepMin: number; readonly place: PlaceOfTable },
): { readonly rows: SourceRows; readonly stepsPerHour: number; readonly converted: number } {
  const { mapping, place, stepMin } = table;
  const stepsPerHour = stepMin < MINUTES_PER_HOUR ? Math.round(MINUTES_PER_HOUR / stepMin) : 1;
  const minutes = standardMinutes(records.minutes, table);
  const taken = stepsPerHour === 1 ? nearestOfEachHour(minutes) : null;
  const years = typicalYears(records, mapping);
  const rows = new RowCollector(minutes.length);
  let converted = 0;
  for (let record = 0; record < minutes.length; record++) {
    const at = minutes[record] ?? 0;
    if (taken !== null && taken[record] === 0) continue;
    const slot = slotEndingAt(stepsPerHour === 1 ? nearestHour(at) * MINUTES_PER_HOUR : at);
    const dryBulbC = records.dryBulbC[record] ?? Number.NaN;
    const pressurePa = atStation(records.pressurePa[record] ?? Number.NaN, { dryBulbC, mapping, place });
    if (mapping.pressure !== null && mapping.pressure.level !== 'station' && !Number.isNaN(pressurePa)) converted++;
    rows.add({
      line: records.lines[record] ?? 0,
      ...slot,
      year: years?.[record] ?? slot.year,
      minute: stepsPerHour === 1 ? 0 : slot.minute,
      dryBulbC,
      dewPointC: records.dewPointC[record] ?? Number.NaN,
      relativeHumidityPct:
        mapping.wetBulb !== null && isAlone(mapping)
          ? humidityOfWetBulbPct({ dryBulbC, wetBulbC: records.wetBulbC[record] ?? Number.NaN, pressurePa, place })
          : (records.relativeHumidityPct[record] ?? Number.NaN),
      pressurePa,
      estimated: 0,
    });
  }
  return { rows: rows.finish(), stepsPerHour, converted };
}

/** Whether the wet bulb is the only humidity that is mapped. */
export function isAlone({ dewPoint, relativeHumidity, wetBulb }: TableMapping): boolean {
  return wetBulb !== null && dewPoint === null && relativeHumidity === null;
}

/** Minutes since 1970 in local standard time, at the end of what each row stands for. */
function standardMinutes(
  written: readonly number[],
  table: { readonly mapping: TableMapping; readonly stepMin: number; readonly place: PlaceOfTable },
): readonly number[] {
  const { mapping, place, stepMin } = table;
  const { mark, scale, zone } = mapping.time;
  const laterMin = mark === 'beginning' ? stepMin : 0;
  const laid = mapping.years === 'typical' ? onOneCalendar(written) : written;
  if (scale === 'standard') return laid.map((minutes) => minutes + laterMin);
  if (scale !== 'clock') return laid.map((minutes) => minutes + place.offsetMin + laterMin);
  const toUtc = clockTimeReader(zone ?? 'UTC');
  return laid.map((minutes) => toUtc(minutes) + place.offsetMin + laterMin);
}

/** Months of several years on one calendar, so that no change of clock meets a 29 February that the file does not have. */
function onOneCalendar(written: readonly number[]): readonly number[] {
  const times = written.map(civilTime);
  const year = times.some(({ day, month }) => month === 2 && day === 29) ? LEAP_YEAR : COMMON_YEAR;
  return times.map((time: CivilTime) => civilMinutes({ ...time, year }));
}

/** The years as written, for a typical year, whose calendar is another. */
function typicalYears(records: TableRecords, mapping: TableMapping): readonly number[] | null {
  return mapping.years === 'typical' ? records.minutes.map((minutes) => civilTime(minutes).year) : null;
}

/** 1 for the record of each full hour: the nearest in time. Equal times are all kept, so that they are told. */
function nearestOfEachHour(minutes: readonly number[]): Uint8Array {
  const taken = new Uint8Array(minutes.length);
  const chosen = new Map<number, number>();
  for (let record = 0; record < minutes.length; record++) {
    const at = minutes[record] ?? 0;
    const hour = nearestHour(at);
    const rival = chosen.get(hour);
    const rivalAt = minutes[rival ?? 0] ?? 0;
    if (rival !== undefined && rivalAt !== at) {
      const full = hour * MINUTES_PER_HOUR;
      if (Math.abs(at - full) >= Math.abs(rivalAt - full)) continue;
      taken[rival] = 0;
    }
    taken[record] = 1;
    chosen.set(hour, record);
  }
  return taken;
}

function atStation(
  pressurePa: number,
  at: { readonly dryBulbC: number; readonly mapping: TableMapping; readonly place: PlaceOfTable },
): number {
  const { elevationM } = at.place;
  const level = at.mapping.pressure?.level ?? 'station';
  if (level === 'station' || Number.isNaN(pressurePa)) return pressurePa;
  if (elevationM === null) return Number.NaN;
  if (level === 'altimeter') return stationPressureOfAltimeterPa(pressurePa, elevationM);
  return stationPressurePa({ seaLevelPressurePa: pressurePa, dryBulbC: at.dryBulbC, elevationM });
}

/** Relative humidity, % over water, of dry and wet bulb; in the standard atmosphere where the row has no pressure. */
function humidityOfWetBulbPct(at: {
  readonly dryBulbC: number;
  readonly wetBulbC: number;
  readonly pressurePa: number;
  readonly place: PlaceOfTable;
}): number {
  const { elevationM } = at.place;
  const standardPa = elevationM === null ? Number.NaN : standardPressurePa(elevationM);
  return relativeHumidityOfWetBulbPct(
    at.dryBulbC,
    at.wetBulbC,
    Number.isNaN(at.pressurePa) ? standardPa : at.pressurePa,
  );
}
