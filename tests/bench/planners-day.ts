/**
 * What a planner waits for with 3,000 stations and 10,000 sites: `npx tsx tests/bench/planners-day.ts`. The product's own web application
 * over HTTP with compression, a database of its own; time by the clock and of this process's processor, client included, with the share of the machine that others left idle;
 * then the same in a browser that draws in software.
 */
import http from 'node:http';
import path from 'node:path';
import { gunzipSync } from 'node:zlib';
import { createApp, makeWebThreads } from '../../server/app.ts';
import { buildClient } from '../../server/cli/build-client.ts';
import { inTransaction } from '../../server/db/in-transaction.ts';
import { makePerson } from '../../server/features/accounts/make-person.ts';
import { newestBriefVersionIds } from '../../server/features/briefs/brief-read-model.ts';
import { officeBrief } from '../../server/features/briefs/presets.ts';
import { startBrief } from '../../server/features/briefs/start-brief.ts';
import { judgeStoredYear } from '../../server/features/runs/judge-year.ts';
import { listYearsAtStations } from '../../server/features/runs/site-runs-read-model.ts';
import { makeTeam } from '../../server/features/teams/make-team.ts';
import { openTeamFeed } from '../../server/jobs/team-feed.ts';
import { createFolderStore } from '../../server/storage/folder-store.ts';
import { keepLog } from '../support/quiet-log.ts';
import { countProcessor, idleShare } from './machine-idle.ts';
import { makeManyPlaces } from './many-places.ts';
import { measureScreen } from './planners-screen.ts';
import { fillWithClimates, withEmptyTeam } from './station-year-cluster.ts';

const STATIONS = 3000;
const SITES = 10_000;
const IN_VIEW = 2000;
const ROUNDS = 5;

interface Asked {
  readonly method: 'GET' | 'POST';
  readonly path: string;
  readonly body?: unknown;
}

await withEmptyTeam(async ({ db, ownerDb, databaseUrl, home }) => {
  const password = 'a long pass phrase for tests';
  const email = 'planner@example.org';
  const personId = await makePerson(db, { email, password, name: 'Planner' });
  const { teamId, programmeId } = await inTransaction(db, (transaction) =>
    makeTeam(
      { transaction, startBrief },
      { name: 'Many places', leadId: personId, invented: true, programmeName: 'Many places' },
    ),
  );
  await fillWithClimates({ db, home, teamId, personId });
  const [briefVersionId = ''] = await newestBriefVersionIds(db, teamId);
  for (const { weatherYearId } of await listYearsAtStations(db, teamId))
    await judgeStoredYear(db, { teamId, weatherYearId, briefVersionId });
  const { heights } = await makeManyPlaces(ownerDb, { teamId, programmeId, stations: STATIONS - 6, sites: SITES });
  print(`${STATIONS} stations, ${SITES} sites, judged at ${heights} heights beside the stations' own`);

  const log = keepLog();
  const feed = await openTeamFeed({ databaseUrl, log });
  const threads = makeWebThreads();
  const { dir: clientDir } = await buildClient(path.resolve(import.meta.dirname, '../..'));
  const app = createApp(
    {
      ...{ db, databaseUrl, feed, log, uploadsDir: home, clientDir, trustProxy: 'loopback' },
      now: () => new Date(),
      storage: createFolderStore(path.join(home, 'originals')),
      sessionSecrets: ['a session secret for measuring'],
      publicUrl: 'http://127.0.0.1',
      sendsMail: false,
      basemapPath: path.resolve(import.meta.dirname, '../../data/basemap/basemap.pmtiles'),
    },
    { threads },
  );
  const server = http.createServer(app).listen(0, '127.0.0.1');
  await new Promise((resolve) => server.once('listening', resolve));
  const address = server.address();
  const port = typeof address === 'object' && address !== null ? address.port : 0;
  let cookie = '';
  const ask = (asked: Asked) => send({ port, cookie, asked });
  const signedIn = await ask({ method: 'POST', path: '/api/session', body: { email, password } });
  cookie = signedIn.cookie;

  const programme = `/api/teams/${teamId}/programmes/${programmeId}`;
  const map = await measure('the map', () => ask({ method: 'GET', path: `${programme}/map` }));
  const { stations, sites } = JSON.parse(map) as { stations: unknown[]; sites: { id: string }[] };
  print(`  with ${stations.length} stations and ${sites.length} sites`);
  await measure('depression hours', () =>
    ask({ method: 'GET', path: `/api/teams/${teamId}/depression-hours?atLeastK=8&months=6,7,8` }),
  );
  const siteIds = sites.slice(0, IN_VIEW).map(({ id }) => id);
  const brief = officeBrief();
  let round = 0;
  await measure(`${IN_VIEW} sites under a draft`, () => {
    round += 1;
    const body = { ...brief, effDirect: 0.7 + round / 100 };
    return ask({ method: 'POST', path: `${programme}/rescore`, body: { body, stationIds: [], siteIds } });
  });
  await measure('the table of sites by score', () =>
    ask({ method: 'GET', path: `${programme}/sites?sort=score&order=desc` }),
  );
  await measureScreen({ origin: `http://127.0.0.1:${port}`, email, password, print });
  for (const error of log.errors) print(JSON.stringify(error));
  await new Promise((resolve) => server.close(resolve));
  await threads.close();
  await feed.close();
});

async function measure(what: string, ask: () => Promise<Answered>): Promise<string> {
  const before = countProcessor();
  const times: number[] = [];
  const processor: number[] = [];
  let last = await ask();
  for (let round = 0; round < ROUNDS; round++) {
    const used = process.cpuUsage();
    const begun = performance.now();
    last = await ask();
    times.push(performance.now() - begun);
    const { user, system } = process.cpuUsage(used);
    processor.push((user + system) / 1000);
  }
  const middle = (values: readonly number[]) =>
    (values.toSorted((one, other) => one - other)[Math.floor(ROUNDS / 2)] ?? 0).toFixed(0);
  const idle = idleShare(before, countProcessor());
  const kilobytes = (last.bytes / 1000).toFixed(0);
  print(
    `${what}: ${middle(times)} ms by the clock, ${middle(processor)} ms of processor, ${kilobytes} kB compressed, status ${last.status}, idle ${idle.toFixed(2)}`,
  );
  return last.text;
}

interface Answered {
  readonly status: number;
  readonly bytes: number;
  readonly text: string;
  readonly cookie: string;
}

function send({ port, cookie, asked }: { port: number; cookie: string; asked: Asked }): Promise<Answered> {
  const origin = `http://127.0.0.1:${port}`;
  const headers = { cookie, origin, 'accept-encoding': 'gzip', 'content-type': 'application/json' };
  return new Promise((resolve, reject) => {
    const request = http.request(`${origin}${asked.path}`, { method: asked.method, headers }, (response) => {
      const chunks: Buffer[] = [];
      response.on('data', (chunk: Buffer) => chunks.push(chunk));
      response.on('end', () => {
        const bytes = Buffer.concat(chunks);
        const zipped = response.headers['content-encoding'] === 'gzip';
        resolve({
          status: response.statusCode ?? 0,
          bytes: bytes.length,
          text: (zipped ? gunzipSync(bytes) : bytes).toString('utf8'),
          cookie: (response.headers['set-cookie'] ?? []).map((each) => each.split(';')[0]).join('; '),
        });
      });
    });
    request.on('error', reject);
    request.end(asked.body === undefined ? undefined : JSON.stringify(asked.body));
  });
}

function print(line: string): void {
  process.stdout.write(`${line}\n`);
}
