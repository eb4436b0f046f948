import { EventEmitter } from 'node:events';
import { setTimeout as sleep } from 'node:timers/promises';
import { Logger, type Runner, run, type Task, type TaskList, type WorkerEvents } from 'graphile-worker';
import type { Knex } from 'knex';
import pg from 'pg';
import type { ListenerLog } from './listener.ts';
import { type JobName, type JobPayloads, payloadOf } from './queue.ts';
import { type Repeated, repeat } from './repeat.ts';
import { beat, forgetPool, releaseSilentPools } from './worker-pool-store.ts';

export interface JobTask<P> {
  /** The work; throwing means that it is tried again later. It may run twice, so doing it again must change nothing. */
  run(payload: P): Promise<void>;
  /** After the last try has failed. */
  dead(payload: P): Promise<void>;
}
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
      taskList: taskList(tasks),
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
  const pool = new pg.Pool({ connectionString: databaseUrl, max: MOST_CONNECTIONS, keepAlive: true });
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

function taskList(tasks: JobTasks): TaskList {
  const list: Record<JobName, Task> = {
    'read-weather-file': (payload) => tasks['read-weather-file'].run(payloadOf('read-weather-file', payload)),
    'open-weather-archive': (payload) => tasks['open-weather-archive'].run(payloadOf('open-weather-archive', payload)),
    'judge-year': (payload) => tasks['judge-year'].run(payloadOf('judge-year', payload)),
    'queue-site-runs': (payload) => tasks['queue-site-runs'].run(payloadOf('queue-site-runs', payload)),
    'send-mail': (payload) => tasks['send-mail'].run(payloadOf('send-mail', payload)),
    'export-team': (payload) => tasks['export-team'].run(payloadOf('export-team', payload)),
    'end-team': (payload) => tasks['end-team'].run(payloadOf('end-team', payload)),
  };
  return list;
}

async function bury(
  tasks: JobTasks,
  job: { task_identifier: string; payload: unknown },
  log: ListenerLog,
): Promise<void> {
  try {
    switch (job.task_identifier) {
      case 'read-weather-file':
        return await tasks['read-weather-file'].dead(payloadOf('read-weather-file', job.payload));
      case 'open-weather-archive':
        return await tasks['open-weather-archive'].dead(payloadOf('open-weather-archive', job.payload));
      case 'judge-year':
        return await tasks['judge-year'].dead(payloadOf('judge-year', job.payload));
      case 'queue-site-runs':
        return await tasks['queue-site-runs'].dead(payloadOf('queue-site-runs', job.payload));
      case 'send-mail':
        return await tasks['send-mail'].dead(payloadOf('send-mail', job.payload));
      case 'export-team':
        return await tasks['export-team'].dead(payloadOf('export-team', job.payload));
      case 'end-team':
        return await tasks['end-team'].dead(payloadOf('end-team', job.payload));
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
