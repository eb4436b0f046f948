import type { Brief } from '../brief/brief.ts';
import { openSlots } from '../clock/open-slots.ts';
import { type ResolvedClock, resolveClock } from '../clock/resolved-clock.ts';
import { hundredths, MISSING_INT16, MISSING_UINT16 } from '../conventions.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { type HourClass, hourClasses } from '../hour-classes/hour-class.ts';
import { loadFractionOf } from '../hour-classes/load-fraction.ts';
import { setPointsC } from '../hour-classes/set-points.ts';
import { volumeM3PerKg } from '../psychrometrics/moist-air.ts';
import type { PackedYear, WeatherYear } from '../reduction/weather-year.ts';
import type { PlantHour } from '../water-energy/plant-hour.ts';
import { findUse } from './find-use.ts';

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
  /** One position in `hourClasses` for every slot. */
  readonly classCodes: Uint8Array;
  /** The demand hours, in slot order. */
  readonly demandHours: readonly JudgedHour[];
}

interface Outdoor {
  readonly dryBulbC: number;
  readonly humidityRatio: number;
  readonly pressurePa: number;
}

/** The class of every slot, first match wins: closed, missing, idle, then what the brief's use says (method 5). */
export function judgeHours(input: { year: WeatherYear; brief: Brief; zone: string }): JudgedYear {
  const { year, brief, zone } = input;
  const slots = year.packed.dryBulb.length;
  const { kind, utcOffsetMin } = year;
  const clock = resolveClock({ zone, kind, year: year.year, slots, utcOffsetMin, clock: brief.clock });
  const open = openSlots(brief, clock);
  const use = findUse(brief);
  const setC = setPointsC(brief, slots);
  const loadFraction = loadFractionOf(brief, knownDryBulbsC(year.packed));
  const classCodes = new Uint8Array(slots);
  const demandHours: JudgedHour[] = [];
  for (let slot = 0; slot < slots; slot++) {
    const outdoor = outdoorAt(year.packed, slot);
    const apart = classWithoutDemand(open[slot] === 1, outdoor, brief);
    if (apart !== null || outdoor === null) {
      classCodes[slot] = codeOf(apart ?? 'missing');
      continue;
    }
    const hour = demandHour(outdoor, { setC: setC[slot] ?? Number.NaN, loadFraction, brief });
    const judgement = use.judgeHour(hour, brief);
    classCodes[slot] = codeOf(judgement.hourClass);
    demandHours.push({ slot, hour, judgement, plant: use.plantHour(hour, judgement, brief) });
  }
  return { slots, clock, classCodes, demandHours };
}

/** `closed`, `missing` or `idle`; null for a demand hour. */
function classWithoutDemand(open: boolean, outdoor: Outdoor | null, brief: Brief): HourClass | null {
  if (!open) return 'closed';
  if (outdoor === null) return 'missing';
  const idle = brief.balanceTempC !== null && hundredths(outdoor.dryBulbC) <= hundredths(brief.balanceTempC);
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

/** Weather of a slot from the packed columns; null when t, w or p is not known. */
function outdoorAt(packed: PackedYear, slot: number): Outdoor | null {
  const dryBulb = packed.dryBulb[slot] ?? MISSING_INT16;
  const humidityRatio = packed.humidityRatio[slot] ?? MISSING_UINT16;
  const pressure = packed.pressure[slot] ?? MISSING_UINT16;
  if (dryBulb === MISSING_INT16 || humidityRatio === MISSING_UINT16 || pressure === MISSING_UINT16) return null;
  return { dryBulbC: dryBulb / 100, humidityRatio: humidityRatio * 2e-6, pressurePa: pressure * 2 };
}

function knownDryBulbsC(packed: PackedYear): Float64Array {
  return Float64Array.from(packed.dryBulb.filter((value) => value !== MISSING_INT16)).map((value) => value / 100);
}

function codeOf(hourClass: HourClass): number {
  return hourClasses.indexOf(hourClass);
}
