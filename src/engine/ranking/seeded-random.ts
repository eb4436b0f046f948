/**
 * The engine's own seeded random numbers: xoshiro128** 1.1 (Blackman and Vigna, "Scrambled linear pseudorandom number
 * generators", ACM Trans. Math. Softw. 47(4), 2021), its state filled by the finaliser of MurmurHash3 (Appleby) over a
 * golden-ratio sequence, as SplitMix does. The same seed and stream give the same numbers on every machine.
 */

/** Four 32-bit words, not all 0. */
export type RandomState = readonly [number, number, number, number];

const GOLDEN_RATIO = 0x9e3779b9;
const TWO_TO_32 = 2 ** 32;

/** Successive outputs of xoshiro128**, whole numbers from 0 to 2^32 - 1. */
export function xoshiro128(state: RandomState): () => number {
  let [s0, s1, s2, s3] = state;
  return () => {
    const output = Math.imul(rotateLeft(Math.imul(s1, 5), 7), 9) >>> 0;
    const shifted = s1 << 9;
    s2 ^= s0;
    s3 ^= s1;
    s1 ^= s2;
    s0 ^= s3;
    s2 ^= shifted;
    s3 = rotateLeft(s3, 11);
    return output;
  };
}

/**
 * Uniform numbers in [0, 1), in steps of 2^-32.
 * @param seed whole number; its lowest 32 bits count
 * @param stream streams of one seed are independent of each other, so that one more of them moves no other
 */
export function seededRandom(seed: number, stream = ''): () => number {
  const start = seed ^ hashOf(stream);
  const word = (place: number): number => mix(start + Math.imul(place, GOLDEN_RATIO));
  const next = xoshiro128([word(1), word(2), word(3), word(4)]);
  return () => next() / TWO_TO_32;
}

function rotateLeft(word: number, bits: number): number {
  return (word << bits) | (word >>> (32 - bits));
}

/** Finaliser of MurmurHash3: one to one on 32 bits, so at most one of four different inputs gives 0. */
function mix(word: number): number {
  let mixed = word ^ (word >>> 16);
  mixed = Math.imul(mixed, 0x85ebca6b);
  mixed ^= mixed >>> 13;
  mixed = Math.imul(mixed, 0xc2b2ae35);
  return mixed ^ (mixed >>> 16);
}

/** FNV-1a over the text's UTF-16 units (Fowler, Noll and Vo). */
function hashOf(text: string): number {
  let hash = 0x811c9dc5;
  for (let at = 0; at < text.length; at++) hash = Math.imul(hash ^ text.charCodeAt(at), 0x01000193);
  return hash;
}
