import type { OriginalStore } from '../../storage/original-store.ts';
import { contentOf } from './original-content.ts';

/** Longer lines are cut: a line without an end must not fill an answer. */
const LONGEST_LINE = 2000;

export interface OriginalLines {
  readonly lines: readonly { readonly line: number; readonly text: string; readonly cut: boolean }[];
  readonly total: number;
}

/** Lines of an original as they stand, counted from 1 as an editor and the findings do. */
export async function originalLines(
  storage: OriginalStore,
  wanted: { storageKey: string; from: number; count: number },
): Promise<OriginalLines> {
  const content = await contentOf(await storage.read(wanted.storageKey));
  if (content instanceof Error) return { lines: [], total: 0 };
  const all = textOf(content).split(/\r\n|\r|\n/);
  if (all.at(-1) === '') all.pop();
  const lines = all.slice(wanted.from - 1, wanted.from - 1 + wanted.count).map((text, index) => ({
    line: wanted.from + index,
    text: text.slice(0, LONGEST_LINE),
    cut: text.length > LONGEST_LINE,
  }));
  return { lines, total: all.length };
}

function textOf(bytes: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return Buffer.from(bytes.buffer, bytes.byteOffset, bytes.length).toString('latin1');
  }
}
