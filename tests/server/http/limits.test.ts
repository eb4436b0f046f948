import supertest from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { addressBucket } from '../../../server/http/client-address.ts';
import { mount } from '../../../server/http/mount.ts';
import type { Actor } from '../../../server/http/request-context.ts';
import { empty, endpoint, none, ordinary } from '../../../src/contract/endpoint.ts';
import { type Bench, leadActor, openBench, TEAM_ID } from '../../support/bare-app.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

let database: TestDatabase;
let bench: Bench;
let now = new Date('2026-03-01T10:00:20Z');

beforeAll(async () => {
  database = await makeTestDatabase();
  bench = await openBench({ database, now: () => now });
});
afterAll(async () => {
  await bench.close();
  await database.drop();
});

const limited = (path: `/api/${string}`, perMinute: number) =>
  endpoint({
    method: 'GET',
    path,
    summary: 'A thing for tests.',
    params: z.strictObject({ teamId: z.uuid() }),
    query: empty,
    body: none,
    response: none,
    errors: [],
    allow: 'weather.view',
    limits: { ...ordinary, perMinute },
  });
const twice = limited('/api/teams/:teamId/twice', 2);
const often = limited('/api/teams/:teamId/often', 61);

const appFor = (actor: Actor) =>
  bench.app(
    (router) => {
      mount(router, bench.deps, twice, async () => undefined);
      mount(router, bench.deps, often, async () => undefined);
    },
    { actor },
  );
const other: Actor = {
  ...leadActor,
  kind: 'person',
  personId: '44444444-4444-4444-8444-444444444444',
  roles: new Map([[TEAM_ID, 'viewer']]),
  revisions: new Map(),
  closedProgrammes: new Set(),
};

test('a small limit is counted in PostgreSQL over all processes, by person, and ends with the minute', async () => {
  const path = `/api/teams/${TEAM_ID}/twice`;
  // Two applications on one database stand for two processes.
  const [one, two] = [appFor(leadActor), appFor(leadActor)];
  await supertest(one).get(path).expect(204);
  await supertest(two).get(path).expect(204);
  const refused = await supertest(one).get(path).expect(429);
  expect(refused.body).toMatchObject({
    code: 'too_many_requests',
    message: 'Too many requests. Try again in 40 seconds.',
  });
  expect(refused.headers['retry-after']).toBe('40');
  await supertest(appFor(other)).get(path).expect(204);

  now = new Date('2026-03-01T10:01:00Z');
  await supertest(one).get(path).expect(204);
  const { rows } = await database.ownerDb.raw<{ rows: { minute: Date; requests: number }[] }>(
    'select minute, requests from request_counts order by minute, requests',
  );
  expect(rows.map(({ minute, requests }) => [minute.toISOString(), requests])).toEqual([
    ['2026-03-01T10:00:00.000Z', 1],
    ['2026-03-01T10:00:00.000Z', 3],
    ['2026-03-01T10:01:00.000Z', 1],
  ]);
});

test('a large limit is counted in memory and ends with the minute', async () => {
  const path = `/api/teams/${TEAM_ID}/often`;
  const agent = supertest.agent(appFor(leadActor));
  for (let request = 0; request < 61; request++) await agent.get(path).expect(204);
  const refused = await agent.get(path).expect(429);
  expect(refused.headers['retry-after']).toBe('60');
  now = new Date('2026-03-01T10:02:00Z');
  await agent.get(path).expect(204);
});

test('a limit counts before anything is looked up, so that a stranger cannot knock for ever', async () => {
  const path = `/api/teams/${TEAM_ID}/twice`;
  const stranger = appFor({ kind: 'signed-out' });
  await supertest(stranger).get(path).expect(401);
  await supertest(stranger).get(path).expect(401);
  await supertest(stranger).get(path).expect(429);
});

test.each([
  ['192.0.2.7', '192.0.2.7'],
  ['::ffff:192.0.2.7', '192.0.2.7'],
  ['2001:db8:1:2:3:4:5:6', '2001:db8:1:2::/64'],
  ['2001:db8:1:2::9', '2001:db8:1:2::/64'],
  ['2001:0DB8:0001:0002::', '2001:db8:1:2::/64'],
  ['::1', '0:0:0:0::/64'],
  ['fe80::1%eth0', 'fe80:0:0:0::/64'],
])('the address %s counts as %s', (ip, bucket) => {
  expect(addressBucket(ip)).toBe(bucket);
});
