import type { Brief } from '../brief/brief.ts';
import { dewPointC } from '../psychrometrics/moist-air.ts';
import { secondaryWaterKgPerKg } from './indirect.ts';
import { fanRiseK, type OutdoorState, type StagePath, shareOnLine } from './stage-path.ts';

/** Dew-point indirect evaporation: t_s = t - x e (t - t_dp) + f, w_s = w (method 4). */
export function dewPointPath(outdoor: OutdoorState, brief: Pick<Brief, 'fanWPerLs' | 'effDewPoint' | 'k'>): StagePath {
  const riseK = fanRiseK(brief.fanWPerLs.dewpoint, outdoor.volumeM3PerKg);
  const outdoorDewPointC = dewPointC(outdoor.dryBulbC, outdoor.humidityRatio, outdoor.pressurePa);
  const fullFallK = brief.effDewPoint * (outdoor.dryBulbC - outdoorDewPointC);
  return {
    stage: 'dewpoint',
    at: (share) => ({
      tempC: outdoor.dryBulbC - share * fullFallK + riseK,
      humidityRatio: outdoor.humidityRatio,
      evaporatedKgPerKg: secondaryWaterKgPerKg(share * fullFallK, brief.k),
      share,
    }),
    shareFor: (supplyC) => shareOnLine({ dryC: outdoor.dryBulbC + riseK, fullFallK, supplyC }),
  };
}
