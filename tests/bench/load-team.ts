import type { Knex } from 'knex';
import { newestBriefVersionIds } from '../../server/features/briefs/brief-read-model.ts';
import { judgeStoredYear } from '../../server/features/runs/judge-year.ts';
import { listYearsAtStations } from '../../server/features/runs/site-runs-read-model.ts';
import { makeManyPlaces } from './many-places.ts';
import { type EmptyTeam, fillWithClimates } from './station-year-cluster.ts';

export interface TeamSize {
  readonly stations: number;
  readonly sites: number;
  readonly people: number;
}

export interface TeamUnderLoad {
  readonly teamId: string;
  readonly programmeId: string;
  readonly stationId: string;
  /** Address of each person; the password is that of the bench's own person. */
  readonly emails: readonly string[];
}

/** A team with judged stations and sites, and so many planners who can sign in. */
export async function makeTeamUnderLoad(team: EmptyTeam, size: TeamSize): Promise<TeamUnderLoad> {
  const { db, ownerDb, teamId } = team;
  await fillWithClimates(team);
  const [briefVersionId = ''] = await newestBriefVersionIds(db, teamId);
  for (const { weatherYearId } of await listYearsAtStations(db, teamId))
    await judgeStoredYear(db, { teamId, weatherYearId, briefVersionId });
  const programmeId = await oneId(ownerDb, 'select id from programmes where team_id = ?', teamId);
  await makeManyPlaces(ownerDb, { teamId, programmeId, stations: size.stations - 6, sites: size.sites });
  const { rows } = await ownerDb.raw<{ rows: { email: string }[] }>(
    `with made as (
       insert into people (email, name, password_hash)
       select 'planner-' || number || '@example.org', 'Planner ' || number, password_hash
       from people cross join generate_series(1, :people) as number where people.id = :personId
       returning id, email
     ), joined as (
       insert into memberships (team_id, person_id, role) select :teamId, made.id, 'planner' from made
     )
     select made.email from made`,
    { people: size.people, personId: team.personId, teamId },
  );
  const stationId = await oneId(ownerDb, 'select id from stations where team_id = ? limit 1', teamId);
  return { teamId, programmeId, stationId, emails: rows.map(({ email }) => email) };
}

async function oneId(db: Knex, statement: string, value: string): Promise<string> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(statement, [value]);
  return rows[0]?.id ?? '';
}
