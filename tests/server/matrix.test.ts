/**
 * Who may what: every endpoint against every kind of caller, with rows that are there, so that a refusal is one of rights. One long
 * file, since every row of the table is tried on the same road, and a new endpoint is one row and perhaps one body.
 */
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
import { type TokenScope, tokenScopes } from '../../src/contract/tokens.ts';
import { doneElsewhere, writesNoEvent } from '../support/audited-endpoints.ts';
import { eventually } from '../support/eventually.ts';
import { openRoad, type Road } from '../support/open-road.ts';
import { zipBytes } from '../support/zip-bytes.ts';

const callers = [
  'viewer',
  'planner',
  'engineer',
  'lead',
  'foreign lead',
  'guest',
  'unknown token',
  'signed out',
  'uploading token',
  'weather token',
  'results token',
  'expired token',
  'revoked token',
  'foreign token',
] as const;
type Caller = (typeof callers)[number];
const signedInCallers: readonly Caller[] = callers.slice(0, 5);
/** Tokens of the team, one for each scope, and one of another team with all of them. */
const scopesOf: Partial<Record<Caller, readonly TokenScope[]>> = {
  'uploading token': ['weather:upload'],
  'weather token': ['weather:read'],
  'results token': ['results:read'],
  'expired token': tokenScopes,
  'revoked token': tokenScopes,
  'foreign token': tokenScopes,
};

/**
 * Statuses in the order of `callers`: those of the four roles, of strangers, of the token for each scope, of tokens that hold no
 * more or elsewhere. A guest has no share link to open yet, so is a stranger everywhere.
 */
