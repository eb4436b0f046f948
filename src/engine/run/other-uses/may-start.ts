import type { Brief } from '../../brief/brief.ts';
import { hundredths } from '../../conventions.ts';
import { relativeHumidityPct } from '../../psychrometrics/moist-air.ts';
import { block } from '../hour-block.ts';

/** Constants of this module: see `hour-block.ts`. */
const { airSupplyC, loadFraction, dryBulbC, humidityRatio, pressurePa } = block;

/** Whether neither start temperature nor a ceiling of outdoor humidity is asked for, so that no hour need be. */
export function mayAlwaysStart({ startRoomTempC, maxOutdoorRhPct }: Brief): boolean {
  return startRoomTempC === null && maxOutdoorRhPct === null;
}

/** Start temperature and the ceiling of outdoor humidity in the hour of `block` at a place (method 4), as `outdoorForWetting`. */
export function mayStart({ startRoomTempC, maxOutdoorRhPct, dTroomK }: Brief, at: number): boolean {
  const roomByAirC = (airSupplyC[at] ?? 0) + dTroomK * (loadFraction[at] ?? 0);
  if (startRoomTempC !== null && hundredths(roomByAirC) < hundredths(startRoomTempC)) return false;
  if (maxOutdoorRhPct === null) return true;
  const outdoorPct = relativeHumidityPct(dryBulbC[at] ?? 0, humidityRatio[at] ?? 0, pressurePa[at] ?? 0);
  return hundredths(outdoorPct) <= hundredths(maxOutdoorRhPct);
}
