/** What the stages of a brief do to the air of one hour, as lines on the psychrometric chart: the engine's own stage paths. */
import type { Brief } from '../engine/brief/brief.ts';
import type { DemandHour } from '../engine/hour-classes/demand-hour.ts';
import { outdoorForWetting, permittedPaths } from '../engine/hour-classes/permitted-paths.ts';
import { airPath } from '../engine/stages/air.ts';
import { directPath } from '../engine/stages/direct.ts';
import { fanRiseK, type StagePath, type SupplyStage } from '../engine/stages/stage-path.ts';

export interface AirPoint {
  readonly tempC: number;
  readonly humidityRatio: number;
}

export interface ProcessLine {
  readonly stage: SupplyStage;
  /** From outdoor air to the supply; the last step is what the fan adds. */
  readonly points: readonly AirPoint[];
  /** The air after each stage, before the fan. */
  readonly after: readonly AirPoint[];
  readonly supply: AirPoint;
}

/** Along a line of constant wet bulb, which is nearly straight. */
const STEPS = 6;
const NO_FAN = { air: 0, direct: 0, indirect: 0, dewpoint: 0, twostage: 0, returnAir: 0 } as const;

/**
 * The lines of outdoor air and of every stage that the brief lets run in the hour, each at full wetting, in the brief's order.
 * Empty for halls that cool return air and for towers: they do nothing to outdoor air that is then supplied.
 */
export function processLines(hour: DemandHour, brief: Brief): readonly ProcessLine[] {
  const { limit } = brief;
  if (limit.kind === 'turbine') return turbineLines(hour, brief, limit.floorC);
  if (limit.kind === 'tower' || brief.primaryAir === 'return') return [];
  const air = airPath(hour.outdoor, brief);
  // Exhaust of a room whose temperature no limit sets has no state to draw.
  const isKnown = brief.secondaryAir === 'outdoor' || !Number.isNaN(hour.setC);
  const frozen = hour.outdoor.dryBulbC <= brief.freezeLockoutC;
  const wet = isKnown && !frozen ? permittedPaths(hour, brief, air.at(0).tempC) : [];
  return [air, ...wet].map((path) => {
    const riseK = fanRiseK(brief.fanWPerLs[path.stage], hour.outdoor.volumeM3PerKg);
    return lineOf(path, { hour, riseK, mostShare: 1 });
  });
}

/** A turbine's inlet is cooled at full effect down to its floor, and no fan is counted. */
function turbineLines(hour: DemandHour, brief: Brief, floorC: number): readonly ProcessLine[] {
  const frozen = hour.outdoor.dryBulbC <= brief.freezeLockoutC;
  const wet = frozen || !brief.stages.includes('direct') ? null : outdoorForWetting(hour, brief, hour.outdoor.dryBulbC);
  if (wet === null) return [];
  const path = directPath(wet, { effDirect: brief.effDirect, fanWPerLs: NO_FAN });
  return [lineOf(path, { hour, riseK: 0, mostShare: path.shareFor(floorC) })];
}

function lineOf(path: StagePath, how: { hour: DemandHour; riseK: number; mostShare: number }): ProcessLine {
  const { hour, riseK, mostShare } = how;
  const outdoor = { tempC: hour.outdoor.dryBulbC, humidityRatio: hour.outdoor.humidityRatio };
  const leaving = (share: number): AirPoint => {
    const { tempC, humidityRatio } = path.at(share);
    return { tempC: tempC - riseK, humidityRatio };
  };
  const { tempC, humidityRatio } = path.at(mostShare);
  const supply = { tempC, humidityRatio };
  if (path.stage === 'air') return { stage: path.stage, points: [outdoor, supply], after: [], supply };
  const along = Array.from({ length: STEPS + 1 }, (_, step) => leaving((mostShare * step) / STEPS));
  const last = leaving(mostShare);
  // At no wetting of its second part a two-stage line stands where the indirect part leaves the air.
  const after = path.stage === 'twostage' ? [leaving(0), last] : [last];
  return { stage: path.stage, points: [outdoor, ...along, supply], after, supply };
}
