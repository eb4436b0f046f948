/**
 * A weather year of another climate (method 10): the parent's dry bulb shifted and stretched month by month, its humidity
 * by a named rule, its pressure kept. It stands beside its parent and is never mixed with measured years.
 */
import { hundredths } from '../conventions.ts';
import {
  humidityRatioFromRelativeHumidity,
  relativeHumidityPct,
  saturationHumidityRatio,
} from '../psychrometrics/moist-air.ts';
import { monthNames, monthOfEachSlot } from '../reduction/calendar.ts';
import { packYear, unpackYear, type YearColumns } from '../reduction/packed-columns.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import { DRY_BULB_LIMITS_C } from '../weather-files/assembly/range-limits.ts';
import { monthClimates } from './month-climates.ts';
import { type HumidityRule, type MonthlyChange, shiftedAndStretchedC, stretchOf } from './monthly-change.ts';

const MONTHS = 12;
/** Steps in which a humidity ratio is packed. */
const RATIO_STEPS_PER_UNIT = 500_000;
/** A whole number of steps may come out of the arithmetic under itself, by less than this; saturation may not be passed by more. */
const ROUNDING_STEPS = 1e-9;

export interface DeriveYearInput {
  readonly parent: WeatherYear;
  /** January first. */
  readonly monthly: readonly MonthlyChange[];
  readonly humidityRule: HumidityRule;
}

export interface DerivedYear {
  readonly year: WeatherYear;
  /** Hours whose humidity would have passed saturation and was held there. */
  readonly cappedHours: number;
}

/** A change that makes no weather; the message names the months. */
export class ImpossibleChange extends RangeError {
  override readonly name = 'ImpossibleChange';
  /** `month` 0 is January. */
  readonly faults: readonly { readonly month: number; readonly message: string }[];

  constructor(faults: ImpossibleChange['faults']) {
    super(faults.map(({ month, message }) => `${monthNames[month]}: ${message}`).join('; '));
    this.faults = faults;
  }
}

/**
 * Same parent and changes, same packed columns. Missing stays missing and provenance is kept; an hour whose dry bulb and
 * humidity do not change keeps its very values; the dew point never lies above the dry bulb of an hour that does.
 * @throws RangeError unless there are twelve changes of finite numbers, and on a parent that is derived itself;
 * ImpossibleChange where a change would turn a month's day over or leave the range of weather
 */
export function deriveYear({ parent, monthly, humidityRule }: DeriveYearInput): DerivedYear {
  if (parent.kind === 'derived') throw new RangeError('a derived year has a measured parent: derive from that one');
  checkChanges(monthly);
  const before = unpackYear(parent.packed);
  const months = monthOfEachSlot(before.dryBulbC.length);
  const dryBulbC = changedDryBulbs(before.dryBulbC, months, monthly);
  let cappedHours = 0;
  const humidityRatio = before.humidityRatio.map((ratio, slot) => {
    const { ratioChangePct = 0 } = monthly[(months[slot] ?? 1) - 1] ?? {};
    const factor = humidityRule === 'ratio-scaled' ? 1 + ratioChangePct / 100 : 1;
    const changed = changedRatio({ before, slot, ratio, toC: dryBulbC[slot] ?? Number.NaN, factor, humidityRule });
    if (changed.capped) cappedHours += 1;
    return changed.ratio;
  });
  const { pressurePa } = before;
  const packed = packYear({ dryBulbC, humidityRatio, pressurePa, flags: parent.packed.flags });
  return { year: { kind: 'derived', year: null, utcOffsetMin: parent.utcOffsetMin, packed }, cappedHours };
}

