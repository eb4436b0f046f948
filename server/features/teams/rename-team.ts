import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { setTeamName } from './member-store.ts';

export async function renameTeam(
  db: Knex,
  { teamId, name, by, requestId }: { teamId: string; name: string; by: string; requestId: string },
): Promise<void> {
  await inTransaction(db, async (transaction) => {
    await setTeamName(transaction, { teamId, name });
    await recordAuditEvent(transaction, { teamId, personId: by, act: 'team renamed', subject: { name }, requestId });
  });
}
