import { HOURS_PER_DAY } from '../conventions.ts';

const DAYS_BACK = 30;
const ALPHA = 0.8;

/**
 * Running mean of the outdoor temperature, °C, of every day: sum over k = 1..30 of 0.2 x 0.8^(k-1) x Td(-k), divided by the
 * sum of the weights, Td the mean of a day's slots in standard time (method 3.1; the same for ASHRAE 55 and EN 16798-1).
 * Days without a known hour are left out with their weight; a day with none before it takes the first daily mean known.
 * @param dryBulbC one value per slot, NaN where missing
 * @param wrapped the days before the first are the year's last (typical and derived years)
 */
export function runningMeansC(dryBulbC: Float64Array, wrapped: boolean): Float64Array {
  const days = dryBulbC.length / HOURS_PER_DAY;
  const dailyC = Float64Array.from({ length: days }, (_, day) => meanOfDay(dryBulbC, day));
  const first = dailyC.find((mean) => !Number.isNaN(mean)) ?? Number.NaN;
  return Float64Array.from({ length: days }, (_, day) => {
    let sum = 0;
    let weights = 0;
    for (let back = 1; back <= DAYS_BACK; back++) {
      const before = wrapped ? (day - back + days) % days : day - back;
      const mean = dailyC[before] ?? Number.NaN;
      if (Number.isNaN(mean)) continue;
      const weight = (1 - ALPHA) * ALPHA ** (back - 1);
      sum += weight * mean;
      weights += weight;
    }
    return weights > 0 ? sum / weights : first;
  });
}

function meanOfDay(dryBulbC: Float64Array, day: number): number {
  const known = dryBulbC
    .subarray(day * HOURS_PER_DAY, (day + 1) * HOURS_PER_DAY)
    .filter((value) => !Number.isNaN(value));
  return known.length === 0 ? Number.NaN : known.reduce((sum, value) => sum + value, 0) / known.length;
}
