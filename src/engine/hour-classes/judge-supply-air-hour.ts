/**
 * Method 5 for uses that hold a room at a temperature with outdoor air: exactly one class per hour, first match wins.
 * Every comparison is on whole hundredths and a tie is met.
 */
import type { Brief } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import { airPath } from '../stages/air.ts';
import type { StagePath, SupplyStage, SupplyState } from '../stages/stage-path.ts';
import { capsHold } from './caps.ts';
import { type DemandClass, type DemandHour, type HourJudgement, withinShare } from './demand-hour.ts';
import { permittedPaths } from './permitted-paths.ts';
import { gainsEnough } from './short-from.ts';

/** The share of wetting at which a cap just holds is found to this. */
const SHARE_TOLERANCE = 1e-7;

/** A stage's supply in this hour. */
interface StageSupply {
  readonly stage: SupplyStage;
  readonly waterC: number | null;
  readonly supply: SupplyState;
}

/** Judges one demand hour of a brief whose rooms are held at a temperature by a stream of outdoor air. */
export function judgeSupplyAirHour(hour: DemandHour, brief: Brief): HourJudgement {
  const air = airPath(hour.outdoor, brief);
  const airSupply = air.at(0);
  const frozen = hundredths(hour.outdoor.dryBulbC) <= hundredths(brief.freezeLockoutC);
  const dampOutside = !frozen && !holds(hour.supplyAimC, airSupply.humidityRatio, { hour, brief });
  if (!dampOutside && meets(airSupply, hour, brief)) {
    const onAir = { stage: air.stage, waterC: air.waterC, supply: airSupply };
    return metHour({ hourClass: frozen ? 'frozen' : 'air', first: onAir, airSupply, aloneMet: stagesWithAir(brief) });
  }
  const paths = frozen ? [] : permittedPaths(hour, brief, airSupply.tempC);
  const meeting = dampOutside ? [] : paths.flatMap((path) => meetingSupply(path, hour, brief) ?? []);
  const first = meeting[0];
  if (first !== undefined) {
    return metHour({ hourClass: first.stage, first, airSupply, aloneMet: meeting.map(({ stage }) => stage) });
  }
  return unmetHour({ hour, brief, frozen, dampOutside, air, paths });
}

function metHour(input: {
  hourClass: DemandClass;
  first: StageSupply;
  airSupply: SupplyState;
  aloneMet: readonly SupplyStage[];
}): HourJudgement {
  const { hourClass, first, airSupply, aloneMet } = input;
  return {
    hourClass,
    met: true,
    dampBy: null,
    shortfallK: 0,
    uncappedShortfallK: 0,
    airMeets: first.stage === 'air',
    airSupplyC: airSupply.tempC,
    running: first.stage,
    supply: first.supply,
    carriedShare: 1,
    waterC: first.waterC,
    aloneMet,
  };
}

interface UnmetInput {
  readonly hour: DemandHour;
  readonly brief: Brief;
  readonly frozen: boolean;
  readonly dampOutside: boolean;
  readonly air: StagePath;
  readonly paths: readonly StagePath[];
}

/** `damp`, `short` or `beyond` (or `frozen`), with the shortfall from T*, the lowest supply within the caps. */
function unmetHour(input: UnmetInput): HourJudgement {
  const { hour, brief, air, paths } = input;
  const airSupply = air.at(0);
  const all = [air, ...paths];
  const lowest = lowestWithinCaps(all, hour, brief);
  const lowestUncappedC = Math.min(...all.map((path) => path.at(1).tempC));
  const hourClass = unmetClass(input, lowest);
  const runs =
    hourClass === 'short' && lowest !== null ? lowest : { stage: air.stage, waterC: air.waterC, supply: airSupply };
  return {
    hourClass,
    met: false,
    dampBy: hourClass === 'damp' ? (input.dampOutside ? 'outside' : 'plant') : null,
    shortfallK: Math.max(0, (lowest?.supply ?? airSupply).tempC - hour.supplyAimC),
    uncappedShortfallK: Math.max(0, lowestUncappedC - hour.supplyAimC),
    airMeets: false,
    airSupplyC: airSupply.tempC,
    running: runs.stage,
    supply: runs.supply,
    carriedShare: hourClass === 'damp' ? 0 : carriedShare(runs.supply.tempC, hour),
    waterC: runs.waterC,
    aloneMet: [],
  };
}

