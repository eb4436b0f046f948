import type { Brief } from '../brief/brief.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import { humidityRatioOnWetBulbLine } from '../psychrometrics/wet-bulb-line.ts';
import { secondaryWaterKgPerKg } from './indirect.ts';
import { fanRiseK, type StagePath, shareOnLine, type WetOutdoorState } from './stage-path.ts';

/**
 * Two-stage evaporation: indirect at full effect to t1 with wet bulb t_wb1(t1, w, p), then direct with x from there
 * (method 4). The water evaporated is the sum of both (method 6).
 */
export function twoStagePath(
  outdoor: WetOutdoorState,
  brief: Pick<Brief, 'fanWPerLs' | 'effIndirect' | 'effDirect' | 'k'>,
): StagePath {
  const { dryBulbC, humidityRatio, pressurePa } = outdoor;
  const riseK = fanRiseK(brief.fanWPerLs.twostage, outdoor.volumeM3PerKg);
  const firstFallK = brief.effIndirect * (dryBulbC - outdoor.wetBulbC);
  const betweenC = dryBulbC - firstFallK;
  const betweenWetBulbC = wetBulbC(betweenC, humidityRatio, pressurePa);
  const secondFallK = brief.effDirect * (betweenC - betweenWetBulbC);
  const firstWater = secondaryWaterKgPerKg(firstFallK, brief.k);
  return {
    stage: 'twostage',
    at: (share) => {
      const leavingC = betweenC - share * secondFallK;
      const leavingRatio =
        share > 0
          ? Math.max(humidityRatio, humidityRatioOnWetBulbLine(leavingC, betweenWetBulbC, pressurePa))
          : humidityRatio;
      return {
        tempC: leavingC + riseK,
        humidityRatio: leavingRatio,
        evaporatedKgPerKg: firstWater + (leavingRatio - humidityRatio),
        share,
      };
    },
    shareFor: (supplyC) => shareOnLine({ dryC: betweenC + riseK, fullFallK: secondFallK, supplyC }),
  };
}
