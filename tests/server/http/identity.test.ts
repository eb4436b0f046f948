/** Whose request it is: origin guard, session, bearer token, both. */
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { openWeb, PASSWORD, type WebForTests } from '../../support/open-web.ts';

let web: WebForTests;
let cookie: string;

beforeAll(async () => {
  web = await openWeb();
  await web.makePerson('lead@example.org');
  const response = await web
    .browser()
    .post('/api/session')
    .send({ email: 'lead@example.org', password: PASSWORD })
    .expect(200);
  cookie = (response.headers['set-cookie']?.[0] ?? '').split(';')[0] ?? '';
});
afterAll(() => web.close());

const signIn = (headers: Record<string, string>) =>
  supertest(web.app).post('/api/session').set(headers).send({ email: 'lead@example.org', password: PASSWORD });

describe('the origin guard', () => {
  test.each([
    ['says that it comes from a page of ours', { 'Sec-Fetch-Site': 'same-origin' }],
    ['was typed by the person', { 'Sec-Fetch-Site': 'none' }],
    ['names our host as its origin', { Host: 'muslin.example:8080', Origin: 'http://muslin.example:8080' }],
    [
      'names the host that a trusted proxy names',
      { Host: 'inner:3000', 'X-Forwarded-Host': 'muslin.example', Origin: 'https://muslin.example' },
    ],
  ])('lets a request through that %s', async (_what, headers) => {
    await signIn(headers).expect(200);
  });

  test.each([
    ['says nothing of where it comes from', {}],
    ['comes from another site', { 'Sec-Fetch-Site': 'cross-site', Origin: 'https://elsewhere.example' }],
    ['comes from a sister site', { 'Sec-Fetch-Site': 'same-site' }],
    ['names another origin', { Host: 'muslin.example', Origin: 'https://elsewhere.example' }],
    ['names our host on another port', { Host: 'muslin.example:3000', Origin: 'http://muslin.example:4000' }],
    ['hides its origin', { Host: 'muslin.example', Origin: 'null' }],
  ])('refuses a request that %s', async (_what, headers) => {
    const response = await signIn(headers).expect(403);
    expect(response.body.code).toBe('cross_site');
    expect(response.headers['set-cookie']).toBeUndefined();
  });

  test('asks nothing of a request that changes nothing', async () => {
    await supertest(web.app).get('/api/session').set('Sec-Fetch-Site', 'cross-site').expect(200);
  });

  test('guards every unsafe method, also where nothing is', async () => {
    for (const method of ['post', 'put', 'patch', 'delete'] as const)
      expect((await supertest(web.app)[method]('/api/nothing').expect(403)).body.code).toBe('cross_site');
  });
});

describe('a bearer token', () => {
  test('is not known yet: every request with one is turned away, without the origin guard and without a session', async () => {
    for (const Authorization of ['Bearer abc', 'bearer abc', 'Bearer', 'BEARER  x']) {
      for (const request of [
        supertest(web.app).get('/api/session'),
        supertest(web.app).post('/api/session').send({ email: 'lead@example.org', password: PASSWORD }),
        supertest(web.app).delete('/api/session'),
      ]) {
        const response = await request.set({ Authorization }).expect(401);
        expect(response.body.code).toBe('not_signed_in');
        expect(response.headers['set-cookie']).toBeUndefined();
      }
    }
  });

  test('together with a session is one identity too many, and leaves the session as it was', async () => {
    const both = { Authorization: 'Bearer abc', Cookie: cookie };
    for (const request of [supertest(web.app).get('/api/session'), supertest(web.app).delete('/api/session')]) {
      const response = await request.set(both).expect(400);
      expect(response.body.code).toBe('two_identities');
    }
    const still = await supertest(web.app).get('/api/session').set('Cookie', cookie).expect(200);
    expect(still.body.person.email).toBe('lead@example.org');
  });

  test('is told from another way of authorisation, which a proxy before us may ask for', async () => {
    const response = await supertest(web.app)
      .get('/api/session')
      .set({ Authorization: 'Basic YTpi', Cookie: cookie })
      .expect(200);
    expect(response.body.person.email).toBe('lead@example.org');
  });
});

test('every reply carries the strict headers, and no two the same nonce', async () => {
  const replies = [await supertest(web.app).get('/api/session'), await supertest(web.app).get('/nothing/here')];
  const nonces = new Set<string>();
  for (const { headers } of replies) {
    const policy = headers['content-security-policy'] ?? '';
    const nonce = /'nonce-([^']+)'/.exec(policy)?.[1] ?? '';
    nonces.add(nonce);
    expect(policy.replace(nonce, 'N').split(';').sort()).toEqual(
      [
        "default-src 'none'",
        "script-src 'self'",
        "style-src 'self' 'nonce-N'",
        "img-src 'self' data: blob:",
        "font-src 'self'",
        "connect-src 'self'",
        "worker-src 'self'",
        "manifest-src 'self'",
        "form-action 'self'",
        "base-uri 'none'",
        "frame-ancestors 'none'",
        "object-src 'none'",
      ].sort(),
    );
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['x-frame-options']).toBe('DENY');
    expect(headers['referrer-policy']).toBe('same-origin');
    expect(headers['x-powered-by']).toBeUndefined();
  }
  expect(nonces.size).toBe(2);
});