const ofTeam = (roles: readonly number[], [upload, weather, results] = [403, 403, 403]): readonly number[] => [
  ...[...roles, 404, 401, 401, 401],
  ...[upload ?? 403, weather ?? 403, results ?? 403, 401, 401, 404],
];
const everyone = [200, 200, 200, 200];
const everyMember = ofTeam(everyone);
const weatherReaders = ofTeam(everyone, [403, 200, 403]);
const resultsReaders = ofTeam(everyone, [403, 403, 200]);
const plannersToo = ofTeam([403, 200, 200, 200]);
const plannersAndResults = ofTeam([403, 200, 200, 200], [403, 403, 200]);
const changersOnly = ofTeam([403, 403, 200, 200]);
const uploadersOnly = ofTeam([403, 403, 200, 200], [200, 403, 403]);
/** The same where nothing has stopped that could be tried again, so that who may is told that. */
const uploadersInVain = ofTeam([403, 403, 409, 409], [409, 403, 403]);
const leadOnly = ofTeam([403, 403, 403, 200]);
const leadOnlyDone = ofTeam([403, 403, 403, 204]);
/** What concerns one's own account: no token may. */
const ownAccount = (status: number) => [
  ...[status, status, status, status, status, 401, 401, 401],
  ...[403, 403, 403, 401, 401, 403],
];
const signedInOnly = ownAccount(200);
/** Of no team: whoever comes, but nobody whose token does not hold. */
const anyone = (status: number, withToken = status) => [
  ...[status, status, status, status, status, status, 401, status],
  ...[withToken, withToken, withToken, 401, 401, withToken],
];
/** With a key that was never made. */
const linkInVain = anyone(410);
const matrix: Record<EndpointName, readonly number[]> = {
  getSession: anyone(200),
  // A program has its token, and cannot begin a session beside it.
  signIn: anyone(200, 400),
  signOut: ownAccount(204),
  setUp: linkInVain,
  getAccount: signedInOnly,
  renamePerson: signedInOnly,
  // With a wrong password: who is signed in is told so at its field.
  changePassword: ownAccount(400),
  askEmailChange: ownAccount(400),
  startTwoFactor: ownAccount(400),
  endTwoFactor: ownAccount(400),
  renewRecoveryCodes: ownAccount(400),
  // Nothing has been begun that could be confirmed.
  confirmTwoFactor: ownAccount(409),
  setNoticesOff: signedInOnly,
  listSessions: signedInOnly,
  // Of nobody.
  endSession: ownAccount(404),
  endOtherSessions: ownAccount(204),
  listNotices: signedInOnly,
  readNotices: ownAccount(204),
  askReset: anyone(204),
  resetPassword: linkInVain,
  confirmEmail: linkInVain,
  openInvitation: linkInVain,
  acceptAsNewPerson: linkInVain,
  listOwnInvitations: signedInOnly,
  // To somebody else's address.
  acceptOwnInvitation: ownAccount(410),
  listInvitations: leadOnly,
  invite: leadOnly,
  resendInvitation: leadOnly,
  revokeInvitation: leadOnly,
  listMembers: everyMember,
  changeMember: leadOnly,
  endMemberSessions: leadOnlyDone,
  removeMember: leadOnlyDone,
  // A team of which the lead is the last, and to which the tokens do not belong.
  leaveTeam: [204, 204, 204, 409, 404, 401, 401, 401, 404, 404, 404, 401, 401, 404],
  makeTeam: signedInOnly,
  renameTeam: leadOnlyDone,
  listProgrammes: resultsReaders,
  makeProgramme: plannersToo,
  renameProgramme: plannersToo,
  setProgrammeMembers: leadOnly,
  listMails: leadOnly,
  listExports: leadOnly,
  askExport: leadOnly,
  // Its time is over.
  getExport: ofTeam([403, 403, 403, 410]),
  getDeletion: leadOnly,
  // With a name that is not the team's, and so nothing to stop.
  askDeletion: ofTeam([403, 403, 403, 400]),
  stopDeletion: ofTeam([403, 403, 403, 409]),
  listWeatherFiles: weatherReaders,
  uploadWeatherFile: uploadersOnly,
  getWeatherFile: weatherReaders,
  getOriginal: changersOnly,
  previewDerivedYear: changersOnly,
  // The engineer saves the change first: to the lead the same change of the same year stands already.
  deriveWeatherYear: ofTeam([403, 403, 200, 409]),
  acceptWeatherFile: changersOnly,
  withdrawWeatherFile: changersOnly,
  actOnWeatherFiles: changersOnly,
  retryWeatherFile: uploadersInVain,
  // The file is accepted, and stands as it was read.
  answerWeatherFile: ofTeam([403, 403, 409, 409]),
  getWeatherFileLines: changersOnly,
  getWeatherYearColumns: weatherReaders,
  setLicence: changersOnly,
  listStations: weatherReaders,
  getStation: weatherReaders,
  moveStation: changersOnly,
  // Merging a station into itself is refused.
  mergeStations: ofTeam([403, 403, 409, 409]),
  setRuleOff: changersOnly,
  setRuleOn: changersOnly,
  listWeatherBatches: weatherReaders,
  getWeatherBatch: weatherReaders,
  startWeatherBatch: uploadersOnly,
  changeWeatherBatch: uploadersOnly,
  uploadWeatherFiles: uploadersOnly,
  uploadWeatherArchive: uploadersOnly,
  retryWeatherArchive: uploadersInVain,
  watchTeam: weatherReaders,
  findPlaces: resultsReaders,
  getMap: resultsReaders,
  getSurface: resultsReaders,
  judgeSurface: resultsReaders,
  getEstimate: resultsReaders,
  getDepressionMap: resultsReaders,
  getStationPlace: resultsReaders,
  getSitePlace: resultsReaders,
  listRunHours: resultsReaders,
  getDesignPoints: resultsReaders,
  rankPlaces: resultsReaders,
  getRun: resultsReaders,
  judgeRange: resultsReaders,
  findWhatWouldPass: resultsReaders,
  getRunHours: resultsReaders,
  exportRunHours: plannersAndResults,
  rescore: resultsReaders,
  listPresets: resultsReaders,
  listBriefs: resultsReaders,
  makeBrief: plannersToo,
  listBriefVersions: resultsReaders,
  getBriefVersion: resultsReaders,
  compareBriefVersions: resultsReaders,
  saveBriefVersion: plannersToo,
  previewBrief: resultsReaders,
  listSites: resultsReaders,
  getSite: resultsReaders,
  makeSite: plannersToo,
  // The planner changes the revision that all of them saw, so that the others come second.
  changeSite: ofTeam([403, 200, 409, 409]),
  moveSite: ofTeam([403, 409, 409, 409]),
  removeSites: plannersToo,
  setSiteDuty: plannersToo,
  getGround: resultsReaders,
  startSiteImport: plannersToo,
  addSiteImportRows: plannersToo,
  checkSiteImport: plannersToo,
  // The planner finishes it first, and undoes it first.
  finishSiteImport: ofTeam([403, 200, 409, 409]),
  listSiteImports: resultsReaders,
  undoSiteImport: ofTeam([403, 200, 409, 409]),
  exportSites: plannersAndResults,
  listTokens: leadOnly,
  makeToken: leadOnly,
  revokeToken: leadOnly,
  // About no team: every person who is signed in.
  getMethodChecks: signedInOnly,
  getApiDescription: anyone(200),
  listAuditEvents: leadOnly,
  exportAuditCsv: leadOnly,
  exportAuditJson: leadOnly,
};

