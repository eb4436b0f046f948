/**
 * What the plant does at the design points of a weather year (method 6), per kW of design load: the hour with the dry bulb
 * that is passed in so many percent of the hours and its mean coincident wet bulb; for a tower, the wet bulb and its mean
 * coincident dry bulb, since the wet bulb is what its water follows.
 */
import type { Brief } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { setPoints } from '../hour-classes/set-points.ts';
import { volumeM3PerKg } from '../psychrometrics/moist-air.ts';
import { humidityRatioOnWetBulbLine } from '../psychrometrics/wet-bulb-line.ts';
import { wetBulbColumn } from '../reduction/derived-columns.ts';
import { type DesignRow, type DesignValues, designValues } from '../reduction/design-values.ts';
import { unpackDryBulb, unpackYear } from '../reduction/packed-columns.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import { findUse } from '../run/find-use.ts';
import { DRY_AIR_KJ_PER_KG_K } from '../stages/stage-path.ts';
import { streamRiseK } from '../water-energy/air-plant-hour.ts';

export interface DesignPoint {
  /** Share of the hours in which the value is passed, %. */
  readonly percent: number;
  readonly dryBulbC: number;
  readonly wetBulbC: number;
  /** null: no demand at this point. */
  readonly state: DesignState | null;
}

export interface DesignState {
  readonly hourClass: HourJudgement['hourClass'];
  /** What runs; null when a tower stands. */
  readonly running: HourJudgement['running'];
  readonly supplyC: number;
  /** Cooling delivered without back-up, kW. */
  readonly capacityKw: number;
  readonly backUpKw: number;
  readonly makeUpLitresPerH: number;
  /** Supply airflow at the density of the entering outdoor air, L/s; null for a tower. */
  readonly airflowLPerS: number | null;
}

export interface Sizing {
  readonly points: readonly DesignPoint[];
  /** "not for sizing: ..." of a typical year or one derived from it; null for an actual year. */
  readonly caution: string | null;
}

const LITRES_PER_M3 = 1000;

/** Design values of a year as it is judged: a year that was moved to another height has its own. Dew points are left out. */
export function designOfYear({ packed }: WeatherYear): DesignValues {
  const dryBulbC = unpackDryBulb(packed);
  const dewPointC = new Float64Array(dryBulbC.length).fill(Number.NaN);
  return designValues({ dryBulbC, wetBulbC: wetBulbColumn(packed), dewPointC });
}

/**
 * @param input.design the design values of the year, as its reduction found them
 * @param input.heightM the height used for the place, m
 * @returns no points for a year without a known pressure
 */
export function sizeAtDesignPoints(input: {
  year: WeatherYear;
  design: DesignValues;
  brief: Brief;
  heightM: number;
}): Sizing {
  const { year, design, brief } = input;
  const columns = unpackYear(year.packed);
  const caution = year.kind === 'actual' ? null : `not for sizing: a ${year.kind} year hides extremes`;
  const pressurePa = meanOf(columns.pressurePa);
  if (pressurePa === null) return { points: [], caution };
  const { setC } = setPoints({ ...input, dryBulbC: columns.dryBulbC, wrapped: year.kind !== 'actual' });
  // An adaptive limit is at its highest when the days before are at their hottest, as they are at a design point (ours).
  const highestSetC = setC.reduce((one, other) => Math.max(one, other), Number.NEGATIVE_INFINITY);
  const byWetBulb = brief.limit.kind === 'tower';
  const rows = byWetBulb ? design.wetBulb : design.dryBulb;
  const points = rows.map((row) => pointOf(row, { byWetBulb, brief, pressurePa, setC: highestSetC }));
  return { points, caution };
}

interface PointInput {
  readonly byWetBulb: boolean;
  readonly brief: Brief;
  readonly pressurePa: number;
  readonly setC: number;
}

function pointOf({ percent, valueC, coincidentC }: DesignRow, input: PointInput): DesignPoint {
  // A mean of other hours may pass the value itself by a little near saturation; a wet bulb never passes the dry bulb.
  const wetBulbC = input.byWetBulb ? valueC : Math.min(coincidentC, valueC);
  const dryBulbC = input.byWetBulb ? Math.max(coincidentC, valueC) : valueC;
  return { percent, dryBulbC, wetBulbC, state: stateAt({ dryBulbC, wetBulbC }, input) };
}

function stateAt(at: { dryBulbC: number; wetBulbC: number }, input: PointInput): DesignState | null {
  const { brief, pressurePa, setC } = input;
  const use = findUse(brief);
  const idleUpToC = use.idleUpToC(brief);
  if (idleUpToC !== null && hundredths(at.dryBulbC) <= hundredths(idleUpToC)) return null;
  const humidityRatio = humidityRatioOnWetBulbLine(at.dryBulbC, at.wetBulbC, pressurePa);
  const volume = volumeM3PerKg(at.dryBulbC, humidityRatio, pressurePa);
  const hour: DemandHour = {
    outdoor: { dryBulbC: at.dryBulbC, humidityRatio, pressurePa, volumeM3PerKg: volume },
    setC,
    supplyAimC: setC - brief.dTroomK,
    // A design point is where a load is at its design value.
    loadFraction: 1,
  };
  const judgement = use.judgeHour(hour, brief);
  const plant = use.plantHour(hour, judgement, brief);
  const riseK = streamRiseK(brief);
  return {
    hourClass: judgement.hourClass,
    running: judgement.running,
    supplyC: judgement.supply.tempC,
    capacityKw: plant.coolingKwh,
    backUpKw: plant.backUpKw,
    makeUpLitresPerH: plant.makeUpLitres,
    airflowLPerS: riseK === null ? null : (LITRES_PER_M3 * volume) / (DRY_AIR_KJ_PER_KG_K * riseK),
  };
}

function meanOf(column: Float64Array): number | null {
  const known = column.filter((value) => !Number.isNaN(value));
  return known.length === 0 ? null : known.reduce((sum, value) => sum + value, 0) / known.length;
}
