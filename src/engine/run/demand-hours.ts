/**
 * What every demand hour is before it is judged: outdoor air, what the room is held at, load and what the supply must reach.
 * Written into the columns of `block` for all its hours at once, so that a use can run through them without an object or a call per hour.
 */
import type { Brief } from '../brief/brief.ts';
import { HOURS_PER_DAY } from '../conventions.ts';
import { designDryBulbC, type LoadLine, loadFractionAt, loadLine } from '../hour-classes/load-fraction.ts';
import { runningMeansC } from '../hour-classes/running-mean.ts';
import { adaptiveDays, steadySetC } from '../hour-classes/set-points.ts';
import { volumeM3PerKg } from '../psychrometrics/moist-air.ts';
import { unpackDryBulb, unpackedDryBulbC, unpackedPa, unpackedRatio } from '../reduction/packed-columns.ts';
import type { PackedYear, WeatherYear } from '../reduction/weather-year.ts';
import { block } from './hour-block.ts';

/** What is asked in a year, found once for all its hours. */
export interface YearDemand {
  readonly packed: PackedYear;
  /** t_set of every day where it moves, and the one that holds all year, NaN where it moves or there is none; °C. */
  readonly setOfDayC: Float64Array | null;
  readonly steadySetC: number;
  /** 1 for every day whose adaptive limit was clamped to its range; null for other limits. */
  readonly outsideRangeOfDay: Uint8Array | null;
  /** null: the load is whole at every hour. */
  readonly load: LoadLine | null;
  readonly dTroomK: number;
}

export function yearDemand({ year, brief, heightM }: { year: WeatherYear; brief: Brief; heightM: number }): YearDemand {
  const { packed } = year;
  const days = brief.limit.kind === 'adaptive' ? adaptiveDays(brief.limit, runningMeansOfYear(year)) : null;
  return {
    packed,
    setOfDayC: days?.setC ?? null,
    steadySetC: steadySetC(brief, heightM),
    outsideRangeOfDay: days?.outsideRange ?? null,
    load: loadLine(brief, () => designDryBulbC(packed)),
    dTroomK: brief.dTroomK,
  };
}

const keptMeansC = new WeakMap<PackedYear, { readonly wrapped: boolean; readonly meansC: Float64Array }>();

/** Kept beside the year while that is in memory, since no brief moves them. */
function runningMeansOfYear({ packed, kind }: WeatherYear): Float64Array {
  const wrapped = kind !== 'actual';
  const found = keptMeansC.get(packed);
  if (found?.wrapped === wrapped) return found.meansC;
  const meansC = runningMeansC(unpackDryBulb(packed), wrapped);
  keptMeansC.set(packed, { wrapped, meansC });
  return meansC;
}

/** Constants of this module: see `hour-block.ts`. */
const { slot, dryBulbC, humidityRatio, pressurePa, volumeM3PerKg: volumes, setC, loadFraction, supplyAimC } = block;

/** Begins a year in `block`: what is the same at every hour is filled in once. */
export function beginDemand({ steadySetC: steadyC, dTroomK }: YearDemand): void {
  setC.fill(steadyC);
  loadFraction.fill(1);
  supplyAimC.fill(steadyC - dTroomK);
}

/** Fills in the hours of `block`, whose `slot` and `count` say which they are. */
export function meetDemandHours({ packed, setOfDayC, load, dTroomK }: YearDemand): void {
  const { count } = block;
  fillOutdoors(packed);
  if (setOfDayC !== null) {
    for (let at = 0; at < count; at++) setC[at] = setOfDayC[((slot[at] ?? 0) / HOURS_PER_DAY) | 0] ?? Number.NaN;
  }
  if (load !== null) for (let at = 0; at < count; at++) loadFraction[at] = loadFractionAt(load, dryBulbC[at] ?? 0);
  if (setOfDayC === null && load === null) return;
  for (let at = 0; at < count; at++) supplyAimC[at] = (setC[at] ?? 0) - dTroomK * (loadFraction[at] ?? 0);
}

function fillOutdoors({ dryBulb, humidityRatio: ratios, pressure }: PackedYear): void {
  const { count } = block;
  for (let at = 0; at < count; at++) {
    const from = slot[at] ?? 0;
    const tempC = unpackedDryBulbC(dryBulb[from] ?? 0);
    const ratio = unpackedRatio(ratios[from] ?? 0);
    const pascal = unpackedPa(pressure[from] ?? 0);
    dryBulbC[at] = tempC;
    humidityRatio[at] = ratio;
    pressurePa[at] = pascal;
    volumes[at] = volumeM3PerKg(tempC, ratio, pascal);
  }
}
