import type { Brief } from '../brief/brief.ts';
import {
  DRY_AIR_KJ_PER_KG_K,
  fanRiseK,
  LATENT_HEAT_KJ_PER_KG,
  type StagePath,
  shareOnLine,
  type WetOutdoorState,
} from './stage-path.ts';

/**
 * Indirect evaporation with outdoor secondary air: t_s = t - x e (t - t_wb,secondary) + f, w_s = w (method 4). The floor
 * at the dew point cannot bind here, since an outdoor wet bulb is never under the dew point.
 */
export function indirectPath(
  outdoor: WetOutdoorState,
  brief: Pick<Brief, 'fanWPerLs' | 'effIndirect' | 'k'>,
): StagePath {
  const riseK = fanRiseK(brief.fanWPerLs.indirect, outdoor.volumeM3PerKg);
  const fullFallK = brief.effIndirect * (outdoor.dryBulbC - outdoor.wetBulbC);
  return {
    stage: 'indirect',
    at: (share) => ({
      tempC: outdoor.dryBulbC - share * fullFallK + riseK,
      humidityRatio: outdoor.humidityRatio,
      evaporatedKgPerKg: secondaryWaterKgPerKg(share * fullFallK, brief.k),
      share,
    }),
    shareFor: (supplyC) => shareOnLine({ dryC: outdoor.dryBulbC + riseK, fullFallK, supplyC }),
  };
}

/**
 * Water that the secondary side evaporates, kg per kg of primary dry air: sensible heat / latent heat x k, the fan rise
 * left out (method 3.1 and 6).
 * @param fallK how far the primary air is cooled, K
 */
export function secondaryWaterKgPerKg(fallK: number, k: number): number {
  return ((DRY_AIR_KJ_PER_KG_K * fallK) / LATENT_HEAT_KJ_PER_KG) * k;
}
