import { type HourCells, MONTH_HOUR_CELLS } from './hour-cells.ts';
import type { ScaledCounts } from './run-result.ts';

/**
 * Demand and met hours scaled by month x hour of day: each cell's counts times its scheduled over its present hours. A
 * missing hour is never counted as not met (method 2).
 */
export function scaleForMissing(cells: HourCells): ScaledCounts {
  let demand = 0;
  let met = 0;
  let unknown = 0;
  for (let cell = 0; cell < MONTH_HOUR_CELLS; cell++) {
    const scheduled = cells.scheduled[cell] ?? 0;
    const present = cells.present[cell] ?? 0;
    if (present === 0) unknown += scheduled;
    else {
      demand += ((cells.demand[cell] ?? 0) * scheduled) / present;
      met += ((cells.met[cell] ?? 0) * scheduled) / present;
    }
  }
  return { demand, met, unknown };
}
