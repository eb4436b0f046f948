import { type FindingList, hoursPhrase } from '../finding-list.ts';
import type { ReportColumns } from './report-columns.ts';

/** Says which pressure served where the file gives that at sea level. */
export function tellSeaLevelPressure(
  input: { readonly fromSeaLevel: number; readonly elevationM: number | null; readonly reports: ReportColumns },
  findings: FindingList,
): void {
  const { elevationM, fromSeaLevel, reports } = input;
  const waiting = elevationM === null && reports.seaLevelPressurePa.some((value) => !Number.isNaN(value));
  if (fromSeaLevel === 0 && !waiting) return;
  findings.add({
    code: 'pressure-sea-level',
    severity: 'note',
    count: fromSeaLevel,
    message: () =>
      waiting
        ? 'The file gives the pressure at sea level, which becomes station pressure once the elevation is known.'
        : `In ${hoursPhrase(fromSeaLevel)} the station pressure follows from the pressure at sea level and the elevation, ${elevationM} m.`,
  });
}
