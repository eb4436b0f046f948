import type { Knex } from 'knex';

/** Ends one session. @returns false when the person has none such */
export async function deleteSession(db: Knex, key: { personId: string; sessionId: string }): Promise<boolean> {
  const result = await db.raw<{ rowCount: number }>(
    'delete from sessions where person_id = :personId and id = :sessionId',
    key,
  );
  return result.rowCount === 1;
}

/** Ends every session of a person but the one of this `sid`. @returns how many */
export async function deleteSessions(
  db: Knex,
  { personId, but }: { personId: string; but: string | null },
): Promise<number> {
  const result = await db.raw<{ rowCount: number }>(
    'delete from sessions where person_id = :personId and sid is distinct from :but',
    { personId, but },
  );
  return result.rowCount;
}
