import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { findArchive, setArchiveFailure } from './batch-store.ts';
import { queueOpening } from './receive-archive.ts';

/** Opens an archive again whose opening stopped for a fault of ours. */
export async function retryArchive(
  db: Knex,
  retry: { teamId: string; archiveId: string; personId: string; tokenId: string | null; requestId: string | null },
): Promise<void> {
  const { teamId, archiveId } = retry;
  await inTransaction(db, async (transaction) => {
    const archive = await findArchive(transaction, { teamId, archiveId });
    if (archive === null) throw new AppError('not_found', 'There is no such archive in this team.');
    if (archive.failure === null) throw new AppError('wrong_state', 'The opening of this archive has not stopped.');
    await setArchiveFailure(transaction, { teamId, archiveId, message: null });
    await queueOpening(transaction, { teamId, archiveId });
    await recordAuditEvent(transaction, {
      teamId,
      personId: retry.personId,
      act: 'weather archive tried again',
      subject: { archiveId, name: archive.name, tokenId: retry.tokenId },
      requestId: retry.requestId,
    });
  });
}
