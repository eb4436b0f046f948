import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import type { SiteAct } from './make-site.ts';
import { type ImportKey, lockSiteImport, markImportUndone } from './site-import-store.ts';

/** Takes every site that an import brought off the programme, those that were changed since included. */
export async function undoSiteImport(db: Knex, undo: SiteAct & ImportKey): Promise<void> {
  const { teamId, programmeId, importId, personId, requestId } = undo;
  await inTransaction(db, async (transaction) => {
    const found = await lockSiteImport(transaction, undo);
    if (found === null) throw new AppError('not_found', 'There is no such import in this programme.');
    if (found.status !== 'done')
      throw new AppError('wrong_state', 'This import was undone already, or never finished.');
    const removed = await markImportUndone(transaction, { ...undo, reason: `Import of ${found.name} undone` });
    await recordAuditEvent(transaction, {
      ...{ teamId, personId, requestId, act: 'site import undone' },
      subject: { programmeId, importId, name: found.name, removed },
    });
    await notifyTeam(transaction, { teamId, event: { kind: 'sites', programmeId } });
  });
}
