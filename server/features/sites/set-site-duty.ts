import type { Knex } from 'knex';
import type { SiteDuty } from '#contract/site-record.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import type { SiteAct } from './make-site.ts';
import { lockSite, upsertDuty } from './site-store.ts';

/** Writes down who sees to a duty at a site. */
export async function setSiteDuty(db: Knex, setting: SiteAct & SiteDuty & { siteId: string }): Promise<void> {
  const { teamId, programmeId, siteId, personId, requestId, duty, owner, dueOn, doneOn, note } = setting;
  await inTransaction(db, async (transaction) => {
    const site = await lockSite(transaction, { teamId, programmeId, siteId });
    if (site === null) throw new AppError('not_found', 'There is no such site in this programme, or it was removed.');
    await upsertDuty(transaction, setting);
    await recordAuditEvent(transaction, {
      ...{ teamId, personId, requestId, act: 'site duty set' },
      subject: { programmeId, siteId, letters: site.letters, duty, owner, dueOn, doneOn, note },
    });
    await notifyTeam(transaction, { teamId, event: { kind: 'sites', programmeId } });
  });
}
