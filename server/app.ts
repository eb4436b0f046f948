/** The web side, wired: here alone the parts of the server meet. */
import { availableParallelism } from 'node:os';
import compression from 'compression';
import express, { type Express, type RequestHandler, Router } from 'express';
import type { Relief } from '#engine/weather-files/relief.ts';
import type { Deps } from './deps.ts';
import { sessionStands } from './features/accounts/account-store.ts';
import { checkPassword } from './features/accounts/check-password.ts';
import { makePerson } from './features/accounts/make-person.ts';
import { makeDummyHash } from './features/accounts/password-hash.ts';
import { readSession } from './features/accounts/read-session.ts';
import { requirePassword } from './features/accounts/require-password.ts';
import { accountsRoutes } from './features/accounts/routes.ts';
import { auditRoutes } from './features/audit/routes.ts';
import { readDraft } from './features/briefs/read-draft.ts';
import { briefsRoutes } from './features/briefs/routes.ts';
import { startBrief } from './features/briefs/start-brief.ts';
import { methodRoutes } from './features/method/routes.ts';
import { placesRoutes } from './features/places/routes.ts';
import { figuresOfSites } from './features/runs/figures-of-sites.ts';
import { queueRuns, queueRunsOfVersion } from './features/runs/queue-runs.ts';
import { queueSiteRuns, queueSiteRunsOf } from './features/runs/queue-site-runs.ts';
import { runsRoutes } from './features/runs/routes.ts';
import { sitesRoutes } from './features/sites/routes.ts';
import { findOrMakeStation } from './features/stations/find-or-make-station.ts';
import { stationsRoutes } from './features/stations/routes.ts';
import { switchRuleOff } from './features/stations/switch-rule.ts';
import { findToken } from './features/teams/find-token.ts';
import { makeTeam } from './features/teams/make-team.ts';
import { teamsRoutes } from './features/teams/routes.ts';
import { FIRST_PROGRAMME } from './features/teams/start-team.ts';
import { findSessionStanding, findStanding } from './features/teams/team-read-model.ts';
import { filesOfStation } from './features/weather/files-of-station.ts';
import { originalToRead } from './features/weather/original-to-read.ts';
import { weatherRoutes } from './features/weather/routes.ts';
import { apiRoute } from './http/api-route.ts';
import { authentication, type PeopleLookup } from './http/authenticate.ts';
import { builtClient } from './http/built-client.ts';
import { errorHandler, nothingHere } from './http/errors.ts';
import { health } from './http/health.ts';
import { originGuard } from './http/origin-guard.ts';
import { beginRequest, type ServerTerms } from './http/request-state.ts';
import { routesByShape } from './http/routes-by-shape.ts';
import { securityHeaders } from './http/security-headers.ts';
import { makeWebThreadsOf, type WebThreads } from './jobs/web-threads.ts';
import { makeYearThread, type YearThread } from './jobs/year-thread.ts';
import { shippedRelief } from './tiles/relief.ts';
import { reliefRouter } from './tiles/relief-router.ts';
import { tilesRouter } from './tiles/tiles-router.ts';

/** Often enough for proxies that cut a silent connection after a minute (common practice). */
const HEARTBEAT_MS = 15_000;

const MOST_THREADS = 8;

/** Threads that judge for the web process, which itself never does; the caller closes them. */
export function makeWebThreads(): WebThreads {
  const threads = Math.min(availableParallelism(), MOST_THREADS);
  return makeWebThreadsOf({ entry: new URL('./web-thread.ts', import.meta.url), threads });
}

/** One thread more for what concerns a single year, so that no slider waits for a table of hours; the caller closes it. */
export function makeWebYearThread(): YearThread {
  return makeYearThread(new URL('./year-thread.ts', import.meta.url));
}

export interface AppThreads {
  readonly threads: WebThreads;
  readonly yearThread: YearThread;
}

/** @param terms.threads by default some that start with their first task and end with the process; so `yearThread` */
export function createApp(deps: Deps, terms: Partial<ServerTerms & AppThreads> = {}): Express {
  const { closing = new AbortController().signal, heartbeatMs = HEARTBEAT_MS } = terms;
  const { threads = makeWebThreads(), yearThread = makeWebYearThread() } = terms;
  const relief = shippedRelief();
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', deps.trustProxy === 'none' ? false : deps.trustProxy);
  app.set('query parser', 'simple');
  app.use(beginRequest({ closing, heartbeatMs }), securityHeaders());

  // What stands outside the declarations: health, base map and relief, built client (page, code, fonts). Nothing else does.
  app.get('/api/health', health(deps.db, closing));
  // Each endpoint packs its own answer.
  const pack = compression();
  app.use((request, response, next) => (request.path.startsWith('/api/') ? next() : pack(request, response, next)));
  app.use(tilesRouter(deps.basemapPath), reliefRouter(relief));
  if (deps.clientDir !== null) app.use(builtClient(deps.clientDir));

  app.use('/api', originGuard, ...authentication(deps, peopleLookup(deps)));
  app.use(declaredRoutes(deps, { threads, yearThread, relief }));
  app.use(nothingHere);
  app.use(errorHandler(deps.log));
  return app;
}

/** Every endpoint of src/contract/endpoints.ts, by feature. */
function declaredRoutes(deps: Deps, { threads, yearThread, relief }: AppThreads & { relief: Relief }): RequestHandler {
  const router = Router();
  accountsRoutes(router, deps, {
    makeFirstTeam: (transaction, team) =>
      makeTeam({ transaction, startBrief }, { ...team, invented: false, programmeName: FIRST_PROGRAMME }),
  });
  weatherRoutes(router, deps, { findOrMakeStation, switchRuleOff, queueRuns, queueSiteRunsOf, yearThread });
  stationsRoutes(router, deps, { queueRuns, filesOfStation: (key) => filesOfStation(deps.db, key) });
  sitesRoutes(router, deps, { relief, queueSiteRuns, figuresOfSites: (of) => figuresOfSites(deps.db, of) });
  briefsRoutes(router, deps, { queueRunsOfVersion, threads });
  runsRoutes(router, deps, {
    ...{ threads, yearThread, readDraft, relief },
    originalToRead: (key) => originalToRead(deps, key),
  });
  placesRoutes(router, deps);
  methodRoutes(router, deps);
  auditRoutes(router, deps);
  apiRoute(router, deps);
  teamsRoutes(router, deps, {
    startBrief,
    makePerson,
    requirePassword: (given) => requirePassword(deps.db, given),
    readSession: (personId) => readSession(deps.db, { personId, at: deps.now() }),
  });
  return routesByShape(router);
}

function peopleLookup({ db, now }: Deps): PeopleLookup {
  let dummyHash: Promise<string> | null = null;
  return {
    checkPassword: (given) => {
      dummyHash ??= makeDummyHash();
      return checkPassword({ db, dummyHash }, given);
    },
    findStanding: (personId) => findStanding(db, { personId, at: now() }),
    findSession: (sessionId) => findSessionStanding(db, { sessionId, at: now() }),
    findToken: (token) => findToken(db, { token, at: now() }),
    sessionStands: (id) => sessionStands(db, { id, at: now() }),
  };
}
