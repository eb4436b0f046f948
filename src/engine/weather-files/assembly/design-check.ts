/** A free check: design values that a file publishes for its place, beside those of its own hours. */
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
  const dry = [...hours.dryBulbC].filter((value) => !Number.isNaN(value)).sort((a, b) => b - a);
  const wet = highestWetBulbs(hours);
  const differences = PER_MILLE.flatMap((perMille, index) => [
    difference('dry bulb', perMille, published.dryBulbC[index], dry[Math.floor((perMille * dry.length) / 1000)]),
    difference('wet bulb', perMille, published.wetBulbC[index], wet.values[Math.floor((perMille * wet.hours) / 1000)]),
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

/** The highest wet bulbs, downwards, and the number of hours that have one. */
function highestWetBulbs(hours: HourColumns): { values: readonly number[]; hours: number } {
  const known: { slot: number; heat: number }[] = [];
  for (let slot = 0; slot < hours.dryBulbC.length; slot++) {
    const dryBulbC = hours.dryBulbC[slot] ?? Number.NaN;
    const ratio = hours.humidityRatio[slot] ?? Number.NaN;
    if (Number.isNaN(dryBulbC + ratio + (hours.pressurePa[slot] ?? Number.NaN))) continue;
    known.push({ slot, heat: enthalpyKJPerKg(dryBulbC, ratio) });
  }
  known.sort((a, b) => b.heat - a.heat);
  const values = known.slice(0, Math.ceil(HOTTEST_SHARE * known.length)).map(({ slot }) => {
    const dryBulbC = hours.dryBulbC[slot] ?? Number.NaN;
    return wetBulbC(dryBulbC, hours.humidityRatio[slot] ?? Number.NaN, hours.pressurePa[slot] ?? Number.NaN);
  });
  return { values: values.sort((a, b) => b - a), hours: known.length };
}
