/**
 * Every operation that a program may use is sent to a server as its description shows it, and the answer held against the schema that
 * the description gives for it.
 */
import http from 'node:http';
import { Ajv2020, type ValidateFunction } from 'ajv/dist/2020.js';
import addFormats from 'ajv-formats';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { ApiDescription, ApiOperation } from '../../../src/contract/api.ts';
import { exampleParameters } from '../../../src/contract/examples.ts';
import { type TokenScope, tokenScopes } from '../../../src/contract/tokens.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf } from '../../support/team-desk.ts';
import { zipBytes } from '../../support/zip-bytes.ts';

/** What an example alone cannot show. */
const notSent: Readonly<Record<string, string>> = {
  retryWeatherFile: 'Nothing has stopped that could be tried again.',
  retryWeatherArchive: 'Nothing has stopped that could be tried again.',
};

let road: Road;
let team: RoadTeam;
let server: http.Server;
let origin: string;
let description: ApiDescription;
let archive: Buffer;
const tokens = new Map<TokenScope, string>();
/** By the name of the parameter: what stands there instead of the example's id. */
let ids: Readonly<Record<string, string>>;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  const { teamId, programmeId, lead } = team;
  const base = `/api/teams/${teamId}`;
  const engineer = await team.join('engineer');
  const desk = deskOf(team, engineer);
  await road.startWorker();
  const { file } = await desk.upload('a.epw', demoEpw(0).text);
  await desk.readToTheEnd(file.id);
  const { stationId } = (await desk.accept(file.id)).body;
  const site = await lead.agent
    .post(`${base}/programmes/${programmeId}/sites`)
    .send({ name: 'Harbour school', latitude: -24, longitude: 25 })
    .expect(200);
  await engineer.agent
    .put(`${base}/weather-files/${file.id}/licence`)
    .send({ licence: 'open', attribution: null })
    .expect(200);
  const batch = await lead.agent.post(`${base}/weather-batches`).send({ name: 'A batch' }).expect(200);
  for (const scope of tokenScopes) {
    const order = { name: scope, scopes: [scope], days: 1 };
    tokens.set(scope, (await lead.agent.post(`${base}/tokens`).send(order).expect(200)).body.token);
  }
  await desk.mapWithoutPending();
  const place = await desk.place(stationId);
  const briefs = await lead.agent.get(`${base}/programmes/${programmeId}/briefs`).expect(200);
  ids = {
    ...{ teamId, programmeId, stationId, fileId: file.id, siteId: site.body.id, batchId: batch.body.id },
    ...{ runId: place.shown?.runId ?? '', briefId: briefs.body.items[0].briefId, placeId: stationId },
  };
  archive = await zipBytes({ 'note.md': 'nothing to read' });
  server = http.createServer(road.app).listen(0, '127.0.0.1');
  await new Promise((resolve) => server.once('listening', resolve));
  const address = server.address();
  origin = `http://127.0.0.1:${typeof address === 'object' && address !== null ? address.port : 0}`;
  const answer = await fetch(`${origin}/api/openapi.json`);
  expect(answer.status).toBe(200);
  description = await answer.json();
}, 60_000);
afterAll(async () => {
  await new Promise((resolve) => server.close(resolve));
  expect(road.log.errors).toEqual([]);
  await road.close();
});

interface Described {
  readonly path: string;
  readonly method: string;
  readonly operation: ApiOperation;
}

function forPrograms(): readonly Described[] {
  return Object.entries(description.paths).flatMap(([path, methods]) =>
    Object.entries(methods)
      .filter(([, operation]) => operation['x-muslin-access'].scopes.length > 0)
      .map(([method, operation]) => ({ path, method, operation })),
  );
}

/** An example's ids in a body or a query are those of this team as well. */
function withOwnIds(text: string): string {
  return Object.entries(exampleParameters).reduce(
    (replaced, [name, example]) =>
      example.length === 36 ? replaced.replaceAll(example, ids[name] ?? example) : replaced,
    text,
  );
}

