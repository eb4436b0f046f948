import { stationPressurePa } from '../../psychrometrics/pressure.ts';
import { RowCollector } from '../assembly/row-collector.ts';
import type { SourceRows } from '../assembly/source-rows.ts';
import { nearestHour, slotEndingAt } from '../time/slot-time.ts';
import type { ReportColumns } from './report-columns.ts';

export interface PlaceOfReports {
  /** Minutes that local standard time is ahead of UTC. */
  readonly offsetMin: number;
  /** null where it is not known; pressure at sea level is then of no use. */
  readonly elevationM: number | null;
}

export interface HourlyRows {
  readonly rows: SourceRows;
  /** Hours whose station pressure follows from the pressure at sea level. */
  readonly fromSeaLevel: number;
}

/**
 * One row for each full hour of local standard time that has a report with a temperature within half an hour: the nearest; of
 * equally near ones the routine report before a special, then the better quality code, then the later.
 */
export function hourlyRows(reports: ReportColumns, place: PlaceOfReports): HourlyRows {
  const chosen = nearestReports(reports, place.offsetMin);
  const hours = Float64Array.from(chosen.keys()).sort();
  return rowsOf(reports, place, {
    count: hours.length,
    report: (index) => chosen.get(hours[index] ?? 0) ?? 0,
    hour: (index) => hours[index] ?? 0,
  });
}

/** One row for each report, in the order of the file: those of a source that gives one report an hour, on the hour. */
export function rowsAsTheyStand(reports: ReportColumns, place: PlaceOfReports): HourlyRows {
  return rowsOf(reports, place, {
    count: reports.count,
    report: (index) => index,
    hour: (index) => nearestHour((reports.minutes[index] ?? 0) + place.offsetMin),
  });
}

/** Station pressure is the reported one, else that of sea level reduced to the elevation, else missing. */
function rowsOf(
  reports: ReportColumns,
  place: PlaceOfReports,
  chosen: {
    readonly count: number;
    readonly report: (index: number) => number;
    /** Hours since 1970 in local standard time. */
    readonly hour: (index: number) => number;
  },
): HourlyRows {
  const rows = new RowCollector(chosen.count);
  let fromSeaLevel = 0;
  for (let index = 0; index < chosen.count; index++) {
    const report = chosen.report(index);
    const reported = reports.pressurePa[report] ?? Number.NaN;
    const reduced = Number.isNaN(reported) ? reducedPressurePa(reports, report, place.elevationM) : Number.NaN;
    if (!Number.isNaN(reduced)) fromSeaLevel++;
    const { day, hour, month, year } = slotEndingAt(chosen.hour(index) * 60);
    rows.add({
      line: reports.lines[report] ?? 0,
      ...{ year, month, day, hour, minute: 0 },
      dryBulbC: reports.dryBulbC[report] ?? Number.NaN,
      dewPointC: reports.dewPointC[report] ?? Number.NaN,
      relativeHumidityPct: Number.NaN,
      pressurePa: Number.isNaN(reported) ? reduced : reported,
      estimated: 0,
    });
  }
  return { rows: rows.finish(), fromSeaLevel };
}

/** The report of each full hour, by hours since 1970 in local standard time. */
function nearestReports(reports: ReportColumns, offsetMin: number): Map<number, number> {
  const chosen = new Map<number, number>();
  for (let report = 0; report < reports.count; report++) {
    if (Number.isNaN(reports.dryBulbC[report])) continue;
    const hour = nearestHour((reports.minutes[report] ?? 0) + offsetMin);
    const rival = chosen.get(hour);
    if (rival === undefined || isBetter(reports, { report, rival, full: hour * 60 - offsetMin })) {
      chosen.set(hour, report);
    }
  }
  return chosen;
}

function isBetter(reports: ReportColumns, between: { report: number; rival: number; full: number }): boolean {
  const { full, report, rival } = between;
  const minutes = reports.minutes[report] ?? 0;
  const rivalMinutes = reports.minutes[rival] ?? 0;
  const nearer = Math.abs(rivalMinutes - full) - Math.abs(minutes - full);
  if (nearer !== 0) return nearer > 0;
  const ranks = (reports.ranks[rival] ?? 0) - (reports.ranks[report] ?? 0);
  return ranks === 0 ? minutes >= rivalMinutes : ranks > 0;
}

function reducedPressurePa(reports: ReportColumns, report: number, elevationM: number | null): number {
  const seaLevelPressurePa = reports.seaLevelPressurePa[report] ?? Number.NaN;
  if (elevationM === null) return Number.NaN;
  return stationPressurePa({ seaLevelPressurePa, dryBulbC: reports.dryBulbC[report] ?? Number.NaN, elevationM });
}
