/** Who may what: every endpoint against every kind of caller, with rows that are there, so that a refusal is one of rights. */
import http from 'node:http';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { demoWeatherFile } from '../../data/demo/demo-weather-file.ts';
import { demoStations } from '../../data/demo/stations.ts';
import { inTransaction } from '../../server/db/in-transaction.ts';
import { makePerson } from '../../server/features/accounts/make-person.ts';
import { officeBrief } from '../../server/features/briefs/presets.ts';
import { startBrief } from '../../server/features/briefs/start-brief.ts';
import { addMember } from '../../server/features/teams/add-member.ts';
import { makeTeam } from '../../server/features/teams/make-team.ts';
import type { Role } from '../../src/contract/accounts.ts';
import type { Endpoint } from '../../src/contract/endpoint.ts';
import { type EndpointName, endpoints } from '../../src/contract/endpoints.ts';
import { eventually } from '../support/eventually.ts';
import { openRoad, type Road } from '../support/open-road.ts';

const callers = [
  'viewer',
  'planner',
  'engineer',
  'lead',
  'foreign lead',
  'guest',
  'bearer token',
  'signed out',
] as const;
type Caller = (typeof callers)[number];
const signedInCallers: readonly Caller[] = callers.slice(0, 5);

/** Statuses in the order of `callers`. A guest has no share link to open yet, so is a stranger everywhere. */
const everyMember = [200, 200, 200, 200, 404, 401, 401, 401];
const plannersToo = [403, 200, 200, 200, 404, 401, 401, 401];
const changersOnly = [403, 403, 200, 200, 404, 401, 401, 401];
const matrix: Record<EndpointName, readonly number[]> = {
  getSession: [200, 200, 200, 200, 200, 200, 401, 200],
  signIn: [200, 200, 200, 200, 200, 200, 401, 200],
  signOut: [204, 204, 204, 204, 204, 401, 401, 401],
  // With a key that was never made: nobody sets up a second team.
  setUp: [410, 410, 410, 410, 410, 410, 401, 410],
  listWeatherFiles: everyMember,
  uploadWeatherFile: changersOnly,
  getWeatherFile: everyMember,
  getOriginal: changersOnly,
  previewDerivedYear: changersOnly,
  // The engineer saves the change first: to the lead the same change of the same year stands already.
  deriveWeatherYear: [403, 403, 200, 409, 404, 401, 401, 401],
  acceptWeatherFile: changersOnly,
  withdrawWeatherFile: changersOnly,
  watchTeam: everyMember,
  getMap: everyMember,
  getStationPlace: everyMember,
  getRunHours: everyMember,
  exportRunHours: plannersToo,
  rescore: everyMember,
  listPresets: everyMember,
  listBriefs: everyMember,
  makeBrief: plannersToo,
  listBriefVersions: everyMember,
  getBriefVersion: everyMember,
  compareBriefVersions: everyMember,
  saveBriefVersion: plannersToo,
  previewBrief: everyMember,
  // About no team: every person who is signed in.
  getMethodChecks: [200, 200, 200, 200, 200, 401, 401, 401],
};

const PASSWORD = 'a long pass phrase for tests';
const WITHOUT_SESSION_OF_ITS_OWN: readonly EndpointName[] = ['signIn', 'signOut'];

let road: Road;
let server: http.Server;
let origin: string;
let ids: Readonly<Record<string, string>>;
/** A file of each caller's own, so that one caller's act does not stand in the way of the next. */
const ownFiles = new Map<Caller, string>();
const cookies = new Map<Caller, string>();

const emailOf = (caller: Caller): string => `${caller.replace(' ', '-')}@example.org`;
const [station] = demoStations.filter(({ year, faults }) => year === null && faults.length === 0);
if (station === undefined) throw new Error('the demo has a clean typical year');
const epw = demoWeatherFile(station);
const epwOf = (note: string): Blob => new Blob([epw.text.replace('COMMENTS 1,', `COMMENTS 1,${note} `)]);

