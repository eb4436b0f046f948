import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makeKeptAnswers } from '../../../server/http/kept-answers.ts';
import { sessionIdOf } from '../../../server/http/session-cookie.ts';
import { type Agent, openWeb, type WebForTests } from '../../support/open-web.ts';

describe('answers that are kept', () => {
  it('are made once for a revision, also for those who ask while one is being made', async () => {
    const kept = makeKeptAnswers();
    let made = 0;
    const make = async () => `made ${++made}`;
    const [one, two] = await Promise.all([kept.get('map', '1', make), kept.get('map', '1', make)]);
    expect(one).toBe(two);
    await kept.get('map', '1', make);
    await kept.get('sites', '1', make);
    await kept.get('map', '2', make);
    expect(made).toBe(3);
  });

  it('are not kept when making them fails', async () => {
    const kept = makeKeptAnswers();
    await expect(kept.get('map', '1', () => Promise.reject(new Error('away')))).rejects.toThrow('away');
    expect((await kept.get('map', '1', async () => 'there')).length).toBeGreaterThan(0);
  });

  it('let go of those that nobody has asked for the longest', async () => {
    const size = (await makeKeptAnswers().get('x', '1', async () => 'text')).length;
    // The key counts as well.
    const kept = makeKeptAnswers(2 * (size + 1));
    const made: string[] = [];
    const ask = (key: string) =>
      kept.get(key, '1', async () => {
        made.push(key);
        return 'text';
      });
    for (const key of ['a', 'b', 'a', 'c', 'a', 'b']) await ask(key);
    expect(made).toEqual(['a', 'b', 'c', 'b']);
  });
});

describe('the map and the table of sites', () => {
  let web: WebForTests;
  let lead: Agent;
  let teamId: string;
  let programme: string;
  const names = async (agent: Agent) =>
    (await agent.get(`${programme}/sites`).expect(200)).body.items.map(({ name }: { name: string }) => name);

  beforeAll(async () => {
    web = await openWeb();
    const leadId = await web.makePerson('lead@example.org');
    const made = await web.makeTeam(leadId);
    ({ teamId } = made);
    programme = `/api/teams/${teamId}/programmes/${made.programmeId}`;
    lead = await web.signIn('lead@example.org');
  });
  afterAll(async () => {
    expect(web.log.errors).toEqual([]);
    await web.close();
  });

  it('show every change with the next request, kept or not', async () => {
    expect(await names(lead)).toEqual([]);
    const site = { name: 'Hall', latitude: -25, longitude: 25, elevationM: 1200 };
    const { body } = await lead.post(`${programme}/sites`).send(site).expect(200);
    expect(await names(lead)).toEqual(['Hall']);
    await lead.patch(`${programme}/sites/${body.id}`).send({ revision: 1, name: 'Old hall' }).expect(200);
    expect(await names(lead)).toEqual(['Old hall']);
    const packed = await lead.get(`${programme}/map`).expect(200);
    const plain = await lead.get(`${programme}/map`).set('Accept-Encoding', 'identity').expect(200);
    expect(packed.headers).toMatchObject({ 'content-encoding': 'gzip', 'cache-control': 'no-store' });
    expect(plain.headers['content-encoding']).toBeUndefined();
    expect(packed.body).toEqual(plain.body);
    expect(packed.body.sites).toMatchObject([{ name: 'Old hall' }]);
  });

  it('are shown to nobody who may not see them, however often they were sent to others', async () => {
    const memberId = await web.makePerson('member@example.org');
    await web.addMember({ teamId, personId: memberId, role: 'viewer' });
    const member = await web.signIn('member@example.org');
    await member.get(`${programme}/map`).expect(200);
    await lead.put(`${programme}/members`).send({ restricted: true, memberIds: [] }).expect(200);
    await member.get(`${programme}/map`).expect(404);
    await web.browser().get(`${programme}/map`).expect(401);
    await lead.get(`${programme}/map`).expect(200);
  });

  it('know of a change of every table that they are made of', async () => {
    const { ownerDb } = web.database;
    const { rows } = await ownerDb.raw<{ rows: { name: string }[] }>(
      `select tgrelid::regclass::text as name from pg_trigger where tgfoid = 'note_team_change()'::regprocedure`,
    );
    const shown = ['brief_versions', 'briefs', 'findings', 'programmes', 'runs', 'sites', 'stations', 'teams'];
    expect(rows.map(({ name }) => name).sort()).toEqual([...shown, 'weather_files', 'weather_years']);
    const revision = async () => {
      const found = await ownerDb.raw<{ rows: { revision: string }[] }>(
        'select sum(revision) as revision from team_revisions where team_id = ?',
        [teamId],
      );
      return Number(found.rows[0]?.revision);
    };
    const before = await revision();
    // Once in a transaction, however many rows.
    await ownerDb.transaction(async (transaction) => {
      await transaction.raw(`update sites set notes = 'one'`);
      await transaction.raw(`update briefs set name = name`);
    });
    expect(await revision()).toBe(before + 1);
    // While somebody else commits, in a slot of its own: nobody waits.
    await ownerDb.transaction(async (holding) => {
      await holding.raw('select 1 from team_revisions where team_id = ? for update', [teamId]);
      await web.database.db.raw(`update sites set notes = 'two'`);
    });
    expect(await revision()).toBe(before + 2);
    await ownerDb.raw(`update people set name = 'Another'`);
    expect(await revision()).toBe(before + 2);
  });
});

describe('the cookie of a session', () => {
  // `abc` signed by hand: printf abc | openssl dgst -sha256 -hmac secret -binary | base64
  const signed = 's%3Aabc.mUba1OAOkT%2FIvo5dP34RCkqegy%2BD%2BwnDRShdeGONig4';

  it.each([
    ['another secret', `muslin_session=${signed}`, ['another']],
    ['another id', `muslin_session=${signed.replace('abc', 'abd')}`, ['secret']],
    ['a signature cut short', `muslin_session=${signed.slice(0, -1)}`, ['secret']],
    ['no signature', 'muslin_session=s%3Aabc', ['secret']],
    ['an empty id', 'muslin_session=s%3A.x', ['secret']],
    ['bytes that are no text', 'muslin_session=%E0%A4%A', ['secret']],
    ['another name', `session=${signed}`, ['secret']],
  ])('names no session with %s', (_what, cookies, secrets) => {
    expect(sessionIdOf(cookies, secrets)).toBeNull();
  });

  it('names its session when one of our secrets has signed it', () => {
    expect(sessionIdOf(`a=b; muslin_session=${signed}; c=d`, ['newer', 'secret'])).toBe('abc');
  });
});
