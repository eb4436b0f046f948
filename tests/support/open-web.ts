/** The whole web application for tests: a database of its own, people made when they are asked for. */
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import type { Express } from 'express';
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
import type { Role } from '../../src/contract/accounts.ts';
import { type KeptLog, keepLog } from './quiet-log.ts';
import { makeTestDatabase, type TestDatabase } from './test-database.ts';

export const PASSWORD = 'correct horse battery';

export type Agent = ReturnType<typeof supertest.agent>;

export interface WebForTests {
  readonly database: TestDatabase;
  readonly deps: Deps;
  readonly log: KeptLog;
  readonly app: Express;
  /** A browser that is not signed in, on a page of ours. */
  browser(): Agent;
  makePerson(email: string): Promise<string>;
  makeTeam(leadId: string): Promise<{ teamId: string; programmeId: string }>;
  addMember(member: { teamId: string; personId: string; role: Role }): Promise<void>;
  signIn(email: string): Promise<Agent>;
  close(): Promise<void>;
}

const BASEMAP = path.resolve(import.meta.dirname, '../../data/basemap/basemap.pmtiles');

export async function openWeb(changes: Partial<Deps> = {}): Promise<WebForTests> {
  const database = await makeTestDatabase();
  const { db, databaseUrl } = database;
  const home = await mkdtemp(path.join(tmpdir(), 'muslin-web-'));
  const log = keepLog();
  const feed = await openTeamFeed({ databaseUrl, log });
  const deps: Deps = {
    db,
    databaseUrl,
    now: () => new Date(),
    storage: createFolderStore(path.join(home, 'originals')),
    uploadsDir: home,
    publicUrl: 'https://muslin.example',
    sendsMail: false,
    sessionSecrets: ['a session secret for tests'],
    trustProxy: 'loopback',
    clientDir: null,
    basemapPath: BASEMAP,
    feed,
    log,
    ...changes,
  };
  const app = createApp(deps);
  const browser = () => supertest.agent(app).set('Sec-Fetch-Site', 'same-origin');
  return {
    database,
    deps,
    log,
    app,
    browser,
    makePerson: (email) => makePerson(db, { email, name: `Person of ${email}`, password: PASSWORD }),
    makeTeam: (leadId) =>
      inTransaction(db, (transaction) =>
        makeTeam({ transaction, startBrief }, { name: 'Team', invented: false, leadId, programmeName: 'Programme' }),
      ),
    addMember: (member) => addMember(db, member),
    async signIn(email) {
      const agent = browser();
      await agent.post('/api/session').send({ email, password: PASSWORD }).expect(200);
      return agent;
    },
    async close() {
      await feed.close();
      await database.drop();
      await rm(home, { recursive: true, force: true });
    },
  };
}
