import type { Brief } from '../brief/brief.ts';
import { clockOfBrief } from '../clock/clock-of-brief.ts';
import type { Position } from '../clock/daylight.ts';
import { openSlots } from '../clock/open-slots.ts';
import type { ResolvedClock } from '../clock/resolved-clock.ts';
import { hundredths } from '../conventions.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { type HourClass, hourClasses } from '../hour-classes/hour-class.ts';
import { loadFractionOf } from '../hour-classes/load-fraction.ts';
import { setPoints } from '../hour-classes/set-points.ts';
import { volumeM3PerKg } from '../psychrometrics/moist-air.ts';
import { unpackYear, type YearColumns } from '../reduction/packed-columns.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import type { PlantHour } from '../water-energy/plant-hour.ts';
import { findUse, type Use } from './find-use.ts';

/** A slot with demand: what it was, what it is under the brief, and the plant in it. */
export interface JudgedHour {
  readonly slot: number;
  readonly hour: DemandHour;
  readonly judgement: HourJudgement;
  readonly plant: PlantHour;
}

/** Every slot of a weather year under a brief; ledgers, tables and exports are counted from this. */
export interface JudgedYear {
  readonly slots: number;
  readonly clock: ResolvedClock;
  readonly use: Use;
  /** 1 where the slot's weather is known, in schedule or not. */
  readonly known: Uint8Array;
  /** One position in `hourClasses` for every slot. */
  readonly classCodes: Uint8Array;
  /** 1 where an adaptive limit was clamped to its range; null for other limits. */
  readonly outsideRange: Uint8Array | null;
  /** The demand hours, in slot order. */
  readonly demandHours: readonly JudgedHour[];
}

interface Outdoor {
  readonly dryBulbC: number;
  readonly humidityRatio: number;
  readonly pressurePa: number;
}

/** What a year is judged by. */
export interface JudgeYearInput {
  readonly year: WeatherYear;
  readonly brief: Brief;
  /** IANA name of the station's time zone. */
  readonly zone: string;
  /** The height used for the place, m. */
  readonly heightM: number;
  /** Where the place is; a schedule of daylight hours cannot do without. */
  readonly position?: Position | null;
}

/** The class of every slot, first match wins: closed, missing, idle, then what the brief's use says (method 5). */
export function judgeHours(input: JudgeYearInput): JudgedYear {
  const { year, brief, zone, heightM, position = null } = input;
  const columns = unpackYear(year.packed);
  const slots = columns.dryBulbC.length;
  const clock = clockOfBrief({ year, brief, zone, position });
  const open = openSlots(brief, clock);
  const use = findUse(brief);
  const wrapped = year.kind !== 'actual';
  const { setC, outsideRange } = setPoints({ brief, dryBulbC: columns.dryBulbC, wrapped, heightM });
  const loadFraction = loadFractionOf(
    brief,
    columns.dryBulbC.filter((dryBulbC) => !Number.isNaN(dryBulbC)),
  );
  const idleUpToC = use.idleUpToC(brief);
  const classCodes = new Uint8Array(slots);
  const known = new Uint8Array(slots);
  const demandHours: JudgedHour[] = [];
  for (let slot = 0; slot < slots; slot++) {
    const outdoor = outdoorAt(columns, slot);
    known[slot] = outdoor === null ? 0 : 1;
    const apart = classWithoutDemand(open[slot] === 1, outdoor, idleUpToC);
    if (apart !== null || outdoor === null) {
      classCodes[slot] = codeOf(apart ?? 'missing');
      continue;
    }
    const hour = demandHour(outdoor, { setC: setC[slot] ?? Number.NaN, loadFraction, brief });
    const judgement = use.judgeHour(hour, brief);
    classCodes[slot] = codeOf(judgement.hourClass);
    demandHours.push({ slot, hour, judgement, plant: use.plantHour(hour, judgement, brief) });
  }
  return { slots, clock, use, known, classCodes, demandHours, outsideRange };
}

/** `closed`, `missing` or `idle`; null for a demand hour. */
function classWithoutDemand(open: boolean, outdoor: Outdoor | null, idleUpToC: number | null): HourClass | null {
  if (!open) return 'closed';
  if (outdoor === null) return 'missing';
  const idle = idleUpToC !== null && hundredths(outdoor.dryBulbC) <= hundredths(idleUpToC);
  return idle ? 'idle' : null;
}

function demandHour(
  outdoor: Outdoor,
  input: { setC: number; loadFraction: (dryBulbC: number) => number; brief: Brief },
): DemandHour {
  const { setC, brief } = input;
  const loadFraction = input.loadFraction(outdoor.dryBulbC);
  const { dryBulbC, humidityRatio, pressurePa } = outdoor;
  const volume = volumeM3PerKg(dryBulbC, humidityRatio, pressurePa);
  return {
    outdoor: { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg: volume },
    setC,
    supplyAimC: setC - brief.dTroomK * loadFraction,
    loadFraction,
  };
}

/** Weather of a slot; null when t, w or p is not known. */
function outdoorAt(columns: YearColumns, slot: number): Outdoor | null {
  const dryBulbC = columns.dryBulbC[slot] ?? Number.NaN;
  const humidityRatio = columns.humidityRatio[slot] ?? Number.NaN;
  const pressurePa = columns.pressurePa[slot] ?? Number.NaN;
  return Number.isNaN(dryBulbC + humidityRatio + pressurePa) ? null : { dryBulbC, humidityRatio, pressurePa };
}

function codeOf(hourClass: HourClass): number {
  return hourClasses.indexOf(hourClass);
}
