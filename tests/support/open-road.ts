/** The main road for tests: a database of its own, a store of originals, the web application, people who are signed in. */
import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import type { Express } from 'express';
import type { Knex } from 'knex';
import supertest from 'supertest';
import { createApp } from '../../server/app.ts';
import { inTransaction } from '../../server/db/in-transaction.ts';
import type { Deps } from '../../server/deps.ts';
import { makePerson } from '../../server/features/accounts/make-person.ts';
import { startBrief } from '../../server/features/briefs/start-brief.ts';
import { addMember } from '../../server/features/teams/add-member.ts';
import { makeTeam } from '../../server/features/teams/make-team.ts';
import { openTeamFeed } from '../../server/jobs/team-feed.ts';
import { createFolderStore } from '../../server/storage/folder-store.ts';
import type { OriginalStore } from '../../server/storage/original-store.ts';
import { shippedRelief } from '../../server/tiles/relief.ts';
import { startWorker } from '../../server/worker.ts';
import type { Role } from '../../src/contract/accounts.ts';
import { eventually } from './eventually.ts';
import { type KeptLog, keepLog } from './quiet-log.ts';
import { makeTestDatabase, type TestDatabase } from './test-database.ts';

export type Agent = ReturnType<typeof supertest.agent>;

export interface Member {
  readonly personId: string;
  readonly agent: Agent;
}

export interface RoadTeam {
  readonly teamId: string;
  readonly programmeId: string;
  readonly lead: Member;
  /** A member more, signed in. */
  join(role: Role): Promise<Member>;
}

export interface Road {
  readonly database: TestDatabase;
  readonly db: Knex;
  readonly storage: OriginalStore;
  readonly log: KeptLog;
  readonly app: Express;
  readonly originalsDir: string;
  makeTeam(name: string): Promise<RoadTeam>;
  /** A worker that the road closes if the test has not; `storage` stands in for the road's own. */
  startWorker(options?: { storage?: OriginalStore }): Promise<{ close(): Promise<void> }>;
  /** Rows of every table of ours, by table. */
  countRows(): Promise<Readonly<Record<string, number>>>;
  /** Files that wait as uploads; none is left when no request runs. */
  waitingUploads(): Promise<readonly string[]>;
  close(): Promise<void>;
}

const PASSWORD = 'a long pass phrase for tests';
const BASEMAP = path.resolve(import.meta.dirname, '../../data/basemap/basemap.pmtiles');

/** @param options.database one that is there already instead of a new one; it is dropped with the road all the same */
export async function openRoad(options: { database?: TestDatabase } = {}): Promise<Road> {
  const database = options.database ?? (await makeTestDatabase());
  const { db, databaseUrl } = database;
  const home = await mkdtemp(path.join(tmpdir(), 'muslin-road-'));
  const originalsDir = path.join(home, 'originals');
  const storage = createFolderStore(originalsDir);
  const log = keepLog();
  const feed = await openTeamFeed({ databaseUrl, log });
  const deps: Deps = {
    db,
    databaseUrl,
    now: () => new Date(),
    storage,
    uploadsDir: home,
    publicUrl: 'https://muslin.example',
    sendsMail: false,
    sessionSecrets: ['a session secret for tests'],
    trustProxy: 'loopback',
    clientDir: null,
    basemapPath: BASEMAP,
    feed,
    log,
  };
  const app = createApp(deps);
  const workers = new Set<{ close(): Promise<void> }>();
  let people = 0;

  async function newMember(role: Role, teamId?: string): Promise<Member> {
    people += 1;
    const email = `${role}-${people}@example.org`;
    const personId = await makePerson(db, { email, name: `Test ${role} ${people}`, password: PASSWORD });
    if (teamId !== undefined) await addMember(db, { teamId, personId, role });
    return { personId, agent: await signIn(app, email) };
  }

  return {
    database,
    db,
    storage,
    log,
    app,
    originalsDir,
    async makeTeam(name) {
      const lead = await newMember('lead');
      const made = await inTransaction(db, (transaction) =>
        makeTeam(
          { transaction, startBrief },
          { name, invented: true, leadId: lead.personId, programmeName: 'Offices of the north' },
        ),
      );
      return { ...made, lead, join: (role) => newMember(role, made.teamId) };
    },
    async startWorker(options) {
      const worker = await startWorker({
        databaseUrl,
        storage: options?.storage ?? storage,
        relief: shippedRelief(),
        publicUrl: deps.publicUrl,
        log,
      });
      const closing = {
        close: async () => {
          if (workers.delete(closing)) await worker.close();
        },
      };
      workers.add(closing);
      return closing;
    },
    async countRows() {
      // A worker takes its job out of the queue a moment after it has done the work.
      if (workers.size > 0) await eventually('an empty queue', async () => (await waitingJobs(database)) === 0);
      return countRows(database);
    },
    waitingUploads: async () => (await readdir(home)).filter((name) => name !== 'originals'),
    async close() {
      for (const worker of workers) await worker.close();
      await feed.close();
      await database.drop();
      await rm(home, { recursive: true, force: true });
    },
  };
}

async function signIn(app: Express, email: string): Promise<Agent> {
  const agent = supertest.agent(app).set('Sec-Fetch-Site', 'same-origin');
  await agent.post('/api/session').send({ email, password: PASSWORD }).expect(200);
  return agent;
}

/** Jobs that a worker has or will take; those that failed for good stay in the queue. */
async function waitingJobs({ ownerDb }: TestDatabase): Promise<number> {
  const { rows } = await ownerDb.raw<{ rows: [{ number: number }] }>(
    'select count(*)::integer as number from graphile_worker._private_jobs where attempts < max_attempts or locked_at is not null',
  );
  return rows[0].number;
}

async function countRows({ ownerDb }: TestDatabase): Promise<Readonly<Record<string, number>>> {
  const tables = await ownerDb.raw<{ rows: { name: string }[] }>(
    `select quote_ident(schemaname) || '.' || quote_ident(tablename) as name from pg_tables
     where (schemaname = 'public' and tablename not in ('sessions', 'request_counts', 'worker_pools', 'audit_chains'))
       or (schemaname = 'graphile_worker' and tablename = '_private_jobs')
     order by name`,
  );
  const counts: Record<string, number> = {};
  for (const { name } of tables.rows) {
    const { rows } = await ownerDb.raw<{ rows: [{ number: number }] }>(
      `select count(*)::integer as number from ${name}`,
    );
    counts[name] = rows[0].number;
  }
  return counts;
}
