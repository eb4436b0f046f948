import http from 'node:http';
import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { createApp } from '../../../server/app.ts';
import { answerEvents } from '../../../server/http/answer-events.ts';
import { notifyTeam } from '../../../server/jobs/team-feed.ts';
import { eventually } from '../../support/eventually.ts';
import { openWeb, type WebForTests } from '../../support/open-web.ts';

const Thing = z.object({ step: z.int() });

interface Listening {
  readonly status: number;
  readonly headers: http.IncomingHttpHeaders;
  readonly text: () => string;
  readonly ended: () => boolean;
  leave(): void;
}

const servers: http.Server[] = [];
afterEach(async () => {
  for (const server of servers.splice(0)) await new Promise((resolve) => server.close(resolve));
});

async function serve(listener: http.RequestListener): Promise<number> {
  const server = http.createServer(listener).listen(0, '127.0.0.1');
  servers.push(server);
  await new Promise((resolve) => server.once('listening', resolve));
  const address = server.address();
  return typeof address === 'object' && address !== null ? address.port : 0;
}

function listen(port: number, { path = '/', headers = {} }: { path?: string; headers?: Record<string, string> } = {}) {
  return new Promise<Listening>((resolve, reject) => {
    const request = http.get({ port, host: '127.0.0.1', path, headers }, (response) => {
      let text = '';
      let ended = false;
      response.setEncoding('utf8');
      response.on('data', (part: string) => {
        text += part;
      });
      response.on('close', () => {
        ended = true;
      });
      response.on('error', () => undefined);
      resolve({
        status: response.statusCode ?? 0,
        headers: response.headers,
        text: () => text,
        ended: () => ended,
        leave: () => request.destroy(),
      });
    });
    request.on('error', reject);
  });
}

/** Events that wait for the test to give them; knows whether somebody still reads. */
function makeSource() {
  const waiting: unknown[] = [];
  let wake: () => void = () => undefined;
  let letGo = false;
  let ended = false;
  const signal = new AbortController();
  async function* read(): AsyncGenerator<unknown> {
    try {
      while (!signal.signal.aborted) {
        const item = waiting.shift();
        if (item !== undefined) yield item;
        else if (ended) return;
        else
          await new Promise<void>((resolve) => {
            wake = resolve;
          });
      }
    } finally {
      letGo = true;
    }
  }
  const stop = () => {
    signal.abort();
    wake();
  };
  return {
    read,
    give(item: unknown) {
      waiting.push(item);
      wake();
    },
    end() {
      ended = true;
      wake();
    },
    stop,
    letGo: () => letGo,
  };
}

describe('a stream of events', () => {
  const streaming = async (options: { mayStillWatch?: () => Promise<boolean>; heartbeatMs?: number } = {}) => {
    const source = makeSource();
    const outcome: { error?: unknown; over: boolean } = { over: false };
    const closing = new AbortController();
    const port = await serve((_request, response) => {
      const gone = new AbortController();
      response.once('close', () => gone.abort());
      const signal = AbortSignal.any([gone.signal, closing.signal]);
      signal.addEventListener('abort', source.stop);
      answerEvents({
        response,
        schema: Thing,
        events: source.read(),
        signal,
        mayStillWatch: options.mayStillWatch ?? (async () => true),
        heartbeatMs: options.heartbeatMs ?? 60_000,
      }).then(
        () => {
          outcome.over = true;
        },
        (error) => {
          outcome.error = error;
          outcome.over = true;
        },
      );
    });
    return { source, outcome, closing, client: await listen(port) };
  };

  test('says when to come back, then each event as it happens, without what is not declared', async () => {
    const { source, client } = await streaming();
    expect(client.headers['content-type']).toBe('text/event-stream; charset=utf-8');
    expect(client.headers['cache-control']).toBe('no-store, no-transform');
    source.give({ step: 1, secret: 'x' });
    await eventually('the first event', async () => client.text().includes('data: '));
    source.give({ step: 2 });
    source.end();
    await eventually('the end', async () => client.ended());
    expect(client.text()).toBe('retry: 2000\n\ndata: {"step":1}\n\ndata: {"step":2}\n\n');
  });

  test('beats while nothing happens and while much happens', async () => {
    const { source, client } = await streaming({ heartbeatMs: 30 });
    await eventually('two beats', async () => client.text().split(': still here\n\n').length > 2);
    const beats = client.text().split(': still here').length;
    for (let step = 0; step < 40; step++) {
      source.give({ step });
      await sleep(5);
    }
    expect(client.text().split(': still here').length).toBeGreaterThan(beats);
    expect(client.text()).toContain('data: {"step":39}');
    client.leave();
  });

  test('ends when the client leaves, and lets the events go', async () => {
    const { source, outcome, client } = await streaming();
    client.leave();
    await eventually('the end', async () => outcome.over && source.letGo());
    expect(outcome.error).toBeUndefined();
  });

  test('ends when the server closes', async () => {
    const { source, outcome, closing, client } = await streaming();
    closing.abort();
    await eventually('the end', async () => client.ended() && outcome.over && source.letGo());
    expect(outcome.error).toBeUndefined();
  });

  test('ends at the beat at which the right to watch is gone', async () => {
    let may = true;
    const { outcome, client } = await streaming({ heartbeatMs: 20, mayStillWatch: async () => may });
    await eventually('a beat', async () => client.text().includes(': still here'));
    may = false;
    await eventually('the end', async () => client.ended() && outcome.over);
    expect(outcome.error).toBeUndefined();
  });

  test('ends, and is reported, at an event that is not what is declared; nothing of it is sent', async () => {
    const { source, outcome, client } = await streaming();
    source.give({ step: 'secret' });
    await eventually('the end', async () => client.ended() && outcome.over);
    expect(outcome.error).toBeInstanceOf(Error);
    expect(client.text()).not.toContain('secret');
  });
});

