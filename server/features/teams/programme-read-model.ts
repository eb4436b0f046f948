import type { Knex } from 'knex';
import type { Programme } from '#contract/programmes.ts';

const PROGRAMME = `
  select programmes.id, programmes.name, programmes.restricted,
    coalesce((select json_agg(programme_members.person_id order by programme_members.person_id)
      from programme_members where programme_members.programme_id = programmes.id), '[]'::json) as "memberIds"
  from programmes`;

/** By name. */
export async function listProgrammeViews(db: Knex, teamId: string): Promise<readonly Programme[]> {
  const { rows } = await db.raw<{ rows: Programme[] }>(
    `${PROGRAMME} where programmes.team_id = ? order by programmes.name, programmes.id`,
    [teamId],
  );
  return rows;
}

/** `null` when the team has no such programme. */
export async function findProgrammeView(
  db: Knex,
  key: { teamId: string; programmeId: string },
): Promise<Programme | null> {
  const { rows } = await db.raw<{ rows: Programme[] }>(
    `${PROGRAMME} where programmes.team_id = :teamId and programmes.id = :programmeId`,
    key,
  );
  return rows[0] ?? null;
}
