import type { Knex } from 'knex';
import { setNoticesRead } from './notice-store.ts';

/** Marks every notice of a person as read. */
export async function readNotices(db: Knex, reading: { personId: string; at: Date }): Promise<void> {
  await setNoticesRead(db, reading);
}
