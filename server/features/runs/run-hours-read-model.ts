import type { Knex } from 'knex';

/** One byte a slot, the position of its class in the list of classes; `null` when the team has no such run. */
export async function readRunHours(db: Knex, key: { teamId: string; runId: string }): Promise<Uint8Array | null> {
  const { rows } = await db.raw<{ rows: { hours: Buffer }[] }>(
    'select runs.hour_classes as hours from runs where runs.team_id = ? and runs.id = ?',
    [key.teamId, key.runId],
  );
  return rows[0]?.hours ?? null;
}
