import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { anyTeamExists } from '../teams/team-read-model.ts';
import { useSetUpKey } from './account-store.ts';
import { makePerson } from './make-person.ts';
import { hashOfSetUpKey } from './set-up-key.ts';

/** What setting up needs of another feature, handed in where the server is wired. */
export interface SetUpParts {
  /** Makes the team of a lead who is there already. */
  makeFirstTeam(transaction: Knex.Transaction, team: { name: string; leadId: string }): Promise<{ teamId: string }>;
}

export interface SettingUp {
  readonly key: string;
  readonly teamName: string;
  readonly name: string;
  readonly email: string;
  readonly password: string;
  readonly requestId: string;
  readonly at: Date;
}

/** Makes the first team and its lead; all of it or, when the key is no longer good, nothing. @returns the lead's id */
export async function setUp(deps: { db: Knex } & SetUpParts, given: SettingUp): Promise<string> {
  return inTransaction(deps.db, async (transaction) => {
    const good = await useSetUpKey(transaction, { keyHash: hashOfSetUpKey(given.key), at: given.at });
    if (!good || (await anyTeamExists(transaction)))
      throw new AppError(
        'link_not_valid',
        'This link was used already or was never made. Start the program to get one.',
      );
    const { email, name, password, teamName, requestId } = given;
    const leadId = await makePerson(transaction, { email, name, password });
    const { teamId } = await deps.makeFirstTeam(transaction, { name: teamName, leadId });
    const subject = { teamName, name, email };
    await recordAuditEvent(transaction, { teamId, personId: leadId, act: 'team set up', subject, requestId });
    return leadId;
  });
}
