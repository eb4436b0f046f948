import type { Knex } from 'knex';

export async function setNoticesRead(db: Knex, reading: { personId: string; at: Date }): Promise<void> {
  await db.raw('update notices set read_at = :at where person_id = :personId and read_at is null', reading);
}
