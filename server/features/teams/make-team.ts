import type { Knex } from 'knex';
import { insertMembership, insertProgramme, insertTeam } from './team-store.ts';

/** What a new team needs of another feature, handed in where the server is wired. */
export interface TeamParts {
  /** Writes version 1 of the brief that a programme begins with. */
  startBrief(
    transaction: Knex.Transaction,
    programme: { teamId: string; programmeId: string; madeBy: string },
  ): Promise<void>;
}

export interface NewTeam {
  readonly name: string;
  /** Demo teams: every screen says "invented places and weather". */
  readonly invented: boolean;
  /** A person who is there already. */
  readonly leadId: string;
  readonly programmeName: string;
}

/** Makes a team with its lead and a first programme, whose brief is there too, so that the first accepted file is judged. */
export async function makeTeam(
  deps: { transaction: Knex.Transaction } & TeamParts,
  team: NewTeam,
): Promise<{ teamId: string; programmeId: string }> {
  const { transaction } = deps;
  const teamId = await insertTeam(transaction, { name: team.name, invented: team.invented });
  await insertMembership(transaction, { teamId, personId: team.leadId, role: 'lead' });
  const programmeId = await insertProgramme(transaction, { teamId, name: team.programmeName });
  await deps.startBrief(transaction, { teamId, programmeId, madeBy: team.leadId });
  return { teamId, programmeId };
}
