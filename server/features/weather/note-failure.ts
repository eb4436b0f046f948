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

/** What was given up: after its last try, or since the process died of it again and again. */
type WhyStopped = 'tries' | 'deaths';

const READING_STOPPED = {
  tries: 'Reading stopped for a fault of ours, not of the file. Nothing of it was stored. Let it be read once more.',
  deaths:
    'Reading stopped: the process that read this file died again and again, with nothing else in hand. Nothing of it was stored. Let it be read once more; if it stops again, whoever runs the server should see its log.',
} as const;
const OPENING_STOPPED = {
  tries:
    'Opening the archive stopped for a fault of ours, not of the archive. What was taken out of it stays. Let it be opened once more.',
  deaths:
    'Opening the archive stopped: the process that opened it died again and again, with nothing else in hand. What was taken out of it stays. Let it be opened once more; if it stops again, whoever runs the server should see its log.',
} as const;
const JUDGING_STOPPED = {
  tries: 'The year was read, but judging it by a brief stopped for a fault of ours. Let it be judged once more.',
  deaths:
    'The year was read, but the process that judged it by a brief died again and again, with nothing else in hand. Let it be judged once more; if it stops again, whoever runs the server should see its log.',
} as const;

/** Writes on a file that its reading was given up, so that an engineer sees it. */
export async function noteReadingFailure(
  db: Knex,
  key: { teamId: string; fileId: string },
  why: WhyStopped,
): Promise<void> {
  await inTransaction(db, async (transaction) => {
    if (!(await setReadingFailure(transaction, { ...key, message: READING_STOPPED[why] }))) return;
    await notifyTeam(transaction, {
      teamId: key.teamId,
      event: { kind: 'weather-file', fileId: key.fileId, status: 'reading', step: null },
    });
  });
}

/** The same where a year was read and accepted but could not be judged. */
export async function noteJudgingFailure(
  db: Knex,
  key: { teamId: string; weatherYearId: string },
  why: WhyStopped,
): Promise<void> {
  await inTransaction(db, async (transaction) => {
    const fileId = await setJudgingFailure(transaction, { ...key, message: JUDGING_STOPPED[why] });
    if (fileId === null) return;
    await notifyTeam(transaction, {
      teamId: key.teamId,
      event: { kind: 'weather-file', fileId, status: 'accepted', step: null },
    });
  });
}

/** The same where an archive could not be opened. */
export async function noteOpeningFailure(
  db: Knex,
  key: { teamId: string; archiveId: string },
  why: WhyStopped,
): Promise<void> {
  const batchId = await setArchiveFailure(db, { ...key, message: OPENING_STOPPED[why] });
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
  for (const file of await findStrandedFiles(db)) await noteReadingFailure(db, file, 'tries');
  for (const archive of await findStrandedArchives(db)) await noteOpeningFailure(db, archive, 'tries');
}
