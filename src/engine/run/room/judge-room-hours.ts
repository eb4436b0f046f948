/**
 * Method 5 and 6 for every demand hour of a year in one pass: rooms held at a temperature by a stream of outdoor air whose
 * indirect stages take outdoor air as secondary air. The same decisions as `judgeSupplyAirHour`, which judges one hour for any
 * brief, made on numbers alone; a test holds the two together. Comparisons on whole hundredths, a tie is met. Arguments are plain:
 * an object for every hour would cost as much as judging it.
 */
import { hundredths } from '../../conventions.ts';
import { withinShare } from '../../hour-classes/demand-hour.ts';
import { hourClasses } from '../../hour-classes/hour-class.ts';
import { gainsEnough } from '../../hour-classes/short-from.ts';
import { vapourPressurePa, volumeM3PerKg } from '../../psychrometrics/moist-air.ts';
import { tabledSaturationPa } from '../../psychrometrics/saturation-table.ts';
import { dampReasons, type HourColumns, runningStages } from '../hour-columns.ts';
import { capsHold, meetCaps, type RoomHour, roomHour } from './room-hour.ts';
import type { RoomPlan } from './room-plan.ts';
import {
  evaporatedAt,
  layLine,
  ratioAt,
  type SupplyLine,
  shareFor,
  shareWithinCaps,
  supplyAt,
  supplyLine,
} from './supply-line.ts';

const FROZEN = hourClasses.indexOf('frozen');
const CLASS_OF_AIR = hourClasses.indexOf('air');
const DAMP = hourClasses.indexOf('damp');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const AIR = runningStages.indexOf('air');
const OUTSIDE = dampReasons.indexOf('outside');
const PLANT = dampReasons.indexOf('plant');
/** Class of an hour that a stage meets, by the stage's position in `runningStages`. */
const CLASS_OF_STAGE = Uint8Array.from(runningStages, (stage) =>
  stage === null || stage === 'tower' ? 0 : hourClasses.indexOf(stage),
);

/** A brief made ready, with the places that its hours are worked out in; used for any number of years, one after another. */
export interface RoomJudge {
  readonly plan: RoomPlan;
  readonly hour: RoomHour;
  readonly lines: readonly SupplyLine[];
}

export function roomJudge(plan: RoomPlan): RoomJudge {
  return { plan, hour: roomHour(), lines: plan.stages.map(supplyLine) };
}

/** Slots of a year that have demand, with the weather and the limit of every slot. */
export interface RoomYear {
  readonly demandSlots: Uint16Array;
  readonly dryBulbC: Float64Array;
  readonly humidityRatio: Float64Array;
  readonly pressurePa: Float64Array;
  readonly setC: Float64Array;
  readonly loadFraction: (dryBulbC: number) => number;
  /** Wet bulb of each slot, °C, and the one after an indirect stage at full effect. */
  readonly wetBulbC: Float32Array;
  readonly secondWetBulbC: Float32Array;
}

/** Judges every demand hour of a year and writes it into the columns, from their beginning. */
export function judgeRoomHours(judge: RoomJudge, year: RoomYear, into: HourColumns): void {
  into.count = 0;
  for (let index = 0; index < year.demandSlots.length; index++) {
    const slot = year.demandSlots[index] ?? 0;
    meetHour(judge, year, slot);
    into.slot[into.count] = slot;
    judgeHour(judge, into, into.count);
    writePlant(judge, into, into.count);
    into.count++;
  }
}

/** Takes in a slot: its air, what is asked of the supply, and what the caps allow there. */
function meetHour({ plan, hour }: RoomJudge, year: RoomYear, slot: number): void {
  hour.dryBulbC = year.dryBulbC[slot] ?? Number.NaN;
  hour.humidityRatio = year.humidityRatio[slot] ?? Number.NaN;
  hour.pressurePa = year.pressurePa[slot] ?? Number.NaN;
  hour.wetBulbC = year.wetBulbC[slot] ?? Number.NaN;
  hour.secondWetBulbC = year.secondWetBulbC[slot] ?? Number.NaN;
  hour.volumeM3PerKg = volumeM3PerKg(hour.dryBulbC, hour.humidityRatio, hour.pressurePa);
  hour.setC = year.setC[slot] ?? Number.NaN;
  hour.loadFraction = year.loadFraction(hour.dryBulbC);
  hour.supplyAimC = hour.setC - plan.dTroomK * hour.loadFraction;
  hour.roomRiseK = hour.setC - hour.supplyAimC;
  hour.airC = hour.dryBulbC + (plan.riseKPerVolume[AIR] ?? 0) * hour.volumeM3PerKg;
  hour.aimHundredths = hundredths(hour.supplyAimC);
  meetCaps(plan, hour);
  hour.frozen = hundredths(hour.dryBulbC) <= plan.freezeHundredths;
  hour.dampOutside = !hour.frozen && !(hour.humidityRatio < hour.ratioUnderCaps);
  hour.wet = false;
}

