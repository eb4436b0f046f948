import type { Knex } from 'knex';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { addJob, addJobs } from '../../jobs/queue.ts';
import { newestBriefVersionIds } from '../briefs/brief-read-model.ts';
import { listAcceptedYearIds } from '../weather/accepted-years-read-model.ts';
import { findMissingRuns } from './missing-runs-read-model.ts';
import { queueSiteRunsOf } from './queue-site-runs.ts';

/** Queues the judging of a weather year by the newest version of every brief of its team, and of sites that it now stands for. */
export async function queueRuns(
  transaction: Knex.Transaction,
  year: { teamId: string; weatherYearId: string },
): Promise<void> {
  for (const briefVersionId of await newestBriefVersionIds(transaction, year.teamId)) {
    await queueRun(transaction, { ...year, briefVersionId });
  }
  await queueSiteRunsOf(transaction, year);
}

/** Queues the judging of every accepted year of the team by a new brief version. */
export async function queueRunsOfVersion(
  transaction: Knex.Transaction,
  version: { teamId: string; briefVersionId: string },
): Promise<void> {
  const yearIds = await listAcceptedYearIds(transaction, version.teamId);
  const jobs = yearIds.map((weatherYearId) => jobOf({ ...version, weatherYearId }));
  if (jobs.length > 0) await addJobs(transaction, 'judge-year', jobs);
  await queueSiteRunsOf(transaction, version);
}

export async function queueRun(
  db: Knex,
  run: { teamId: string; weatherYearId: string; briefVersionId: string },
): Promise<void> {
  await addJob(db, { task: 'judge-year', ...jobOf(run) });
}

function jobOf({
  teamId,
  weatherYearId,
  briefVersionId,
}: {
  teamId: string;
  weatherYearId: string;
  briefVersionId: string;
}) {
  return { payload: { teamId, weatherYearId, briefVersionId }, jobKey: `${weatherYearId} ${briefVersionId}` };
}

/**
 * Queues what accepted years still lack under the newest brief versions and this METHOD_VERSION: after a new release, and
 * where a job was lost. Runs of earlier versions stay beside the new ones.
 */
export async function queueMissingRuns(db: Knex): Promise<void> {
  for (const run of await findMissingRuns(db, METHOD_VERSION)) await queueRun(db, run);
  await queueSiteRunsOf(db, { teamId: null });
}
