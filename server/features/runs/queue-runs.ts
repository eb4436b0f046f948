import type { Knex } from 'knex';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { addJob } from '../../jobs/queue.ts';
import { newestBriefVersionIds } from '../briefs/brief-read-model.ts';
import { findMissingRuns } from './missing-runs-read-model.ts';

/** Queues the judging of a weather year by the newest version of every brief of its team. */
export async function queueRuns(
  transaction: Knex.Transaction,
  year: { teamId: string; weatherYearId: string },
): Promise<void> {
  for (const briefVersionId of await newestBriefVersionIds(transaction, year.teamId)) {
    await queueRun(transaction, { ...year, briefVersionId });
  }
}

export async function queueRun(
  db: Knex,
  run: { teamId: string; weatherYearId: string; briefVersionId: string },
): Promise<void> {
  await addJob(db, {
    task: 'judge-year',
    payload: { teamId: run.teamId, weatherYearId: run.weatherYearId, briefVersionId: run.briefVersionId },
    jobKey: `${run.weatherYearId} ${run.briefVersionId}`,
  });
}

/**
 * Queues what accepted years still lack under the newest brief versions and this METHOD_VERSION: after a new release, and
 * where a job was lost. Runs of earlier versions stay beside the new ones.
 */
export async function queueMissingRuns(db: Knex): Promise<void> {
  for (const run of await findMissingRuns(db, METHOD_VERSION)) await queueRun(db, run);
}