function judgeHour(judge: RoomJudge, into: HourColumns, at: number): void {
  const { plan, hour, lines } = judge;
  if (into.detail) writeDemand(into, at, hour);
  into.airMeets[at] = 0;
  into.aloneMet[at] = 0;
  const reachedByAir = hundredths(hour.airC) <= hour.aimHundredths;
  if (reachedByAir && !hour.dampOutside && capsHold(plan, hour, hour.airC, hour.humidityRatio)) {
    writeMet(into, at, hour.frozen ? FROZEN : CLASS_OF_AIR);
    writeAir(into, at, hour);
    into.airMeets[at] = 1;
    into.aloneMet[at] = plan.allAlone;
    return;
  }
  hour.wet = !hour.frozen && waterMayRun(plan, hour);
  if (hour.wet) for (let nth = 0; nth < lines.length; nth++) layLine(lineAt(lines, nth), plan, hour);
  if (!hour.wet || hour.dampOutside || !metByStage(judge, into, at)) writeUnmet(judge, into, at);
}

function lineAt(lines: readonly SupplyLine[], nth: number): SupplyLine {
  const line = lines[nth];
  if (line === undefined) throw new RangeError(`no stage of the number ${nth}`);
  return line;
}

/** Cut-in, start temperature and the ceiling of outdoor humidity (method 4). */
function waterMayRun(plan: RoomPlan, hour: RoomHour): boolean {
  const roomByAirC = hour.airC + plan.dTroomK * hour.loadFraction;
  if (hundredths(roomByAirC) < plan.startHundredths) return false;
  if (plan.outdoorShare !== Number.POSITIVE_INFINITY) {
    const vapourPa = vapourPressurePa(hour.humidityRatio, hour.pressurePa);
    if (!(vapourPa < plan.outdoorShare * tabledSaturationPa(hour.dryBulbC))) return false;
  }
  return hundredths(hour.dryBulbC) - hundredths(hour.wetBulbC) >= plan.cutInHundredths;
}

/** The first stage that reaches t_sup within the caps runs, with the x that just does; the others are marked as able to. */
function metByStage({ plan, hour, lines }: RoomJudge, into: HourColumns, at: number): boolean {
  let alone = 0;
  for (let nth = 0; nth < lines.length; nth++) {
    const line = lineAt(lines, nth);
    if (hundredths(supplyAt(line, 1)) > hour.aimHundredths) continue;
    const share = plan.onOff ? 1 : shareFor(line, hour.supplyAimC);
    if (!capsHold(plan, hour, supplyAt(line, share), ratioAt(line, hour, share))) continue;
    if (alone === 0) {
      writeMet(into, at, CLASS_OF_STAGE[line.stage] ?? 0);
      writeStage(into, at, plan, hour, line, share);
    }
    alone |= 1 << line.stage;
  }
  into.aloneMet[at] = alone;
  return alone !== 0;
}

