import type { Brief } from '../brief/brief.ts';
import { openSlots } from './open-slots.ts';
import type { ResolvedClock } from './resolved-clock.ts';

/** The slots that a schedule opens, ready to be counted; read only, since years of one clock share it. */
export interface OpenSchedule {
  /** 1 where a slot is open. */
  readonly open: Uint8Array;
  /** The open slots, in order. */
  readonly slots: Uint16Array;
  /** How many slots before each one are open. */
  readonly openBefore: Uint16Array;
}

const made = new WeakMap<Uint8Array, OpenSchedule>();

/** @throws RangeError as `openSlots` */
export function openSchedule(brief: Pick<Brief, 'months' | 'weekdays' | 'hours'>, clock: ResolvedClock): OpenSchedule {
  const open = openSlots(brief, clock);
  const schedule = made.get(open) ?? countOpen(open);
  made.set(open, schedule);
  return schedule;
}

/** @param open 1 where a slot is open */
export function countOpen(open: Uint8Array): OpenSchedule {
  const slots = new Uint16Array(open.length);
  const openBefore = new Uint16Array(open.length);
  let count = 0;
  for (let slot = 0; slot < open.length; slot++) {
    openBefore[slot] = count;
    if (open[slot] === 1) slots[count++] = slot;
  }
  return { open, slots: slots.slice(0, count), openBefore };
}
