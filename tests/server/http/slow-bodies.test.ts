/** Clients that send a little now and then to hold a connection: each is answered when its time is over, and let go of. */
import http from 'node:http';
import net, { type AddressInfo } from 'node:net';
import { afterAll, beforeAll, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { mount } from '../../../server/http/mount.ts';
import { empty, endpoint, json, none, ordinary } from '../../../src/contract/endpoint.ts';
import { type Bench, openBench, TEAM_ID } from '../../support/bare-app.ts';
import { eventually } from '../../support/eventually.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

const slowThing = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/things',
  summary: 'A thing.',
  params: z.strictObject({ teamId: z.uuid() }),
  query: empty,
  body: json(z.strictObject({ name: z.string() })),
  response: none,
  errors: [],
  allow: 'weather.view',
  limits: { ...ordinary, seconds: 0.3 },
});

let database: TestDatabase;
let bench: Bench;
let server: http.Server;
let port: number;
let handled = 0;

beforeAll(async () => {
  database = await makeTestDatabase();
  bench = await openBench({ database });
  const app = bench.app((router) =>
    mount(router, bench.deps, slowThing, async () => {
      handled += 1;
      return undefined;
    }),
  );
  server = http.createServer(app).listen(0, '127.0.0.1');
  await new Promise((resolve) => server.once('listening', resolve));
  const address: AddressInfo | string | null = server.address();
  port = typeof address === 'object' && address !== null ? address.port : 0;
});
afterAll(async () => {
  server.closeAllConnections();
  await new Promise((resolve) => server.close(resolve));
  await bench.close();
  await database.drop();
});

test('a body that trickles in is answered when its time is over, and nothing is done with it', async () => {
  const socket = net.connect(port, '127.0.0.1');
  socket.on('error', () => undefined);
  let answer = '';
  socket.on('data', (data) => {
    answer += data.toString();
  });
  const head = `POST /api/teams/${TEAM_ID}/things HTTP/1.1\r\nHost: x\r\nContent-Type: application/json\r\n`;
  socket.write(`${head}Content-Length: 1000\r\n\r\n{"name": "`);
  const trickle = setInterval(() => socket.write('x'), 20);
  await eventually('the answer', async () => answer.startsWith('HTTP/1.1 503 '), 3_000);
  clearInterval(trickle);
  expect(answer).toMatch(/retry-after: \d+/i);
  expect(answer).toContain('"code":"unavailable"');
  socket.destroy();
  expect(handled).toBe(0);
});

test('many of them hold up nobody else', async () => {
  const head = `POST /api/teams/${TEAM_ID}/things HTTP/1.1\r\nHost: x\r\nContent-Type: application/json\r\n`;
  const slow = Array.from({ length: 50 }, () => {
    const socket = net.connect(port, '127.0.0.1');
    socket.on('error', () => undefined);
    socket.write(`${head}Content-Length: 1000\r\n\r\n{`);
    return socket;
  });
  const answer = await fetch(`http://127.0.0.1:${port}/api/teams/${TEAM_ID}/things`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: '{"name": "quick"}',
  });
  expect(answer.status).toBe(204);
  for (const socket of slow) socket.destroy();
  expect(handled).toBe(1);
  // That a client has gone is no fault of ours; that its time was over is told to the log, as every 5xx is.
  for (const { message } of bench.log.errors) expect(message).toBe('answered 503');
});
