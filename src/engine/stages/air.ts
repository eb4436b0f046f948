import type { Brief } from '../brief/brief.ts';
import { fanRiseK, type OutdoorState, type StagePath } from './stage-path.ts';

/** Outdoor air as it is: t_s = t + f, w_s = w (method 4). */
export function airPath(outdoor: OutdoorState, brief: Pick<Brief, 'fanWPerLs'>): StagePath {
  const state = {
    tempC: outdoor.dryBulbC + fanRiseK(brief.fanWPerLs.air, outdoor.volumeM3PerKg),
    humidityRatio: outdoor.humidityRatio,
    evaporatedKgPerKg: 0,
    share: 0,
  };
  return { stage: 'air', waterC: null, at: () => state, shareFor: (supplyC) => (state.tempC <= supplyC ? 0 : 1) };
}
