import type { OriginalMemory } from './original-store.ts';

/** A larger original gets memory of its own, so that a single one does not keep it for ever. */
const MOST_KEPT = 8 * 2 ** 20;

/** Memory for one original after another: thousands of them, each in memory of its own, would keep the process busy clearing it. */
export class ReusableBytes implements OriginalMemory {
  #bytes = new Uint8Array(0);

  take(length: number): Uint8Array {
    if (length > MOST_KEPT) return new Uint8Array(length);
    if (length > this.#bytes.length) this.#bytes = new Uint8Array(Math.min(MOST_KEPT, 2 * length));
    return this.#bytes.subarray(0, length);
  }
}
