/** Acts that the matrix of rights cannot do: each leaves an event in the audit trail, under the id of its request. */
import { generateSync } from 'otplib';
import type { Response } from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { makeSetUpKey } from '../../../server/features/accounts/set-up-key.ts';
import { officeBrief } from '../../../server/features/briefs/presets.ts';
import { originalKey } from '../../../server/storage/original-store.ts';
import { doneElsewhere } from '../../support/audited-endpoints.ts';
import { lastKeyTo } from '../../support/mail-box.ts';
import { type Agent, openWeb, PASSWORD, type WebForTests } from '../../support/open-web.ts';

let web: WebForTests;
let lead: Agent;
let personId: string;
let teamId: string;
let team: string;
let programme: string;
/** Done before anybody else is there: afterwards its link is worth nothing. */
let setUp: Response;
const EMAIL = 'lead@example.org';
const NEW_PASSWORD = 'four words of a new kind';
const JUDGED_AS_SCHOOL = { ...officeBrief(), dTroomK: 4 };

beforeAll(async () => {
  web = await openWeb();
  const key = (await makeSetUpKey(web.deps.db))?.split('/').at(-1) ?? '';
  const first = { teamName: 'First', name: 'First', email: 'first@example.org', password: PASSWORD };
  setUp = await web
    .browser()
    .post('/api/set-up')
    .send({ key, ...first });
  personId = await web.makePerson(EMAIL);
  const made = await web.makeTeam(personId);
  teamId = made.teamId;
  team = `/api/teams/${teamId}`;
  programme = `${team}/programmes/${made.programmeId}`;
  lead = await web.signIn(EMAIL);
});
afterAll(() => web.close());

async function idOf(table: string, row: Readonly<Record<string, unknown>>): Promise<string> {
  const [made] = await web.database.db(table).insert(row, ['id']);
  return made.id;
}
const station = (name: string) => {
  const place = { latitude: -24, longitude: 25, elevation_m: 1000, utc_offset_min: 120, zone: 'Africa/Gaborone' };
  return idOf('stations', { team_id: teamId, name, ...place });
};
let files = 0;
function file(changes: Readonly<Record<string, unknown>>): Promise<string> {
  files += 1;
  const fingerprint = String(files).padStart(64, '0');
  const stored = { name: 'year.epw', bytes: 1, fingerprint, storage_key: fingerprint, uploaded_by: personId };
  return idOf('weather_files', { team_id: teamId, ...stored, ...changes });
}
const batch = () => idOf('weather_batches', { team_id: teamId, name: 'Batch', made_by: personId });
const site = async (): Promise<string> =>
  (await lead.post(`${programme}/sites`).send({ name: 'Hall', latitude: -24, longitude: 25 }).expect(200)).body.id;
const keyTo = (email: string) => lastKeyTo(web.database, email);
const invited = async (email: string): Promise<string> =>
  (await lead.post(`${team}/invitations`).send({ email, role: 'viewer', lastDay: null }).expect(200)).body.id;
const teamName = async (): Promise<string> => (await web.database.db('teams').where({ id: teamId }).first('name')).name;
const reset = (email: string) => web.browser().post('/api/password-reset/request').send({ email });

