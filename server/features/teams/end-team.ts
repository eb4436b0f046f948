import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { addJob } from '../../jobs/queue.ts';
import { notify } from '../../mail/notify.ts';
import type { OriginalStore } from '../../storage/original-store.ts';
import { listLeadIds } from './deletion-read-model.ts';
import { deleteTeamRows, listDueDeletions, listKeysLeft, setKeysSeenTo, takeDueDeletion } from './deletion-store.ts';
import { removeUnused } from './remove-unused.ts';

/** Queues the end of every team whose time is over. */
export async function queueDueDeletions(db: Knex): Promise<void> {
  for (const { teamId } of await listDueDeletions(db))
    await addJob(db, { task: 'end-team', payload: { teamId }, jobKey: `end ${teamId}` });
}

/**
 * The work of the job `end-team`: the rows of the team in one transaction, then the originals that nobody else uses. Done again it goes
 * on where it was broken off.
 */
export async function endTeam(
  deps: { db: Knex; storage: OriginalStore; publicUrl: string },
  { teamId }: { teamId: string },
  at: Date,
): Promise<void> {
  const { db, publicUrl } = deps;
  await inTransaction(db, async (transaction) => {
    const due = await takeDueDeletion(transaction, teamId);
    if (due === null) return;
    const { teamName, askedBy } = due;
    const leads = await listLeadIds(transaction, teamId);
    await deleteTeamRows(transaction, teamId);
    const subject = { name: teamName, askedBy };
    await recordAuditEvent(transaction, { teamId, personId: null, act: 'team deleted', subject, requestId: null });
    const words = `The team “${teamName}” was deleted, with all that it had here.`;
    for (const personId of leads)
      await notify(transaction, {
        personId,
        teamId: null,
        kind: 'team deletion',
        words,
        path: '/account',
        publicUrl,
        at,
      });
  });
  for (const key of await listKeysLeft(db, teamId)) await removeUnused(deps, key);
  await setKeysSeenTo(db, teamId);
}
