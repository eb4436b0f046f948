import type { Knex } from 'knex';
import { DELETION_DAYS } from '#contract/team-data.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notify } from '../../mail/notify.ts';
import { findTeamName, listLeadIds } from './deletion-read-model.ts';
import { insertDeletion, setDeletionStopped } from './deletion-store.ts';
import { lockTeam } from './member-store.ts';

const DAY_MS = 24 * 3_600_000;

export interface DeletionAct {
  readonly teamId: string;
  readonly personId: string;
  readonly at: Date;
  readonly requestId: string;
  readonly publicUrl: string;
}

/** Sets the day on which the team and all that it has are deleted, and tells every lead. The caller has asked for the password. */
export async function askDeletion(db: Knex, act: DeletionAct & { name: string }): Promise<void> {
  const { teamId, personId, at, name, requestId } = act;
  await inTransaction(db, async (transaction) => {
    await lockTeam(transaction, teamId);
    const teamName = await findTeamName(transaction, teamId);
    if (name !== teamName) {
      const message = `The name of the team is “${teamName}”. Type it as it stands.`;
      throw new AppError('invalid_input', message, [{ path: 'body.name', message }]);
    }
    const endsAt = new Date(at.getTime() + DELETION_DAYS * DAY_MS);
    if (!(await insertDeletion(transaction, { teamId, teamName, personId, at, endsAt })))
      throw new AppError('wrong_state', 'The team is to be deleted already.');
    const subject = { name: teamName, endsAt: endsAt.toISOString() };
    await recordAuditEvent(transaction, { teamId, personId, act: 'team deletion asked for', subject, requestId });
    const day = endsAt.toISOString().slice(0, 10);
    await tellLeads(
      transaction,
      act,
      `The team “${teamName}” will be deleted on ${day}. Any of its leads can stop this.`,
    );
  });
}

/** The team stays; every lead is told. */
export async function stopDeletion(db: Knex, act: DeletionAct): Promise<void> {
  const { teamId, personId, requestId } = act;
  await inTransaction(db, async (transaction) => {
    await lockTeam(transaction, teamId);
    if (!(await setDeletionStopped(transaction, act)))
      throw new AppError('wrong_state', 'No deletion of this team waits.');
    const name = await findTeamName(transaction, teamId);
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'team deletion stopped',
      subject: { name },
      requestId,
    });
    await tellLeads(transaction, act, `The team “${name}” stays: its deletion was stopped.`);
  });
}

async function tellLeads(transaction: Knex.Transaction, { teamId, at, publicUrl }: DeletionAct, words: string) {
  const path = `/teams/${teamId}/team/data`;
  for (const personId of await listLeadIds(transaction, teamId))
    await notify(transaction, { personId, teamId, kind: 'team deletion', words, path, publicUrl, at });
}
