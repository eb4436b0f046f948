import type { Readable } from 'node:stream';

/** Memory that one original after another is read into. */
export interface OriginalMemory {
  /** So many bytes, holding anything; what was taken before is no longer the taker's. */
  take(length: number): Uint8Array;
}

/**
 * Where the original bytes of uploads are kept. Keys are made by `originalKey`, never from a name that a person gave.
 * A key stands for its bytes: putting the same key again leaves what is there.
 */
export interface OriginalStore {
  /** Takes a copy of the file at a path, or bytes; whole and on disk when it answers, else nothing of it stays. */
  put(key: string, from: string | Uint8Array): Promise<void>;
  /** @throws when there is no such original */
  get(key: string): Promise<Readable>;
  /**
   * @param into of `newMemory`, to be used for one original after another: the bytes hold until it is used again
   * @throws when there is no such original
   */
  read(key: string, into?: OriginalMemory): Promise<Uint8Array>;
  /** Memory for `read`, in a store that can read into it. */
  newMemory?(): OriginalMemory;
  /** Removing what is not there is no fault. */
  remove(key: string): Promise<void>;
}

const FINGERPRINT = /^[0-9a-f]{64}$/;

/** The key of an original: its SHA-256 under two folders of two letters, so that no folder grows without end. */
export function originalKey(fingerprint: string): string {
  if (!FINGERPRINT.test(fingerprint)) throw new RangeError(`not a SHA-256 fingerprint: ${fingerprint.slice(0, 80)}`);
  return `${fingerprint.slice(0, 2)}/${fingerprint.slice(2, 4)}/${fingerprint}`;
}

const KEY = /^[0-9a-f]{2}\/[0-9a-f]{2}\/[0-9a-f]{64}$/;

export function isOriginalKey(key: string): boolean {
  return KEY.test(key);
}
