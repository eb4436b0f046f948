import type { Readable } from 'node:stream';
import type { ReusableBytes } from './reusable-bytes.ts';

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
   * @param into memory that a folder's original is read into, where it is given: the bytes hold until that is used again
   * @throws when there is no such original
   */
  read(key: string, into?: ReusableBytes): Promise<Uint8Array>;
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
