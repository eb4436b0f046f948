/** The limit of each slot, written apart from the method: adaptive comfort with its running mean, fixed and derated limits. */
import type { Brief } from '#engine/brief/brief.ts';

interface Adaptive {
  readonly slope: number;
  readonly constant: number;
  readonly above: number;
  readonly from: number;
  readonly to: number;
}

/** ASHRAE 55-2023 5.4 and EN 16798-1 annex B, upper limits (checks C01, C02). */
const MODELS: Readonly<Record<string, Adaptive>> = {
  'ashrae55-80': { slope: 0.31, constant: 17.8, above: 3.5, from: 10, to: 33.5 },
  'ashrae55-90': { slope: 0.31, constant: 17.8, above: 2.5, from: 10, to: 33.5 },
  'en16798-i': { slope: 0.33, constant: 18.8, above: 2, from: 10, to: 30 },
  'en16798-ii': { slope: 0.33, constant: 18.8, above: 3, from: 10, to: 30 },
  'en16798-iii': { slope: 0.33, constant: 18.8, above: 4, from: 10, to: 30 },
};

/** Mean of the known slots of each day; NaN for a day without one. */
function dayMeans(dryBulbC: Float64Array): readonly number[] {
  const means: number[] = [];
  for (let day = 0; day < dryBulbC.length / 24; day++) {
    const known = [...dryBulbC.slice(24 * day, 24 * day + 24)].filter((value) => !Number.isNaN(value));
    means.push(known.reduce((sum, value) => sum + value, 0) / known.length);
  }
  return means;
}

/**
 * Running mean of each day over the 30 days before it; wrapped where the year is no calendar year. A day with none before it
 * takes the first mean known (ours).
 */
function runningMeans(dryBulbC: Float64Array, wrapped: boolean): readonly number[] {
  const means = dayMeans(dryBulbC);
  const first = means.find((mean) => !Number.isNaN(mean)) ?? Number.NaN;
  return means.map((_mean, day) => {
    let sum = 0;
    let weights = 0;
    for (let back = 1; back <= 30; back++) {
      const then = day - back < 0 && wrapped ? day - back + means.length : day - back;
      const mean = means[then];
      if (mean === undefined || Number.isNaN(mean)) continue;
      const weight = 0.2 * 0.8 ** (back - 1);
      sum += weight * mean;
      weights += weight;
    }
    return weights === 0 ? first : sum / weights;
  });
}

function derated(tempC: number, derate: string | undefined, heightM: number): number {
  return derate === undefined ? tempC : tempC - Math.max(0, heightM - 900) / 300;
}

/** Limit temperature, °C, of each slot; NaN throughout for limits that are no temperature of a room or an inlet. */
export function limitOfEachSlot(input: {
  brief: Brief;
  dryBulbC: Float64Array;
  wrapped: boolean;
  heightM: number;
}): Float64Array {
  const { brief, dryBulbC, wrapped, heightM } = input;
  const { limit } = brief;
  const slots = new Float64Array(dryBulbC.length).fill(Number.NaN);
  if (limit.kind === 'fixed') return slots.fill(limit.tempC);
  if (limit.kind === 'inlet') {
    const hard = brief.hardLimits.map((each) => derated(each.tempC, each.derate, heightM));
    return slots.fill(Math.min(derated(limit.tempC, limit.derate, heightM), ...hard));
  }
  if (limit.kind !== 'adaptive') return slots;
  const model = MODELS[limit.model];
  if (model === undefined) throw new Error(`the oracle does not know ${limit.model}`);
  const running = runningMeans(dryBulbC, wrapped);
  return slots.map((_none, slot) => {
    const clamped = Math.min(model.to, Math.max(model.from, running[Math.floor(slot / 24)] ?? Number.NaN));
    return Math.min(model.slope * clamped + model.constant + model.above, limit.ceilingC ?? Number.POSITIVE_INFINITY);
  });
}