const PASSWORD = 'a long pass phrase for tests';
const WITHOUT_SESSION_OF_ITS_OWN: readonly EndpointName[] = ['signIn', 'signOut'];

let road: Road;
let server: http.Server;
let origin: string;
let ids: Readonly<Record<string, string>>;
let archive: Buffer;
/** A file of each caller's own, so that one caller's act does not stand in the way of the next. */
const ownFiles = new Map<Caller, string>();
const cookies = new Map<Caller, string>();
const tokens = new Map<Caller, string>();

const emailOf = (caller: Caller): string => `${caller.replace(' ', '-')}@example.org`;
const [station] = demoStations.filter(({ year, faults }) => year === null && faults.length === 0);
if (station === undefined) throw new Error('the demo has a clean typical year');
const epw = demoWeatherFile(station);
const rowOfSite = { name: 'Of a table', latitude: '10', longitude: '20' };
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
  if (caller in scopesOf) return { Authorization: `Bearer ${tokens.get(caller) ?? ''}` };
  if (caller === 'unknown token') return { ...base, Authorization: 'Bearer muslin_0123456789' };
  if (caller === 'guest') return { ...base, Cookie: 'muslin_share=unknown' };
  if (caller === 'signed out') return base;
  // These two end the session that they come with.
  const own = name !== undefined && WITHOUT_SESSION_OF_ITS_OWN.includes(name);
  return { ...base, Cookie: own ? await signIn(caller) : (cookies.get(caller) ?? '') };
}

const WRONG = { password: 'not the password of anybody' };
const bodiesOfPeople: Partial<Record<EndpointName, (caller: Caller) => unknown>> = {
  renamePerson: (caller) => ({ name: caller }),
  changePassword: () => ({ ...WRONG, newPassword: 'another long pass phrase' }),
  askEmailChange: () => ({ ...WRONG, email: 'another@example.org' }),
  startTwoFactor: () => WRONG,
  endTwoFactor: () => WRONG,
  renewRecoveryCodes: () => WRONG,
  confirmTwoFactor: () => ({ code: '000000' }),
  setNoticesOff: () => ({ off: ['comment'] }),
  askReset: () => ({ email: 'nobody@example.org' }),
  resetPassword: () => ({ key: 'never-made', password: PASSWORD }),
  confirmEmail: () => ({ key: 'never-made' }),
  openInvitation: () => ({ key: 'never-made' }),
  acceptAsNewPerson: () => ({ key: 'never-made', name: 'Nobody', password: PASSWORD }),
  invite: (caller) => ({ email: `guest-of-${emailOf(caller)}`, role: 'viewer', lastDay: null }),
  changeMember: () => ({ role: 'viewer' }),
  makeTeam: (caller) => ({ name: `Team of ${caller}` }),
  renameTeam: () => ({ name: 'Ours' }),
  makeProgramme: (caller) => ({ name: `Programme of ${caller}` }),
  renameProgramme: () => ({ name: 'Ours' }),
  setProgrammeMembers: () => ({ restricted: false, memberIds: [] }),
  askDeletion: () => ({ name: 'Not ours', password: PASSWORD }),
};

