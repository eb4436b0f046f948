import type { Knex } from 'knex';
import { brokenConstraint } from '../../db/database-errors.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import type { TeamParts } from './make-team.ts';
import { replaceProgrammeMembers, setProgrammeName, setProgrammeRestricted } from './programme-store.ts';
import { insertProgramme } from './team-store.ts';

interface Act {
  readonly teamId: string;
  readonly by: string;
  readonly requestId: string;
}

/** Makes a programme with the brief that it begins with. @returns its id */
export async function makeProgramme(
  { db, startBrief }: { db: Knex } & TeamParts,
  { teamId, by, requestId, name }: Act & { name: string },
): Promise<string> {
  return await inTransaction(db, async (transaction) => {
    const programmeId = await insertProgramme(transaction, { teamId, name });
    await startBrief(transaction, { teamId, programmeId, madeBy: by });
    const subject = { programmeId, name };
    await recordAuditEvent(transaction, { teamId, personId: by, act: 'programme made', subject, requestId });
    return programmeId;
  });
}

export async function renameProgramme(
  db: Knex,
  { teamId, by, requestId, programmeId, name }: Act & { programmeId: string; name: string },
): Promise<void> {
  await inTransaction(db, async (transaction) => {
    if (!(await setProgrammeName(transaction, { teamId, programmeId, name }))) throw noSuchProgramme();
    const subject = { programmeId, name };
    await recordAuditEvent(transaction, { teamId, personId: by, act: 'programme renamed', subject, requestId });
  });
}

/** Says to whom a programme is open. Leads are never shut out; the list is kept while the programme is open to all. */
export async function setProgrammeMembers(
  db: Knex,
  order: Act & { programmeId: string; restricted: boolean; memberIds: readonly string[] },
): Promise<void> {
  const { teamId, by, requestId, programmeId, restricted } = order;
  const memberIds = [...new Set(order.memberIds.map((id) => id.toLowerCase()))];
  await inTransaction(db, async (transaction) => {
    if (!(await setProgrammeRestricted(transaction, { teamId, programmeId, restricted }))) throw noSuchProgramme();
    await replaceProgrammeMembers(transaction, { teamId, programmeId, memberIds }).catch((error: unknown) => {
      if (brokenConstraint(error)?.kind !== 'reference') throw error;
      const message = 'One of these people is not in the team (any more). Load the page again.';
      throw new AppError('invalid_input', message, [{ path: 'body.memberIds', message }]);
    });
    const subject = { programmeId, restricted, memberIds };
    await recordAuditEvent(transaction, { teamId, personId: by, act: 'programme opened to', subject, requestId });
  });
}

export function noSuchProgramme(): AppError {
  return new AppError('not_found', 'There is no such programme in this team.');
}
