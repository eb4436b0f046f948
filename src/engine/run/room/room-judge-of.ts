import type { Brief } from '../../brief/brief.ts';
import { type RoomJudge, roomJudge } from './judge-room-hours.ts';
import { roomPlan } from './room-plan.ts';

const judges = new WeakMap<Brief, RoomJudge | null>();

/**
 * The judge of a brief whose years can be judged in one pass, made once per brief; null for every other: limits that are no room
 * temperature, and indirect stages fed with the room's exhaust, whose moisture has to be settled hour by hour.
 */
export function roomJudgeOf(brief: Brief): RoomJudge | null {
  const made = judges.get(brief);
  if (made !== undefined) return made;
  const { kind } = brief.limit;
  const judge =
    (kind === 'fixed' || kind === 'adaptive') && brief.secondaryAir === 'outdoor' ? roomJudge(roomPlan(brief)) : null;
  judges.set(brief, judge);
  return judge;
}