function bodyOf(name: EndpointName, caller: Caller): FormData | string | null {
  const ofPeople = bodiesOfPeople[name]?.(caller);
  if (ofPeople !== undefined) return JSON.stringify(ofPeople);
  if (name === 'uploadWeatherFile') {
    const form = new FormData();
    form.append('file', epwOf(`uploaded by ${caller}`), `${caller}.epw`);
    return form;
  }
  if (name === 'uploadWeatherFiles') {
    const form = new FormData();
    form.append('file', epwOf(`one of several by ${caller}`), `${caller}.epw`);
    return form;
  }
  if (name === 'uploadWeatherArchive') {
    const form = new FormData();
    form.append('file', new Blob([new Uint8Array(archive)]), `${caller}.zip`);
    return form;
  }
  if (name === 'answerWeatherFile') return JSON.stringify({ keepSuspect: true });
  if (name === 'setLicence') return JSON.stringify({ licence: 'open', attribution: null });
  if (name === 'moveStation') {
    const place = { latitude: 10, longitude: 20, elevationM: 300, zone: 'Africa/Ndjamena' };
    return JSON.stringify({ name: 'Moved', ...place, reason: 'A test.' });
  }
  if (name === 'mergeStations') return JSON.stringify({ otherStationId: ids.stationId, reason: 'A test.' });
  if (name === 'setRuleOff') return JSON.stringify({ reason: 'A test.' });
  if (name === 'judgeRange' || name === 'findWhatWouldPass' || name === 'rankPlaces') return '{}';
  if (name === 'makeSite') return JSON.stringify({ name: `Site of ${caller}`, latitude: 10, longitude: 20 });
  if (name === 'changeSite') return JSON.stringify({ revision: 1, notes: `Seen by ${caller}.` });
  if (name === 'moveSite') return JSON.stringify({ revision: 1, latitude: 11, longitude: 20 });
  if (name === 'startSiteImport') return JSON.stringify({ name: `Table of ${caller}` });
  if (name === 'addSiteImportRows') return JSON.stringify({ rows: [{ line: 2, cells: rowOfSite }] });
  if (name === 'finishSiteImport') return JSON.stringify({ duplicates: 'keep' });
  if (name === 'removeSites') return JSON.stringify({ siteIds: [ids.teamId], reason: 'A test.' });
  if (name === 'setSiteDuty') return JSON.stringify({ owner: caller, dueOn: '2027-05-01', doneOn: null, note: '' });
  if (name === 'makeToken') return JSON.stringify({ name: 'A program', scopes: ['weather:read'], days: 1 });
  if (name === 'startWeatherBatch') return JSON.stringify({ name: `Batch of ${caller}` });
  if (name === 'changeWeatherBatch') return JSON.stringify({ state: 'running' });
  if (name === 'actOnWeatherFiles') {
    return JSON.stringify({ act: 'refuse', fileIds: [ids.fileId], reason: 'Not of use.' });
  }
  if (name === 'signIn') return JSON.stringify({ email: emailOf('viewer'), password: PASSWORD });
  if (name === 'previewDerivedYear' || name === 'deriveWeatherYear') return changeOf(name);
  if (name === 'withdrawWeatherFile') return JSON.stringify({ reason: 'Not needed.' });
  if (name === 'makeBrief') return JSON.stringify({ name: `Brief of ${caller}`, preset: 'office' });
  if (name === 'saveBriefVersion') return JSON.stringify({ basedOn: 1, body: officeBrief() });
  if (name === 'previewBrief') return JSON.stringify({ stationId: ids.stationId, body: officeBrief() });
  if (name === 'rescore' || name === 'judgeSurface') return JSON.stringify({ body: officeBrief() });
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

function queryOf(name: EndpointName): string {
  if (name === 'compareBriefVersions') return '?from=1&to=1';
  if (name === 'getDepressionMap') return '?atLeastK=5&months=6,7';
  if (name === 'findPlaces') return '?text=Korrel';
  if (name === 'getEstimate') return '?latitude=-24.5&longitude=25.5';
  if (name === 'getGround') return '?latitude=10&longitude=20';
  return name === 'getWeatherFileLines' ? '?from=1' : '';
}

/** Sends the request and looks at its status and id alone; an event stream is let go of at once. */
async function answerTo(
  name: EndpointName,
  { caller, values }: { caller: Caller; values: typeof ids },
): Promise<{ status: number; requestId: string }> {
  const endpoint: Endpoint = endpoints[name];
  const path = endpoint.path.replace(/:(\w+)/g, (_all, parameter: string) => values[parameter] ?? 'missing');
  expect(path).not.toContain('missing');
  const query = queryOf(name);
  const body = bodyOf(name, caller);
  const headers = await headersOf(caller, name);
  const ending = new AbortController();
  const response = await fetch(`${origin}${path}${query}`, {
    method: endpoint.method,
    headers: typeof body === 'string' ? { ...headers, 'Content-Type': 'application/json' } : headers,
    body,
    signal: ending.signal,
  });
  const { status } = response;
  expectSafe(endpoint, response);
  // A download that is cut off may be cut off before it is written down.
  if (endpoint.response.kind === 'file' && status === 200) await response.arrayBuffer();
  ending.abort();
  return { status, requestId: response.headers.get('x-request-id') ?? '' };
}

/** Nobody keeps an answer, guesses at its type or shows a download as a page, whoever is answered and whatever. */
function expectSafe(endpoint: Endpoint, { status, headers }: Response): void {
  expect(headers.get('cache-control')).toMatch(/^no-store\b/);
  expect(headers.get('x-content-type-options')).toBe('nosniff');
  expect(headers.get('content-security-policy')).toContain("default-src 'none'");
  expect(headers.get('x-request-id')).toMatch(/^[0-9a-f-]{36}$/);
  if (endpoint.response.kind !== 'file' || status !== 200) return;
  expect(headers.get('content-type')).toBe(endpoint.response.mediaType);
  if (endpoint.response.attachment) expect(headers.get('content-disposition')).toMatch(/^attachment; filename/);
}

/** Of these requests, those that have left something in the audit trail, and whether that names the token that was brought. */
async function audited(requestIds: Iterable<string>): Promise<ReadonlyMap<string, boolean>> {
  const { rows } = await road.db.raw<{ rows: { id: string; byToken: boolean }[] }>(
    `select request_id as id, bool_and(subject ->> 'tokenId' is not null) as "byToken"
     from audit_events where request_id = any(:ids) group by request_id`,
    { ids: [...requestIds] },
  );
  return new Map(rows.map(({ id, byToken }) => [id, byToken]));
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
  const spare = await makePerson(road.db, { email: 'spare@example.org', name: 'Spare', password: PASSWORD });
  await addMember(road.db, { teamId: ours.teamId, personId: spare, role: 'viewer' });
  const leaving = await teamOf('Leaving', people.get('lead') ?? '');
  for (const [caller, role] of members)
    await addMember(road.db, { teamId: leaving.teamId, personId: people.get(caller) ?? '', role });
  for (const caller of signedInCallers) cookies.set(caller, await signIn(caller));

  ids = { ...ours, foreignTeamId: foreign.teamId, foreignProgrammeId: foreign.programmeId };
  ids = { ...ids, leavingTeamId: leaving.teamId, personId: spare, sessionId: spare };
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
  const json = { ...headers, 'Content-Type': 'application/json' };
  const batch: { id: string } = await (
    await fetch(`${team}/weather-batches`, { method: 'POST', headers: json, body: JSON.stringify({ name: 'Ours' }) })
  ).json();
  const site: { id: string } = await (
    await fetch(`${team}/programmes/${ours.programmeId}/sites`, {
      method: 'POST',
      headers: json,
      body: JSON.stringify({ name: 'Ours', latitude: 10, longitude: 20 }),
    })
  ).json();
  const table: { id: string } = await (
    await fetch(`${team}/programmes/${ours.programmeId}/site-imports`, {
      method: 'POST',
      headers: json,
      body: JSON.stringify({ name: 'Ours' }),
    })
  ).json();
  archive = await zipBytes({ 'note.md': 'nothing to read' });
  const form = new FormData();
  form.append('file', new Blob([new Uint8Array(archive)]), 'first.zip');
  const sent: { archive: { id: string } } = await (
    await fetch(`${team}/weather-batches/${batch.id}/archives`, { method: 'POST', headers, body: form })
  ).json();
  const order = async (name: Caller, scopes: readonly string[]): Promise<string> => {
    const isForeign = name === 'foreign token';
    const lead = { ...(await headersOf(isForeign ? 'foreign lead' : 'lead')), 'Content-Type': 'application/json' };
    const body = JSON.stringify({ name, scopes, days: 1 });
    const teamUrl = isForeign ? `${origin}/api/teams/${foreign.teamId}` : team;
    const made: { token: string; made: { id: string } } = await (
      await fetch(`${teamUrl}/tokens`, { method: 'POST', headers: lead, body })
    ).json();
    tokens.set(name, made.token);
    return made.made.id;
  };
  const tokenIds = new Map<string, string>();
  for (const caller of callers) {
    const scopes = scopesOf[caller];
    if (scopes !== undefined) tokenIds.set(caller, await order(caller, scopes));
  }
  await road.db.raw(`update api_tokens set made_at = now() - interval '2 days', expires_at = now() where id = ?`, [
    tokenIds.get('expired token') ?? '',
  ]);
  await fetch(`${team}/tokens/${tokenIds.get('revoked token')}`, {
    method: 'DELETE',
    headers: await headersOf('lead'),
  });
  ids = { ...ids, tokenId: await order('unknown token', ['weather:read']) };
  const invited: { id: string } = await (
    await fetch(`${team}/invitations`, {
      method: 'POST',
      headers: { ...(await headersOf('lead')), 'Content-Type': 'application/json' },
      body: JSON.stringify({ email: 'invited@example.org', role: 'viewer', lastDay: null }),
    })
  ).json();
  ids = { ...ids, invitationId: invited.id };
  const over = await road.db.raw<{ rows: { id: string }[] }>(
    `insert into team_exports (team_id, state, asked_by, asked_at) values (?, 'over', ?, now()) returning id`,
    [ours.teamId, spare],
  );
  ids = { ...ids, exportId: over.rows[0]?.id ?? '' };
  ids = { ...ids, batchId: batch.id, archiveId: sent.archive.id };
  ids = { ...ids, placeKind: 'stations', placeId: stationId };
  ids = { ...ids, rule: 'step', siteId: site.id, duty: 'noise', importId: table.id };
  ids = { ...ids, fileId, stationId, runId: place.shown.runId, briefId: briefs.items[0]?.briefId ?? '', version: '1' };
  for (const caller of ['engineer', 'lead'] as const) ownFiles.set(caller, await uploadAndRead(`of ${caller}`));
});

