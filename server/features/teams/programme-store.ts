import type { Knex } from 'knex';

/** @returns false when the team has no such programme */
export async function setProgrammeName(
  db: Knex,
  change: { teamId: string; programmeId: string; name: string },
): Promise<boolean> {
  const result = await db.raw<{ rowCount: number }>(
    'update programmes set name = :name where team_id = :teamId and id = :programmeId',
    change,
  );
  return result.rowCount === 1;
}

/** @returns false when the team has no such programme */
export async function setProgrammeRestricted(
  db: Knex,
  change: { teamId: string; programmeId: string; restricted: boolean },
): Promise<boolean> {
  const result = await db.raw<{ rowCount: number }>(
    'update programmes set restricted = :restricted where team_id = :teamId and id = :programmeId',
    change,
  );
  return result.rowCount === 1;
}

export async function replaceProgrammeMembers(
  transaction: Knex.Transaction,
  { teamId, programmeId, memberIds }: { teamId: string; programmeId: string; memberIds: readonly string[] },
): Promise<void> {
  await transaction.raw('delete from programme_members where team_id = ? and programme_id = ?', [teamId, programmeId]);
  await transaction.raw(
    'insert into programme_members (team_id, programme_id, person_id) select ?, ?, unnest(?::uuid[])',
    [teamId, programmeId, [...memberIds]],
  );
}
