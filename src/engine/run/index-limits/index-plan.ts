import type { Brief } from '../../brief/brief.ts';
import { hundredths } from '../../conventions.ts';
import { type IndexLimit, indexLimit } from '../../hour-classes/index-limit.ts';
import { sharesTried } from '../../hour-classes/judge-index-hour.ts';
import { runningStages } from '../hour-columns.ts';

/** What a brief that limits an index means for every hour, worked out once. */
export interface IndexPlan {
  readonly limit: IndexLimit;
  /** Whether the index is the shade heat figure; else that of temperature and humidity. */
  readonly isShadeHeat: boolean;
  readonly limitHundredths: number;
  readonly freezeHundredths: number;
  readonly cutInHundredths: number;
  /** What rounds to at most a cap on relative humidity lies under this, hundredths of a percent; Infinity without a cap. */
  readonly roomRhEdge: number;
  readonly supplyRhEdge: number;
  /** Cap on the dew point of the supply; Infinity without one. */
  readonly dewPointHundredths: number;
  /** Whether the supply has a cap of its own. */
  readonly capsSupply: boolean;
  /** The permitted stages by position in `runningStages`, in the brief's order; all of them and air, as bits. */
  readonly stages: readonly number[];
  readonly allAlone: number;
  /** Shares of full wetting that are tried, ascending. */
  readonly shares: readonly number[];
  /** By position in `runningStages`. */
  readonly fanWPerLs: Float64Array;
  readonly effDirect: number;
  readonly effIndirect: number;
  readonly effDewPoint: number;
  readonly k: number;
  readonly dTroomK: number;
  readonly dwRoomKgKg: number;
}

/** @throws RangeError for a brief of another limit */
export function indexPlan(brief: Brief): IndexPlan {
  const limit = indexLimit(brief);
  const { fanWPerLs: fan } = brief;
  const stages = brief.stages.map((stage) => runningStages.indexOf(stage));
  return {
    limit,
    isShadeHeat: limit.kind === 'shade-heat',
    limitHundredths: hundredths(limit.value),
    freezeHundredths: hundredths(brief.freezeLockoutC),
    cutInHundredths: hundredths(brief.cutInDepressionK),
    roomRhEdge: edgeOf(brief.caps.roomRhPct),
    supplyRhEdge: edgeOf(brief.caps.supplyRhPct),
    dewPointHundredths: hundredths(brief.caps.supplyDewPointC ?? Number.POSITIVE_INFINITY),
    capsSupply: brief.caps.supplyRhPct !== undefined || brief.caps.supplyDewPointC !== undefined,
    stages,
    allAlone: stages.reduce((bits, stage) => bits | (1 << stage), 1 << runningStages.indexOf('air')),
    shares: sharesTried(brief),
    fanWPerLs: Float64Array.of(0, fan.air, fan.direct, fan.indirect, fan.dewpoint, fan.twostage, 0),
    effDirect: brief.effDirect,
    effIndirect: brief.effIndirect,
    effDewPoint: brief.effDewPoint,
    k: brief.k,
    dTroomK: brief.dTroomK,
    dwRoomKgKg: brief.dwRoomKgKg,
  };
}

function edgeOf(capPct: number | undefined): number {
  return capPct === undefined ? Number.POSITIVE_INFINITY : hundredths(capPct) + 0.5;
}