let secret = '';
/** In this order: a code of the authenticator is wanted only while two-factor sign-in is on, and a new password comes last. */
const acts: Readonly<Record<string, () => Promise<Response>>> = {
  setUp: async () => setUp,
  askEmailChange: async () => lead.post('/api/account/email').send({ password: PASSWORD, email: 'moved@example.org' }),
  confirmEmail: async () =>
    web
      .browser()
      .post('/api/email-confirmation')
      .send({ key: await keyTo('moved@example.org') }),
  confirmTwoFactor: async () => {
    ({ secret } = (await lead.post('/api/account/two-factor').send({ password: PASSWORD }).expect(200)).body);
    return lead.put('/api/account/two-factor').send({ code: generateSync({ secret }) });
  },
  renewRecoveryCodes: async () => lead.post('/api/account/recovery-codes').send({ password: PASSWORD }),
  endTwoFactor: async () => lead.post('/api/account/two-factor/removal').send({ password: PASSWORD }),
  endSession: async () => {
    await web.signIn('moved@example.org');
    const { items } = (await lead.get('/api/account/sessions').expect(200)).body;
    const other = items.find(({ current }: { current: boolean }) => !current);
    return lead.delete(`/api/account/sessions/${other.id}`);
  },
  acceptAsNewPerson: async () => {
    await invited('new@example.org');
    const given = { key: await keyTo('new@example.org'), name: 'New', password: PASSWORD };
    return web.browser().post('/api/invitations/acceptance').send(given);
  },
  acceptOwnInvitation: async () => {
    await web.makePerson('known@example.org');
    const id = await invited('known@example.org');
    return (await web.signIn('known@example.org')).post(`/api/account/invitations/${id}/acceptance`);
  },
  mergeStations: async () => {
    const [one, other] = [await station('One'), await station('Other')];
    return lead.post(`${team}/stations/${one}/merge`).send({ otherStationId: other, reason: 'The same mast.' });
  },
  retryWeatherFile: async () => {
    const id = await file({ status: 'reading', step: 'reading', failure: 'The disk was full.' });
    return lead.post(`${team}/weather-files/${id}/retry`);
  },
  retryWeatherArchive: async () => {
    const batchId = await batch();
    const stored = { name: 'a.zip', bytes: 1, fingerprint: 'a'.repeat(64), storage_key: 'a', failure: 'Stopped.' };
    const id = await idOf('weather_archives', { team_id: teamId, batch_id: batchId, status: 'opening', ...stored });
    return lead.post(`${team}/weather-archives/${id}/retry`);
  },
  answerWeatherFile: async () =>
    lead.put(`${team}/weather-files/${await file({ status: 'asks' })}/answers`).send({ keepSuspect: true }),
  actOnWeatherFiles: async () => {
    const fileIds = [await file({ status: 'review' })];
    return lead.post(`${team}/weather-files/acts`).send({ act: 'refuse', fileIds, reason: 'Not of use.' });
  },
  changeWeatherBatch: async () => lead.put(`${team}/weather-batches/${await batch()}/state`).send({ state: 'paused' }),
  moveSite: async () =>
    lead.put(`${programme}/sites/${await site()}/position`).send({ revision: 1, latitude: -25, longitude: 25 }),
  removeSites: async () => lead.post(`${programme}/sites/removal`).send({ siteIds: [await site()], reason: 'Sold.' }),
  saveBriefVersion: async () => {
    const { items } = (await lead.get(`${programme}/briefs`).expect(200)).body;
    return lead.post(`${programme}/briefs/${items[0].briefId}/versions`).send({ basedOn: 1, body: JUDGED_AS_SCHOOL });
  },
  getExport: async () => {
    const key = originalKey('b'.repeat(64));
    await web.deps.storage.put(key, Buffer.from('an archive'));
    const at = new Date();
    const times = { asked_at: at, ready_at: at, expires_at: new Date(at.getTime() + 60_000) };
    const id = await idOf('team_exports', {
      ...{ team_id: teamId, state: 'ready', asked_by: personId, bytes: 10, storage_key: key },
      ...times,
    });
    return lead.get(`${team}/exports/${id}/archive`);
  },
  askDeletion: async () => lead.post(`${team}/deletion`).send({ name: await teamName(), password: PASSWORD }),
  stopDeletion: async () => lead.delete(`${team}/deletion`),
  changePassword: async () => lead.put('/api/account/password').send({ password: PASSWORD, newPassword: NEW_PASSWORD }),
  askReset: async () => reset('known@example.org'),
  resetPassword: async () => {
    const key = await keyTo('known@example.org');
    return web.browser().post('/api/password-reset').send({ key, password: NEW_PASSWORD });
  },
};

test('these are the acts that the matrix leaves to this file', () => {
  expect(Object.keys(acts).sort()).toEqual([...doneElsewhere].sort());
});

test.each(Object.entries(acts))('%s leaves an event in the audit trail', async (_name, act) => {
  const { status, body, headers } = await act();
  expect({ status, body: status < 300 ? {} : body }).toEqual({ status: expect.toBeOneOf([200, 204]), body: {} });
  const { rows } = await web.database.db.raw<{ rows: { act: string; hash: string | null }[] }>(
    'select act, hash from audit_events where request_id = ?',
    [headers['x-request-id'] ?? ''],
  );
  expect(rows.length).toBeGreaterThan(0);
  for (const { hash } of rows) expect(hash).toMatch(/^[0-9a-f]{64}$/);
});
