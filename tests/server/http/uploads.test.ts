import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import http from 'node:http';
import type { AddressInfo } from 'node:net';
import net from 'node:net';
import { setTimeout as sleep } from 'node:timers/promises';
import type { Express } from 'express';
import supertest from 'supertest';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { mount } from '../../../server/http/mount.ts';
import { cleanUploadName } from '../../../server/http/upload-name.ts';
import { empty, endpoint, json, ordinary, upload } from '../../../src/contract/endpoint.ts';
import { type Bench, openBench, TEAM_ID } from '../../support/bare-app.ts';
import { eventually } from '../../support/eventually.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

const LIMIT_BYTES = 100_000;
const path = `/api/teams/${TEAM_ID}/uploads`;

const uploadThing = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/uploads',
  summary: 'Takes one file.',
  params: z.strictObject({ teamId: z.uuid() }),
  query: empty,
  body: upload({ maxFiles: 1, maxBytes: LIMIT_BYTES }),
  response: json(z.object({ name: z.string(), bytes: z.int(), fingerprint: z.string(), content: z.string() })),
  errors: [],
  allow: 'weather.upload',
  limits: ordinary,
});

let database: TestDatabase;
let bench: Bench;
let app: Express;
let handled = 0;

beforeAll(async () => {
  database = await makeTestDatabase();
  bench = await openBench({ database });
  app = bench.app((router) =>
    mount(router, bench.deps, uploadThing, async (_input, { uploads }) => {
      handled += 1;
      const [file] = uploads;
      if (file === undefined || uploads.length !== 1) throw new Error('one file was promised');
      const bytes = await readFile(file.temporaryPath);
      return { ...file, content: bytes.toString('latin1').slice(0, 10) };
    }),
  );
});
afterEach(async () => {
  // Whatever became of the request: nothing waits any more.
  await eventually('uploads are removed', async () => (await bench.waiting()).length === 0, 2_000);
});
afterAll(async () => {
  await bench.close();
  await database.drop();
});

const problemsOf = async (request: supertest.Test) => {
  const response = await request.expect(400);
  expect(response.body.code).toBe('invalid_input');
  return response.body.problems;
};

