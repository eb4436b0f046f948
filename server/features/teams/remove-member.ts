import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { type MemberAct, noSuchMember, refuseLastLead } from './change-member.ts';
import { deleteMember, findMember, lockTeam } from './member-store.ts';

/** Takes a person out of a team, or lets one leave; what the person did there stays under the person's name. */
export async function removeMember(db: Knex, { teamId, personId, by, requestId }: MemberAct): Promise<void> {
  await inTransaction(db, async (transaction) => {
    await lockTeam(transaction, teamId);
    const before = await findMember(transaction, { teamId, personId });
    if (before === null) throw noSuchMember();
    if (before.role === 'lead') await refuseLastLead(transaction, { teamId, personId });
    await deleteMember(transaction, { teamId, personId });
    const act = by === personId ? 'team left' : 'member removed';
    const subject = { personId, role: before.role };
    await recordAuditEvent(transaction, { teamId, personId: by, act, subject, requestId });
    await notifyTeam(transaction, { teamId, event: { kind: 'people' } });
  });
}
