import type { Brief } from '../brief/brief.ts';
import type { Ledger, ToleranceAnswer, Verdict, WorstSpell } from '../run/run-result.ts';
import type { HardLimitCount } from './hard-limits.ts';

export interface VerdictAnswer {
  readonly tolerances: readonly ToleranceAnswer[];
  readonly verdict: Verdict;
  readonly failed: readonly string[];
}

/** Shares are quotients of whole hours; this absorbs the last bits of a floating-point percentage, nothing more. */
const ROUNDING_PCT = 1e-9;

/** `meets the brief` when every tolerance and every hard limit holds (method 7.2 and 3.1). */
export function verdictOf(input: {
  brief: Pick<Brief, 'tolerance'>;
  ledger: Pick<Ledger, 'demand' | 'met'>;
  worstSpell: WorstSpell | null;
  hardLimits: readonly HardLimitCount[];
}): VerdictAnswer {
  const { sharePct, hours, spellH } = input.brief.tolerance;
  const { demand, met } = input.ledger;
  const unmetPct = demand === 0 ? 0 : (100 * (demand - met)) / demand;
  const tolerances = [
    ...answer('unmet share of demand hours', { found: unmetPct, allowed: sharePct, unit: '%' }),
    ...answer('unmet demand hours', { found: demand - met, allowed: hours, unit: 'h' }),
    ...answer('worst spell', { found: input.worstSpell?.hours ?? 0, allowed: spellH, unit: 'h' }),
  ];
  const over = input.hardLimits.map((limit) => ({
    tolerance: hardLimitName(limit),
    found: limit.foundHours,
    allowed: limit.allowedHours,
    unit: 'h',
    holds: limit.foundHours <= limit.allowedHours,
  }));
  const all = [...tolerances, ...over];
  const failed = all.filter(({ holds }) => !holds).map(({ tolerance }) => tolerance);
  if (failed.length > 0) return { tolerances: all, verdict: 'does not', failed };
  return { tolerances: all, verdict: tolerances.length > 0 ? 'meets the brief' : 'no tolerance set', failed };
}

/** "hours over 32 °C". */
export function hardLimitName(limit: Pick<HardLimitCount, 'tempC' | 'derated'>): string {
  return `hours over ${hardLimitWords(limit)}`;
}

/** "32 °C", "27.15 °C (derated for height)". */
export function hardLimitWords({ tempC, derated }: Pick<HardLimitCount, 'tempC' | 'derated'>): string {
  return `${Math.round(tempC * 100) / 100} °C${derated ? ' (derated for height)' : ''}`;
}

function answer(
  tolerance: string,
  of: { found: number; allowed: number | undefined; unit: string },
): ToleranceAnswer[] {
  const { found, allowed, unit } = of;
  return allowed === undefined ? [] : [{ tolerance, found, allowed, unit, holds: found <= allowed + ROUNDING_PCT }];
}
