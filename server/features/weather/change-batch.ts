import type { Knex } from 'knex';
import type { BatchState } from '#contract/weather-batches.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { addJobs } from '../../jobs/queue.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import {
  type BatchKey,
  cancelArchives,
  findUnopenedArchives,
  findUnreadFiles,
  lockBatch,
  setBatchState,
  withdrawUnreadFiles,
} from './batch-store.ts';

const CANCELLED = 'The batch was cancelled before this file was read.';

/**
 * Pauses a batch, lets it go on, or cancels what of it has not been read: those files are withdrawn and may be uploaded again. A
 * file that is being read at this moment still ends, unless the batch is cancelled.
 */
export async function changeBatch(
  db: Knex,
  change: BatchKey & {
    state: BatchState;
    personId: string;
    tokenId: string | null;
    requestId: string | null;
    at: Date;
  },
): Promise<void> {
  const { teamId, batchId, state, personId } = change;
  await inTransaction(db, async (transaction) => {
    const was = await lockBatch(transaction, change);
    if (was === null) throw new AppError('not_found', 'There is no such batch in this team.');
    if (was === state) return;
    if (was === 'cancelled') {
      throw new AppError('wrong_state', 'This batch was cancelled. Upload its files again to read them after all.');
    }
    await setBatchState(transaction, change);
    if (state === 'running') await queueRest(transaction, change);
    if (state === 'cancelled') await cancelRest(transaction, change);
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: `weather batch ${state === 'running' ? 'resumed' : state}`,
      subject: { batchId, tokenId: change.tokenId },
      requestId: change.requestId,
    });
    await notifyTeam(transaction, { teamId, event: { kind: 'weather-batch', batchId } });
  });
}

async function queueRest(transaction: Knex.Transaction, { teamId, batchId }: BatchKey): Promise<void> {
  const [archives, files] = [
    await findUnopenedArchives(transaction, { teamId, batchId }),
    await findUnreadFiles(transaction, { teamId, batchId }),
  ];
  await addJobs(
    transaction,
    'open-weather-archive',
    archives.map((archiveId) => ({ payload: { teamId, archiveId }, jobKey: archiveId })),
  );
  await addJobs(
    transaction,
    'read-weather-file',
    files.map((fileId) => ({ payload: { teamId, fileId }, jobKey: fileId })),
  );
}

async function cancelRest(
  transaction: Knex.Transaction,
  { teamId, batchId, personId, at }: BatchKey & { personId: string; at: Date },
): Promise<void> {
  await cancelArchives(transaction, { teamId, batchId });
  const withdrawn = await withdrawUnreadFiles(transaction, { teamId, batchId, personId, at, reason: CANCELLED });
  for (const fileId of withdrawn) {
    await notifyTeam(transaction, {
      teamId,
      event: { kind: 'weather-file', fileId, status: 'withdrawn', step: null },
    });
  }
}
