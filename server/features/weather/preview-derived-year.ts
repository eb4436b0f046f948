import type { DerivedPreview } from '#contract/climate.ts';
import { changeWords } from '#engine/climate/change-words.ts';
import { contentHash } from './content-hash.ts';
import { type AskedDerivation, type DerivingParts, deriveFromParent } from './derive-from-parent.ts';
import { presentDifference } from './present-derivation.ts';

/** What a change would make of an accepted year; nothing is stored. */
export async function previewDerivedYear(parts: DerivingParts, asked: AskedDerivation): Promise<DerivedPreview> {
  const { monthly, cappedHours, difference, reduced } = await deriveFromParent(parts, asked);
  return {
    monthly: monthly.map((change) => ({ ...change })),
    words: changeWords(monthly, asked.change.humidityRule),
    cappedHours,
    difference: presentDifference(difference),
    contentHash: contentHash(reduced.year),
  };
}