/** As the description shows it and in no other way; the examples of parameters fill the address. */
async function send({ path, method, operation }: Described): Promise<Response> {
  const query = new URLSearchParams();
  let address = path;
  for (const { name, in: place, example } of operation.parameters) {
    if (place === 'path') address = address.replace(`{${name}}`, ids[name] ?? String(example));
    else if (example !== undefined) query.set(name, withOwnIds(String(example)));
  }
  const [scope = 'weather:read'] = operation['x-muslin-access'].scopes;
  const headers = { Authorization: `Bearer ${tokens.get(scope)}` };
  const url = `${origin}${address}${query.size > 0 ? `?${query}` : ''}`;
  const content = operation.requestBody?.content ?? {};
  const json = content['application/json'];
  if (json !== undefined) {
    const body = withOwnIds(JSON.stringify(json.example));
    return await fetch(url, { method, headers: { ...headers, 'Content-Type': 'application/json' }, body });
  }
  if (content['multipart/form-data'] !== undefined) {
    const body = new FormData();
    const isArchive = path.endsWith('/archives');
    const note = `COMMENTS 1,sent by ${operation.operationId} `;
    const bytes = isArchive ? new Uint8Array(archive) : demoEpw(0).text.replace('COMMENTS 1,', note);
    body.append('file', new Blob([bytes]), isArchive ? 'files.zip' : 'year.epw');
    return await fetch(url, { method, headers, body });
  }
  return await fetch(url, { method, headers });
}

function validatorOf(schema: Readonly<Record<string, unknown>>): ValidateFunction {
  const ajv = new Ajv2020({ strict: false, allErrors: true });
  addFormats.default(ajv);
  ajv.addSchema({ $id: 'description', components: description.components });
  return ajv.compile(JSON.parse(JSON.stringify(schema).replaceAll('"#/components', '"description#/components')));
}

describe('what the description shows to programs', () => {
  test('is sent and answered as described, operation by operation', async () => {
    const sent: string[] = [];
    for (const described of forPrograms()) {
      const { operation } = described;
      if (operation.operationId in notSent) continue;
      const answer = await send(described);
      const name = operation.operationId;
      const [status, response] = Object.entries(operation.responses)[0] ?? [];
      if (String(answer.status) !== status) expect({ name, answer: await answer.text() }).toBe(status);
      const [[media, of] = ['', {}]] = Object.entries(response?.content ?? {});
      expect(answer.headers.get('content-type')?.split(';')[0], name).toBe(media);
      if (media === 'application/json') {
        const validate = validatorOf(of?.schema ?? {});
        validate(await answer.json());
        expect({ name, errors: validate.errors }).toEqual({ name, errors: null });
      } else await answer.body?.cancel();
      sent.push(name);
    }
    const all = forPrograms().map(({ operation }) => operation.operationId);
    expect([...sent, ...Object.keys(notSent)].sort()).toEqual([...all].sort());
    expect(sent.length).toBeGreaterThan(30);
  });

  test('of refusals holds too: a body with faults, no token, another scope, another team', async () => {
    const validate = validatorOf({ $ref: '#/components/schemas/Error' });
    const batches = `${origin}/api/teams/${team.teamId}/weather-batches`;
    const bearer = { Authorization: `Bearer ${tokens.get('weather:read')}` };
    const json = { ...bearer, 'Content-Type': 'application/json' };
    const refusals = await Promise.all([
      fetch(batches, { headers: { Authorization: 'Bearer muslin_nothing' } }),
      fetch(batches, { method: 'POST', headers: json, body: '{"name": 7, "more": 1}' }),
      fetch(batches.replace(team.teamId, exampleParameters.teamId ?? ''), { headers: bearer }),
      fetch(batches, {
        method: 'POST',
        headers: { ...json, Authorization: `Bearer ${tokens.get('weather:upload')}` },
        body: '{"name": 7, "more": 1}',
      }),
    ]);
    expect(refusals.map(({ status }) => status)).toEqual([401, 403, 404, 400]);
    for (const refusal of refusals) {
      validate(await refusal.json());
      expect(validate.errors).toBeNull();
    }
  });
});
