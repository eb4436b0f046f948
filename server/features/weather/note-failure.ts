import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { setArchiveFailure } from './batch-store.ts';
import {
  findStrandedArchives,
  findStrandedFiles,
  setJudgingFailure,
  setReadingFailure,
  unsetJudgingFailure,
} from './failure-store.ts';

const READING_STOPPED =
  'Reading stopped for a fault of ours, not of the file. Nothing of it was stored. Let it be read once more.';
const OPENING_STOPPED =
  'Opening the archive stopped for a fault of ours, not of the archive. What was taken out of it stays. Let it be opened once more.';
const JUDGING_STOPPED =
  'The year was read, but judging it by a brief stopped for a fault of ours. Let it be judged once more.';

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

/** The same where an archive could not be opened. */
export async function noteOpeningFailure(db: Knex, key: { teamId: string; archiveId: string }): Promise<void> {
  const batchId = await setArchiveFailure(db, { ...key, message: OPENING_STOPPED });
  if (batchId === null) return;
  await notifyTeam(db, { teamId: key.teamId, event: { kind: 'weather-batch', batchId } });
}

/** A year that could be judged after all carries no failure any more. */
export async function clearJudgingFailure(db: Knex, key: { teamId: string; weatherYearId: string }): Promise<void> {
  await unsetJudgingFailure(db, key);
}

/**
 * Finds files that are being read, and archives that are being opened, without a job that would do it (their last try was killed
 * half-way) and writes the failure on them.
 */
export async function noteStrandedFiles(db: Knex): Promise<void> {
  for (const file of await findStrandedFiles(db)) await noteReadingFailure(db, file);
  for (const archive of await findStrandedArchives(db)) await noteOpeningFailure(db, archive);
}
