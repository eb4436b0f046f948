import type { Knex } from 'knex';
import type { Membership, Role } from '#contract/accounts.ts';
import { preparedQuery } from '../../db/prepared-query.ts';

/** As authorisation takes it. */
interface Standing {
  readonly roles: ReadonlyMap<string, Role>;
  readonly closedProgrammes: ReadonlySet<string>;
  /** Of each team a number that grows with every change of what its map and sites show. */
  readonly revisions: ReadonlyMap<string, string>;
}

/** A programme is closed to members who are not among those that it is open to; never to a lead. */
const OPEN_PROGRAMME = `(not programmes.restricted or memberships.role = 'lead' or exists (
  select 1 from programme_members
  where programme_members.programme_id = programmes.id and programme_members.person_id = memberships.person_id))`;

/** A member of the house, or one from outside whose time is not over. */
const STANDS = '(memberships.ends_at is null or memberships.ends_at > :at)';

/** The person's teams, each with the person's role and the programmes that are open to the person, by name. */
export async function listMemberships(db: Knex, key: { personId: string; at: Date }): Promise<Membership[]> {
  const { rows } = await db.raw<{ rows: (Omit<Membership, 'deletedAt'> & { deletedAt: Date | null })[] }>(
    `select teams.id as "teamId", teams.name as "teamName", memberships.role, teams.invented,
       (select team_deletions.ends_at from team_deletions where team_deletions.team_id = teams.id
          and team_deletions.stopped_at is null and team_deletions.ended_at is null) as "deletedAt",
       coalesce(
         (select json_agg(json_build_object('id', programmes.id, 'name', programmes.name) order by programmes.name, programmes.id)
          from programmes where programmes.team_id = teams.id and ${OPEN_PROGRAMME}),
         '[]'::json) as programmes
     from memberships
     join teams on teams.id = memberships.team_id
     where memberships.person_id = :personId and ${STANDS}
     order by teams.name, teams.id`,
    key,
  );
  return rows.map(({ deletedAt, ...membership }) => ({
    ...membership,
    ...(deletedAt === null ? {} : { deletedAt: deletedAt.toISOString() }),
  }));
}

/** Asked with every request of a person: see `preparedQuery`. `$1` is the moment. */
const STANDING = `select people.id as "personId", memberships.team_id as "teamId", memberships.role,
    (select sum(team_revisions.revision)::text from team_revisions
     where team_revisions.team_id = memberships.team_id) as revision,
    array(select programmes.id from programmes
          where programmes.team_id = memberships.team_id and not ${OPEN_PROGRAMME}) as closed
  from people
  left join memberships on memberships.person_id = people.id and ${STANDS.replace(':at', '$1')}`;

interface StandingRow {
  readonly personId: string;
  readonly teamId: string | null;
  readonly role: Role | null;
  readonly revision: string | null;
  readonly closed: readonly string[];
}

/** What a person is in which teams, and what is closed to the person there; `null` when there is no such person. */
export async function findStanding(db: Knex, key: { personId: string; at: Date }): Promise<Standing | null> {
  const text = `${STANDING} where people.id = $2`;
  const rows = await preparedQuery<StandingRow>(db, { name: 'standing', text, values: [key.at, key.personId] });
  return rows.length === 0 ? null : standingOf(rows);
}

/** The same of the person whose session it is; `null` when the session has ended or expired. */
export async function findSessionStanding(
  db: Knex,
  key: { sessionId: string; at: Date },
): Promise<({ personId: string } & Standing) | null> {
  const text = `${STANDING}
    join sessions on sessions.person_id = people.id and sessions.sid = $2 and sessions.expire >= $1 and sessions.expire >= now()`;
  const rows = await preparedQuery<StandingRow>(db, {
    name: 'session standing',
    text,
    values: [key.at, key.sessionId],
  });
  const [first] = rows;
  return first === undefined ? null : { personId: first.personId, ...standingOf(rows) };
}

function standingOf(rows: readonly StandingRow[]): Standing {
  return {
    roles: new Map(rows.flatMap(({ teamId, role }) => (teamId === null || role === null ? [] : [[teamId, role]]))),
    closedProgrammes: new Set(rows.flatMap(({ closed }) => closed)),
    revisions: new Map(rows.flatMap(({ teamId, revision }) => (teamId === null ? [] : [[teamId, revision ?? '0']]))),
  };
}

export async function anyTeamExists(db: Knex): Promise<boolean> {
  const { rows } = await db.raw<{ rows: { found: boolean }[] }>('select exists (select 1 from teams) as found');
  return rows[0]?.found ?? false;
}
