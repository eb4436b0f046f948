import type { Brief, Stage } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import { relativeHumidityPct } from '../psychrometrics/moist-air.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import { dewPointPath } from '../stages/dew-point.ts';
import { directPath } from '../stages/direct.ts';
import { indirectPath } from '../stages/indirect.ts';
import { exhaustSecondary, outdoorSecondary } from '../stages/secondary-air.ts';
import type { OutdoorState, StagePath, WetOutdoorState } from '../stages/stage-path.ts';
import { twoStageExhaustPath, twoStagePath } from '../stages/two-stage.ts';
import type { DemandHour } from './demand-hour.ts';

/**
 * The wet stages that may be tried in an hour, in the brief's order (method 4): only if d >= cut-in,
 * t + f_air + dT_room phi >= the start temperature and the outdoor relative humidity <= its ceiling. Freeze lockout is
 * tested before, since it makes a class of its own.
 * @param airSupplyC t + f of outdoor air, °C
 */
export function permittedPaths(hour: DemandHour, brief: Brief, airSupplyC: number): StagePath[] {
  const wet = outdoorForWetting(hour, brief, airSupplyC);
  return wet === null ? [] : brief.stages.map((stage) => pathOf(stage, { wet, setC: hour.setC, brief }));
}

/** Outdoor air with its wet bulb where the brief lets a wet stage run on it, else null; see `permittedPaths`. */
export function outdoorForWetting(hour: DemandHour, brief: Brief, airSupplyC: number): WetOutdoorState | null {
  const { outdoor } = hour;
  const roomByAirC = airSupplyC + brief.dTroomK * hour.loadFraction;
  if (brief.startRoomTempC !== null && hundredths(roomByAirC) < hundredths(brief.startRoomTempC)) return null;
  if (brief.maxOutdoorRhPct !== null && hundredths(outdoorRhPct(outdoor)) > hundredths(brief.maxOutdoorRhPct))
    return null;
  const { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg } = outdoor;
  const outdoorWetBulbC = wetBulbC(dryBulbC, humidityRatio, pressurePa);
  if (hundredths(dryBulbC) - hundredths(outdoorWetBulbC) < hundredths(brief.cutInDepressionK)) return null;
  return { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, wetBulbC: outdoorWetBulbC };
}

function outdoorRhPct(outdoor: OutdoorState): number {
  return relativeHumidityPct(outdoor.dryBulbC, outdoor.humidityRatio, outdoor.pressurePa);
}

function pathOf(stage: Stage, input: { wet: WetOutdoorState; setC: number; brief: Brief }): StagePath {
  const { wet, setC, brief } = input;
  const exhaust = brief.secondaryAir === 'exhaust' ? { setC, dwRoomKgKg: brief.dwRoomKgKg } : null;
  switch (stage) {
    case 'direct':
      return directPath(wet, brief);
    case 'indirect':
      // An indirect stage adds no moisture, so the supply's is that of outdoor air.
      return indirectPath(
        wet,
        brief,
        exhaust === null ? outdoorSecondary(wet) : exhaustSecondary(wet, exhaust, wet.humidityRatio),
      );
    case 'dewpoint':
      return dewPointPath(wet, brief);
    case 'twostage':
      return exhaust === null
        ? twoStagePath(wet, brief, outdoorSecondary(wet))
        : twoStageExhaustPath(wet, brief, exhaust);
    case 'tower':
      throw new RangeError('a tower cools water, not supply air');
  }
}
