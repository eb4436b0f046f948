import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import type { SiteAct } from './make-site.ts';
import { markRemoved } from './site-store.ts';

/** Takes sites off the programme; those that are gone already are passed over. @returns how many were removed */
export async function removeSites(
  db: Knex,
  removal: SiteAct & { siteIds: readonly string[]; reason: string },
): Promise<number> {
  const { teamId, programmeId, personId, requestId, reason } = removal;
  return await inTransaction(db, async (transaction) => {
    const removed = await markRemoved(transaction, removal);
    if (removed.length === 0) return 0;
    await recordAuditEvent(transaction, {
      ...{ teamId, personId, requestId, act: 'sites removed' },
      subject: { programmeId, sites: removed, reason },
    });
    await notifyTeam(transaction, { teamId, event: { kind: 'sites', programmeId } });
    return removed.length;
  });
}