describe('an upload', () => {
  test('is streamed, measured and hashed; the handler finds it on disk, and it is gone afterwards', async () => {
    const bytes = Buffer.alloc(LIMIT_BYTES, 'muslin');
    const response = await supertest(app).post(path).attach('file', bytes, 'hourly.epw').expect(200);
    expect(response.body).toEqual({
      name: 'hourly.epw',
      bytes: LIMIT_BYTES,
      fingerprint: createHash('sha256').update(bytes).digest('hex'),
      content: 'muslinmusl',
    });
    expect(await bench.waiting()).toEqual([]);
  });

  test('may be empty: what that means is for the reader of the file to say', async () => {
    const response = await supertest(app).post(path).attach('file', Buffer.alloc(0), 'empty.epw').expect(200);
    expect(response.body.bytes).toBe(0);
  });

  test('keeps no folder, line break or control character of its name', async () => {
    for (const sent of ['../../etc/passwd', 'C:\\weather\\passwd', 'a/b/\r\nx: y/passwd']) {
      const response = await supertest(app).post(path).attach('file', Buffer.from('x'), sent).expect(200);
      expect(response.body.name).toBe('passwd');
    }
  });

  test('of one byte too many is refused with the limit in the message, and the handler never sees it', async () => {
    const before = handled;
    const response = await supertest(app)
      .post(path)
      .attach('file', Buffer.alloc(LIMIT_BYTES + 1), 'big.epw')
      .expect(413);
    expect(response.body).toMatchObject({
      code: 'too_large',
      message: 'The file is larger than 100000 bytes, the most that is taken at once.',
    });
    expect(handled).toBe(before);
  });

  test('without a file, with a second one, in another field, with text beside it: each fault is located', async () => {
    const file = Buffer.from('x');
    expect(await problemsOf(supertest(app).post(path).field('note', 'hello'))).toEqual([
      { path: 'body.note', message: 'Send the file in the field “file”, and nothing else.' },
    ]);
    const form = 'multipart/form-data; boundary=b';
    expect(await problemsOf(supertest(app).post(path).set('Content-Type', form).send('--b--\r\n'))).toEqual([
      { path: 'files', message: 'Choose a file to upload.' },
    ]);
    expect(await problemsOf(supertest(app).post(path).field('file', 'only text'))).toEqual([
      { path: 'files', message: 'The field “file” holds text where a file is due.' },
    ]);
    const everything = supertest(app)
      .post(path)
      .attach('file', file, 'a.epw')
      .attach('file', file, 'b.epw')
      .attach('weather', file, 'c.epw')
      .field('note', 'hello');
    expect(await problemsOf(everything)).toEqual([
      { path: 'files.1', message: 'Send one file at a time.' },
      { path: 'body.weather', message: 'Send the file in the field “file”, and nothing else.' },
      { path: 'body.note', message: 'Send the file in the field “file”, and nothing else.' },
    ]);
  });

  test.each([
    ['cut off in its first file', '--b\r\nContent-Disposition: form-data; name="file"; filename="a"\r\n\r\nhalf'],
    ['cut off in a header', '--b\r\nContent-Dispos'],
    ['without its last border', '--b\r\nContent-Disposition: form-data; name="file"; filename="a"\r\n\r\nx\r\n--b\r\n'],
    ['of letters without borders', 'just some letters'],
  ])('%s is refused as unreadable', async (_what, body) => {
    const request = supertest(app).post(path).set('Content-Type', 'multipart/form-data; boundary=b').send(body);
    const response = await request.expect(400);
    expect(response.body.code).toBe('unreadable_body');
  });

  test('that is no form at all, or has no border, is refused as unreadable', async () => {
    for (const type of ['text/csv', 'multipart/form-data', 'multipart/mixed; boundary=b']) {
      const response = await supertest(app).post(path).set('Content-Type', type).send('--b').expect(400);
      expect(response.body.code).toBe('unreadable_body');
    }
  });
});

