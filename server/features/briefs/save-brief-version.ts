import type { Knex } from 'knex';
import type { Brief } from '#engine/brief/brief.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { briefHash } from './brief-hash.ts';
import { insertBriefVersion, lockNewestVersion, type NewestVersion } from './brief-store.ts';
import type { BriefAct, BriefParts } from './make-brief.ts';
import { draftFaults, readDraft } from './read-draft.ts';

export interface Saving extends BriefAct {
  readonly teamId: string;
  readonly programmeId: string;
  readonly briefId: string;
  /** The version that the draft was begun from. */
  readonly basedOn: number;
  readonly draft: unknown;
}

/**
 * Saves a draft as the next version and queues its runs. Saving what the newest version says makes nothing, however often
 * it is sent and whatever it is based on.
 */
export async function saveBriefVersion(
  { db, queueRunsOfVersion }: { db: Knex } & BriefParts,
  saving: Saving,
): Promise<{ version: number; made: boolean }> {
  const { teamId, briefId, basedOn, personId, requestId } = saving;
  return await inTransaction(db, async (transaction) => {
    const newest = await lockNewestVersion(transaction, saving);
    if (newest === null) throw new AppError('not_found', 'There is no such brief in this programme.');
    const body = readDraft(saving.draft);
    keepPreset(body, newest);
    if (briefHash(body) === newest.hash) return { version: newest.version, made: false };
    if (basedOn !== newest.version) throw new AppError('wrong_state', whyNotNewest(newest, basedOn));

    const made = await insertBriefVersion(transaction, { teamId, briefId, body, madeBy: personId });
    await queueRunsOfVersion(transaction, { teamId, briefVersionId: made.id });
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'brief version saved',
      subject: { briefId, briefVersionId: made.id, name: newest.name, version: made.version, hash: briefHash(body) },
      requestId,
    });
    await notifyTeam(transaction, { teamId, event: { kind: 'brief', briefId, version: made.version } });
    return { version: made.version, made: true };
  });
}

/** Rules of a preset, such as a clinic's, would else be left behind by taking its name off. */
function keepPreset(body: Brief, { preset }: NewestVersion): void {
  if (body.preset === preset) return;
  const message = `a brief keeps its preset, ${preset}; make another brief to begin from another preset`;
  throw draftFaults([{ path: 'preset', message }]);
}

function whyNotNewest(newest: NewestVersion, basedOn: number): string {
  if (basedOn > newest.version) return `Version ${basedOn} does not exist; the newest is ${newest.version}.`;
  const when = newest.madeAt
    .toISOString()
    .replace(/\.\d+Z$/, ' UTC')
    .replace('T', ' ');
  return `${newest.madeBy} saved version ${newest.version} meanwhile, on ${when}. Your draft began from version ${basedOn}: look at the newest version, then save yours on top of it.`;
}
