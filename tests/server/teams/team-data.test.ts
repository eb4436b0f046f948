import { readdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import papaparse from 'papaparse';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { endTeam, queueDueDeletions } from '../../../server/features/teams/end-team.ts';
import { makeExport } from '../../../server/features/teams/make-export.ts';
import { removeExpiredExports } from '../../../server/features/teams/remove-expired-exports.ts';
import { readZip } from '../../../server/storage/read-zip.ts';
import { DELETION_DAYS, EXPORT_DAYS } from '../../../src/contract/team-data.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { eventually } from '../../support/eventually.ts';
import { mailsTo } from '../../support/mail-box.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, toBuffer } from '../../support/team-desk.ts';

const PASSWORD = 'a long pass phrase for tests';
const DAY_MS = 24 * 3_600_000;

let road: Road;
let team: RoadTeam;
let lead: Member;
let base: string;
/** Another team, which has brought the same file. */
let other: RoadTeam;

const jobDeps = () => ({ db: road.db, storage: road.storage, publicUrl: 'https://muslin.example' });
const originals = () =>
  readdirSync(road.originalsDir, { recursive: true, encoding: 'utf8' }).filter((name) => /[0-9a-f]{64}$/.test(name));
async function rowsOf(sql: string, values: readonly string[] = [team.teamId]) {
  const { rows } = await road.database.ownerDb.raw<{ rows: Record<string, unknown>[] }>(sql, [...values]);
  return rows;
}
const acts = async () =>
  (await rowsOf('select act from audit_events where team_id = ? order by id')).map(({ act }) => act);

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  ({ lead } = team);
  other = await road.makeTeam('Southern offices');
  base = `/api/teams/${team.teamId}`;
  const engineer = await team.join('engineer');
  const desk = deskOf(team, engineer);
  const worker = await road.startWorker();
  const epw = demoEpw(0);
  const { file } = await desk.upload(epw.name, epw.text);
  const { file: second } = await desk.upload('unlicensed.epw', demoEpw(1).text);
  await deskOf(other, other.lead).upload(epw.name, epw.text);
  await desk.readToTheEnd(file.id);
  await desk.readToTheEnd(second.id);
  await desk.accept(file.id);
  await engineer.agent
    .put(`${base}/weather-files/${file.id}/licence`)
    .send({ licence: 'open', attribution: null })
    .expect(200);
  const sites = `${base}/programmes/${team.programmeId}/sites`;
  await lead.agent.post(sites).send({ name: '=1+1, "the hall"', latitude: -25, longitude: 25 }).expect(200);
  await lead.agent.post(`${base}/weather-batches`).send({ name: 'Spring' }).expect(200);
  await lead.agent
    .post(`${base}/tokens`)
    .send({ name: 'nightly', scopes: ['weather:read'], days: 1 })
    .expect(200);
  await lead.agent.post(`${base}/invitations`).send({ email: 'a@example.org', role: 'viewer', lastDay: null });
  await desk.mapWithoutPending();
  await road.countRows();
  await worker.close();
}, 60_000);
afterAll(async () => {
  expect(road.log.errors).toEqual([]);
  await road.close();
});

describe('an export of a team', () => {
  let exportId: string;
  const at = new Date();

  it('is made once however often it is asked for, and cannot be had before it is ready', async () => {
    const first = await lead.agent.post(`${base}/exports`).expect(200);
    expect(first.body).toMatchObject({ state: 'making', share: null, bytes: null });
    exportId = first.body.id;
    expect((await lead.agent.post(`${base}/exports`).expect(200)).body.id).toBe(exportId);
    await lead.agent.get(`${base}/exports/${exportId}/archive`).expect(409);
  });

  it('holds every table, the licensed originals, and says what it leaves out', async () => {
    await makeExport(jobDeps(), { teamId: team.teamId, exportId }, at);
    const { items } = (await lead.agent.get(`${base}/exports`).expect(200)).body;
    expect(items).toMatchObject([{ id: exportId, state: 'ready', share: 1 }]);
    expect(Date.parse(items[0].expiresAt) - at.getTime()).toBe(EXPORT_DAYS * DAY_MS);
    const answer = await lead.agent.get(`${base}/exports/${exportId}/archive`).buffer().parse(toBuffer).expect(200);
    expect(answer.headers['content-disposition']).toMatch(
      /^attachment; filename="?muslin-export-\d{4}-\d\d-\d\d\.zip"?$/,
    );
    expect(answer.body).toHaveLength(items[0].bytes);
    const file = path.join(road.originalsDir, 'downloaded.zip');
    writeFileSync(file, answer.body);
    const archive = await readZip(file);
    const table = async (entry: string) =>
      papaparse.parse<Record<string, string>>((await archive.text(entry)).slice(1), {
        header: true,
        skipEmptyLines: true,
      }).data;
    expect(await table('people.csv')).toMatchObject([
      { Role: 'engineer' },
      { Role: 'lead', 'E-mail': expect.stringContaining('@') },
    ]);
    const [site] = await table('sites.csv');
    // Guarded, so that no spreadsheet computes it.
    expect(site?.Name).toBe(`'=1+1, "the hall"`);
    const runs = await table('runs.csv');
    const stored = await rowsOf('select score, demand_hours, result_hash from runs where team_id = ?');
    expect(runs).toHaveLength(stored.length);
    expect(new Set(runs.map((run) => run['SHA-256 of the result']))).toEqual(
      new Set(stored.map(({ result_hash }) => result_hash)),
    );
    const results = (await archive.text('runs.jsonl')).trim().split('\n');
    expect(results.map((line) => JSON.parse(line).Result.score).sort()).toEqual(
      stored.map(({ score }) => score).sort(),
    );
    const brief = JSON.parse((await archive.text('briefs.jsonl')).split('\n')[0] ?? '');
    expect(brief).toMatchObject({ programme: 'Offices of the north', version: 1, body: expect.any(Object) });
    expect((await table('audit-events.csv')).map((event) => event.Act)).toContain('team export asked for');
    expect(await table('weather-files.csv')).toHaveLength(2);
    const [licensed] = archive.entries.filter((entry) => entry.startsWith('originals/'));
    expect(archive.entries.filter((entry) => entry.startsWith('originals/'))).toHaveLength(1);
    expect(await archive.text(licensed ?? '')).toBe(demoEpw(0).text);
    expect(await archive.text('README.txt')).toMatch(/- unlicensed\.epw \([0-9a-f]{64}\): its licence is “unknown”/);
    archive.close();
  });

  it('is told to whoever asked, written down, and gone when its time is over', async () => {
    const notices = (await lead.agent.get('/api/account/notices').expect(200)).body;
    expect(notices.items).toMatchObject([{ kind: 'export ready', path: `/teams/${team.teamId}/team/data` }]);
    expect(await acts()).toEqual(
      expect.arrayContaining(['team export asked for', 'team export made', 'team export downloaded']),
    );
    const before = originals().length;
    await removeExpiredExports(jobDeps(), new Date(at.getTime() + EXPORT_DAYS * DAY_MS - 1));
    expect(originals()).toHaveLength(before);
    await removeExpiredExports(jobDeps(), new Date(at.getTime() + EXPORT_DAYS * DAY_MS));
    expect(originals()).toHaveLength(before - 1);
    await lead.agent.get(`${base}/exports/${exportId}/archive`).expect(410);
    expect((await lead.agent.get(`${base}/exports`)).body.items).toMatchObject([{ state: 'over' }]);
  });
});

