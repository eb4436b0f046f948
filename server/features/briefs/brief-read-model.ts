import type { Knex } from 'knex';
import type { Brief } from '#engine/brief/brief.ts';

/** The newest version of each brief of a team: what an accepted year is judged by. */
export async function newestBriefVersionIds(db: Knex, teamId: string): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(
    `select distinct on (brief_versions.brief_id) brief_versions.id
     from brief_versions
     where brief_versions.team_id = ?
     order by brief_versions.brief_id, brief_versions.version desc`,
    [teamId],
  );
  return rows.map((row) => row.id);
}

export interface ProgrammeBrief {
  readonly programmeName: string;
  readonly invented: boolean;
  readonly briefId: string;
  readonly briefVersionId: string;
  readonly name: string;
  readonly version: number;
  readonly body: Brief;
}

/**
 * The newest version of a brief of a programme, with what every screen under it names; without an id, of the brief that was
 * saved last. `null` without the programme or such a brief.
 */
export async function findProgrammeBrief(
  db: Knex,
  key: { teamId: string; programmeId: string; briefId?: string | undefined },
): Promise<ProgrammeBrief | null> {
  const { rows } = await db.raw<{ rows: ProgrammeBrief[] }>(
    `select programmes.name as "programmeName", teams.invented, briefs.id as "briefId",
       brief_versions.id as "briefVersionId", briefs.name, brief_versions.version, brief_versions.body
     from programmes
     join teams on teams.id = programmes.team_id
     join briefs on briefs.team_id = programmes.team_id and briefs.programme_id = programmes.id
     join brief_versions on brief_versions.team_id = briefs.team_id and brief_versions.brief_id = briefs.id
     where programmes.team_id = ? and programmes.id = ? and (?::uuid is null or briefs.id = ?)
     order by brief_versions.made_at desc, brief_versions.version desc, brief_versions.id
     limit 1`,
    [key.teamId, key.programmeId, key.briefId ?? null, key.briefId ?? null],
  );
  return rows[0] ?? null;
}
