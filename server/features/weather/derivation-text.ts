import { canonicalJson } from '#engine/brief/canonical-json.ts';
import type { HumidityRule, MonthlyChange } from '#engine/climate/monthly-change.ts';

/**
 * The original of a derived year: what it was made of, canonically, so that the same change of the same weather is the same
 * bytes and is known again. The parent stands in it by its own bytes and by what they were reduced to.
 */
export function derivationText(derivation: {
  parent: { fingerprint: string; contentHash: string };
  humidityRule: HumidityRule;
  monthly: readonly MonthlyChange[];
}): string {
  const { parent, humidityRule, monthly } = derivation;
  const { fingerprint, contentHash } = parent;
  const text = canonicalJson({
    derived: 1,
    parent: { fingerprint, contentHash },
    humidityRule,
    monthly: monthly.map((change) => ({ ...change })),
  });
  return `${text}\n`;
}
