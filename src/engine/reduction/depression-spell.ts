import { monthOfEachSlot } from './calendar.ts';
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
  const months = monthOfEachSlot(depression.length);
  const jointBefore = (slot: number) => kind !== 'actual' && months[slot] !== months[slot - 1];
  const isLow = (slot: number) => {
    const value = depression[slot] ?? -1;
    return value >= 0 && value < LOW_DEPRESSION_HUNDREDTHS;
  };
  let longest: DepressionSpell | null = null;
  for (let slot = 0; slot < depression.length; slot++) {
    if (!isLow(slot)) continue;
    const startSlot = slot;
    while (slot + 1 < depression.length && isLow(slot + 1) && !jointBefore(slot + 1)) slot++;
    const hours = slot - startSlot + 1;
    if (hours <= (longest?.hours ?? 0)) continue;
    const cutBefore = startSlot > 0 && jointBefore(startSlot) && isLow(startSlot - 1);
    const cutAfter = slot + 1 < depression.length && jointBefore(slot + 1) && isLow(slot + 1);
    longest = { hours, startSlot, endSlot: slot, cutAtJoint: cutBefore || cutAfter };
  }
  return longest;
}
