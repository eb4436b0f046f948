/**
 * Method 5 for uses that hold a room at a temperature with outdoor air: exactly one class per hour, first match wins.
 * Every comparison is on whole hundredths and a tie is met.
 */
import type { Brief } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import { airPath } from '../stages/air.ts';
import type { StagePath, SupplyStage, SupplyState } from '../stages/stage-path.ts';
import { capsHold } from './caps.ts';
import type { DemandHour, HourJudgement } from './demand-hour.ts';
import { permittedPaths } from './permitted-paths.ts';

/** Least useful cooling: `short` lowers the supply by at least this, K. */
const SHORT_FROM_K = 1;
/** The share of wetting at which a cap just holds is found to this. */
const SHARE_TOLERANCE = 1e-7;

/** A stage's supply in this hour. */
interface StageSupply {
  readonly stage: SupplyStage;
  readonly supply: SupplyState;
}

/** Judges one demand hour of a brief whose rooms are held at a temperature by a stream of outdoor air. */
export function judgeSupplyAirHour(hour: DemandHour, brief: Brief): HourJudgement {
  const air = airPath(hour.outdoor, brief);
  const airSupply = air.at(0);
  const frozen = hundredths(hour.outdoor.dryBulbC) <= hundredths(brief.freezeLockoutC);
  const dampOutside = !frozen && !holds({ ...airSupply, tempC: hour.supplyAimC }, hour, brief);
  const airMeets = !dampOutside && reaches(airSupply.tempC, hour) && holds(airSupply, hour, brief);
  const base = { airMeets, airSupplyC: airSupply.tempC };
  if (airMeets) {
    const hourClass = frozen ? 'frozen' : 'air';
    const aloneMet = ['air', ...airStages(brief)] as const;
    return { ...base, ...MET, hourClass, running: 'air', supply: airSupply, aloneMet };
  }
  const paths = frozen ? [] : permittedPaths(hour, brief, airSupply.tempC);
  const meeting = dampOutside ? [] : paths.flatMap((path) => meetingSupply(path, hour, brief) ?? []);
  const aloneMet = meeting.map((each) => each.stage);
  const first = meeting[0];
  if (first !== undefined) {
    return { ...base, ...MET, hourClass: first.stage, running: first.stage, supply: first.supply, aloneMet };
  }
  return { ...base, aloneMet, ...unmetHour({ hour, brief, frozen, dampOutside, air, paths }) };
}

const MET = { met: true, dampBy: null, shortfallK: 0, uncappedShortfallK: 0 } as const;

interface UnmetInput {
  readonly hour: DemandHour;
  readonly brief: Brief;
  readonly frozen: boolean;
  readonly dampOutside: boolean;
  readonly air: StagePath;
  readonly paths: readonly StagePath[];
}

/** `damp`, `short` or `beyond` (or `frozen`), with the shortfall from T*, the lowest supply within the caps. */
function unmetHour(input: UnmetInput): Omit<HourJudgement, 'airMeets' | 'airSupplyC' | 'aloneMet'> {
  const { hour, brief, air, paths } = input;
  const airSupply = air.at(0);
  const all = [air, ...paths];
  const lowest = lowestWithinCaps(all, hour, brief);
  const lowestUncappedC = Math.min(...all.map((path) => path.at(1).tempC));
  const shortfalls = {
    met: false,
    shortfallK: Math.max(0, (lowest?.supply ?? airSupply).tempC - hour.supplyAimC),
    uncappedShortfallK: Math.max(0, lowestUncappedC - hour.supplyAimC),
  };
  const onAir = { ...shortfalls, running: 'air', supply: airSupply } as const;
  if (input.frozen) return { ...onAir, hourClass: 'frozen', dampBy: null };
  if (input.dampOutside) return { ...onAir, hourClass: 'damp', dampBy: 'outside' };
  if (paths.some((path) => reaches(path.at(1).tempC, hour))) return { ...onAir, hourClass: 'damp', dampBy: 'plant' };
  const gained = lowest === null ? 0 : hundredths(airSupply.tempC) - hundredths(lowest.supply.tempC);
  if (lowest === null || gained < hundredths(SHORT_FROM_K)) return { ...onAir, hourClass: 'beyond', dampBy: null };
  return { ...shortfalls, hourClass: 'short', dampBy: null, running: lowest.stage, supply: lowest.supply };
}

/** The brief's stages that are streams of supply air. */
function airStages(brief: Brief): SupplyStage[] {
  return brief.stages.flatMap((stage) => (stage === 'tower' ? [] : [stage]));
}

function reaches(supplyC: number, hour: DemandHour): boolean {
  return hundredths(supplyC) <= hundredths(hour.supplyAimC);
}

function holds(supply: SupplyState, hour: DemandHour, brief: Brief): boolean {
  const { supplyAimC } = hour;
  const { tempC, humidityRatio } = supply;
  const roomRiseK = hour.setC - supplyAimC;
  return capsHold({ tempC, humidityRatio, pressurePa: hour.outdoor.pressurePa, supplyAimC, roomRiseK }, brief);
}

/** The supply with which a stage meets the hour: modulating, the x that just reaches t_sup; on-off, x = 1. */
function meetingSupply(path: StagePath, hour: DemandHour, brief: Brief): StageSupply | null {
  if (!reaches(path.at(1).tempC, hour)) return null;
  const supply = path.at(brief.control === 'on-off' ? 1 : path.shareFor(hour.supplyAimC));
  return holds(supply, hour, brief) ? { stage: path.stage, supply } : null;
}

/** T* with its stage: the lowest supply over x in 0..1 (on-off: x = 1) at which the caps hold; null without any. */
function lowestWithinCaps(paths: readonly StagePath[], hour: DemandHour, brief: Brief): StageSupply | null {
  let lowest: StageSupply | null = null;
  for (const path of paths) {
    const supply = lowestOfPath(path, hour, brief);
    if (supply !== null && (lowest === null || supply.tempC < lowest.supply.tempC)) {
      lowest = { stage: path.stage, supply };
    }
  }
  return lowest;
}

/** More wetting is never drier and never warmer, so the shares within the caps begin at 0 and end at one place. */
function lowestOfPath(path: StagePath, hour: DemandHour, brief: Brief): SupplyState | null {
  const full = path.at(1);
  if (holds(full, hour, brief)) return full;
  if (brief.control === 'on-off' || !holds(path.at(0), hour, brief)) return null;
  let within = 0;
  let over = 1;
  while (over - within > SHARE_TOLERANCE) {
    const middle = (within + over) / 2;
    if (holds(path.at(middle), hour, brief)) within = middle;
    else over = middle;
  }
  return path.at(within);
}