afterAll(async () => {
  await new Promise((resolve) => server.close(resolve));
  await road.close();
});

/** An act, or a download: whatever changes something or lets something out. */
function leavesSomething(name: EndpointName): boolean {
  const { method, response }: Endpoint = endpoints[name];
  const takesAlong = response.kind === 'file' && response.attachment;
  return (method !== 'GET' || takesAlong) && !(name in writesNoEvent);
}

const names = Object.keys(endpoints).filter((name): name is EndpointName => name in endpoints);

describe('the matrix of rights', () => {
  test('has a row for every endpoint and a column for every caller', () => {
    expect(Object.keys(matrix).sort()).toEqual([...names].sort());
    for (const row of Object.values(matrix)) expect(row).toHaveLength(callers.length);
  });

  test.each(names)('%s answers every kind of caller as the table says', async (name) => {
    const found: Partial<Record<Caller, number>> = {};
    /** Requests that were done, and whether it was a program that sent them. */
    const done = new Map<string, boolean>();
    for (const caller of callers) {
      const own = ['acceptWeatherFile', 'withdrawWeatherFile'].includes(name) ? ownFiles.get(caller) : undefined;
      const team = name === 'leaveTeam' ? { teamId: ids.leavingTeamId ?? '' } : {};
      const values = own === undefined ? { ...ids, ...team } : { ...ids, fileId: own };
      const { status, requestId } = await answerTo(name, { caller, values });
      found[caller] = status;
      if (status < 300) done.set(requestId, caller in scopesOf);
    }
    const expected = Object.fromEntries(callers.map((caller, index) => [caller, matrix[name][index]]));
    expect(found).toEqual(expected);
    if (!leavesSomething(name)) expect(await audited(done.keys())).toEqual(new Map());
    else if (!doneElsewhere.includes(name)) {
      expect(done.size).toBeGreaterThan(0);
      const left = await audited(done.keys());
      // Of its own making and taking back, a token is what the act is about, not who did it.
      if (name === 'makeToken' || name === 'revokeToken')
        expect([...left.keys()].sort()).toEqual([...done.keys()].sort());
      else expect(left).toEqual(done);
    }
  });

  test('every reason for which an act leaves nothing in the audit trail is that of an act', () => {
    for (const [name, reason] of Object.entries(writesNoEvent)) {
      expect(names.filter((each) => each === name && endpoints[each].method !== 'GET')).toHaveLength(1);
      expect(reason).toMatch(/^[A-Z].+\.$/);
    }
  });

  const withInnerIds = names.filter((name) => /:teamId\/.*:\w+/.test(endpoints[name].path));

  test('the endpoints with ids inside a team were found', () => {
    expect(withInnerIds.length).toBeGreaterThanOrEqual(7);
  });

  test.each(withInnerIds)('%s knows nothing of another team’s ids under one’s own team', async (name) => {
    const values = { ...ids, teamId: ids.foreignTeamId ?? '' };
    expect((await answerTo(name, { caller: 'foreign lead', values })).status).toBe(404);
  });

  test('nothing was logged as a fault of ours', () => {
    expect(road.log.errors).toEqual([]);
  });
});
