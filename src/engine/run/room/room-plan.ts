/**
 * What a brief means for every hour of a room held at a temperature, worked out once: fan figures by what runs, and caps as
 * pressures of vapour, so that no hour computes a relative humidity. A cap of whole hundredths is kept when the figure rounds to
 * at most the cap: when it is under the cap and half a hundredth (a tie is kept).
 */
import type { Brief, Stage } from '../../brief/brief.ts';
import { hundredths } from '../../conventions.ts';
import { hourClasses } from '../../hour-classes/hour-class.ts';
import { saturationPressurePa } from '../../psychrometrics/moist-air.ts';
import { DRY_AIR_KJ_PER_KG_K, fanRiseK } from '../../stages/stage-path.ts';
import { makeUpLitres, SECONDS_PER_HOUR } from '../../water-energy/plant-hour.ts';
import { runningStages } from '../hour-columns.ts';

const DIRECT = runningStages.indexOf('direct');
const TWO_STAGE = runningStages.indexOf('twostage');

/** Class of an hour that a stage meets, by the stage's position in `runningStages`. */
export const CLASS_OF_STAGE = Uint8Array.from(runningStages, (stage) =>
  stage === null || stage === 'tower' ? 0 : hourClasses.indexOf(stage),
);

/** Whether a stage, by its position, wets the supply itself. */
export function isMoist(stage: number): boolean {
  return stage === DIRECT || stage === TWO_STAGE;
}

export interface RoomPlan {
  readonly freezeHundredths: number;
  readonly cutInHundredths: number;
  /** Least room temperature by outdoor air at which water may run; -Infinity without one. */
  readonly startHundredths: number;
  /** Vapour must stay under this share of saturation outdoors for water to run; Infinity without a ceiling. */
  readonly outdoorShare: number;
  /** The same of the room and of the supply, Infinity without a cap. */
  readonly roomShare: number;
  readonly supplyShare: number;
  /** Vapour of the supply must stay under this, Pa; Infinity without a cap. */
  readonly supplyVapourPa: number;
  /** Whether the supply has a cap of its own. */
  readonly capsSupply: boolean;
  readonly onOff: boolean;
  /** Positions in `runningStages`, in the brief's order. */
  readonly stages: readonly number[];
  /** Places in `stages` in the order in which the lowest supply is looked for: those that add no moisture, two-stage, direct. */
  readonly dryFirst: readonly number[];
  /** All of them and air, as bits. */
  readonly allAlone: number;
  /** Fan rise, K per m³ of air and kg of dry air, and fan electricity, kWh per m³/kg of the hour: by position in `runningStages`. */
  readonly riseKPerVolume: Float64Array;
  readonly fanKwhPerVolume: Float64Array;
  readonly effDirect: number;
  readonly effIndirect: number;
  readonly effDewPoint: number;
  readonly k: number;
  readonly dTroomK: number;
  readonly dwRoomKgKg: number;
  /** Litres in an hour per kg evaporated and kg of dry air, with a design load of 1 kW. */
  readonly litresPerRatio: number;
  /** Make-up per litre evaporated: 1 + 1 / (C - 1). */
  readonly makeUpPerEvaporated: number;
  readonly pumpKwPerKw: number;
  readonly kwhPerKwh: number;
  readonly economy: boolean;
}

const plans = new WeakMap<Brief, RoomPlan>();

/** The plan of a brief, made once. @throws RangeError for a tower, which cools no air */
export function roomPlan(brief: Brief): RoomPlan {
  const plan = plans.get(brief) ?? makePlan(brief);
  plans.set(brief, plan);
  return plan;
}

function makePlan(brief: Brief): RoomPlan {
  const { caps, fanWPerLs: fan } = brief;
  const stages = brief.stages.map(positionOf);
  const placesOf = (isAsked: (stage: number) => boolean) =>
    stages.flatMap((stage, nth) => (isAsked(stage) ? [nth] : []));
  const dry = placesOf((stage) => !isMoist(stage));
  const fans = Float64Array.of(0, fan.air, fan.direct, fan.indirect, fan.dewpoint, fan.twostage, 0);
  const airflowKgPerS = 1 / (DRY_AIR_KJ_PER_KG_K * brief.dTroomK);
  return {
    freezeHundredths: hundredths(brief.freezeLockoutC),
    cutInHundredths: hundredths(brief.cutInDepressionK),
    startHundredths: brief.startRoomTempC === null ? Number.NEGATIVE_INFINITY : hundredths(brief.startRoomTempC),
    outdoorShare: shareOf(brief.maxOutdoorRhPct ?? undefined),
    roomShare: shareOf(caps.roomRhPct),
    supplyShare: shareOf(caps.supplyRhPct),
    supplyVapourPa:
      caps.supplyDewPointC === undefined
        ? Number.POSITIVE_INFINITY
        : saturationPressurePa(edgeOf(caps.supplyDewPointC)),
    capsSupply: caps.supplyRhPct !== undefined || caps.supplyDewPointC !== undefined,
    onOff: brief.control === 'on-off',
    stages,
    dryFirst: [...dry, ...placesOf((stage) => stage === TWO_STAGE), ...placesOf((stage) => stage === DIRECT)],
    allAlone: stages.reduce((bits, stage) => bits | (1 << stage), 1 << runningStages.indexOf('air')),
    riseKPerVolume: fans.map((wattPerLs) => fanRiseK(wattPerLs, 1)),
    fanKwhPerVolume: fans.map((wattPerLs) => wattPerLs * airflowKgPerS),
    effDirect: brief.effDirect,
    effIndirect: brief.effIndirect,
    effDewPoint: brief.effDewPoint,
    k: brief.k,
    dTroomK: brief.dTroomK,
    dwRoomKgKg: brief.dwRoomKgKg,
    litresPerRatio: airflowKgPerS * SECONDS_PER_HOUR,
    makeUpPerEvaporated: makeUpLitres(1, brief),
    pumpKwPerKw: brief.pumpKwPerKw,
    kwhPerKwh: 1 / brief.reference.cop,
    economy: brief.reference.economy,
  };
}

/** The first value that rounds to more than a limit of whole hundredths. */
function edgeOf(limit: number): number {
  return (hundredths(limit) + 0.5) / 100;
}

function shareOf(pct: number | undefined): number {
  return pct === undefined ? Number.POSITIVE_INFINITY : edgeOf(pct) / 100;
}

function positionOf(stage: Stage): number {
  if (stage === 'tower') throw new RangeError('a tower cools water, not supply air');
  return runningStages.indexOf(stage);
}
