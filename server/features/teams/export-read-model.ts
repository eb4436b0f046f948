import type { Knex } from 'knex';
import type { TeamExport } from '#contract/team-data.ts';

export interface ExportView {
  readonly id: string;
  readonly state: TeamExport['state'];
  readonly askedBy: string;
  readonly askedAt: Date;
  readonly parts: number | null;
  readonly partsDone: number;
  readonly bytes: number | null;
  readonly storageKey: string | null;
  readonly expiresAt: Date | null;
}

const MOST_SHOWN = 10;

const VIEW = `select team_exports.id, team_exports.state, people.name as "askedBy", team_exports.asked_at as "askedAt",
    team_exports.parts, team_exports.parts_done as "partsDone", team_exports.bytes::float8 as bytes,
    team_exports.storage_key as "storageKey", team_exports.expires_at as "expiresAt"
  from team_exports join people on people.id = team_exports.asked_by`;

/** The last exports of a team, newest first. */
export async function listExportViews(db: Knex, teamId: string): Promise<readonly ExportView[]> {
  const { rows } = await db.raw<{ rows: ExportView[] }>(
    `${VIEW} where team_exports.team_id = ? order by team_exports.asked_at desc, team_exports.id limit ${MOST_SHOWN}`,
    [teamId],
  );
  return rows;
}

export async function findExportView(db: Knex, key: { teamId: string; exportId: string }): Promise<ExportView | null> {
  const { rows } = await db.raw<{ rows: ExportView[] }>(
    `${VIEW} where team_exports.team_id = :teamId and team_exports.id = :exportId`,
    key,
  );
  return rows[0] ?? null;
}