/** (t_set - t_s) / (dT_room phi), within 0..1 (method 6). */
function carriedShare(supplyC: number, { setC, supplyAimC }: DemandHour): number {
  return withinShare((setC - supplyC) / (setC - supplyAimC));
}

function unmetClass(input: UnmetInput, lowest: StageSupply | null): DemandClass {
  const { hour, frozen, dampOutside, air, paths } = input;
  if (frozen) return 'frozen';
  if (dampOutside || paths.some((path) => reaches(path.at(1).tempC, hour))) return 'damp';
  return lowest !== null && gainsEnough(air.at(0).tempC, lowest.supply.tempC) ? 'short' : 'beyond';
}

/** Where outdoor air meets the hour, so does every plant, run dry. */
function stagesWithAir(brief: Brief): SupplyStage[] {
  const stages: SupplyStage[] = ['air'];
  for (const stage of brief.stages) if (stage !== 'tower') stages.push(stage);
  return stages;
}

function reaches(supplyC: number, hour: DemandHour): boolean {
  return hundredths(supplyC) <= hundredths(hour.supplyAimC);
}

function holds(tempC: number, humidityRatio: number, { hour, brief }: { hour: DemandHour; brief: Brief }): boolean {
  const { setC, supplyAimC } = hour;
  const { pressurePa } = hour.outdoor;
  return capsHold({ tempC, humidityRatio, pressurePa, supplyAimC, roomRiseK: setC - supplyAimC }, brief);
}

function meets(supply: SupplyState, hour: DemandHour, brief: Brief): boolean {
  return reaches(supply.tempC, hour) && holds(supply.tempC, supply.humidityRatio, { hour, brief });
}

/** The supply with which a stage meets the hour: modulating, the x that just reaches t_sup; on-off, x = 1. */
function meetingSupply(path: StagePath, hour: DemandHour, brief: Brief): StageSupply | null {
  if (!reaches(path.at(1).tempC, hour)) return null;
  const supply = path.at(brief.control === 'on-off' ? 1 : path.shareFor(hour.supplyAimC));
  return meets(supply, hour, brief) ? { stage: path.stage, waterC: path.waterC, supply } : null;
}

/** T* with its stage: the lowest supply over x in 0..1 (on-off: x = 1) at which the caps hold; null without any. */
function lowestWithinCaps(paths: readonly StagePath[], hour: DemandHour, brief: Brief): StageSupply | null {
  let lowest: StageSupply | null = null;
  for (const path of paths) {
    const supply = lowestOfPath(path, hour, brief);
    if (supply !== null && (lowest === null || supply.tempC < lowest.supply.tempC)) {
      lowest = { stage: path.stage, waterC: path.waterC, supply };
    }
  }
  return lowest;
}

/** More wetting is never drier and never warmer, so the shares within the caps begin at 0 and end at one place. */
function lowestOfPath(path: StagePath, hour: DemandHour, brief: Brief): SupplyState | null {
  const full = path.at(1);
  const within = (supply: SupplyState): boolean => holds(supply.tempC, supply.humidityRatio, { hour, brief });
  if (within(full)) return full;
  if (brief.control === 'on-off' || !within(path.at(0))) return null;
  let wettest = 0;
  let over = 1;
  while (over - wettest > SHARE_TOLERANCE) {
    const middle = (wettest + over) / 2;
    if (within(path.at(middle))) wettest = middle;
    else over = middle;
  }
  return path.at(wettest);
}
