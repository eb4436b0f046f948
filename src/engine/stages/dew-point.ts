import type { Brief } from '../brief/brief.ts';
import { dewPointC } from '../psychrometrics/moist-air.ts';
import { secondaryWaterKgPerKg } from './indirect.ts';
import { fanRiseK, type StagePath, shareOnLine, type WetOutdoorState } from './stage-path.ts';

/**
 * Dew-point indirect evaporation: t_s = t - x e (t - t_dp) + f, w_s = w (method 4). Its water is somewhere between the dew
 * point and the wet bulb of outdoor air; the warmer of the two stands for it.
 */
export function dewPointPath(
  outdoor: WetOutdoorState,
  brief: Pick<Brief, 'fanWPerLs' | 'effDewPoint' | 'k'>,
): StagePath {
  const riseK = fanRiseK(brief.fanWPerLs.dewpoint, outdoor.volumeM3PerKg);
  const outdoorDewPointC = dewPointC(outdoor.dryBulbC, outdoor.humidityRatio, outdoor.pressurePa);
  const fullFallK = brief.effDewPoint * (outdoor.dryBulbC - outdoorDewPointC);
  return {
    stage: 'dewpoint',
    waterC: outdoor.wetBulbC,
    at: (share) => ({
      tempC: outdoor.dryBulbC - share * fullFallK + riseK,
      humidityRatio: outdoor.humidityRatio,
      evaporatedKgPerKg: secondaryWaterKgPerKg(share * fullFallK, brief.k),
      share,
    }),
    shareFor: (supplyC) => shareOnLine({ dryC: outdoor.dryBulbC + riseK, fullFallK, supplyC }),
  };
}
