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

/**
 * The longest run of unmet demand hours (method 5), the first of equals; null when every demand hour is met. `cutAtJoint`
 * says that the run would go on, or began earlier, across a month joint.
 * @param hours demand hours, in slot order
 */
export function worstSpell(
  hours: Pick<HourColumns, 'count' | 'slot' | 'met' | 'shortfallK'>,
  { openBefore, periodOf }: SpellSlots,
): WorstSpell | null {
  let longest: WorstSpell | null = null;
  // The run so far, as numbers: an object would be written to at every hour.
  let runHours = 0;
  let startSlot = 0;
  let endSlot = 0;
  let severityKh = 0;
  let worstK = 0;
  let cutAtJoint = false;
  for (let at = 0; at < hours.count; at++) {
    if (hours.met[at] === 1) continue;
    const slot = hours.slot[at] ?? 0;
    const near = runHours > 0 && (openBefore[slot] ?? 0) - (openBefore[endSlot] ?? 0) - 1 <= BRIDGE_H;
    if (!near || (periodOf !== null && periodOf[slot] !== periodOf[endSlot])) {
      if (runHours > (longest?.hours ?? 0)) {
        longest = { hours: runHours, startSlot, endSlot, severityKh, worstK, cutAtJoint: cutAtJoint || near };
      }
      runHours = 0;
      startSlot = slot;
      severityKh = 0;
      worstK = 0;
      cutAtJoint = near;
    }
    const shortfallK = hours.shortfallK[at] ?? 0;
    runHours += 1;
    endSlot = slot;
    severityKh += shortfallK;
    worstK = Math.max(worstK, shortfallK);
  }
  if (runHours <= (longest?.hours ?? 0)) return longest;
  return { hours: runHours, startSlot, endSlot, severityKh, worstK, cutAtJoint };
}
