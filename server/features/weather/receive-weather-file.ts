import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import type { UploadedFile } from '../../http/request-context.ts';
import { addJob } from '../../jobs/queue.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { type OriginalStore, originalKey } from '../../storage/original-store.ts';
import { type BatchKey, shareBatch } from './batch-store.ts';
import { restartReading } from './reading-store.ts';
import { findStandingFile, insertWeatherFile } from './weather-file-store.ts';

export interface ReceivedFile {
  readonly fileId: string;
  /** The team already had these bytes; nothing was stored. */
  readonly known: boolean;
}

export interface Receiving {
  readonly teamId: string;
  readonly personId: string;
  /** The token of a program that brings it; null when the person does. */
  readonly tokenId: string | null;
  readonly requestId: string | null;
  readonly at: Date;
  readonly upload: UploadedFile;
  /** The batch that it came with; null when it came by itself. */
  readonly batchId: string | null;
}

/**
 * Keeps the original and queues its reading. The same bytes again answer the file that is there; where its reading stopped
 * for a fault of ours it begins anew.
 */
export async function receiveWeatherFile(
  deps: { db: Knex; storage: OriginalStore },
  receiving: Receiving,
): Promise<ReceivedFile> {
  const { teamId, upload, batchId } = receiving;
  const known = await answerKnown(deps.db, receiving);
  if (known !== null) return known;

  // The original goes first: a row never stands without its bytes. Bytes whose row could not be stored belong to nobody,
  // show nowhere, and are taken up by the next upload of the same.
  const storageKey = originalKey(upload.fingerprint);
  await deps.storage.put(storageKey, upload.temporaryPath);
  const fileId = await inTransaction(deps.db, async (transaction) => {
    const batchState = batchId === null ? 'running' : await openBatch(transaction, { teamId, batchId });
    const id = await insertWeatherFile(transaction, {
      teamId,
      batchId,
      name: upload.name,
      bytes: upload.bytes,
      fingerprint: upload.fingerprint,
      storageKey,
      uploadedBy: receiving.personId,
      uploadedAt: receiving.at,
    });
    if (id === null) return null;
    await recordAuditEvent(transaction, {
      teamId,
      personId: receiving.personId,
      act: 'weather file uploaded',
      subject: { fileId: id, name: upload.name, fingerprint: upload.fingerprint, tokenId: receiving.tokenId },
      requestId: receiving.requestId,
    });
    if (batchState === 'running') await queueReading(transaction, { teamId, fileId: id });
    if (batchId !== null) await notifyTeam(transaction, { teamId, event: { kind: 'weather-batch', batchId } });
    return id;
  });
  if (fileId !== null) return { fileId, known: false };
  // Another upload of the same bytes was faster and has committed; only a withdrawal since then sends us round again.
  return (await answerKnown(deps.db, receiving)) ?? (await receiveWeatherFile(deps, receiving));
}

async function answerKnown(db: Knex, { teamId, upload }: Receiving): Promise<ReceivedFile | null> {
  const file = await findStandingFile(db, { teamId, fingerprint: upload.fingerprint });
  if (file === null) return null;
  if (file.status === 'reading' && file.failure !== null) {
    await inTransaction(db, async (transaction) => {
      const key = { teamId, fileId: file.id };
      if (await restartReading(transaction, key)) await queueReading(transaction, key);
    });
  }
  return { fileId: file.id, known: true };
}

/** @throws AppError when there is no such batch, or it takes nothing in any more */
async function openBatch(transaction: Knex.Transaction, key: BatchKey): Promise<'running' | 'paused'> {
  const state = await shareBatch(transaction, key);
  if (state === null) throw new AppError('not_found', 'There is no such batch in this team.');
  if (state === 'cancelled') throw new AppError('wrong_state', 'This batch was cancelled. Begin another one.');
  return state;
}

/** Puts the reading of a file in line. */
export async function queueReading(
  transaction: Knex.Transaction,
  key: { teamId: string; fileId: string },
): Promise<void> {
  await addJob(transaction, { task: 'read-weather-file', payload: key, jobKey: key.fileId });
  await notifyTeam(transaction, {
    teamId: key.teamId,
    event: { kind: 'weather-file', fileId: key.fileId, status: 'reading', step: 'received' },
  });
}