describe('an upload over the wire', () => {
  let server: http.Server;
  let port: number;

  beforeAll(async () => {
    server = http.createServer(app).listen(0, '127.0.0.1');
    await new Promise((resolve) => server.once('listening', resolve));
    const address: AddressInfo | string | null = server.address();
    port = typeof address === 'object' && address !== null ? address.port : 0;
  });
  afterAll(() => new Promise((resolve) => server.close(resolve)));

  const head = `--b\r\nContent-Disposition: form-data; name="file"; filename="a.epw"\r\n\r\n`;
  const request = (lines: readonly string[]) =>
    `${[`POST ${path} HTTP/1.1`, 'Host: localhost', 'Content-Type: multipart/form-data; boundary=b', ...lines].join('\r\n')}\r\n\r\n`;

  /** Sends chunks until the server answers; answers what it said and how much it took. */
  async function pour({ headers, chunked, mostBytes }: { headers: string[]; chunked: boolean; mostBytes: number }) {
    const socket = net.connect(port, '127.0.0.1');
    let answer = '';
    socket.on('data', (data) => {
      answer += data.toString('latin1');
    });
    socket.on('error', () => undefined);
    const chunk = Buffer.alloc(64 * 1024, 'x');
    const framed = chunked
      ? Buffer.concat([Buffer.from(`${chunk.length.toString(16)}\r\n`), chunk, Buffer.from('\r\n')])
      : chunk;
    socket.write(request(headers));
    socket.write(chunked ? `${head.length.toString(16)}\r\n${head}\r\n` : head);
    let sent = 0;
    while (answer === '' && sent < mostBytes && !socket.destroyed) {
      sent += chunk.length;
      if (!socket.write(framed))
        await Promise.race([new Promise((resolve) => socket.once('drain', resolve)), sleep(200)]);
    }
    await eventually('the server answers', async () => answer !== '', 3_000);
    socket.destroy();
    return { answer, sent };
  }

  test('that announces 300 MB is refused before a byte of it is written', async () => {
    const headers = [`Content-Length: ${300 * 1024 * 1024}`];
    const { answer, sent } = await pour({ headers, chunked: false, mostBytes: 64 * 1024 });
    expect(answer).toMatch(/^HTTP\/1\.1 413 /);
    expect(sent).toBeLessThanOrEqual(64 * 1024);
  });

  test('that goes on without an announced length is stopped soon after its limit', async () => {
    const headers = ['Transfer-Encoding: chunked'];
    const { answer, sent } = await pour({ headers, chunked: true, mostBytes: 300 * 1024 * 1024 });
    expect(answer).toMatch(/^HTTP\/1\.1 413 /);
    // What the sockets between us hold comes on top of the limit (16 MB is a wide guess at that).
    expect(sent).toBeLessThan(16 * 1024 * 1024);
  });

  test('whose client leaves midway is forgotten, without an alarm', async () => {
    const before = { handled, errors: bench.log.errors.length };
    const socket = net.connect(port, '127.0.0.1');
    socket.write(request(['Content-Length: 50000']));
    socket.write(`${head}${'x'.repeat(20_000)}`);
    await eventually('the upload has begun', async () => (await bench.waiting()).length === 1, 2_000);
    socket.destroy();
    await eventually('the upload is removed', async () => (await bench.waiting()).length === 0, 2_000);
    expect({ handled, errors: bench.log.errors.length }).toEqual(before);
  });

  test('that stalls is ended when its time is over, and the client is told', async () => {
    const slow = { ...uploadThing, limits: { ...ordinary, seconds: 0.2 } };
    const slowServer = http
      .createServer(
        bench.app((router) =>
          mount(router, bench.deps, slow, async () => ({ name: '', bytes: 0, fingerprint: '', content: '' })),
        ),
      )
      .listen(0, '127.0.0.1');
    await new Promise((resolve) => slowServer.once('listening', resolve));
    const address: AddressInfo | string | null = slowServer.address();
    const socket = net.connect(typeof address === 'object' && address !== null ? address.port : 0, '127.0.0.1');
    let answer = '';
    socket.on('data', (data) => {
      answer += data.toString('latin1');
    });
    socket.write(request(['Content-Length: 50000']));
    socket.write(`${head}${'x'.repeat(20_000)}`);
    await eventually('the server answers', async () => answer.startsWith('HTTP/1.1 503 '), 3_000);
    await eventually('the upload is removed', async () => (await bench.waiting()).length === 0, 2_000);
    socket.destroy();
    await new Promise((resolve) => slowServer.close(resolve));
  });
});

test.each([
  ['weather.epw', 'weather.epw'],
  ['../../weather.epw', 'weather.epw'],
  ['..\\..\\weather.epw', 'weather.epw'],
  ['..', 'unnamed file'],
  ['', 'unnamed file'],
  ['folder/', 'unnamed file'],
  ['a\0b\u0007c.epw', 'a b c.epw'],
  ['line\r\nbreak\u2028.epw', 'line break .epw'],
  ['gpj\u202Ewpe.epw', 'gpj wpe.epw'],
  ['half \ud800 a pair', 'half a pair'],
  ['Łódź–Lublinek (PL).epw', 'Łódź–Lublinek (PL).epw'],
  [`${'x'.repeat(300)}.epw`, `${'x'.repeat(196)}.epw`],
  ['😀'.repeat(250), '😀'.repeat(200)],
])('the name %j is kept as %j', (sent, kept) => {
  expect(cleanUploadName(sent)).toBe(kept);
});
