import type { Brief } from '../brief/brief.ts';
import type { RunResult } from '../run/run-result.ts';
import type { RawComponents } from './weighted-score.ts';

type Counted = Pick<RunResult, 'ledger' | 'severityKh' | 'worstSpell' | 'water' | 'electricity'>;

/** The raw figures of one run (method 7.3); with one year, the worst year is that year. No demand: none applies. */
export function rawComponents(run: Counted, brief: Brief): RawComponents {
  const { demand, met, classes } = run.ledger;
  if (demand === 0) return NONE_APPLIES;
  const servedPct = (100 * met) / demand;
  return {
    served: servedPct,
    severity: (1000 * run.severityKh) / demand,
    spell: run.worstSpell?.hours ?? 0,
    damp: dampApplies(brief) ? (100 * classes.damp) / demand : null,
    water: run.water.litresPerKwh,
    electricity: run.electricity?.savedPct ?? null,
    'worst-year': servedPct,
  };
}

const NONE_APPLIES: RawComponents = {
  served: null,
  severity: null,
  spell: null,
  damp: null,
  water: null,
  electricity: null,
  'worst-year': null,
};

/** Not to towers, halls, turbines, index limits and briefs without caps (method 3.1). */
function dampApplies({ limit, caps }: Brief): boolean {
  return (limit.kind === 'fixed' || limit.kind === 'adaptive') && Object.keys(caps).length > 0;
}
