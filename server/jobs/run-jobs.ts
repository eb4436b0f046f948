import { EventEmitter } from 'node:events';
import { setTimeout as sleep } from 'node:timers/promises';
import { Logger, type Runner, run, type Task, type TaskList, type WorkerEvents } from 'graphile-worker';
import type { Knex } from 'knex';
import pg from 'pg';
import { Gate } from './gate.ts';
import type { ListenerLog } from './listener.ts';
import { type JobName, type JobPayloads, payloadOf } from './queue.ts';
import { type Repeated, repeat } from './repeat.ts';
import { clearBlame, deathsOf, MOST_DEATHS_ALONE, markAlone } from './worker-deaths.ts';
import { beat, forgetPool, releaseSilentPools } from './worker-pool-store.ts';

export interface JobTask<P> {
  /**
   * The work; throwing means that it is tried again later. It may run twice, so doing it again must change nothing.
   * @param progressed to be called when a part is done that will not be done again: no worker has died of the job so far
   */
  run(payload: P, progressed: () => Promise<void>): Promise<void>;
  /** After the last try has failed, or so many workers have died of the job that it is not tried again. */
  dead(payload: P, why: WhyDead): Promise<void>;
}
export type WhyDead = 'tries' | 'deaths';
export type JobTasks = { readonly [N in JobName]: JobTask<JobPayloads[N]> };

const CONCURRENCY = 2;
/** One connection to listen on, and one to spare. */
const MOST_CONNECTIONS = CONCURRENCY + 2;
const BEAT_EVERY_MS = 10_000;
const SILENT_MS = 60_000;
const FIRST_WAIT_MS = 500;
const LONGEST_WAIT_MS = 10_000;

interface JobsOptions {
  readonly db: Knex;
  readonly databaseUrl: string;
  readonly tasks: JobTasks;
  readonly log: ListenerLog;
}

/**
 * Works off the queue until it is closed; a run that ends by itself (the database was away for long) is begun again.
 * Signals are the caller's business. Closing waits for the jobs at hand.
 * @throws when the first run cannot begin
 */
export async function runJobs(options: JobsOptions): Promise<{ close(): Promise<void> }> {
  const closing = new AbortController();
  let current = await startRun(options);
  const supervised = supervise();

  async function supervise(): Promise<void> {
    let waitMs = FIRST_WAIT_MS;
    await current.ended;
    while (!closing.signal.aborted) {
      options.log.error({ waitMs }, 'the job worker ended by itself; starting it again');
      await sleep(waitMs, undefined, { signal: closing.signal }).catch(() => undefined);
      waitMs = Math.min(waitMs * 2, LONGEST_WAIT_MS);
      if (closing.signal.aborted) return;
      try {
        current = await startRun(options);
        waitMs = FIRST_WAIT_MS;
        if (closing.signal.aborted) await current.stop();
        await current.ended;
      } catch (error) {
        options.log.error({ error }, 'the job worker could not be started');
      }
    }
  }

  return {
    async close() {
      closing.abort();
      await current.stop();
      await supervised;
    },
  };
}

interface Run {
  readonly ended: Promise<void>;
  stop(): Promise<void>;
}

async function startRun({ db, databaseUrl, tasks, log }: JobsOptions): Promise<Run> {
  const pool = makePool(databaseUrl);
  const { events, buried, poolId } = watchRun(tasks, log);
  let runner: Runner;
  try {
    runner = await run({
      pgPool: pool,
      taskList: taskList({ db, tasks, log, poolId }),
      concurrency: CONCURRENCY,
      noHandleSignals: true,
      events,
      logger: queueLogger(log),
    });
  } catch (error) {
    await pool.end();
    throw error;
  }
  const heart = startHeart({ db, poolId: poolId(), log });
  const ended = runner.promise
    .catch((error) => log.error({ error }, 'the job worker ended'))
    .then(async () => {
      await heart.stop();
      await buried();
      await forgetPool(db, poolId()).catch(() => undefined);
      await pool.end();
    });
  return {
    ended,
    async stop() {
      await runner.stop().catch(() => undefined);
      await ended;
    },
  };
}

function makePool(databaseUrl: string): pg.Pool {
  const pool = new pg.Pool({
    connectionString: databaseUrl,
    max: MOST_CONNECTIONS,
    keepAlive: true,
    // Taking and ending a job does not wait for the disk: a server that crashes forgets the last of it, and the job is done twice.
    onConnect: async (client) => {
      await client.query('set synchronous_commit to off');
    },
  });
  // A lost connection shows in the query that meets it; without a listener it would end the process.
  pool.on('error', () => undefined);
  pool.on('connect', (client) => void client.on('error', () => undefined));
  return pool;
}

