import type { Knex } from 'knex';

export interface StandingDemo {
  readonly teamId: string;
  readonly programmeId: string;
  /** Who uploads and accepts. */
  readonly engineerId: string;
  /** Who enters the sites. */
  readonly plannerId: string;
  /** It was seeded to the end once; what people did to it since is theirs. */
  readonly seeded: boolean;
}

/** What the audit trail says when the demo is complete. */
export const DEMO_SEEDED = 'demo seeded';

/** The demo's team, seeded to the end or not; `null` before the first seed. */
export async function findStandingDemo(db: Knex, teamName: string): Promise<StandingDemo | null> {
  const { rows } = await db.raw<{ rows: StandingDemo[] }>(
    `select teams.id as "teamId", programmes.id as "programmeId", memberships.person_id as "engineerId",
       planners.person_id as "plannerId",
       exists (
         select 1 from audit_events where audit_events.team_id = teams.id and audit_events.act = :act
       ) as seeded
     from teams
     join programmes on programmes.team_id = teams.id
     join memberships on memberships.team_id = teams.id and memberships.role = 'engineer'
     join memberships as planners on planners.team_id = teams.id and planners.role = 'planner'
     where teams.invented and teams.name = :teamName
     order by teams.created_at, programmes.created_at, memberships.since, planners.since
     limit 1`,
    { teamName, act: DEMO_SEEDED },
  );
  return rows[0] ?? null;
}

/** Names of the sites of a programme that the demo has already, and whether work still waits. */
export async function lookAtDemoSites(
  db: Knex,
  { teamId, programmeId }: Pick<StandingDemo, 'teamId' | 'programmeId'>,
): Promise<{ names: readonly string[]; jobs: number }> {
  const { rows } = await db.raw<{ rows: [{ names: string[]; jobs: number }] }>(
    `select array(select name from sites where team_id = :teamId and programme_id = :programmeId) as names,
       (select count(*) from graphile_worker.jobs where attempts < max_attempts)::integer as jobs`,
    { teamId, programmeId },
  );
  return rows[0];
}
