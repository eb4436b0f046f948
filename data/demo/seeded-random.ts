/** Random numbers that are the same on every machine and in every run: one stream per seed text. */
export interface SeededRandom {
  /** Uniform in 0 (included) to 1 (excluded). */
  uniform(): number;
  /** Normal, mean 0, standard deviation 1. */
  normal(): number;
}

/** FNV-1a, 32 bits. */
function hash32(text: string): number {
  let hash = 0x811c9dc5;
  for (const letter of text) hash = Math.imul(hash ^ (letter.codePointAt(0) ?? 0), 0x01000193);
  return hash >>> 0;
}

/** A stream that depends on the seed text alone: a Weyl sequence through a 32-bit mixer, about 2^32 numbers long. */
export function seededRandom(seed: string): SeededRandom {
  let state = hash32(seed);
  function uniform(): number {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  }
  function normal(): number {
    const radius = Math.sqrt(-2 * Math.log(1 - uniform()));
    return radius * Math.cos(2 * Math.PI * uniform());
  }
  return { uniform, normal };
}
