import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { makeTeam, type TeamParts } from './make-team.ts';

/** The name under which the first programme of a team begins; it can be renamed. */
export const FIRST_PROGRAMME = 'First programme';

/** Makes a team whose lead is the person who asks. @returns its id */
export async function startTeam(
  { db, startBrief }: { db: Knex } & TeamParts,
  { name, by, requestId }: { name: string; by: string; requestId: string },
): Promise<string> {
  return await inTransaction(db, async (transaction) => {
    const team = { name, invented: false, leadId: by, programmeName: FIRST_PROGRAMME };
    const { teamId } = await makeTeam({ transaction, startBrief }, team);
    await recordAuditEvent(transaction, { teamId, personId: by, act: 'team made', subject: { name }, requestId });
    return teamId;
  });
}
