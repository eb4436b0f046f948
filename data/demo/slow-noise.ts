import type { SeededRandom } from './seeded-random.ts';

/**
 * Noise with memory: mean 0, standard deviation 1, correlation exp(-h / memoryH) between values h hours apart
 * (a first-order autoregressive series, started in its stationary state).
 */
export function slowNoise(random: SeededRandom, options: { length: number; memoryH: number }): Float64Array {
  const keep = Math.exp(-1 / options.memoryH);
  const fresh = Math.sqrt(1 - keep * keep);
  const series = new Float64Array(options.length);
  let value = random.normal();
  for (let slot = 0; slot < options.length; slot += 1) {
    value = keep * value + fresh * random.normal();
    series[slot] = value;
  }
  return series;
}
