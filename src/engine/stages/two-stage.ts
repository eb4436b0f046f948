import type { Brief } from '../brief/brief.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import { humidityRatioOnWetBulbLine } from '../psychrometrics/wet-bulb-line.ts';
import { secondaryFallK, secondaryWaterKgPerKg } from './indirect.ts';
import { exhaustSecondary, type RoomExhaust, type SecondaryAir } from './secondary-air.ts';
import { fanRiseK, type OutdoorState, type StagePath, shareOnLine, type WetOutdoorState } from './stage-path.ts';

type TwoStagePlant = Pick<Brief, 'fanWPerLs' | 'effIndirect' | 'effDirect' | 'k'>;

/** Moisture of the supply and of the exhaust settle on one another to this, kg/kg: far under a hundredth of a kelvin. */
const SETTLED_KG_PER_KG = 1e-9;
/** Each round takes off more than half of what is left, so that this is never reached. */
const MOST_ROUNDS = 60;
/** The share at which a supply is just reached is found to this. */
const SHARE_TOLERANCE = 1e-9;

/**
 * Two-stage evaporation: indirect at full effect to t1 with wet bulb t_wb1(t1, w, p), then direct with x from there
 * (method 4). The water evaporated is the sum of both (method 6).
 */
export function twoStagePath(outdoor: OutdoorState, brief: TwoStagePlant, secondary: SecondaryAir): StagePath {
  const { dryBulbC, humidityRatio, pressurePa } = outdoor;
  const riseK = fanRiseK(brief.fanWPerLs.twostage, outdoor.volumeM3PerKg);
  const firstFallK = Math.min(secondaryFallK(dryBulbC, brief.effIndirect, secondary), secondary.mostFallK);
  const betweenC = dryBulbC - firstFallK;
  const betweenWetBulbC = wetBulbC(betweenC, humidityRatio, pressurePa);
  const secondFallK = brief.effDirect * (betweenC - betweenWetBulbC);
  const firstWater = secondaryWaterKgPerKg(firstFallK, brief.k);
  return {
    stage: 'twostage',
    waterC: Math.max(secondary.wetBulbC, betweenWetBulbC),
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

/**
 * The same with the room's exhaust as secondary air: what the second stage adds to the supply comes back with the exhaust,
 * so that at every share the moisture of both is settled first. The supply then no longer falls in a straight line.
 */
export function twoStageExhaustPath(outdoor: WetOutdoorState, brief: TwoStagePlant, room: RoomExhaust): StagePath {
  const settled = (share: number): StagePath => {
    let supplyRatio = outdoor.humidityRatio;
    for (let round = 0; ; round++) {
      const path = twoStagePath(outdoor, brief, exhaustSecondary(outdoor, room, supplyRatio));
      const { humidityRatio } = path.at(share);
      if (Math.abs(humidityRatio - supplyRatio) < SETTLED_KG_PER_KG || round === MOST_ROUNDS) return path;
      supplyRatio = humidityRatio;
    }
  };
  const at: StagePath['at'] = (share) => settled(share).at(share);
  return { stage: 'twostage', waterC: settled(1).waterC, at, shareFor: (supplyC) => leastShare(at, supplyC) };
}

/** The least share at which the supply is at most this, °C, by halving; 1 when it never is. */
function leastShare(at: StagePath['at'], supplyC: number): number {
  if (at(0).tempC <= supplyC) return 0;
  let over = 0;
  let reached = 1;
  while (reached - over > SHARE_TOLERANCE) {
    const middle = (over + reached) / 2;
    if (at(middle).tempC <= supplyC) reached = middle;
    else over = middle;
  }
  return reached;
}
