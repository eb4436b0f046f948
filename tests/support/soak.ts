/** Counts of a random test: a sample in `npm test`, the full count in `npm run soak`, always with the seed in the output. */
export interface Sample {
  readonly count: number;
  readonly seed: number;
}

const EVERYDAY_SEED = 20260101;

/**
 * @param name what is counted, for the printed line
 * @param everyday the count of `npm test`; the environment variable SOAK_HOURS takes its place
 */
export function sampleOf(name: string, everyday: number): Sample {
  const soak = process.env.SOAK_HOURS;
  const count = soak === undefined ? everyday : Number(soak);
  const given = process.env.SOAK_SEED;
  const seed = given !== undefined ? Number(given) : soak === undefined ? EVERYDAY_SEED : Date.now() % 2 ** 31;
  console.log(`${name}: ${count} samples, seed ${seed}`);
  return { count, seed };
}
