/** The way of a request through `mount` alone, for endpoints that a test declares: no session, an actor of the test's choice. */
import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import express, { type Express, Router } from 'express';
import type { Deps } from '../../server/deps.ts';
import { errorHandler, nothingHere } from '../../server/http/errors.ts';
import type { Actor, SessionControl } from '../../server/http/request-context.ts';
import { beginRequest, stateOf } from '../../server/http/request-state.ts';
import { securityHeaders } from '../../server/http/security-headers.ts';
import { type KeptLog, keepLog } from './quiet-log.ts';
import type { TestDatabase } from './test-database.ts';

export const TEAM_ID = '11111111-1111-4111-8111-111111111111';

/** A lead of the one team. */
export const leadActor: Actor = {
  kind: 'person',
  personId: '22222222-2222-4222-8222-222222222222',
  roles: new Map([[TEAM_ID, 'lead']]),
  closedProgrammes: new Set(),
  revisions: new Map(),
};

const unused = async (): Promise<never> => {
  throw new Error('not used here');
};
const noSession: SessionControl = { id: '', checkPassword: unused, begin: unused, end: unused };

export interface Bench {
  readonly deps: Deps;
  readonly log: KeptLog;
  /** Files that wait as uploads. */
  waiting(): Promise<readonly string[]>;
  app(routes: (router: Router) => void, options?: { actor?: Actor; closing?: AbortSignal }): Express;
  close(): Promise<void>;
}

export async function openBench({
  database,
  now = () => new Date(),
}: {
  database: TestDatabase;
  now?: () => Date;
}): Promise<Bench> {
  const uploadsDir = await mkdtemp(path.join(tmpdir(), 'muslin-bench-'));
  const log = keepLog();
  const deps: Deps = {
    db: database.db,
    databaseUrl: database.databaseUrl,
    now,
    storage: { put: unused, get: unused, read: unused, remove: unused },
    uploadsDir,
    publicUrl: 'https://muslin.example',
    sendsMail: false,
    sessionSecrets: ['a session secret for tests'],
    trustProxy: 'loopback',
    clientDir: null,
    basemapPath: '',
    feed: { watch: () => noEvents(), close: async () => undefined },
    log,
  };
  return {
    deps,
    log,
    waiting: () => readdir(uploadsDir),
    app(routes, { actor = leadActor, closing = new AbortController().signal } = {}) {
      const app = express();
      const router = Router();
      routes(router);
      app.set('query parser', 'simple');
      app.use(beginRequest({ closing, heartbeatMs: 60_000 }), securityHeaders());
      app.use((request, _response, next) => {
        stateOf(request).identity = { actor, session: noSession, lookAgain: async () => actor };
        next();
      });
      app.use(router, nothingHere, errorHandler(log));
      return app;
    },
    close: () => rm(uploadsDir, { recursive: true, force: true }),
  };
}

async function* noEvents(): AsyncGenerator<never> {
  yield* [];
}
