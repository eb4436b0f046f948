import type { Knex } from 'knex';

/** The closed list of background work, each with what it is told. */
export interface JobPayloads {
  'read-weather-file': { readonly teamId: string; readonly fileId: string };
  'open-weather-archive': { readonly teamId: string; readonly archiveId: string };
  'judge-year': {
    readonly teamId: string;
    readonly weatherYearId: string;
    readonly briefVersionId: string;
    /** Heights of sites, m, that the weather is moved to; left out: the station's own. */
    readonly heightsM?: readonly number[];
  };
  'queue-site-runs': { readonly teamId: string; readonly programmeId: string };
  'send-mail': { readonly mailId: string };
  'export-team': { readonly teamId: string; readonly exportId: string };
  'end-team': { readonly teamId: string };
}
export type JobName = keyof JobPayloads;

/** Waits before tries grow as e^n seconds, so the last of five comes about a minute and a half after the first. */
export const MAX_ATTEMPTS = 5;

/** A mail server that is away for the night is met again: the last of twelve tries comes after most of a day. */
const MAIL_ATTEMPTS = 12;

/**
 * Queues a job in the caller's transaction: it exists exactly when the transaction commits.
 * A waiting job of the same key is replaced, one that used up its attempts is begun anew.
 */
export async function addJob<N extends JobName>(
  db: Knex,
  job: { task: N; payload: JobPayloads[N]; jobKey: string },
): Promise<void> {
  await db.raw(
    `select graphile_worker.add_job(
       identifier => ?::text, payload => ?::json, job_key => ?::text, max_attempts => ?::integer)`,
    [job.task, JSON.stringify(job.payload), job.jobKey, job.task === 'send-mail' ? MAIL_ATTEMPTS : MAX_ATTEMPTS],
  );
}

/** Queues many jobs of one task as `addJob` does, in one statement. */
export async function addJobs<N extends JobName>(
  db: Knex,
  task: N,
  jobs: readonly { payload: JobPayloads[N]; jobKey: string }[],
): Promise<void> {
  await db.raw(
    `select graphile_worker.add_job(
       identifier => ?::text, payload => job.payload::json, job_key => job.key, max_attempts => ?::integer)
     from unnest(?::text[], ?::text[]) as job (payload, key)`,
    [task, MAX_ATTEMPTS, jobs.map(({ payload }) => JSON.stringify(payload)), jobs.map(({ jobKey }) => jobKey)],
  );
}

const payloadKeys: { readonly [N in JobName]: readonly (keyof JobPayloads[N])[] } = {
  'read-weather-file': ['teamId', 'fileId'],
  'open-weather-archive': ['teamId', 'archiveId'],
  'judge-year': ['teamId', 'weatherYearId', 'briefVersionId'],
  'queue-site-runs': ['teamId', 'programmeId'],
  'send-mail': ['mailId'],
  'export-team': ['teamId', 'exportId'],
  'end-team': ['teamId'],
};

/** The payload of a job out of the queue. @throws TypeError when it is not one that `addJob` writes */
export function payloadOf<N extends JobName>(task: N, payload: unknown): JobPayloads[N] {
  const found: Record<PropertyKey, unknown> = { ...(typeof payload === 'object' ? payload : null) };
  for (const key of payloadKeys[task]) {
    if (typeof found[key] !== 'string') throw new TypeError(`the job ${task} has no ${String(key)}`);
  }
  return payload as JobPayloads[N];
}