async function signIn(caller: Caller): Promise<string> {
  const response = await fetch(`${origin}/api/session`, {
    method: 'POST',
    headers: {
      'Content-Type': 'application/json',
      'Sec-Fetch-Site': 'same-origin',
      'X-Forwarded-For': `192.0.2.${callers.indexOf(caller)}`,
    },
    body: JSON.stringify({ email: emailOf(caller), password: PASSWORD }),
  });
  expect(response.status).toBe(200);
  return response.headers.get('set-cookie')?.split(';')[0] ?? '';
}

async function headersOf(caller: Caller, name?: EndpointName): Promise<Record<string, string>> {
  const base = { 'Sec-Fetch-Site': 'same-origin' };
  if (caller === 'bearer token') return { ...base, Authorization: 'Bearer muslin_0123456789' };
  if (caller === 'guest') return { ...base, Cookie: 'muslin_share=unknown' };
  if (caller === 'signed out') return base;
  // These two end the session that they come with.
  const own = name !== undefined && WITHOUT_SESSION_OF_ITS_OWN.includes(name);
  return { ...base, Cookie: own ? await signIn(caller) : (cookies.get(caller) ?? '') };
}

function bodyOf(name: EndpointName, caller: Caller): FormData | string | null {
  if (name === 'uploadWeatherFile') {
    const form = new FormData();
    form.append('file', epwOf(`uploaded by ${caller}`), `${caller}.epw`);
    return form;
  }
  if (name === 'signIn') return JSON.stringify({ email: emailOf('viewer'), password: PASSWORD });
  if (name === 'previewDerivedYear' || name === 'deriveWeatherYear') return changeOf(name);
  if (name === 'withdrawWeatherFile') return JSON.stringify({ reason: 'Not needed.' });
  if (name === 'makeBrief') return JSON.stringify({ name: `Brief of ${caller}`, preset: 'office' });
  if (name === 'saveBriefVersion') return JSON.stringify({ basedOn: 1, body: officeBrief() });
  if (name === 'previewBrief') return JSON.stringify({ stationId: ids.stationId, body: officeBrief() });
  if (name === 'rescore') return JSON.stringify({ body: officeBrief() });
  if (name !== 'setUp') return null;
  const team = { teamName: 'Second', name: 'Second', email: 'second@example.org', password: PASSWORD };
  return JSON.stringify({ key: 'never-made', ...team });
}

/** An example of a change: two kelvin in every month. */
function changeOf(name: 'previewDerivedYear' | 'deriveWeatherYear'): string {
  const monthly = Array.from({ length: 12 }, () => ({ shiftK: 2, maxShiftK: 2, minShiftK: 2, ratioChangePct: 0 }));
  const change = { humidityRule: 'ratio-kept', monthly };
  return JSON.stringify(name === 'deriveWeatherYear' ? { ...change, name: 'Warmer by 2 K' } : change);
}

/** Sends the request and looks at its status alone; an event stream is let go of at once. */
async function statusOf(
  name: EndpointName,
  { caller, values }: { caller: Caller; values: typeof ids },
): Promise<number> {
  const endpoint: Endpoint = endpoints[name];
  const path = endpoint.path.replace(/:(\w+)/g, (_all, parameter: string) => values[parameter] ?? 'missing');
  expect(path).not.toContain('missing');
  const query = name === 'compareBriefVersions' ? '?from=1&to=1' : '';
  const body = bodyOf(name, caller);
  const headers = await headersOf(caller, name);
  const ending = new AbortController();
  const response = await fetch(`${origin}${path}${query}`, {
    method: endpoint.method,
    headers: typeof body === 'string' ? { ...headers, 'Content-Type': 'application/json' } : headers,
    body,
    signal: ending.signal,
  });
  ending.abort();
  return response.status;
}

async function uploadAndRead(note: string): Promise<string> {
  const form = new FormData();
  form.append('file', epwOf(note), `${note}.epw`);
  const path = `${origin}/api/teams/${ids.teamId}/weather-files`;
  const headers = await headersOf('engineer');
  const { file }: { file: { id: string } } = await (await fetch(path, { method: 'POST', headers, body: form })).json();
  await eventually(`${note} is read`, async () => {
    const record: { file: { status: string } } = await (await fetch(`${path}/${file.id}`, { headers })).json();
    return record.file.status === 'review';
  });
  return file.id;
}

