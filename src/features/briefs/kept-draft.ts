/**
 * A draft that was left stays on this device, for the person and the brief that it belongs to, until it is saved or dropped.
 * Where the browser keeps nothing it stays as long as the page is not loaded anew.
 */
import { isRecord } from '../../engine/brief/fields.ts';
import type { DraftValues } from './draft.ts';

export interface DraftKey {
  readonly personId: string;
  readonly briefId: string;
}

export interface KeptDraft {
  /** The version that it began from. */
  readonly basedOn: number;
  readonly keptAt: string;
  readonly values: DraftValues;
}

type Storage = Pick<globalThis.Storage, 'getItem' | 'setItem' | 'removeItem'>;

const inMemory = new Map<string, KeptDraft>();

const nameOf = ({ personId, briefId }: DraftKey): string => `muslin.draft.${personId}.${briefId}`;

/** The storage of the device; null where a browser holds it back. */
function deviceStorage(): Storage | null {
  try {
    return globalThis.localStorage ?? null;
  } catch {
    return null;
  }
}

/** @returns whether it outlasts the page */
export function keepDraft(key: DraftKey, draft: KeptDraft, storage: Storage | null = deviceStorage()): boolean {
  const name = nameOf(key);
  inMemory.set(name, draft);
  try {
    storage?.setItem(name, JSON.stringify(draft));
    return storage !== null;
  } catch {
    return false;
  }
}

export function findDraft(key: DraftKey, storage: Storage | null = deviceStorage()): KeptDraft | null {
  const name = nameOf(key);
  try {
    return readKept(storage?.getItem(name) ?? null) ?? inMemory.get(name) ?? null;
  } catch {
    return inMemory.get(name) ?? null;
  }
}

export function dropDraft(key: DraftKey, storage: Storage | null = deviceStorage()): void {
  const name = nameOf(key);
  inMemory.delete(name);
  try {
    storage?.removeItem(name);
  } catch {
    // A browser that keeps nothing has nothing to drop.
  }
}

function readKept(text: string | null): KeptDraft | null {
  const kept: unknown = text === null ? null : JSON.parse(text);
  if (!isRecord(kept) || !isRecord(kept.values)) return null;
  const { basedOn, keptAt, values } = kept;
  if (typeof basedOn !== 'number' || typeof keptAt !== 'string') return null;
  return { basedOn, keptAt, values: { ...values } };
}
