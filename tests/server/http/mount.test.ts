import { Readable } from 'node:stream';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { AppError } from '../../../server/http/app-error.ts';
import { mount } from '../../../server/http/mount.ts';
import { empty, endpoint, file, json, none, ordinary } from '../../../src/contract/endpoint.ts';
import { type Bench, openBench, TEAM_ID } from '../../support/bare-app.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

let database: TestDatabase;
let bench: Bench;

beforeAll(async () => {
  database = await makeTestDatabase();
  bench = await openBench({ database });
});
afterAll(async () => {
  await bench.close();
  await database.drop();
});

const base = {
  method: 'GET',
  path: '/api/teams/:teamId/things',
  summary: 'A thing for tests.',
  params: z.strictObject({ teamId: z.uuid() }),
  query: empty,
  body: none,
  errors: [],
  allow: 'weather.view',
  limits: ordinary,
} as const;

const getThing = endpoint({ ...base, response: json(z.object({ name: z.string(), size: z.number() })) });
const thingsPath = `/api/teams/${TEAM_ID}/things`;

describe('answers', () => {
  test('a key that is not declared never leaves', async () => {
    const app = bench.app((router) =>
      mount(router, bench.deps, getThing, async () => ({ name: 'a', size: 1, passwordHash: 'secret' })),
    );
    const response = await supertest(app).get(thingsPath).expect(200);
    expect(response.body).toEqual({ name: 'a', size: 1 });
    expect(response.headers['cache-control']).toBe('no-store');
    expect(response.headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/);
  });

  test('an answer that does not fit is logged as a fault of ours and nothing of it is sent', async () => {
    const app = bench.app((router) =>
      mount(router, bench.deps, getThing, async () => ({ name: 'secret', size: Number.NaN })),
    );
    const response = await supertest(app).get(thingsPath).expect(500);
    expect(response.body).toEqual({
      code: 'internal',
      message: 'Something went wrong on our side. Quote the request id when you report it.',
      problems: [],
      requestId: response.headers['x-request-id'],
    });
    expect(bench.log.errors.at(-1)?.fields.requestId).toBe(response.headers['x-request-id']);
  });

  test('what a handler throws by accident tells the client nothing and the log everything', async () => {
    const app = bench.app((router) =>
      mount(router, bench.deps, getThing, async () => {
        throw new Error('the secret is pomegranate');
      }),
    );
    const response = await supertest(app).get(thingsPath).expect(500);
    expect(response.text).not.toContain('pomegranate');
    expect(bench.log.errors.at(-1)?.fields.error).toMatchObject({ message: 'the secret is pomegranate' });
  });

  test('an expected failure is told with its problems and is not logged', async () => {
    const logged = bench.log.errors.length;
    const problems = [{ line: 9, column: 3, message: 'A letter stands for a number.' }];
    const app = bench.app((router) =>
      mount(router, bench.deps, getThing, async () => {
        throw new AppError('wrong_state', 'It was accepted already.', problems);
      }),
    );
    const response = await supertest(app).get(thingsPath).expect(409);
    expect(response.body).toMatchObject({ code: 'wrong_state', message: 'It was accepted already.', problems });
    expect(bench.log.errors.length).toBe(logged);
  });

  test('an endpoint without an answer says 204', async () => {
    const app = bench.app((router) =>
      mount(router, bench.deps, endpoint({ ...base, response: none }), async () => undefined),
    );
    await supertest(app).get(thingsPath).expect(204);
  });

  test('a handler that takes too long is answered for, and told to stop', async () => {
    const slow = endpoint({ ...base, response: none, limits: { ...ordinary, seconds: 0.05 } });
    let stopped = false;
    const app = bench.app((router) =>
      mount(router, bench.deps, slow, (_input, { signal }) => {
        return new Promise((resolve) => {
          signal.addEventListener('abort', () => {
            stopped = true;
            resolve(undefined);
          });
        });
      }),
    );
    const response = await supertest(app).get(thingsPath).expect(503);
    expect(response.body.code).toBe('unavailable');
    expect(response.headers['retry-after']).toBe('5');
    expect(stopped).toBe(true);
  });
});

