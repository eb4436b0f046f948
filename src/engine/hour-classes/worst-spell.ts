import type { WorstSpell } from '../run/run-result.ts';

/** Hours of a year that a spell can run over, slot order. */
export interface SpellInput {
  /** 1 where the schedule is closed; closed hours are removed before runs are formed. */
  readonly closed: Uint8Array;
  /** 1 where demand is unmet. */
  readonly unmet: Uint8Array;
  /** S of each slot, K. */
  readonly shortfallK: Float64Array;
  /** Slots at which a new month of a typical year begins; no run crosses one. */
  readonly joints: ReadonlySet<number>;
}

/** Open hours other than unmet ones that a run bridges, uncounted. */
const BRIDGE_H = 6;

interface Run {
  hours: number;
  startSlot: number;
  endSlot: number;
  severityKh: number;
  worstK: number;
  cutAtJoint: boolean;
}

/**
 * The longest run of unmet demand hours (method 5), the first of equals; null when every demand hour is met. `cutAtJoint`
 * says that the run would go on, or began earlier, across a month joint.
 */
export function worstSpell(input: SpellInput): WorstSpell | null {
  const runs = unmetRuns(input);
  return runs.reduce<Run | null>((best, run) => (best === null || run.hours > best.hours ? run : best), null);
}

function unmetRuns(input: SpellInput): Run[] {
  const runs: Run[] = [];
  let run: Run | null = null;
  let bridged = 0;
  let jointPassed = false;
  for (let slot = 0; slot < input.closed.length; slot++) {
    if (input.joints.has(slot)) jointPassed = true;
    if (input.closed[slot] === 1) continue;
    if (input.unmet[slot] !== 1) {
      bridged += 1;
      continue;
    }
    const goesOn: boolean = run !== null && bridged <= BRIDGE_H;
    if (run === null || !goesOn || jointPassed) {
      const cut: boolean = goesOn && jointPassed;
      if (run !== null && cut) run.cutAtJoint = true;
      run = { hours: 0, startSlot: slot, endSlot: slot, severityKh: 0, worstK: 0, cutAtJoint: cut };
      runs.push(run);
    }
    const shortfallK = input.shortfallK[slot] ?? 0;
    run.hours += 1;
    run.endSlot = slot;
    run.severityKh += shortfallK;
    run.worstK = Math.max(run.worstK, shortfallK);
    bridged = 0;
    jointPassed = false;
  }
  return runs;
}
