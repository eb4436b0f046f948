import type { Brief, Stage } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import { relativeHumidityPct } from '../psychrometrics/moist-air.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import { dewPointPath } from '../stages/dew-point.ts';
import { directPath } from '../stages/direct.ts';
import { indirectPath } from '../stages/indirect.ts';
import type { OutdoorState, StagePath, WetOutdoorState } from '../stages/stage-path.ts';
import { twoStagePath } from '../stages/two-stage.ts';
import type { DemandHour } from './demand-hour.ts';

/**
 * The wet stages that may be tried in an hour, in the brief's order (method 4): only if d >= cut-in,
 * t + f_air + dT_room phi >= the start temperature and the outdoor relative humidity <= its ceiling. Freeze lockout is
 * tested before, since it makes a class of its own.
 * @param airSupplyC t + f of outdoor air, °C
 */
export function permittedPaths(hour: DemandHour, brief: Brief, airSupplyC: number): StagePath[] {
  const { outdoor } = hour;
  const roomByAirC = airSupplyC + (hour.setC - hour.supplyAimC);
  if (brief.startRoomTempC !== null && hundredths(roomByAirC) < hundredths(brief.startRoomTempC)) return [];
  if (brief.maxOutdoorRhPct !== null && hundredths(outdoorRhPct(outdoor)) > hundredths(brief.maxOutdoorRhPct))
    return [];
  const { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg } = outdoor;
  const outdoorWetBulbC = wetBulbC(dryBulbC, humidityRatio, pressurePa);
  const wet = { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, wetBulbC: outdoorWetBulbC };
  if (hundredths(wet.dryBulbC) - hundredths(wet.wetBulbC) < hundredths(brief.cutInDepressionK)) return [];
  return brief.stages.map((stage) => pathOf(stage, wet, brief));
}

function outdoorRhPct(outdoor: OutdoorState): number {
  return relativeHumidityPct(outdoor.dryBulbC, outdoor.humidityRatio, outdoor.pressurePa);
}

function pathOf(stage: Stage, wet: WetOutdoorState, brief: Brief): StagePath {
  switch (stage) {
    case 'direct':
      return directPath(wet, brief);
    case 'indirect':
      return indirectPath(wet, brief);
    case 'dewpoint':
      return dewPointPath(wet, brief);
    case 'twostage':
      return twoStagePath(wet, brief);
    case 'tower':
      throw new RangeError('a tower cools water, not supply air');
  }
}