describe('watching a team', () => {
  let web: WebForTests;
  let port: number;
  let teamId: string;
  let personId: string;
  let cookie: string;

  beforeAll(async () => {
    web = await openWeb();
    const leadId = await web.makePerson('lead@example.org');
    ({ teamId } = await web.makeTeam(leadId));
    personId = await web.makePerson('viewer@example.org');
    await web.addMember({ teamId, personId, role: 'viewer' });
    const response = await web
      .browser()
      .post('/api/session')
      .send({ email: 'viewer@example.org', password: 'correct horse battery' })
      .expect(200);
    cookie = (response.headers['set-cookie']?.[0] ?? '').split(';')[0] ?? '';
  });
  afterAll(() => web.close());

  test('tells what is committed, uncompressed, and nothing of another team', async () => {
    port = await serve(web.app);
    const path = `/api/teams/${teamId}/events`;
    const client = await listen(port, { path, headers: { Cookie: cookie, 'Accept-Encoding': 'gzip' } });
    expect(client.status).toBe(200);
    expect(client.headers['content-encoding']).toBeUndefined();
    const event = { kind: 'run', runId: personId, stationId: teamId } as const;
    await notifyTeam(web.deps.db, { teamId: personId, event });
    await notifyTeam(web.deps.db, { teamId, event });
    await eventually('the event', async () => client.text().includes('data: '));
    expect(client.text()).toBe(`retry: 2000\n\ndata: ${JSON.stringify(event)}\n\n`);
    client.leave();
    await eventually('the connection is closed', async () => client.ended());
  });

  const beating = async (): Promise<Listening> => {
    const beatingPort = await serve(createApp(web.deps, { heartbeatMs: 50 }));
    const client = await listen(beatingPort, { path: `/api/teams/${teamId}/events`, headers: { Cookie: cookie } });
    await eventually('a beat', async () => client.text().includes(': still here'));
    expect(client.ended()).toBe(false);
    return client;
  };

  test('ends at the next beat when the membership is gone, and from then on the team is not there', async () => {
    const client = await beating();
    await web.database.ownerDb.raw('delete from memberships where person_id = ?', [personId]);
    await eventually('the end', async () => client.ended(), 3_000);
    await web.browser().set('Cookie', cookie).get(`/api/teams/${teamId}/events`).expect(404);
    await web.addMember({ teamId, personId, role: 'viewer' });
  });

  test('ends at the next beat when the session is over', async () => {
    const client = await beating();
    await web.browser().set('Cookie', cookie).delete('/api/session').expect(204);
    await eventually('the end', async () => client.ended(), 3_000);
    await web.browser().set('Cookie', cookie).get(`/api/teams/${teamId}/events`).expect(401);
  });

  test('answers the question after its headers without a stream', async () => {
    const agent = await web.signIn('viewer@example.org');
    const response = await agent.head(`/api/teams/${teamId}/events`).expect(200);
    expect(response.headers['content-type']).toContain('text/event-stream');
  });
});
