import type { Brief } from '../brief/brief.ts';
import { humidityRatioOnWetBulbLine } from '../psychrometrics/wet-bulb-line.ts';
import { fanRiseK, type StagePath, shareOnLine, type WetOutdoorState } from './stage-path.ts';

/**
 * Direct evaporation: t' = t - x e (t - t_wb), w_s on the line of constant wet bulb, t_s = t' + f (method 4). The water
 * evaporated is what the air gains, w_s - w (method 6).
 */
export function directPath(outdoor: WetOutdoorState, brief: Pick<Brief, 'fanWPerLs' | 'effDirect'>): StagePath {
  const riseK = fanRiseK(brief.fanWPerLs.direct, outdoor.volumeM3PerKg);
  const fullFallK = brief.effDirect * (outdoor.dryBulbC - outdoor.wetBulbC);
  return {
    stage: 'direct',
    waterC: outdoor.wetBulbC,
    at: (share) => {
      const leavingC = outdoor.dryBulbC - share * fullFallK;
      const humidityRatio =
        share > 0
          ? Math.max(outdoor.humidityRatio, humidityRatioOnWetBulbLine(leavingC, outdoor.wetBulbC, outdoor.pressurePa))
          : outdoor.humidityRatio;
      return {
        tempC: leavingC + riseK,
        humidityRatio,
        evaporatedKgPerKg: humidityRatio - outdoor.humidityRatio,
        share,
      };
    },
    shareFor: (supplyC) => shareOnLine({ dryC: outdoor.dryBulbC + riseK, fullFallK, supplyC }),
  };
}
