import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import type { UploadedFile } from '../../http/request-context.ts';
import { addJob } from '../../jobs/queue.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { type OriginalStore, originalKey } from '../../storage/original-store.ts';
import { isZip } from '../../storage/zip-members.ts';
import { type BatchKey, insertArchive, shareBatch } from './batch-store.ts';

export interface ArchiveReceiving extends BatchKey {
  readonly personId: string;
  /** The token of a program that brings it; null when the person does. */
  readonly tokenId: string | null;
  readonly requestId: string | null;
  readonly at: Date;
  readonly upload: UploadedFile;
}

/** Keeps an archive and queues its opening. @returns its id */
export async function receiveArchive(
  deps: { db: Knex; storage: OriginalStore },
  receiving: ArchiveReceiving,
): Promise<string> {
  const { teamId, batchId, personId, requestId, upload } = receiving;
  if (!(await isZip(upload.temporaryPath))) {
    throw new AppError(
      'unsupported_format',
      `“${upload.name}” is not a zip archive. Upload a plain or gzip file as a weather file of the batch.`,
    );
  }
  const storageKey = originalKey(upload.fingerprint);
  await deps.storage.put(storageKey, upload.temporaryPath);
  return await inTransaction(deps.db, async (transaction) => {
    const state = await shareBatch(transaction, { teamId, batchId });
    if (state === null) throw new AppError('not_found', 'There is no such batch in this team.');
    if (state === 'cancelled') throw new AppError('wrong_state', 'This batch was cancelled. Begin another one.');
    const { name, bytes, fingerprint } = upload;
    const archiveId = await insertArchive(transaction, { teamId, batchId, name, bytes, fingerprint, storageKey });
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'weather archive uploaded',
      subject: { archiveId, batchId, name, fingerprint, tokenId: receiving.tokenId },
      requestId,
    });
    if (state === 'running') await queueOpening(transaction, { teamId, archiveId });
    await notifyTeam(transaction, { teamId, event: { kind: 'weather-batch', batchId } });
    return archiveId;
  });
}

/** Puts the opening of an archive in line. */
export async function queueOpening(
  transaction: Knex.Transaction,
  key: { teamId: string; archiveId: string },
): Promise<void> {
  await addJob(transaction, { task: 'open-weather-archive', payload: key, jobKey: key.archiveId });
}
