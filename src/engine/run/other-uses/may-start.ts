import type { Brief } from '../../brief/brief.ts';
import { hundredths } from '../../conventions.ts';
import { relativeHumidityPct } from '../../psychrometrics/moist-air.ts';
import type { HourColumns } from '../hour-columns.ts';

/** Start temperature and the ceiling of outdoor humidity in the hour at a place (method 4), as `outdoorForWetting`. */
export function mayStart(brief: Brief, hours: HourColumns, at: number): boolean {
  const roomByAirC = (hours.airSupplyC[at] ?? 0) + brief.dTroomK * (hours.loadFraction[at] ?? 0);
  const { startRoomTempC, maxOutdoorRhPct } = brief;
  if (startRoomTempC !== null && hundredths(roomByAirC) < hundredths(startRoomTempC)) return false;
  if (maxOutdoorRhPct === null) return true;
  const { dryBulbC, humidityRatio, pressurePa } = hours;
  const outdoorPct = relativeHumidityPct(dryBulbC[at] ?? 0, humidityRatio[at] ?? 0, pressurePa[at] ?? 0);
  return hundredths(outdoorPct) <= hundredths(maxOutdoorRhPct);
}
