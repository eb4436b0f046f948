import { createHash } from 'node:crypto';
import { canonicalJson } from '#engine/brief/canonical-json.ts';
import type { ResolvedClock } from '#engine/clock/resolved-clock.ts';
import type { RunResult } from '#engine/run/run-result.ts';

/**
 * SHA-256, hexadecimal, of everything that a run depends on. The height is the station's own, or a site's in steps of 10 m with the
 * height that the weather was moved from.
 */
export function runKey(parts: {
  contentHash: string;
  heightM: number;
  /** null: the weather is as it was measured. */
  adjustedFromM: number | null;
  clock: ResolvedClock;
  briefHash: string;
  methodVersion: string;
}): string {
  const { contentHash, heightM, adjustedFromM, clock, briefHash, methodVersion } = parts;
  const height = adjustedFromM === null ? String(heightM) : `${adjustedFromM} to ${heightM}`;
  const written = [contentHash, height, canonicalJson(clock), briefHash, methodVersion].join('|');
  return createHash('sha256').update(written).digest('hex');
}

/** What is stored of a run beside the classes of its hours. */
export type RunFigures = Omit<RunResult, 'hourClassCodes'>;

/** SHA-256, hexadecimal, of what a run found: its figures written canonically, then one byte an hour. Verifies a stored run. */
export function runResultHash(figures: RunFigures, hourClassCodes: Uint8Array): string {
  return createHash('sha256')
    .update(`${canonicalJson(figures)}\n`)
    .update(hourClassCodes)
    .digest('hex');
}
