import type { Knex } from 'knex';

const LONGEST_WAIT_MS = 3_000;

/** Whether the database answers the simplest question in time. */
export async function databaseAnswers(db: Knex): Promise<boolean> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<false>((resolve) => {
    timer = setTimeout(() => resolve(false), LONGEST_WAIT_MS);
  });
  const answered = db.raw('select 1').then(
    () => true,
    () => false,
  );
  try {
    return await Promise.race([answered, late]);
  } finally {
    clearTimeout(timer);
  }
}
