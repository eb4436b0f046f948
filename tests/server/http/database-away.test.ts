import type { Express } from 'express';
import type { Knex } from 'knex';
import supertest from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { createApp } from '../../../server/app.ts';
import { connect } from '../../../server/db/connection.ts';
import { type DatabaseLine, openDatabaseLine } from '../../support/database-line.ts';
import { eventually } from '../../support/eventually.ts';
import { openWeb, PASSWORD, type WebForTests } from '../../support/open-web.ts';

const APPLICATION = 'muslin on a line';

let web: WebForTests;
let line: DatabaseLine;
let db: Knex;
let app: Express;
let cookie: string;
const rejections: unknown[] = [];
const noteRejection = (reason: unknown) => void rejections.push(reason);

beforeAll(async () => {
  process.on('unhandledRejection', noteRejection);
  web = await openWeb();
  await web.makePerson('lead@example.org');
  line = await openDatabaseLine(web.database.databaseUrl);
  db = connect({ databaseUrl: line.databaseUrl, applicationName: APPLICATION, maxConnections: 3 });
  app = createApp({ ...web.deps, db });
  const signedIn = await signIn().expect(200);
  cookie = (signedIn.headers['set-cookie']?.[0] ?? '').split(';')[0] ?? '';
});
afterAll(async () => {
  await db.destroy();
  await line.close();
  await web.close();
  process.off('unhandledRejection', noteRejection);
  expect(rejections).toEqual([]);
});

const signIn = () =>
  supertest(app)
    .post('/api/session')
    .set('Sec-Fetch-Site', 'same-origin')
    .send({ email: 'lead@example.org', password: PASSWORD });
const whoAmI = () => supertest(app).get('/api/session').set('Cookie', cookie);
const health = () => supertest(app).get('/api/health');

test('while the database is away every request says so and when to come back; afterwards all is as before', async () => {
  await health().expect(200, { status: 'ok' });
  await line.cut();
  const logged = web.log.errors.length;
  const answers = [await health(), await whoAmI(), await signIn()];
  for (const { status, body, headers } of answers) {
    expect({ status, code: body.code }).toEqual({ status: 503, code: 'unavailable' });
    expect(headers['retry-after']).toBe('5');
    expect(body.message).not.toMatch(/ECONN|127\.0\.0\.1/);
  }
  expect(web.log.errors.slice(logged).map(({ fields }) => fields.requestId)).toEqual(
    answers.map(({ body }) => body.requestId),
  );
  // A visitor without a session needs no database to be refused.
  await supertest(app).get(`/api/teams/${crypto.randomUUID()}/weather-files`).expect(401);

  await line.mend();
  await health().expect(200);
  expect((await whoAmI().expect(200)).body.person.email).toBe('lead@example.org');
  await signIn().expect(200);
});

test('a server that closes is ready no longer, and still answers what is at hand', async () => {
  const closing = createApp(web.deps, { closing: AbortSignal.abort() });
  const answer = await supertest(closing).get('/api/health').expect(503);
  expect(answer.headers['retry-after']).toBe('5');
  await supertest(closing).get('/api/session').expect(200);
});

test('connections that the database itself cuts are replaced without anybody noticing for long', async () => {
  // Three at once and long enough to overlap, so that the pool has three connections.
  await Promise.all([1, 2, 3].map(() => db.raw('select pg_sleep(1)')));
  const cut = await web.deps.db.raw<{ rows: unknown[] }>(
    'select pg_terminate_backend(pid) from pg_stat_activity where application_name = ?',
    [APPLICATION],
  );
  expect(cut.rows).toHaveLength(3);
  await eventually('it has recovered', async () => (await whoAmI()).status === 200, 3_000);
  await health().expect(200);
});

test('a statement that is cut while it runs is answered as away, not as a fault', async () => {
  const running = db.raw('select pg_sleep(30)').catch((error: unknown) => error);
  await eventually('it runs', async () => {
    const { rows } = await web.deps.db.raw<{ rows: unknown[] }>(
      "select pg_terminate_backend(pid) from pg_stat_activity where application_name = ? and query like '%pg_sleep(30)%'",
      [APPLICATION],
    );
    return rows.length > 0;
  });
  const { isDatabaseAway } = await import('../../../server/db/database-errors.ts');
  expect(isDatabaseAway(await running)).toBe(true);
  await eventually('it has recovered', async () => (await health()).status === 200, 3_000);
});

test('a statement that breaks a constraint is not taken for a database that is away', async () => {
  const { brokenConstraint, isDatabaseAway } = await import('../../../server/db/database-errors.ts');
  const again = await web.makePerson('lead@example.org').catch((error: unknown) => error);
  expect(again).toMatchObject({ code: 'invalid_input', problems: [{ path: 'body.email' }] });
  const error = await db
    .raw("insert into people (email, name, password_hash) values ('lead@example.org', 'x', 'x')")
    .catch((thrown: unknown) => thrown);
  expect(isDatabaseAway(error)).toBe(false);
  expect(brokenConstraint(error)).toEqual({ kind: 'unique', constraint: 'people_email_key' });
  expect(brokenConstraint(new Error('another'))).toBeNull();
});