describe('files', () => {
  const original = endpoint({ ...base, response: file({ mediaType: 'application/octet-stream', attachment: true }) });
  const inline = endpoint({ ...base, response: file({ mediaType: 'application/octet-stream', attachment: false }) });

  test('a name with quotes, line breaks and letters beyond ASCII goes out safely', async () => {
    const fileName = 'a"b\r\nSet-Cookie: x=1; Łódź.epw';
    const app = bench.app((router) =>
      mount(router, bench.deps, original, async () => ({ body: Buffer.from([1, 2, 3]), fileName })),
    );
    const response = await supertest(app).get(thingsPath).expect(200);
    expect(response.headers['set-cookie']).toBeUndefined();
    expect(response.headers['content-disposition']).toMatch(/^attachment; filename="/);
    expect(response.headers['content-disposition']).toContain("filename*=UTF-8''");
    expect(response.headers['content-type']).toBe('application/octet-stream');
    expect(response.headers['x-content-type-options']).toBe('nosniff');
    expect([...response.body]).toEqual([1, 2, 3]);
  });

  test('bytes that are not an attachment carry no disposition, and come whole from a stream', async () => {
    const app = bench.app((router) =>
      mount(router, bench.deps, inline, async () => ({ body: Readable.from([Buffer.from('ab'), Buffer.from('cd')]) })),
    );
    const response = await supertest(app).get(thingsPath).expect(200);
    expect(response.headers['content-disposition']).toBeUndefined();
    expect(response.body.toString()).toBe('abcd');
    expect((await supertest(app).head(thingsPath).expect(200)).text).toBeUndefined();
  });

  test('a stream that breaks midway cuts the connection instead of ending as if it were whole', async () => {
    async function* breaking(): AsyncGenerator<Buffer> {
      yield Buffer.alloc(64 * 1024, 1);
      throw new Error('the disk is gone');
    }
    const app = bench.app((router) =>
      mount(router, bench.deps, inline, async () => ({ body: Readable.from(breaking()) })),
    );
    await expect(supertest(app).get(thingsPath)).rejects.toThrow(/aborted|hang up/);
    expect(bench.log.errors.at(-1)?.fields.error).toMatchObject({ message: 'the disk is gone' });
  });
});

describe('requests', () => {
  const post = endpoint({
    ...base,
    method: 'POST',
    path: '/api/teams/:teamId/things/:thingId',
    params: z.strictObject({ teamId: z.uuid(), thingId: z.uuid() }),
    query: z.strictObject({ limit: z.optional(z.coerce.number().check(z.int(), z.gte(1), z.lte(200))) }),
    body: json(
      z.strictObject({
        name: z.string().check(z.minLength(1, 'Type a name.')),
        size: z.number(),
        kind: z.enum(['typical', 'actual']),
      }),
    ),
    response: json(z.object({ name: z.string() })),
    limits: { ...ordinary, bodyBytes: 2000 },
  });
  const app = () => bench.app((router) => mount(router, bench.deps, post, async ({ body }) => ({ name: body.name })));
  const good = { name: 'a', size: 1, kind: 'typical' };
  const path = `${thingsPath}/33333333-3333-4333-8333-333333333333`;

  test('every fault is told at once, each with its path', async () => {
    const response = await supertest(app())
      .post(`${thingsPath}/7?limit=many&sort=up`)
      .send({ name: '', size: 'large', extra: 1 })
      .expect(400);
    expect(response.body.code).toBe('invalid_input');
    expect(response.body.message).toBe('The request has 7 faults.');
    expect(response.body.problems).toEqual([
      { path: 'params.thingId', message: 'This is not an id.' },
      { path: 'query.limit', message: 'This must be a number.' },
      { path: 'query.sort', message: 'This is not asked for here.' },
      { path: 'body.name', message: 'Type a name.' },
      { path: 'body.size', message: 'This must be a number.' },
      { path: 'body.kind', message: 'This is missing.' },
      { path: 'body.extra', message: 'This is not asked for here.' },
    ]);
  });

  test('a NUL character, which the database cannot keep, is refused with its place', async () => {
    const response = await supertest(app())
      .post(path)
      .send({ ...good, name: 'a\0b' })
      .expect(400);
    expect(response.body.problems).toEqual([
      { path: 'body.name', message: 'This holds a character (NUL) that cannot be kept.' },
    ]);
  });

  test.each([
    ['broken JSON', 'application/json', '{"name": ', 400, 'unreadable_body'],
    ['another type', 'text/plain', 'name=a', 400, 'unreadable_body'],
    ['a form', 'application/x-www-form-urlencoded', 'name=a', 400, 'unreadable_body'],
    ['another alphabet', 'application/json; charset=klingon', '{}', 400, 'unreadable_body'],
    ['too many bytes', 'application/json', JSON.stringify({ ...good, name: 'x'.repeat(3000) }), 413, 'too_large'],
  ])('a body of %s is refused plainly', async (_what, type, body, status, code) => {
    const response = await supertest(app()).post(path).set('Content-Type', type).send(body).expect(status);
    expect(response.body.code).toBe(code);
    expect(response.body.problems).toEqual([]);
  });

  test('a body of nothing at all lacks every field', async () => {
    const response = await supertest(app()).post(path).set('Content-Type', 'application/json').send('').expect(400);
    expect(response.body.problems).toEqual(
      ['name', 'size', 'kind'].map((field) => ({ path: `body.${field}`, message: 'This is missing.' })),
    );
  });

  test('an address that cannot be decoded is the fault of the caller', async () => {
    const response = await supertest(app()).post(`${thingsPath}/%E0%A4%A`).send(good).expect(400);
    expect(response.body.code).toBe('invalid_input');
  });

  test('a path or a method that nothing serves is not found, in JSON', async () => {
    for (const request of [supertest(app()).get('/api/nothing'), supertest(app()).put(path).send(good)]) {
      const response = await request.expect(404);
      expect(response.body).toMatchObject({ code: 'not_found', problems: [] });
    }
  });

  test('a good request goes through as the contract understands it', async () => {
    expect((await supertest(app()).post(`${path}?limit=5`).send(good).expect(200)).body).toEqual({ name: 'a' });
  });
});

test('a declaration that no rule guards is refused at start', () => {
  const unguarded = { ...getThing, allow: 'things.view' };
  const start = () =>
    bench.app((router) => {
      // @ts-expect-error a name outside the list of policies does not compile either
      mount(router, bench.deps, unguarded, async () => ({ name: 'a', size: 1 }));
    });
  expect(start).toThrow('"things.view" has no rule');
  const inherited = { ...getThing, allow: 'toString' };
  // @ts-expect-error nor does a name that every object has
  expect(() => bench.app((router) => mount(router, bench.deps, inherited, async () => ({})))).toThrow('has no rule');
});
