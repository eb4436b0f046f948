import { createServer, type RequestListener, type Server } from 'node:http';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { getSession, signIn, signOut } from '../../../src/contract/accounts.ts';
import { getStationPlace } from '../../../src/contract/place.ts';
import { getRunHours } from '../../../src/contract/run-hours.ts';
import { listWeatherFiles } from '../../../src/contract/weather-library.ts';
import { call, callForBytes, urlOf } from '../../../src/lib/api-client.ts';
import { ApiError, errorSentence } from '../../../src/lib/api-error.ts';

const teamId = '3f1c9a52-9a57-4a3e-8a38-0f8d3c1b2a01';
const none = { params: {}, query: {} };
const errorBody = { message: 'Said by the server.', problems: [], requestId: 'r-1' };

describe('urlOf', () => {
  it('fills in the path and escapes what it is given', () => {
    const params = { teamId, programmeId: 'a/b', stationId: 'x y' };
    expect(urlOf(getStationPlace, { params, query: {} })).toBe(`/api/teams/${teamId}/programmes/a%2Fb/stations/x%20y`);
  });

  it('appends only the query values that are set', () => {
    expect(urlOf(listWeatherFiles, { params: { teamId }, query: { limit: 50, after: undefined } })).toBe(
      `/api/teams/${teamId}/weather-files?limit=50`,
    );
  });

  it('refuses a call that lacks a part of its path', () => {
    expect(() => urlOf(listWeatherFiles, { params: {}, query: {} })).toThrow('needs the parameter teamId');
  });
});

describe('call, against a real server', () => {
  let server: Server;
  let answer: RequestListener;

  beforeEach(async () => {
    server = createServer((request, response) => answer(request, response));
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    const address = server.address();
    const port = typeof address === 'object' && address ? address.port : 0;
    const real = globalThis.fetch;
    // A page's addresses are its own origin's; outside a browser that origin has to be said.
    vi.stubGlobal('fetch', (path: string, init: RequestInit) => real(`http://127.0.0.1:${port}${path}`, init));
  });

  afterEach(async () => {
    vi.unstubAllGlobals();
    server.closeAllConnections();
    await new Promise((resolve) => server.close(resolve));
  });

  const respond = (status: number, body: unknown, headers: Record<string, string> = {}) => {
    answer = (_, response) => {
      response.writeHead(status, { 'Content-Type': 'application/json', ...headers });
      response.end(typeof body === 'string' ? body : JSON.stringify(body));
    };
  };

  it('gives the parsed answer and nothing that the endpoint does not declare', async () => {
    respond(200, { person: null, memberships: [], secret: 'x' });
    expect(await call(getSession, none)).toEqual({ person: null, memberships: [] });
  });

  it('sends method, path and JSON body as declared', async () => {
    let seen = '';
    answer = (request, response) => {
      request.setEncoding('utf8');
      request.on('data', (chunk: string) => {
        seen += chunk;
      });
      request.on('end', () => {
        seen = `${request.method} ${request.url} ${request.headers['content-type']} ${seen}`;
        response.end(JSON.stringify({ person: null, memberships: [] }));
      });
    };
    await call(signIn, { ...none, body: { email: 'a@example.org', password: 'p' } });
    expect(seen).toBe('POST /api/session application/json {"email":"a@example.org","password":"p"}');
  });

  it('answers nothing where nothing is declared', async () => {
    respond(204, '');
    expect(await call(signOut, none)).toBeUndefined();
  });

  it('gives the bytes of a file', async () => {
    answer = (_, response) => response.end(Buffer.from([0, 5, 11]));
    const bytes = await callForBytes(getRunHours, { params: { teamId, runId: teamId }, query: {} });
    expect([...bytes]).toEqual([0, 5, 11]);
  });

  it('turns an error body into an ApiError with code, problems, request and waiting time', async () => {
    const problems = [{ path: 'body.email', message: 'Type an e-mail address.' }];
    respond(429, { ...errorBody, code: 'too_many_requests', problems }, { 'Retry-After': '40' });
    const error = await call(getSession, none).catch((thrown: unknown) => thrown);
    expect(error).toBeInstanceOf(ApiError);
    expect(error).toMatchObject({ code: 'too_many_requests', problems, requestId: 'r-1', retryAfterS: 40 });
  });

  it('says which request failed when the fault is the server’s', async () => {
    respond(500, { ...errorBody, code: 'internal' });
    const error = await call(getSession, none).catch((thrown: unknown) => thrown);
    expect(errorSentence(error)).toBe(
      'Said by the server. If it happens again, tell whoever runs this server the request r-1.',
    );
  });

  it('takes a gateway’s own page for a server that is away', async () => {
    respond(502, '<html>Bad gateway</html>');
    await expect(call(getSession, none)).rejects.toMatchObject({ code: 'unavailable' });
  });

  it('says plainly when an answer is not what the endpoint declares', async () => {
    for (const body of [{ person: 5 }, 'not json', '']) {
      respond(200, body);
      await expect(call(getSession, none)).rejects.toMatchObject({ code: 'unexpected_answer' });
    }
  });

  it('says plainly when no answer comes', async () => {
    answer = (request) => request.socket.destroy();
    const error = await call(getSession, none).catch((thrown: unknown) => thrown);
    expect(error).toMatchObject({ code: 'network' });
    expect(errorSentence(error)).toContain('The server did not answer.');
  });

  it('ends as the caller asked when the caller stops it', async () => {
    answer = () => {};
    const stop = new AbortController();
    const asked = call(getSession, none, { signal: stop.signal });
    stop.abort();
    await expect(asked).rejects.toMatchObject({ name: 'AbortError' });
  });
});
