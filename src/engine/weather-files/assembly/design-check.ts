/** A free check: design values that a file publishes for its place, beside those of its own hours. */
import { valueAtPlace } from '../../order-statistic.ts';
import { enthalpyKJPerKg } from '../../psychrometrics/moist-air.ts';
import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import type { FindingList } from '../finding-list.ts';
import type { HourColumns } from '../weather-file-reading.ts';

/** Dry and wet bulb, °C, at 0.4, 1 and 2 % of the hours of a year, as published; null where not given. */
export interface PublishedDesign {
  readonly line: number;
  readonly dryBulbC: readonly (number | null)[];
  readonly wetBulbC: readonly (number | null)[];
}

const PER_MILLE = [4, 10, 20] as const;
const FAR_K = { dryBulb: 3, wetBulb: 2.5 } as const;
/** The wet bulb rises with the heat of the air, so its highest 2 % stand among the tenth of the hours with the most heat. */
const HOTTEST_SHARE = 0.1;

export function compareDesign(hours: HourColumns, published: PublishedDesign, findings: FindingList): void {
  const dry = hours.dryBulbC.filter((value) => !Number.isNaN(value));
  const wet = highestWetBulbs(hours);
  const differences = PER_MILLE.flatMap((perMille, index) => [
    difference('dry bulb', perMille, published.dryBulbC[index], highest(dry, dry.length, perMille)),
    difference('wet bulb', perMille, published.wetBulbC[index], highest(wet.values, wet.hours, perMille)),
  ]).filter((text) => text !== null);
  if (differences.length === 0) return;
  findings.add({
    code: 'design-differs',
    severity: 'note',
    line: published.line,
    message: () =>
      `The design values in the header differ from those of the hours: ${differences.join('; ')}. The hours are used.`,
  });
}

function difference(
  quantity: 'dry bulb' | 'wet bulb',
  perMille: number,
  publishedC: number | null | undefined,
  computedC: number | undefined,
): string | null {
  if (publishedC == null || computedC === undefined) return null;
  const limit = quantity === 'dry bulb' ? FAR_K.dryBulb : FAR_K.wetBulb;
  if (Math.abs(publishedC - computedC) <= limit) return null;
  return `${perMille / 10} % ${quantity} ${publishedC.toFixed(1)} °C published, ${computedC.toFixed(1)} °C here`;
}

/** The value that so many in a thousand of the hours reach or pass. @param values all of the hours, or the highest; rearranged */
function highest(values: Float64Array, hours: number, perMille: number): number | undefined {
  const place = values.length - 1 - Math.floor((perMille * hours) / 1000);
  return place < 0 ? undefined : valueAtPlace(values, place);
}

/** The highest wet bulbs, in any order, and the number of hours that have one. */
function highestWetBulbs({ dryBulbC, humidityRatio, pressurePa }: HourColumns): {
  values: Float64Array;
  hours: number;
} {
  const heat = new Float64Array(dryBulbC.length).fill(Number.NaN);
  for (let slot = 0; slot < heat.length; slot++) {
    if (Number.isNaN(pressurePa[slot])) continue;
    heat[slot] = enthalpyKJPerKg(dryBulbC[slot] ?? Number.NaN, humidityRatio[slot] ?? Number.NaN);
  }
  const known = heat.filter((value) => !Number.isNaN(value));
  const values = new Float64Array(Math.ceil(HOTTEST_SHARE * known.length));
  const least = valueAtPlace(known, known.length - values.length);
  let taken = 0;
  // Of the hours with just the least heat only as many as there is room for, the first of them.
  let spare = values.length - known.subarray(known.length - values.length).filter((value) => value > least).length;
  for (let slot = 0; slot < heat.length && taken < values.length; slot++) {
    const value = heat[slot] ?? Number.NaN;
    if (!(value > least || (value === least && spare-- > 0))) continue;
    values[taken++] = wetBulbC(dryBulbC[slot] ?? 0, humidityRatio[slot] ?? 0, pressurePa[slot] ?? 0);
  }
  return { values, hours: known.length };
}
