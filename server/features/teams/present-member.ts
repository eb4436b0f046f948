import type { Member } from '#contract/members.ts';
import { lastDayOf } from './last-day.ts';
import type { MemberView } from './member-read-model.ts';

/** @param options.withEmail for leads, who invite people by it */
export function presentMember(view: MemberView, options: { withEmail: boolean; now: Date }): Member {
  const { personId, name, email, role, since, endsAt } = view;
  return {
    personId,
    name,
    email: options.withEmail ? email : null,
    role,
    since: since.toISOString(),
    lastDay: lastDayOf(endsAt),
    ended: endsAt !== null && endsAt <= options.now,
  };
}
