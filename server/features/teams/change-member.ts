import type { Knex } from 'knex';
import type { Role } from '#contract/accounts.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { endOfDay, lastDayOf } from './last-day.ts';
import { countOtherLeads, findMember, lockTeam, updateMember } from './member-store.ts';

export interface MemberAct {
  readonly teamId: string;
  /** The member who is changed. */
  readonly personId: string;
  /** Who does it. */
  readonly by: string;
  readonly requestId: string;
}

/** Changes the role of a member, or until when somebody from outside is one. What holds from now on holds for the next request. */
export async function changeMember(
  db: Knex,
  change: MemberAct & { role: Role | undefined; lastDay: string | null | undefined },
): Promise<void> {
  const { teamId, personId, by, requestId } = change;
  await inTransaction(db, async (transaction) => {
    await lockTeam(transaction, teamId);
    const before = await findMember(transaction, { teamId, personId });
    if (before === null) throw noSuchMember();
    const role = change.role ?? before.role;
    const endsAt = change.lastDay === undefined ? before.endsAt : endOfDay(change.lastDay);
    refuseLeadFromOutside({ role, endsAt });
    if (before.role === 'lead' && role !== 'lead') await refuseLastLead(transaction, { teamId, personId });
    await updateMember(transaction, { teamId, personId, role, endsAt });
    const subject = {
      personId,
      before: { role: before.role, lastDay: lastDayOf(before.endsAt) },
      after: { role, lastDay: lastDayOf(endsAt) },
    };
    await recordAuditEvent(transaction, { teamId, personId: by, act: 'member changed', subject, requestId });
    await notifyTeam(transaction, { teamId, event: { kind: 'people' } });
  });
}

export function noSuchMember(): AppError {
  return new AppError('not_found', 'There is no such person in this team.');
}

/** @throws AppError where a lead would have a last day: the team could be left without one over night */
export function refuseLeadFromOutside({ role, endsAt }: { role: Role; endsAt: Date | null }): void {
  if (role !== 'lead' || endsAt === null) return;
  const message = 'A lead is a member without a last day. Take the last day away, or give another role.';
  throw new AppError('invalid_input', message, [{ path: 'body.lastDay', message }]);
}

/** @throws AppError wrong_state where nobody else leads the team; the team is locked by the caller */
export async function refuseLastLead(
  transaction: Knex.Transaction,
  key: { teamId: string; personId: string },
): Promise<void> {
  if ((await countOtherLeads(transaction, key)) > 0) return;
  throw new AppError('wrong_state', 'This is the last lead of the team. Make somebody else a lead first.');
}
