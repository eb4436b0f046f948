import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { insertBrief, insertBriefVersion, lockProgramme } from './brief-store.ts';
import { presetBrief, presetNames } from './presets.ts';

/** What changing a brief needs of the other features, handed in where the server is wired. */
export interface BriefParts {
  /** Queues the judging of every accepted year of the team by a version. */
  queueRunsOfVersion(transaction: Knex.Transaction, version: { teamId: string; briefVersionId: string }): Promise<void>;
}

export interface BriefAct {
  readonly personId: string;
  readonly requestId: string | null;
}

/** Makes a brief, version 1, from a preset. */
export async function makeBrief(
  { db, queueRunsOfVersion }: { db: Knex } & BriefParts,
  making: BriefAct & { teamId: string; programmeId: string; name: string; preset: string },
): Promise<{ briefId: string; version: number }> {
  const { teamId, programmeId, name, preset, personId, requestId } = making;
  if (!presetNames().includes(preset)) {
    const message = `There is no such preset. There are ${presetNames().join(', ')}.`;
    throw new AppError('invalid_input', message, [{ path: 'body.preset', message }]);
  }
  return await inTransaction(db, async (transaction) => {
    const programme = await lockProgramme(transaction, { teamId, programmeId });
    if (programme === null) throw new AppError('not_found', 'There is no such programme in this team.');
    if (programme.briefNames.some((each) => each.toLowerCase() === name.toLowerCase())) {
      const message = 'Another brief of this programme has that name. Type another.';
      throw new AppError('invalid_input', message, [{ path: 'body.name', message }]);
    }
    const briefId = await insertBrief(transaction, { teamId, programmeId, name });
    const body = presetBrief(preset);
    const { id, version } = await insertBriefVersion(transaction, { teamId, briefId, body, madeBy: personId });
    await queueRunsOfVersion(transaction, { teamId, briefVersionId: id });
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'brief made',
      subject: { programmeId, briefId, briefVersionId: id, name, preset },
      requestId,
    });
    await notifyTeam(transaction, { teamId, event: { kind: 'brief', briefId, version } });
    return { briefId, version };
  });
}
