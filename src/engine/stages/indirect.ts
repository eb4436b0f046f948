import type { Brief } from '../brief/brief.ts';
import type { SecondaryAir } from './secondary-air.ts';
import {
  DRY_AIR_KJ_PER_KG_K,
  fanRiseK,
  LATENT_HEAT_KJ_PER_KG,
  type OutdoorState,
  type StagePath,
  shareOnLine,
} from './stage-path.ts';

/** Indirect evaporation: t_s = t - x e (t - t_wb,secondary) + f, not below the dew point, w_s = w (method 4). */
export function indirectPath(
  outdoor: OutdoorState,
  brief: Pick<Brief, 'fanWPerLs' | 'effIndirect' | 'k'>,
  secondary: SecondaryAir,
): StagePath {
  const riseK = fanRiseK(brief.fanWPerLs.indirect, outdoor.volumeM3PerKg);
  const fullFallK = secondaryFallK(outdoor.dryBulbC, brief.effIndirect, secondary);
  return {
    stage: 'indirect',
    waterC: secondary.wetBulbC,
    at: (share) => {
      const fallK = Math.min(share * fullFallK, secondary.mostFallK);
      return {
        tempC: outdoor.dryBulbC - fallK + riseK,
        humidityRatio: outdoor.humidityRatio,
        evaporatedKgPerKg: secondaryWaterKgPerKg(fallK, brief.k),
        share,
      };
    },
    shareFor: (supplyC) => shareOnLine({ dryC: outdoor.dryBulbC + riseK, fullFallK, supplyC }),
  };
}

/** e (t - t_wb,secondary), K: what full wetting takes off; secondary air that is warmer cools nothing. */
export function secondaryFallK(dryBulbC: number, effIndirect: number, { wetBulbC }: SecondaryAir): number {
  return Math.max(0, effIndirect * (dryBulbC - wetBulbC));
}

/**
 * Water that the secondary side evaporates, kg per kg of primary dry air: sensible heat / latent heat x k, the fan rise
 * left out (method 3.1 and 6).
 * @param fallK how far the primary air is cooled, K
 */
export function secondaryWaterKgPerKg(fallK: number, k: number): number {
  return ((DRY_AIR_KJ_PER_KG_K * fallK) / LATENT_HEAT_KJ_PER_KG) * k;
}