describe('the deletion of a team', () => {
  const ask = (more: Record<string, unknown> = {}) =>
    lead.agent.post(`${base}/deletion`).send({ name: 'Northern offices', password: PASSWORD, ...more });

  it('wants the password of the lead and the name of the team', async () => {
    expect((await ask({ password: 'another' }).expect(400)).body.problems).toMatchObject([{ path: 'body.password' }]);
    expect((await ask({ name: 'northern offices' }).expect(400)).body.problems).toMatchObject([{ path: 'body.name' }]);
    expect((await lead.agent.get(`${base}/deletion`).expect(200)).body).toEqual({ waiting: null });
  });

  it('waits, is told to every lead and shown to every member, and any lead stops it', async () => {
    const { body } = await ask().expect(200);
    expect(Date.parse(body.endsAt) - Date.parse(body.askedAt)).toBe(DELETION_DAYS * DAY_MS);
    await ask().expect(409);
    const second = await team.join('lead');
    const viewer = await team.join('viewer');
    const { memberships } = (await viewer.agent.get('/api/session').expect(200)).body;
    expect(memberships).toMatchObject([{ deletedAt: body.endsAt }]);
    await queueDueDeletions(road.db);
    await endTeam(jobDeps(), team, new Date());
    await second.agent.get(`${base}/members`).expect(200);
    await second.agent.delete(`${base}/deletion`).expect(204);
    await second.agent.delete(`${base}/deletion`).expect(409);
    expect((await lead.agent.get(`${base}/deletion`)).body).toEqual({ waiting: null });
    const [{ email = '' } = {}] = await rowsOf('select email from people where id = ?', [lead.personId]);
    const subjects = (await mailsTo(road.database, String(email))).map(({ subject }) => subject);
    expect(subjects).toEqual(
      expect.arrayContaining([
        expect.stringMatching(/^The team “Northern offices” will be deleted on /),
        'The team “Northern offices” stays: its deletion was stopped',
      ]),
    );
  });

  it('cannot be forced by the application before the time is over', async () => {
    await ask().expect(200);
    await expect(road.db.raw('select end_team(?)', [team.teamId])).rejects.toThrow('is not over');
    await expect(road.db.raw('select end_team(?)', [other.teamId])).rejects.toThrow('is not over');
    await expect(road.db.raw('delete from runs')).rejects.toThrow('permission denied');
  });

  it('ends with no row and no original of the team, but for the trail that says so', async () => {
    const audited = (await acts()).length;
    await rowsOf(
      `update team_deletions set asked_at = asked_at - interval '14 days', ends_at = ends_at - interval '14 days'
       where team_id = ? and stopped_at is null returning id`,
    );
    await queueDueDeletions(road.db);
    const worker = await road.startWorker();
    await eventually('the end of the team', async () => (await acts()).includes('team deleted'));
    await road.countRows();
    await worker.close();
    const tables = await rowsOf(
      `select table_name as name from information_schema.columns
       where table_schema = 'public' and column_name = 'team_id' and table_name not like 'audit\\_%' and table_name <> 'team_deletions'`,
      [],
    );
    expect(tables.length).toBeGreaterThan(20);
    for (const { name } of tables)
      expect(await rowsOf(`select count(*)::integer as left from ${name} where team_id = ?`), String(name)).toEqual([
        { left: 0 },
      ]);
    expect(await acts()).toHaveLength(audited + 1);
    await lead.agent.get(`${base}/members`).expect(404);
    expect((await lead.agent.get('/api/session').expect(200)).body.memberships).toEqual([]);
    // The file that the other team has brought as well is the one that stays.
    const [kept] = await rowsOf('select storage_key from weather_files where team_id = ?', [other.teamId]);
    expect(originals()).toEqual([kept?.storage_key]);
    await other.lead.agent.get(`/api/teams/${other.teamId}/weather-files`).expect(200);
  });
});
