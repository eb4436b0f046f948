/** `npm run soak` tries this many times the samples of `npm test`, unless SOAK_FACTOR says otherwise. */
const SOAK_FACTOR = 20;

const soaking = process.env.SOAK === '1';

/** How many samples a property is tried on: `count` in `npm test`; in `npm run soak` many more, or `atSoak`. */
export function samples(count: number, atSoak?: number): number {
  if (!soaking) return count;
  return atSoak ?? Math.round(count * Number(process.env.SOAK_FACTOR ?? SOAK_FACTOR));
}

/**
 * Settings of a fast-check property: its number of samples, and the seed that `npm run soak` printed, so that a failing soak can
 * be run again. `npm test` takes a new seed each time; fast-check prints it with a failure.
 */
export function propertySettings(count: number, atSoak?: number): { numRuns: number; seed?: number } {
  const seed = process.env.SOAK_SEED;
  return { numRuns: samples(count, atSoak), ...(seed === undefined ? {} : { seed: Number(seed) }) };
}
