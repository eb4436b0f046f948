import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { findStrandedFiles, setJudgingFailure, setReadingFailure, unsetJudgingFailure } from './failure-store.ts';

const READING_STOPPED =
  'Reading stopped for a fault of ours, not of the file. Nothing of it was stored. Upload the file again to try once more.';
const JUDGING_STOPPED =
  'The year was read, but judging it by a brief stopped for a fault of ours. Withdraw the file and upload it again to try once more.';

/** Writes on a file that its reading was given up, so that an engineer sees it. */
export async function noteReadingFailure(db: Knex, key: { teamId: string; fileId: string }): Promise<void> {
  await inTransaction(db, async (transaction) => {
    if (!(await setReadingFailure(transaction, { ...key, message: READING_STOPPED }))) return;
    await notifyTeam(transaction, {
      teamId: key.teamId,
      event: { kind: 'weather-file', fileId: key.fileId, status: 'reading', step: null },
    });
  });
}

/** The same where a year was read and accepted but could not be judged. */
export async function noteJudgingFailure(db: Knex, key: { teamId: string; weatherYearId: string }): Promise<void> {
  await inTransaction(db, async (transaction) => {
    const fileId = await setJudgingFailure(transaction, { ...key, message: JUDGING_STOPPED });
    if (fileId === null) return;
    await notifyTeam(transaction, {
      teamId: key.teamId,
      event: { kind: 'weather-file', fileId, status: 'accepted', step: null },
    });
  });
}

/** A year that could be judged after all carries no failure any more. */
export async function clearJudgingFailure(db: Knex, key: { teamId: string; weatherYearId: string }): Promise<void> {
  await unsetJudgingFailure(db, key);
}

/**
 * Finds files that are being read without a job that would do it (their last try was killed half-way) and writes the
 * failure on them.
 */
export async function noteStrandedFiles(db: Knex): Promise<void> {
  for (const file of await findStrandedFiles(db)) await noteReadingFailure(db, file);
}