/** Learns the run's name, under which its jobs are locked, and writes down the jobs that failed for good. */
function watchRun(
  tasks: JobTasks,
  log: ListenerLog,
): { events: WorkerEvents; poolId(): string; buried(): Promise<void> } {
  const events: WorkerEvents = new EventEmitter();
  const burials = new Set<Promise<void>>();
  let poolId = '';
  events.on('pool:create', ({ workerPool }) => {
    poolId = workerPool.id;
  });
  events.on('job:failed', ({ job }) => {
    const burial = bury(tasks, job, log).finally(() => burials.delete(burial));
    burials.add(burial);
  });
  return {
    events,
    poolId: () => poolId,
    async buried() {
      await Promise.all(burials);
    },
  };
}

function startHeart({ db, poolId, log }: { db: Knex; poolId: string; log: ListenerLog }): Repeated {
  return repeat({
    everyMs: BEAT_EVERY_MS,
    what: 'the heartbeat of the job worker',
    log,
    work: async () => {
      await beat(db, poolId);
      const pools = await releaseSilentPools(db, SILENT_MS);
      if (pools.length > 0) log.error({ pools }, 'the jobs of silent workers were given back');
    },
  });
}

interface TaskListOptions extends Pick<JobsOptions, 'db' | 'tasks' | 'log'> {
  poolId(): string;
}

function taskList(options: TaskListOptions): TaskList {
  const { tasks } = options;
  const gate = new Gate();
  const worked = <N extends JobName>(name: N, task: JobTask<JobPayloads[N]>): Task => {
    return (payload, { job }) => work(options, gate, { jobId: job.id, name, task, payload });
  };
  const list: Record<JobName, Task> = {
    'read-weather-file': worked('read-weather-file', tasks['read-weather-file']),
    'open-weather-archive': worked('open-weather-archive', tasks['open-weather-archive']),
    'judge-year': worked('judge-year', tasks['judge-year']),
    'queue-site-runs': worked('queue-site-runs', tasks['queue-site-runs']),
    'send-mail': worked('send-mail', tasks['send-mail']),
    'export-team': worked('export-team', tasks['export-team']),
    'end-team': worked('end-team', tasks['end-team']),
  };
  return list;
}

/** Does a job: alone where a worker has died with it in hand, and not at all where too many have died of it. */
async function work<N extends JobName>(
  { db, log, poolId }: TaskListOptions,
  gate: Gate,
  job: { jobId: string; name: N; task: JobTask<JobPayloads[N]>; payload: unknown },
): Promise<void> {
  const { jobId, name, task } = job;
  const payload = payloadOf(name, job.payload);
  const { deaths, deathsAlone } = deathsOf(job.payload);
  if (deathsAlone >= MOST_DEATHS_ALONE) {
    log.error({ task: name, deathsAlone }, 'a job that workers die of was given up');
    return await task.dead(payload, 'deaths');
  }
  let blamed = deaths > 0;
  const progressed = async () => {
    if (!blamed) return;
    blamed = false;
    await clearBlame(db, jobId);
  };
  await gate.pass(blamed, async () => {
    if (blamed) await markAlone(db, { jobId, poolId: poolId() });
    await task.run(payload, progressed);
  });
}

async function bury(
  tasks: JobTasks,
  job: { task_identifier: string; payload: unknown },
  log: ListenerLog,
): Promise<void> {
  try {
    switch (job.task_identifier) {
      case 'read-weather-file':
        return await tasks['read-weather-file'].dead(payloadOf('read-weather-file', job.payload), 'tries');
      case 'open-weather-archive':
        return await tasks['open-weather-archive'].dead(payloadOf('open-weather-archive', job.payload), 'tries');
      case 'judge-year':
        return await tasks['judge-year'].dead(payloadOf('judge-year', job.payload), 'tries');
      case 'queue-site-runs':
        return await tasks['queue-site-runs'].dead(payloadOf('queue-site-runs', job.payload), 'tries');
      case 'send-mail':
        return await tasks['send-mail'].dead(payloadOf('send-mail', job.payload), 'tries');
      case 'export-team':
        return await tasks['export-team'].dead(payloadOf('export-team', job.payload), 'tries');
      case 'end-team':
        return await tasks['end-team'].dead(payloadOf('end-team', job.payload), 'tries');
    }
  } catch (error) {
    log.error({ error, task: job.task_identifier }, 'a job that failed for good could not be written down');
  }
}

/** The queue's own log: only what went wrong. */
function queueLogger(log: ListenerLog): Logger {
  return new Logger(() => (level, message, meta) => {
    if (level === 'error') log.error({ ...meta, job: undefined }, message);
  });
}
