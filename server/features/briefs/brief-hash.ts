import { createHash } from 'node:crypto';
import type { Brief } from '#engine/brief/brief.ts';
import { canonicalJson } from '#engine/brief/canonical-json.ts';

/** SHA-256, hexadecimal, of a brief written in the one canonical way: the brief's part of a run's key. */
export function briefHash(brief: Brief): string {
  return createHash('sha256').update(canonicalJson(brief)).digest('hex');
}
