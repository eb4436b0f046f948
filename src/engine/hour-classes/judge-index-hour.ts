/**
 * Method 5 for index limits: a state is good when the index of the room that it gives is at most the limit and the caps
 * hold. The index does not fall evenly with the water that is added, so that every twentieth of full wetting is tried
 * (on-off: full wetting alone). t_set and t_sup do not exist; no hour is `damp` by outdoor moisture alone.
 */
import type { Brief } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import { airPath } from '../stages/air.ts';
import type { StagePath, SupplyStage, SupplyState } from '../stages/stage-path.ts';
import { capsHold } from './caps.ts';
import { type DemandClass, type DemandHour, type HourJudgement, withinShare } from './demand-hour.ts';
import { indexLimit, indexOf } from './index-limit.ts';
import { permittedPaths } from './permitted-paths.ts';
import { gainsEnough } from './short-from.ts';

/** x = k / 20 (method 3.1). */
const SHARE_STEPS = 20;

/** A supply that a stage can give in this hour, with the index of the room that it makes. */
interface Candidate {
  readonly stage: SupplyStage;
  readonly waterC: number | null;
  readonly supply: SupplyState;
  readonly index: number;
  readonly withinCaps: boolean;
}

/** Judges one demand hour of a brief that limits an index. */
export function judgeIndexHour(hour: DemandHour, brief: Brief): HourJudgement {
  const limit = indexLimit(brief);
  const frozen = hundredths(hour.outdoor.dryBulbC) <= hundredths(brief.freezeLockoutC);
  const airStage = airPath(hour.outdoor, brief);
  const air = candidateOf(airStage, 0, { hour, brief });
  const isGood = ({ index, withinCaps }: Candidate): boolean => withinCaps && isReached(index, limit.value);
  if (isGood(air)) return metHour(frozen ? 'frozen' : 'air', air, { air, aloneMet: ['air', ...wetStages(brief)] });
  const paths = frozen ? [] : permittedPaths(hour, brief, air.supply.tempC);
  const tried = paths.map((path) => statesUpToGood(path, { hour, brief, isGood }));
  const meeting = tried.flatMap((states) => states.findLast(isGood) ?? []);
  const first = meeting[0];
  if (first !== undefined) {
    return metHour(first.stage, first, { air, aloneMet: meeting.map(({ stage }) => stage) });
  }
  return unmetHour({ air, states: [air, ...tried.flat()], limit: limit.value, frozen });
}

/** The states of a stage up to the first good one, which is the one that runs; all of them where none is good. */
function statesUpToGood(
  path: StagePath,
  { hour, brief, isGood }: { hour: DemandHour; brief: Brief; isGood: (state: Candidate) => boolean },
): Candidate[] {
  const states: Candidate[] = [];
  for (const share of sharesTried(brief)) {
    const state = candidateOf(path, share, { hour, brief });
    states.push(state);
    if (isGood(state)) break;
  }
  return states;
}

function wetStages(brief: Brief): SupplyStage[] {
  return brief.stages.flatMap((stage) => (stage === 'tower' ? [] : [stage]));
}

/** Shares of full wetting at which a stage is tried, ascending. */
export function sharesTried({ control }: Pick<Brief, 'control'>): readonly number[] {
  return control === 'on-off' ? [1] : EVERY_SHARE;
}

const EVERY_SHARE = Array.from({ length: SHARE_STEPS + 1 }, (_, step) => step / SHARE_STEPS);

function candidateOf(path: StagePath, share: number, { hour, brief }: { hour: DemandHour; brief: Brief }): Candidate {
  const supply = path.at(share);
  const { pressurePa } = hour.outdoor;
  const roomRiseK = brief.dTroomK * hour.loadFraction;
  const index = indexOf(indexLimit(brief), {
    tempC: supply.tempC + roomRiseK,
    humidityRatio: supply.humidityRatio + brief.dwRoomKgKg,
    pressurePa,
  });
  const { tempC, humidityRatio } = supply;
  // There is no t_sup: the supply enters as it is.
  const withinCaps = capsHold({ tempC, humidityRatio, pressurePa, supplyAimC: tempC, roomRiseK }, brief);
  return { stage: path.stage, waterC: path.waterC, supply, index, withinCaps };
}

function isReached(index: number, limit: number): boolean {
  return hundredths(index) <= hundredths(limit);
}

function metHour(
  hourClass: DemandClass,
  first: Candidate,
  { air, aloneMet }: { air: Candidate; aloneMet: readonly SupplyStage[] },
): HourJudgement {
  return {
    hourClass,
    met: true,
    dampBy: null,
    shortfallK: 0,
    uncappedShortfallK: 0,
    airMeets: first.stage === 'air',
    airSupplyC: air.supply.tempC,
    running: first.stage,
    supply: first.supply,
    carriedShare: 1,
    waterC: first.waterC,
    aloneMet,
  };
}

/** `damp` where the limit is reached outside the caps only, else `short` or `beyond` (or `frozen`). */
function unmetHour(input: {
  air: Candidate;
  states: readonly Candidate[];
  limit: number;
  frozen: boolean;
}): HourJudgement {
  const { air, states, limit, frozen } = input;
  const lowest = lowestOf(states.filter(({ withinCaps }) => withinCaps));
  const reachedOutside = states.some(({ index }) => isReached(index, limit));
  const short = lowest !== null && gainsEnough(air.index, lowest.index);
  const unmetClass = reachedOutside ? 'damp' : short ? 'short' : 'beyond';
  const hourClass = frozen ? 'frozen' : unmetClass;
  const runs = hourClass === 'short' && lowest !== null ? lowest : air;
  return {
    hourClass,
    met: false,
    dampBy: hourClass === 'damp' ? 'plant' : null,
    shortfallK: Math.max(0, (lowest ?? air).index - limit),
    uncappedShortfallK: Math.max(0, (lowestOf(states) ?? air).index - limit),
    airMeets: false,
    airSupplyC: air.supply.tempC,
    running: runs.stage,
    supply: runs.supply,
    // (index of outdoor air - index reached) / (index of outdoor air - limit), within 0..1 (method 6).
    carriedShare: hourClass === 'short' ? withinShare((air.index - runs.index) / (air.index - limit)) : 0,
    waterC: runs.waterC,
    aloneMet: [],
  };
}

/** The first of those with the lowest index; null of none. */
function lowestOf(states: readonly Candidate[]): Candidate | null {
  return states.reduce<Candidate | null>(
    (best, each) => (best === null || each.index < best.index ? each : best),
    null,
  );
}
