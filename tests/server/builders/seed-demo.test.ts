import { mkdtemp, readdir, readFile, rm, stat } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import supertest from 'supertest';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { demoStations } from '../../../data/demo/stations.ts';
import { readDemoAccounts } from '../../../server/builders/demo-accounts.ts';
import { demoSites } from '../../../server/builders/demo-sites.ts';
import { DEMO_TEAM, type SeedDemo, seedDemo } from '../../../server/builders/seed-demo.ts';
import { Session } from '../../../src/contract/accounts.ts';
import { openRoad, type Road } from '../../support/open-road.ts';

let road: Road;
let home: string;
let seed: SeedDemo;
const words: string[] = [];

beforeAll(async () => {
  road = await openRoad();
  home = await mkdtemp(path.join(tmpdir(), 'muslin-seed-'));
  seed = {
    deps: { db: road.db, storage: road.storage, uploadsDir: home, now: () => new Date() },
    demoAccountsPath: path.join(home, 'demo-accounts.txt'),
    log: (said) => void words.push(said),
  };
  await road.startWorker();
});

afterAll(async () => {
  await road.close();
  await rm(home, { recursive: true, force: true });
});

async function statuses(): Promise<Record<string, number>> {
  const { rows } = await road.db.raw<{ rows: { status: string; number: number }[] }>(
    'select status, count(*)::integer as number from weather_files group by status',
  );
  return Object.fromEntries(rows.map(({ status, number }) => [status, number]));
}

it('stops in the middle when it is told to, and leaves nothing in the folder of uploads', async () => {
  const stopping = new AbortController();
  const stopped = seedDemo({
    ...seed,
    signal: stopping.signal,
    log: (said) => {
      words.push(said);
      if (/judged/.test(said)) stopping.abort();
    },
  });
  await expect(stopped).rejects.toThrow(/abort/i);
  const { accepted = 0 } = await statuses();
  expect(accepted).toBeGreaterThanOrEqual(10);
  expect(accepted).toBeLessThan(demoStations.length);
  expect(await filesIn(home)).toEqual(['demo-accounts.txt']);
}, 120_000);

it('goes on where it was: every file accepted and judged, none of them twice', async () => {
  const passwords = await readFile(seed.demoAccountsPath, 'utf8');
  await seedDemo(seed);
  expect(await statuses()).toEqual({ accepted: demoStations.length });
  const { rows } = await road.db.raw<{ rows: { name: string; score: number | null; invented: boolean }[] }>(
    `select stations.name, (runs.result ->> 'score')::integer as score, teams.invented
     from runs
     join weather_years on weather_years.id = runs.weather_year_id
     join stations on stations.id = weather_years.station_id
     join teams on teams.id = stations.team_id and teams.name = ?
     where runs.adjusted_from_m is null
     order by stations.name`,
    [DEMO_TEAM],
  );
  expect(rows.map(({ name }) => name)).toEqual(demoStations.map(({ name }) => name).sort());
  expect(rows.every(({ invented }) => invented)).toBe(true);
  const scores = rows.map(({ score }) => score ?? Number.NaN).sort((a, b) => a - b);
  // The point of the demo: humid coast and dry interior are far apart, with places between.
  expect(scores[0]).toBeLessThan(30);
  expect(scores.at(-1)).toBeGreaterThan(85);
  expect(scores.filter((score) => score > 35 && score < 80).length).toBeGreaterThanOrEqual(5);
  expect(await readFile(seed.demoAccountsPath, 'utf8')).toBe(passwords);
  const sites = await road.db.raw<{ rows: { letters: string; name: string }[] }>(
    'select letters, name from sites order by letters',
  );
  expect(sites.rows.map(({ name }) => name)).toEqual(demoSites.map(({ name }) => name));
}, 120_000);

it('keeps four sign-ins, one for each role, that work and that only the owner of the home can read', async () => {
  const accounts = await readDemoAccounts(seed.demoAccountsPath);
  expect(accounts.map(({ role }) => role)).toEqual(['viewer', 'planner', 'engineer', 'lead']);
  expect(new Set(accounts.map(({ password }) => password)).size).toBe(4);
  expect((await stat(seed.demoAccountsPath)).mode & 0o777).toBe(0o600);
  for (const { role, email, password } of accounts) {
    const answer = await supertest(road.app)
      .post('/api/session')
      .set('Sec-Fetch-Site', 'same-origin')
      .send({ email, password })
      .expect(200);
    const session = Session.parse(answer.body);
    expect(session.memberships).toMatchObject([{ teamName: DEMO_TEAM, role, invented: true }]);
    expect(session.memberships[0]?.programmes.map(({ name }) => name)).toEqual(['School cooling']);
  }
});

it('adds nothing when it is started again, also after an engineer has withdrawn one of its files', async () => {
  await road.db.raw(
    `update weather_files set status = 'withdrawn', withdrawn_by = uploaded_by, withdrawn_at = now(), withdrawn_reason = 'test'
     where name like 'korrel%'`,
  );
  const before = await road.countRows();
  words.length = 0;
  await seedDemo(seed);
  expect(await road.countRows()).toEqual(before);
  expect(words).toEqual([]);
});

async function filesIn(folder: string): Promise<string[]> {
  return (await readdir(folder)).sort();
}
