import { HOURS_PER_DAY } from '../conventions.ts';
import { floatColumn } from '../float-column.ts';

const DAYS_BACK = 30;
const ALPHA = 0.8;
/** Weight of each day before, yesterday's first. */
const WEIGHTS = Float64Array.from({ length: DAYS_BACK }, (_, back) => (1 - ALPHA) * ALPHA ** back);

/**
 * Running mean of the outdoor temperature, °C, of every day: sum over k = 1..30 of 0.2 x 0.8^(k-1) x Td(-k), divided by the
 * sum of the weights, Td the mean of a day's slots in standard time (method 3.1; the same for ASHRAE 55 and EN 16798-1).
 * Days without a known hour are left out with their weight; a day with none before it takes the first daily mean known.
 * @param dryBulbC one value per slot, NaN where missing
 * @param wrapped the days before the first are the year's last (typical and derived years)
 */
export function runningMeansC(dryBulbC: Float64Array, wrapped: boolean): Float64Array {
  const days = dryBulbC.length / HOURS_PER_DAY;
  const dailyC = floatColumn(days, (day) => meanOfDay(dryBulbC, day));
  const first = dailyC.find((mean) => !Number.isNaN(mean)) ?? Number.NaN;
  return floatColumn(days, (day) => {
    let sum = 0;
    let weights = 0;
    for (let back = 1; back <= DAYS_BACK; back++) {
      const before = wrapped ? (day - back + days) % days : day - back;
      const mean = before < 0 ? Number.NaN : (dailyC[before] ?? Number.NaN);
      if (Number.isNaN(mean)) continue;
      const weight = WEIGHTS[back - 1] ?? 0;
      sum += weight * mean;
      weights += weight;
    }
    return weights > 0 ? sum / weights : first;
  });
}

function meanOfDay(dryBulbC: Float64Array, day: number): number {
  let sum = 0;
  let known = 0;
  for (let slot = day * HOURS_PER_DAY; slot < (day + 1) * HOURS_PER_DAY; slot++) {
    const value = dryBulbC[slot] ?? Number.NaN;
    if (Number.isNaN(value)) continue;
    sum += value;
    known += 1;
  }
  return known === 0 ? Number.NaN : sum / known;
}
