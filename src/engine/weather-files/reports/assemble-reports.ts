import { assembleStationYears, type StationContents } from '../assembly/assemble-station-years.ts';
import type { FindingList } from '../finding-list.ts';
import { settlePlace } from '../place/settle-place.ts';
import type { ReadOptions } from '../read-options.ts';
import type { WeatherFileReading, WeatherFormat } from '../weather-file-reading.ts';
import { hourlyRows } from './hourly-rows.ts';
import type { ReportsByStation } from './station-reports.ts';
import { tellSeaLevelPressure } from './tell-sea-level.ts';

/** From the reports of a file in UTC, several an hour, to a weather year of each station and year. */
export function assembleReports(
  format: WeatherFormat,
  input: { readonly reports: ReportsByStation; readonly options: ReadOptions },
  findings: FindingList,
): readonly WeatherFileReading[] {
  const settled = input.reports.settle(findings);
  const stations = settled.map(({ key, line, reports, station }): StationContents => {
    const placed = settlePlace(station, { options: input.options, inUtc: true }, findings);
    const { elevationM, utcOffsetH } = placed;
    const { fromSeaLevel, rows } = hourlyRows(reports, { offsetMin: Math.round(60 * (utcOffsetH ?? 0)), elevationM });
    tellSeaLevelPressure({ fromSeaLevel, elevationM, reports }, findings);
    return {
      format,
      key,
      station: placed,
      stationLine: line > 0 ? line : null,
      rows,
      stepsPerHour: 1,
      cutByUtc: true,
      leapYearObserved: null,
      sourceFlagsInformative: null,
      published: null,
      comments: null,
    };
  });
  return assembleStationYears(stations, findings, input.options);
}
