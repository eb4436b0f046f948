import { monthStartSlots } from './calendar.ts';
import type { YearKind } from './weather-year.ts';

/** Under this a wetted stage gains little. */
const LOW_DEPRESSION_HUNDREDTHS = 500;

export interface DepressionSpell {
  readonly hours: number;
  readonly startSlot: number;
  readonly endSlot: number;
  /** It reaches a joint of two months of a typical year, where it is cut. */
  readonly cutAtJoint: boolean;
}

/**
 * Longest run of hours with a depression under 5 K; the first of equals, null without such an hour. An unknown hour ends it,
 * and in a typical year so does the joint of two months, since the months come from different years.
 * @param depression hundredths of a kelvin reached, slot order, -1 where not known
 */
export function longestLowDepression(depression: Int32Array, kind: YearKind): DepressionSpell | null {
  const joints = kind === 'actual' ? [0, depression.length] : monthStartSlots(depression.length);
  let longest = { hours: 0, startSlot: 0 };
  for (let span = 1; span < joints.length; span++) {
    const found = longestWithin(depression, joints[span - 1] ?? 0, joints[span] ?? 0);
    if (found.hours > longest.hours) longest = found;
  }
  const { hours, startSlot } = longest;
  if (hours === 0) return null;
  const endSlot = startSlot + hours - 1;
  const isLow = (slot: number) => lowAt(depression, slot);
  const cutBefore = joints.includes(startSlot) && isLow(startSlot - 1);
  const cutAfter = joints.includes(endSlot + 1) && isLow(endSlot + 1);
  return { hours, startSlot, endSlot, cutAtJoint: cutBefore || cutAfter };
}

function longestWithin(depression: Int32Array, start: number, end: number): { hours: number; startSlot: number } {
  let hours = 0;
  let startSlot = start;
  let run = 0;
  for (let slot = start; slot < end; slot++) {
    run = lowAt(depression, slot) ? run + 1 : 0;
    if (run <= hours) continue;
    hours = run;
    startSlot = slot - run + 1;
  }
  return { hours, startSlot };
}

function lowAt(depression: Int32Array, slot: number): boolean {
  const value = depression[slot] ?? -1;
  return value >= 0 && value < LOW_DEPRESSION_HUNDREDTHS;
}
