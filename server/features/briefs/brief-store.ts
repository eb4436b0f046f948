import type { Knex } from 'knex';
import type { Brief } from '#engine/brief/brief.ts';
import { briefHash } from './brief-hash.ts';

export async function insertBrief(
  transaction: Knex.Transaction,
  brief: { teamId: string; programmeId: string; name: string },
): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    'insert into briefs (team_id, programme_id, name) values (:teamId, :programmeId, :name) returning id',
    brief,
  );
  return rows[0].id;
}

/** The next version of a brief; numbers run on from 1 without a gap, also when two save at once. */
export async function insertBriefVersion(
  transaction: Knex.Transaction,
  version: { teamId: string; briefId: string; body: Brief; madeBy: string },
): Promise<{ id: string; version: number }> {
  const { teamId, briefId, body, madeBy } = version;
  await transaction.raw('select 1 from briefs where briefs.team_id = ? and briefs.id = ? for no key update', [
    teamId,
    briefId,
  ]);
  const { rows } = await transaction.raw<{ rows: [{ id: string; version: number }] }>(
    `insert into brief_versions (team_id, brief_id, version, body, hash, made_by)
     select :teamId, :briefId, coalesce(max(brief_versions.version), 0) + 1, cast(:body as jsonb), :hash, :madeBy
     from brief_versions where brief_versions.brief_id = :briefId
     returning id, version`,
    { teamId, briefId, body: JSON.stringify(body), hash: briefHash(body), madeBy },
  );
  return rows[0];
}

/** Holds a programme while a brief is added, with the names that its briefs have; `null` without the programme. */
export async function lockProgramme(
  transaction: Knex.Transaction,
  key: { teamId: string; programmeId: string },
): Promise<{ briefNames: readonly string[] } | null> {
  const locked = await transaction.raw<{ rows: unknown[] }>(
    'select 1 from programmes where team_id = :teamId and id = :programmeId for no key update',
    { ...key },
  );
  if (locked.rows.length === 0) return null;
  const { rows } = await transaction.raw<{ rows: { name: string }[] }>(
    'select briefs.name from briefs where team_id = :teamId and programme_id = :programmeId',
    { ...key },
  );
  return { briefNames: rows.map(({ name }) => name) };
}

export interface NewestVersion {
  readonly name: string;
  readonly version: number;
  readonly hash: string;
  readonly preset: string;
  readonly madeBy: string;
  readonly madeAt: Date;
}

/** The newest version of a brief, held so that one saves at a time; `null` when the programme has no such brief. */
export async function lockNewestVersion(
  transaction: Knex.Transaction,
  { teamId, programmeId, briefId }: { teamId: string; programmeId: string; briefId: string },
): Promise<NewestVersion | null> {
  const key = { teamId, programmeId, briefId };
  // Locked first and read after: what waited here must see what the one before it has saved.
  await transaction.raw(
    `select 1 from briefs where team_id = :teamId and programme_id = :programmeId and id = :briefId
     for no key update`,
    key,
  );
  const { rows } = await transaction.raw<{ rows: NewestVersion[] }>(
    `select briefs.name, brief_versions.version, brief_versions.hash, brief_versions.body ->> 'preset' as preset,
       people.name as "madeBy", brief_versions.made_at as "madeAt"
     from briefs
     join brief_versions on brief_versions.team_id = briefs.team_id and brief_versions.brief_id = briefs.id
     join people on people.id = brief_versions.made_by
     where briefs.team_id = :teamId and briefs.programme_id = :programmeId and briefs.id = :briefId
     order by brief_versions.version desc
     limit 1`,
    key,
  );
  return rows[0] ?? null;
}
