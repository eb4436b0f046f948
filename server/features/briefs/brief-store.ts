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
