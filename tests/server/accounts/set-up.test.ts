import { createHash } from 'node:crypto';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { makeSetUpKey } from '../../../server/features/accounts/set-up-key.ts';
import { openWeb, PASSWORD, type WebForTests } from '../../support/open-web.ts';

let web: WebForTests;

beforeEach(async () => {
  web = await openWeb();
});
afterEach(() => web.close());

const keyOf = async (): Promise<string> => {
  const path = await makeSetUpKey(web.deps.db);
  expect(path).toMatch(/^\/set-up\/[\w-]{43}$/);
  return path?.split('/').at(-1) ?? '';
};
const given = { teamName: 'Schools office', name: 'Ada Example', email: 'Ada@Example.org', password: PASSWORD };
const setUp = (key: string, changes: Partial<typeof given> = {}) =>
  web
    .browser()
    .post('/api/set-up')
    .send({ key, ...given, ...changes });
const count = async (table: string): Promise<number> => {
  const { rows } = await web.database.ownerDb.raw<{ rows: [{ number: number }] }>(
    'select count(*)::integer as number from ??',
    [table],
  );
  return rows[0].number;
};

test('the link makes the first team, its lead, a programme and the brief that it begins with, and signs the lead in', async () => {
  const browser = web.browser();
  const response = await browser
    .post('/api/set-up')
    .send({ key: await keyOf(), ...given })
    .expect(200);
  expect(response.body).toMatchObject({
    person: { name: 'Ada Example', email: 'ada@example.org' },
    memberships: [
      { teamName: 'Schools office', role: 'lead', invented: false, programmes: [{ name: 'First programme' }] },
    ],
  });
  expect((await browser.get('/api/session').expect(200)).body).toEqual(response.body);
  const { rows } = await web.database.ownerDb.raw('select version, made_by from brief_versions');
  expect(rows).toEqual([{ version: 1, made_by: response.body.person.id }]);
  const audit = await web.database.ownerDb.raw('select act, team_id, person_id from audit_events');
  expect(audit.rows).toEqual([
    { act: 'team set up', team_id: response.body.memberships[0].teamId, person_id: response.body.person.id },
  ]);
});

test('the link works once', async () => {
  const key = await keyOf();
  await setUp(key).expect(200);
  const again = await setUp(key, { email: 'second@example.org' }).expect(410);
  expect(again.body.code).toBe('link_not_valid');
  expect(await count('people')).toBe(1);
  expect(await makeSetUpKey(web.deps.db)).toBeNull();
});

test('two who use the link at once make one team', async () => {
  const key = await keyOf();
  const answers = await Promise.all(['a', 'b', 'c'].map((name) => setUp(key, { email: `${name}@example.org` })));
  expect(answers.map(({ status }) => status).sort()).toEqual([200, 410, 410]);
  expect([await count('teams'), await count('people'), await count('programmes')]).toEqual([1, 1, 1]);
});

test('a link that was never made, or that a newer one replaced, is not valid', async () => {
  const replaced = await keyOf();
  const newest = await keyOf();
  await setUp('never-made').expect(410);
  await setUp(replaced).expect(410);
  await setUp(newest).expect(200);
});

test('what is typed wrong is told at once and does not use the link up', async () => {
  const key = await keyOf();
  const wrong = { teamName: ' ', name: '', email: 'nowhere', password: 'short' };
  const response = await setUp(key, wrong).expect(400);
  expect(response.body.problems).toEqual([
    { path: 'body.teamName', message: 'Type a name.' },
    { path: 'body.name', message: 'Type a name.' },
    { path: 'body.email', message: 'Type an e-mail address, such as name@example.org.' },
    { path: 'body.password', message: 'Use 12 characters or more.' },
  ]);
  await web.makePerson('ada@example.org');
  const taken = await setUp(key).expect(400);
  expect(taken.body.problems).toEqual([
    { path: 'body.email', message: 'Somebody has an account with this e-mail address already.' },
  ]);
  expect(await count('teams')).toBe(0);
  await setUp(key, { email: 'other@example.org' }).expect(200);
});

test('the key is kept only as its hash', async () => {
  const key = await keyOf();
  const { rows } = await web.database.ownerDb.raw('select key_hash from set_up_keys');
  expect(rows).toEqual([{ key_hash: createHash('sha256').update(key).digest('hex') }]);
});
