import type { Readable } from 'node:stream';
import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import type { OriginalStore } from '../../storage/original-store.ts';
import { findExportView } from './export-read-model.ts';

/** The archive of an export, while it is kept; who takes it away is written down. */
export async function openExport(
  { db, storage }: { db: Knex; storage: OriginalStore },
  asked: { teamId: string; exportId: string; personId: string; at: Date; requestId: string },
): Promise<{ body: Readable; fileName: string }> {
  const { teamId, exportId, personId, at, requestId } = asked;
  const view = await findExportView(db, asked);
  if (view === null) throw new AppError('not_found', 'There is no such export in this team.');
  if (view.state === 'making') throw new AppError('wrong_state', 'The export is still being made.');
  const isKept = view.storageKey !== null && view.expiresAt !== null && view.expiresAt > at;
  const body = isKept && view.storageKey !== null ? await storage.get(view.storageKey).catch(() => null) : null;
  if (body === null) throw new AppError('link_not_valid', 'The export is not kept any more. Ask for a new one.');
  await inTransaction(db, (transaction) =>
    recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'team export downloaded',
      subject: { exportId },
      requestId,
    }),
  );
  return { body, fileName: `muslin-export-${view.askedAt.toISOString().slice(0, 10)}.zip` };
}
