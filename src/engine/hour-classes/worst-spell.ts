import type { HourColumns } from '../run/hour-columns.ts';
import type { WorstSpell } from '../run/run-result.ts';

/** The slots that a spell runs over. */
export interface SpellSlots {
  /** How many slots before each one are in schedule: closed hours are removed before runs are formed. */
  readonly openBefore: Uint16Array;
  /** The month of each slot of a typical year, over whose joints no run goes; null for a year in one piece. */
  readonly periodOf: Uint8Array | null;
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
 * @param hours demand hours, in slot order
 */
export function worstSpell(
  hours: Pick<HourColumns, 'count' | 'slot' | 'met' | 'shortfallK'>,
  { openBefore, periodOf }: SpellSlots,
): WorstSpell | null {
  let longest: Run | null = null;
  let run: Run | null = null;
  for (let at = 0; at < hours.count; at++) {
    if (hours.met[at] === 1) continue;
    const slot = hours.slot[at] ?? 0;
    if (run === null || !goesOn(run, slot, openBefore) || isJoint(run, slot, periodOf)) {
      const cut: boolean = run !== null && goesOn(run, slot, openBefore);
      if (run !== null && cut) run.cutAtJoint = true;
      if (run !== null && (longest === null || run.hours > longest.hours)) longest = run;
      run = { hours: 0, startSlot: slot, endSlot: slot, severityKh: 0, worstK: 0, cutAtJoint: cut };
    }
    const shortfallK = hours.shortfallK[at] ?? 0;
    run.hours += 1;
    run.endSlot = slot;
    run.severityKh += shortfallK;
    run.worstK = Math.max(run.worstK, shortfallK);
  }
  return run !== null && (longest === null || run.hours > longest.hours) ? run : longest;
}

/** Whether an unmet hour is near enough to the run's last one to belong to it. */
function goesOn({ endSlot }: Run, slot: number, openBefore: Uint16Array): boolean {
  return (openBefore[slot] ?? 0) - (openBefore[endSlot] ?? 0) - 1 <= BRIDGE_H;
}

function isJoint({ endSlot }: Run, slot: number, periodOf: Uint8Array | null): boolean {
  return periodOf !== null && periodOf[slot] !== periodOf[endSlot];
}
