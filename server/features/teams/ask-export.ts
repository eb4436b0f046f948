import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { addJob } from '../../jobs/queue.ts';
import { insertExport } from './export-store.ts';

/** Asks for an archive of all that a team has; while one is being made it is that one. @returns its id */
export async function askExport(
  db: Knex,
  asked: { teamId: string; personId: string; at: Date; requestId: string },
): Promise<string> {
  const { teamId, personId, requestId } = asked;
  return await inTransaction(db, async (transaction) => {
    const { exportId, isNew } = await insertExport(transaction, asked);
    if (!isNew) return exportId;
    await addJob(transaction, { task: 'export-team', payload: { teamId, exportId }, jobKey: `export ${exportId}` });
    const subject = { exportId };
    await recordAuditEvent(transaction, { teamId, personId, act: 'team export asked for', subject, requestId });
    return exportId;
  });
}
