import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { insertBatch } from './batch-store.ts';

/** Begins a batch, empty as yet. @returns its id */
export async function startBatch(
  db: Knex,
  start: { teamId: string; name: string; personId: string; tokenId: string | null; requestId: string | null; at: Date },
): Promise<string> {
  return await inTransaction(db, async (transaction) => {
    const batchId = await insertBatch(transaction, start);
    await recordAuditEvent(transaction, {
      teamId: start.teamId,
      personId: start.personId,
      act: 'weather batch begun',
      subject: { batchId, name: start.name, tokenId: start.tokenId },
      requestId: start.requestId,
    });
    return batchId;
  });
}
