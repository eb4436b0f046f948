import type { Knex } from 'knex';
import { OF_CLOSED } from './closed-programme-read-model.ts';

/** One byte a slot, the position of its class in the list of classes; `null` when the team has no such run, or it is of a closed programme. */
export async function readRunHours(
  db: Knex,
  key: { teamId: string; runId: string; closed: readonly string[] },
): Promise<Uint8Array | null> {
  const { rows } = await db.raw<{ rows: { hours: Buffer }[] }>(
    `select runs.hour_classes as hours from runs where runs.team_id = ? and runs.id = ? and not ${OF_CLOSED}`,
    [key.teamId, key.runId, [...key.closed]],
  );
  return rows[0]?.hours ?? null;
}