function checkChanges(monthly: readonly MonthlyChange[]): void {
  if (monthly.length !== MONTHS) throw new RangeError(`a year has 12 monthly changes, not ${monthly.length}`);
  const faulty = monthly.flatMap((change, month) => {
    const { shiftK, maxShiftK, minShiftK, ratioChangePct } = change;
    const known = Number.isFinite(shiftK + maxShiftK + minShiftK + ratioChangePct) && ratioChangePct >= -100;
    return known ? [] : (monthNames[month] ?? []);
  });
  if (faulty.length > 0) throw new RangeError(`monthly changes that are no numbers: ${faulty.join(', ')}`);
}

/** In whole hundredths, as they are packed, so that humidity is held to the dry bulb that is kept. */
function changedDryBulbs(dryBulbC: Float64Array, months: Uint8Array, monthly: readonly MonthlyChange[]): Float64Array {
  const climates = monthClimates(dryBulbC);
  const faults: { month: number; message: string }[] = [];
  const moves = monthly.map((change, month) => {
    const climate = climates[month] ?? null;
    const stretch = climate === null ? 0 : stretchOf(climate, change);
    if (stretch <= -1) faults.push({ month, message: 'the swing of its days would vanish or turn over' });
    return { meanC: climate?.meanC ?? 0, shiftK: change.shiftK, stretch };
  });
  const changed = dryBulbC.map((value, slot) => {
    const move = moves[(months[slot] ?? 1) - 1];
    if (move === undefined || Number.isNaN(value)) return Number.NaN;
    return hundredths(shiftedAndStretchedC(value, move)) / 100;
  });
  faults.push(...beyondWeather(changed, months));
  if (faults.length > 0) throw new ImpossibleChange(faults);
  return changed;
}

function beyondWeather(changed: Float64Array, months: Uint8Array): ImpossibleChange['faults'] {
  const furthest = new Map<number, number>();
  for (const [slot, value] of changed.entries()) {
    const month = months[slot] ?? 1;
    if (value < DRY_BULB_LIMITS_C.low || value > DRY_BULB_LIMITS_C.high) {
      furthest.set(month, Math.abs(value) > Math.abs(furthest.get(month) ?? 0) ? value : (furthest.get(month) ?? 0));
    }
  }
  return [...furthest].map(([month, value]) => ({
    month: month - 1,
    message: `an hour would reach ${value.toFixed(1)} °C`,
  }));
}

function changedRatio(hour: {
  before: YearColumns;
  slot: number;
  ratio: number;
  toC: number;
  factor: number;
  humidityRule: HumidityRule;
}): { readonly ratio: number; readonly capped: boolean } {
  const { before, slot, ratio, toC, factor } = hour;
  const fromC = before.dryBulbC[slot] ?? Number.NaN;
  const pressurePa = before.pressurePa[slot] ?? Number.NaN;
  const same = hundredths(fromC) === hundredths(toC) && factor === 1;
  // Without a dry bulb or a pressure the hour is missing whatever its humidity.
  if (same || Number.isNaN(ratio + fromC + pressurePa)) return { ratio, capped: false };
  const wanted =
    hour.humidityRule === 'rh-kept'
      ? humidityRatioFromRelativeHumidity({
          dryBulbC: toC,
          relativeHumidityPct: Math.min(relativeHumidityPct(fromC, ratio, pressurePa), 100),
          pressurePa,
          belowZero: 'ice',
        })
      : ratio * factor;
  const wantedSteps = wanted * RATIO_STEPS_PER_UNIT;
  const saturatedSteps = saturationHumidityRatio(toC, pressurePa) * RATIO_STEPS_PER_UNIT;
  // Packed to the nearest step it could pass saturation again, so near it the ratio goes down to a whole step.
  if (wantedSteps + 0.5 < saturatedSteps) return { ratio: wanted, capped: false };
  const keptSteps = Math.floor(Math.min(wantedSteps, saturatedSteps) + ROUNDING_STEPS);
  // Less than a step is what packing takes anyway.
  return { ratio: keptSteps / RATIO_STEPS_PER_UNIT, capped: wantedSteps >= saturatedSteps + 1 };
}