beforeAll(async () => {
  road = await openRoad();
  server = http.createServer(road.app).listen(0, '127.0.0.1');
  await new Promise((resolve) => server.once('listening', resolve));
  const address = server.address();
  origin = `http://127.0.0.1:${typeof address === 'object' && address !== null ? address.port : 0}`;
  const people = new Map<Caller, string>();
  for (const caller of signedInCallers)
    people.set(caller, await makePerson(road.db, { email: emailOf(caller), name: caller, password: PASSWORD }));
  const teamOf = (name: string, leadId: string) =>
    inTransaction(road.db, (transaction) =>
      makeTeam({ transaction, startBrief }, { name, leadId, invented: true, programmeName: name }),
    );
  const ours = await teamOf('Ours', people.get('lead') ?? '');
  const foreign = await teamOf('Theirs', people.get('foreign lead') ?? '');
  const members: [Caller, Role][] = [
    ['viewer', 'viewer'],
    ['planner', 'planner'],
    ['engineer', 'engineer'],
  ];
  for (const [caller, role] of members)
    await addMember(road.db, { teamId: ours.teamId, personId: people.get(caller) ?? '', role });
  for (const caller of signedInCallers) cookies.set(caller, await signIn(caller));

  ids = { ...ours, foreignTeamId: foreign.teamId, foreignProgrammeId: foreign.programmeId };
  await road.startWorker();
  const fileId = await uploadAndRead('shared');
  const headers = await headersOf('engineer');
  const team = `${origin}/api/teams/${ours.teamId}`;
  await fetch(`${team}/weather-files/${fileId}/acceptance`, { method: 'POST', headers });
  const stationId = await eventually('the run', async () => {
    const map: { pending: number; stations: { id: string }[] } = await (
      await fetch(`${team}/programmes/${ours.programmeId}/map`, { headers })
    ).json();
    return map.pending === 0 && map.stations[0]?.id;
  });
  const briefs: { items: { briefId: string }[] } = await (
    await fetch(`${team}/programmes/${ours.programmeId}/briefs`, { headers })
  ).json();
  const place: { shown: { runId: string } } = await (
    await fetch(`${team}/programmes/${ours.programmeId}/stations/${stationId}`, { headers })
  ).json();
  ids = { ...ids, fileId, stationId, runId: place.shown.runId, briefId: briefs.items[0]?.briefId ?? '', version: '1' };
  for (const caller of ['engineer', 'lead'] as const) ownFiles.set(caller, await uploadAndRead(`of ${caller}`));
});

afterAll(async () => {
  await new Promise((resolve) => server.close(resolve));
  await road.close();
});

const names = Object.keys(endpoints).filter((name): name is EndpointName => name in endpoints);

describe('the matrix of rights', () => {
  test('has a row for every endpoint and a column for every caller', () => {
    expect(Object.keys(matrix).sort()).toEqual([...names].sort());
    for (const row of Object.values(matrix)) expect(row).toHaveLength(callers.length);
  });

  test.each(names)('%s answers every kind of caller as the table says', async (name) => {
    const found: Partial<Record<Caller, number>> = {};
    for (const caller of callers) {
      const own = ['acceptWeatherFile', 'withdrawWeatherFile'].includes(name) ? ownFiles.get(caller) : undefined;
      found[caller] = await statusOf(name, { caller, values: own === undefined ? ids : { ...ids, fileId: own } });
    }
    const expected = Object.fromEntries(callers.map((caller, index) => [caller, matrix[name][index]]));
    expect(found).toEqual(expected);
  });

  const withInnerIds = names.filter((name) => /:teamId\/.*:\w+/.test(endpoints[name].path));

  test('the endpoints with ids inside a team were found', () => {
    expect(withInnerIds.length).toBeGreaterThanOrEqual(7);
  });

  test.each(withInnerIds)('%s knows nothing of another team’s ids under one’s own team', async (name) => {
    const values = { ...ids, teamId: ids.foreignTeamId ?? '' };
    expect(await statusOf(name, { caller: 'foreign lead', values })).toBe(404);
  });

  test('nothing was logged as a fault of ours', () => {
    expect(road.log.errors).toEqual([]);
  });
});