/** `damp`, `short` or `beyond` (or `frozen`), with the shortfall from T*, the lowest supply within the caps. */
function writeUnmet({ plan, hour, lines }: RoomJudge, into: HourColumns, at: number): void {
  let lowestC = capsHold(plan, hour, hour.airC, hour.humidityRatio) ? hour.airC : Number.POSITIVE_INFINITY;
  let lowestLine: SupplyLine | null = null;
  let lowestShare = 0;
  let uncappedC = hour.airC;
  if (hour.wet) {
    for (let nth = 0; nth < lines.length; nth++) {
      const line = lineAt(lines, nth);
      const fullC = supplyAt(line, 1);
      uncappedC = Math.min(uncappedC, fullC);
      // Not even full wetting would be lower.
      if (fullC >= lowestC) continue;
      const share = shareWithinCaps(line, plan, hour);
      if (!(supplyAt(line, share) < lowestC)) continue;
      lowestC = supplyAt(line, share);
      lowestLine = line;
      lowestShare = share;
    }
  }
  const enough = hundredths(uncappedC) <= hour.aimHundredths;
  const short = lowestLine !== null && gainsEnough(hour.airC, lowestC);
  const damp = !hour.frozen && (hour.dampOutside || (enough && hour.wet));
  writeMet(into, at, hour.frozen ? FROZEN : damp ? DAMP : short ? SHORT : BEYOND);
  into.met[at] = 0;
  into.damp[at] = damp ? (hour.dampOutside ? OUTSIDE : PLANT) : 0;
  into.shortfallK[at] = Math.max(0, (lowestC === Number.POSITIVE_INFINITY ? hour.airC : lowestC) - hour.supplyAimC);
  into.uncappedShortfallK[at] = Math.max(0, uncappedC - hour.supplyAimC);
  if (into.classCode[at] === SHORT && lowestLine !== null) {
    writeStage(into, at, plan, hour, lowestLine, lowestShare);
  } else writeAir(into, at, hour);
  const carried = (hour.setC - (into.supplyC[at] ?? 0)) / (hour.setC - hour.supplyAimC);
  into.carriedShare[at] = damp ? 0 : withinShare(carried);
}

function writeDemand(into: HourColumns, at: number, hour: RoomHour): void {
  into.dryBulbC[at] = hour.dryBulbC;
  into.humidityRatio[at] = hour.humidityRatio;
  into.pressurePa[at] = hour.pressurePa;
  into.volumeM3PerKg[at] = hour.volumeM3PerKg;
  into.setC[at] = hour.setC;
  into.supplyAimC[at] = hour.supplyAimC;
  into.loadFraction[at] = hour.loadFraction;
  into.airSupplyC[at] = hour.airC;
}

function writeMet(into: HourColumns, at: number, classCode: number): void {
  into.classCode[at] = classCode;
  into.met[at] = 1;
  into.damp[at] = 0;
  into.shortfallK[at] = 0;
  into.uncappedShortfallK[at] = 0;
  into.carriedShare[at] = 1;
}

function writeAir(into: HourColumns, at: number, hour: RoomHour): void {
  into.running[at] = AIR;
  into.supplyC[at] = hour.airC;
  into.supplyRatio[at] = hour.humidityRatio;
  into.evaporatedKgPerKg[at] = 0;
  into.share[at] = 0;
  into.waterC[at] = Number.NaN;
}

function writeStage(
  into: HourColumns,
  at: number,
  plan: RoomPlan,
  hour: RoomHour,
  line: SupplyLine,
  share: number,
): void {
  into.running[at] = line.stage;
  into.supplyC[at] = supplyAt(line, share);
  into.supplyRatio[at] = ratioAt(line, hour, share);
  into.evaporatedKgPerKg[at] = evaporatedAt(line, plan, hour, share);
  into.share[at] = share;
  into.waterC[at] = line.waterC;
}

/** Water and electricity of the hour, method 6, per kW of design load: `supplyAirPlantHour` on columns. */
function writePlant({ plan, hour }: RoomJudge, into: HourColumns, at: number): void {
  const volume = hour.volumeM3PerKg;
  const evaporatedLitres = plan.litresPerRatio * (into.evaporatedKgPerKg[at] ?? 0);
  const carried = into.carriedShare[at] ?? 0;
  const backUpKw = hour.loadFraction * (1 - carried);
  const running = into.running[at] ?? 0;
  const pumpKw = running === AIR ? 0 : plan.pumpKwPerKw * hour.loadFraction;
  const rests = plan.economy && into.airMeets[at] === 1;
  into.evaporatedLitres[at] = evaporatedLitres;
  into.makeUpLitres[at] = evaporatedLitres * plan.makeUpPerEvaporated;
  into.coolingKwh[at] = hour.loadFraction * carried;
  into.kwh[at] = (plan.fanKwhPerVolume[running] ?? 0) * volume + pumpKw + backUpKw * plan.kwhPerKwh;
  into.referenceKwh[at] = (plan.fanKwhPerVolume[AIR] ?? 0) * volume + (rests ? 0 : hour.loadFraction * plan.kwhPerKwh);
  into.backUpKw[at] = backUpKw;
}
