import { vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledSaturationPa, tabledSlopePaPerK } from '../../psychrometrics/saturation-table.ts';
import { block } from '../hour-block.ts';
import { room } from './room-hours.ts';
import type { RoomPlan } from './room-plan.ts';
import { leavingWithRatioC, ratioOnLine } from './supply-lines.ts';

/** Dry air and vapour, kJ/(kg K): ASHRAE Fundamentals 2017 ch. 1 eq. 30. */
const AIR_KJ_PER_KG_K = 1.006;
const VAPOUR_KJ_PER_KG_K = 1.86;
const MASS_RATIO = 0.621945;

/** Constants of this module: see `hour-block.ts`. */
const { humidityRatio: ratios, pressurePa: pressures, setC, supplyAimC } = block;
const { top: tops, bottom: bottoms, fanRiseK: fanRises, dryC: dries, fullC: fulls, edgeC: edges, triedC: tried } = room;
const { places } = room.lines;
const { places: crossing } = room.crossing;

/**
 * The supply temperature, °C, at which the first cap is just reached on each moist line that `room` lists, into its `edgeC`;
 * -Infinity when full wetting keeps them all, Infinity when no share does.
 */
export function findMoistEdges(plan: RoomPlan): void {
  const { roomShare, supplyShare, supplyVapourPa } = plan;
  const { count } = room.lines;
  for (let index = 0; index < count; index++) edges[places[index] ?? 0] = Number.NEGATIVE_INFINITY;
  if (roomShare !== Number.POSITIVE_INFINITY) {
    raiseToRhCap({ share: roomShare, addedRatio: plan.dwRoomKgKg, ofRoom: true });
  }
  if (supplyShare !== Number.POSITIVE_INFINITY) raiseToRhCap({ share: supplyShare, addedRatio: 0, ofRoom: false });
  if (supplyVapourPa !== Number.POSITIVE_INFINITY) raiseToDewPointCap(supplyVapourPa);
}

function raiseToDewPointCap(supplyVapourPa: number): void {
  const { count } = room.lines;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const ratio = (MASS_RATIO * supplyVapourPa) / ((pressures[at] ?? 0) - supplyVapourPa);
    if ((ratios[at] ?? 0) >= ratio) edges[at] = Number.POSITIVE_INFINITY;
    else {
      const leavingC = leavingWithRatioC(tops[at] ?? 0, bottoms[at] ?? 0, ratio);
      edges[at] = Math.max(edges[at] ?? 0, leavingC + (fanRises[at] ?? 0));
    }
  }
}

/**
 * The same of a cap on relative humidity. Vapour less the share of saturation is a concave function that falls with temperature: the
 * chord between full wetting and none lands on its wet side, and steps of Newton's method come back from the dry side, within the cap.
 *
 * The chord and each step are loops of their own over all lines. Within a line every division waits for the one before it; of several
 * lines a processor works out several at once, but only where what it does for each is short.
 */
function raiseToRhCap(cap: RhCap): void {
  for (const loop of loopsToCap) loop(cap);
}

interface RhCap {
  /** Vapour must stay under this share of saturation. */
  readonly share: number;
  /** Moisture that the air has taken up, kg/kg. */
  readonly addedRatio: number;
  /** Whether the cap is on the room, whose air is warmer; else on the supply itself. */
  readonly ofRoom: boolean;
}

/** Called from one place, as in `run-loop.ts`; two steps from where the chord lands, within a kelvin, leave some 0.00001 K. */
const loopsToCap: readonly ((cap: RhCap) => void)[] = [beginOnChords, stepToCap, stepToCap, raiseEdges];

/** Lists the lines that cross the cap, each with a first guess into `triedC`; a line that lies over it altogether has no edge. */
function beginOnChords({ share, addedRatio, ofRoom }: RhCap): void {
  const { count } = room.lines;
  let crossingCount = 0;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const riseK = ofRoom ? (setC[at] ?? 0) - (supplyAimC[at] ?? 0) : 0;
    const pressurePa = pressures[at] ?? 0;
    const top = tops[at] ?? 0;
    const bottom = bottoms[at] ?? 0;
    const fanRiseK = fanRises[at] ?? 0;
    const dryC = dries[at] ?? 0;
    const fullC = fulls[at] ?? 0;
    const fullRatio = ratioOnLine(top, bottom, fullC - fanRiseK) + addedRatio;
    const fullExcess = vapourPressurePa(fullRatio, pressurePa) - share * tabledSaturationPa(fullC + riseK);
    if (fullExcess < 0) continue;
    const dryRatio = ratioOnLine(top, bottom, dryC - fanRiseK) + addedRatio;
    const dryExcess = vapourPressurePa(dryRatio, pressurePa) - share * tabledSaturationPa(dryC + riseK);
    if (!(dryExcess < 0)) {
      edges[at] = Number.POSITIVE_INFINITY;
      continue;
    }
    tried[at] = fullC + ((dryC - fullC) * fullExcess) / (fullExcess - dryExcess);
    crossing[crossingCount++] = at;
  }
  room.crossing.count = crossingCount;
}

/** One step of Newton's method on every line that crosses the cap. */
function stepToCap({ share, addedRatio, ofRoom }: RhCap): void {
  const { count } = room.crossing;
  for (let index = 0; index < count; index++) {
    const at = crossing[index] ?? 0;
    const edgeC = tried[at] ?? 0;
    const pressurePa = pressures[at] ?? 0;
    const leavingC = edgeC - (fanRises[at] ?? 0);
    const perBottom = 1 / ((bottoms[at] ?? 0) + VAPOUR_KJ_PER_KG_K * leavingC);
    const ratio = ((tops[at] ?? 0) - AIR_KJ_PER_KG_K * leavingC) * perBottom;
    const ratioSlope = -(AIR_KJ_PER_KG_K + VAPOUR_KJ_PER_KG_K * ratio) * perBottom;
    const perTotal = 1 / (MASS_RATIO + ratio + addedRatio);
    const cappedC = edgeC + (ofRoom ? (setC[at] ?? 0) - (supplyAimC[at] ?? 0) : 0);
    const excess = pressurePa * (ratio + addedRatio) * perTotal - share * tabledSaturationPa(cappedC);
    const vapourSlope = pressurePa * MASS_RATIO * ratioSlope * perTotal * perTotal;
    tried[at] = edgeC - excess / (vapourSlope - share * tabledSlopePaPerK(cappedC));
  }
}

function raiseEdges(): void {
  for (let index = 0; index < room.crossing.count; index++) {
    const at = crossing[index] ?? 0;
    edges[at] = Math.max(edges[at] ?? 0, tried[at] ?? 0);
  }
}
