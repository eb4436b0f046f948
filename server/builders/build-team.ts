import type { Knex } from 'knex';
import type { Role } from '#contract/accounts.ts';
import { makePerson } from '../features/accounts/make-person.ts';
import { insertBrief, insertBriefVersion } from '../features/briefs/brief-store.ts';
import { presetBrief } from '../features/briefs/presets.ts';
import { addMember } from '../features/teams/add-member.ts';
import { makeTeam } from '../features/teams/make-team.ts';

export interface PersonToBuild {
  readonly role: Role;
  readonly email: string;
  readonly name: string;
  readonly password: string;
}

export interface TeamToBuild {
  readonly name: string;
  readonly invented: boolean;
  readonly programmeName: string;
  readonly brief: { readonly name: string; readonly preset: string };
  /** One for each role at least; the first lead makes the team. */
  readonly people: readonly PersonToBuild[];
}

export interface BuiltTeam {
  readonly teamId: string;
  readonly programmeId: string;
  /** The first person of each role. */
  readonly personIds: Readonly<Record<Role, string>>;
}

/** A team with people, programme and brief, all through the verbs, in the caller's transaction. For seed and tests. */
export async function buildTeam(transaction: Knex.Transaction, team: TeamToBuild): Promise<BuiltTeam> {
  const personIds = new Map<Role, string>();
  const others: { personId: string; role: Role }[] = [];
  for (const { role, ...person } of team.people) {
    const personId = await makePerson(transaction, person);
    if (role === 'lead' && !personIds.has('lead')) personIds.set('lead', personId);
    else others.push({ personId, role });
    if (!personIds.has(role)) personIds.set(role, personId);
  }
  const idOf = (role: Role): string => {
    const id = personIds.get(role);
    if (id === undefined) throw new RangeError(`a team to build needs a ${role}`);
    return id;
  };
  const startBrief = async (
    brief: Knex.Transaction,
    programme: { teamId: string; programmeId: string; madeBy: string },
  ): Promise<void> => {
    const { teamId, programmeId, madeBy } = programme;
    const briefId = await insertBrief(brief, { teamId, programmeId, name: team.brief.name });
    await insertBriefVersion(brief, { teamId, briefId, body: presetBrief(team.brief.preset), madeBy });
  };
  const { teamId, programmeId } = await makeTeam(
    { transaction, startBrief },
    { name: team.name, invented: team.invented, leadId: idOf('lead'), programmeName: team.programmeName },
  );
  for (const member of others) await addMember(transaction, { teamId, ...member });
  return {
    teamId,
    programmeId,
    personIds: {
      viewer: idOf('viewer'),
      planner: idOf('planner'),
      engineer: idOf('engineer'),
      lead: idOf('lead'),
    },
  };
}
