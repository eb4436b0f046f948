import { gzipSync } from 'node:zlib';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import type { WeatherBatch } from '../../../src/contract/weather-batches.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { eventually } from '../../support/eventually.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';
import { zipBytes } from '../../support/zip-bytes.ts';

let road: Road;
let team: RoadTeam;
let engineer: Member;
let desk: TeamDesk;
let base: string;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  engineer = await team.join('engineer');
  desk = deskOf(team, engineer);
  base = `/api/teams/${team.teamId}`;
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

const [first, second, third] = [demoEpw(0), demoEpw(1), demoEpw(2)];

async function begin(name: string): Promise<WeatherBatch> {
  return (await engineer.agent.post(`${base}/weather-batches`).send({ name }).expect(200)).body;
}
const batchNow = async (id: string): Promise<WeatherBatch> =>
  (await engineer.agent.get(`${base}/weather-batches/${id}`).expect(200)).body;
const ended = (id: string) =>
  eventually('the end of the batch', async () => {
    const batch = await batchNow(id);
    return batch.ended && batch;
  });
const change = (id: string, state: string) => engineer.agent.put(`${base}/weather-batches/${id}/state`).send({ state });
const sendArchive = (id: string, bytes: Buffer, name = 'mixed.zip') =>
  engineer.agent.post(`${base}/weather-batches/${id}/archives`).attach('file', bytes, name);
const filesOf = async (id: string) =>
  (await engineer.agent.get(`${base}/weather-files`).query({ batchId: id, sort: 'name', order: 'asc' }).expect(200))
    .body;

describe('a batch', () => {
  it('that is paused takes files in and reads none of them; going on, it reads them all', async () => {
    await road.startWorker();
    const batch = await begin('Two files');
    expect(batch).toMatchObject({ state: 'running', ended: true, files: { reading: 0 } });
    expect((await change(batch.id, 'paused').expect(200)).body.state).toBe('paused');
    const sent = await engineer.agent
      .post(`${base}/weather-batches/${batch.id}/files`)
      .attach('file', Buffer.from(first.text), first.name)
      .attach('file', gzipSync(second.text), `${second.name}.gz`)
      .expect(200);
    expect(sent.body.files.map(({ known }: { known: boolean }) => known)).toEqual([false, false]);
    expect(await batchNow(batch.id)).toMatchObject({ ended: false, files: { reading: 2, review: 0 } });

    await change(batch.id, 'running').expect(200);
    expect(await ended(batch.id)).toMatchObject({ files: { reading: 0, review: 2 }, stopped: 0 });
    const list = await filesOf(batch.id);
    expect(list).toMatchObject({ total: 2, counts: { review: 2, reading: 0 }, formats: ['EPW'] });
    expect(list.items.map(({ format }: { format: string }) => format)).toEqual(['EPW', 'EPW']);
  });

  it('that is cancelled withdraws what has not been read and takes nothing in any more', async () => {
    const batch = await begin('Cancelled');
    await change(batch.id, 'paused').expect(200);
    await engineer.agent
      .post(`${base}/weather-files`)
      .query({ batchId: batch.id })
      .attach('file', Buffer.from(third.text), third.name)
      .expect(200);
    await sendArchive(batch.id, await zipBytes({ 'x.epw': 'LOCATION' })).expect(200);
    const cancelled = await change(batch.id, 'cancelled').expect(200);
    expect(cancelled.body).toMatchObject({ state: 'cancelled', ended: true, files: { withdrawn: 1, reading: 0 } });
    expect(cancelled.body.archives).toMatchObject([{ status: 'cancelled' }]);
    expect((await change(batch.id, 'running').expect(409)).body.message).toContain('was cancelled');
    const late = await engineer.agent
      .post(`${base}/weather-files`)
      .query({ batchId: batch.id })
      .attach('file', Buffer.from('LOCATION,late'), 'late.epw');
    expect(late.status).toBe(409);
    await sendArchive(batch.id, await zipBytes({ 'y.epw': 'LOCATION' })).expect(409);
  });

  it('belongs to one team alone', async () => {
    const batch = await begin('Ours');
    const other = await (await road.makeTeam('Southern offices')).join('engineer');
    await other.agent.get(`${base}/weather-batches/${batch.id}`).expect(404);
    const theirs = await road.makeTeam('Eastern offices');
    const stranger = await theirs.join('engineer');
    const path = `/api/teams/${theirs.teamId}`;
    await stranger.agent.get(`${path}/weather-batches/${batch.id}`).expect(404);
    const upload = stranger.agent.post(`${path}/weather-files`).query({ batchId: batch.id });
    await upload.attach('file', Buffer.from('LOCATION,x'), 'x.epw').expect(404);
  });
});

describe('an archive', () => {
  it('becomes weather files of its batch, knows those that are there, and says what it left out', async () => {
    const batch = await begin('mixed.zip');
    const bytes = await zipBytes({
      'north/known.epw': first.text,
      'north/new.epw': third.text,
      'north/new.ddy': 'no hours',
      'readme.txt': 'about the files',
      'broken.epw': 'LOCATION,only',
      '__MACOSX/._new.epw': 'x',
    });
    const { body } = await sendArchive(batch.id, bytes).expect(200);
    expect(body.archive).toMatchObject({ name: 'mixed.zip', bytes: bytes.length });
    const done = await ended(batch.id);
    expect(done.archives).toMatchObject([{ status: 'opened', members: 6, membersOpened: 2, problem: null }]);
    expect(done.archives[0]?.leftOut.map(({ path }) => path).sort()).toEqual([
      '__MACOSX/._new.epw',
      'north/known.epw',
      'north/new.ddy',
      'readme.txt',
    ]);
    const known = done.archives[0]?.leftOut.find(({ path }) => path === 'north/known.epw');
    expect(known?.why).toBe(`These are the same bytes as “${first.name}”, which is here already.`);
    // The file that was there before stays with the batch that brought it.
    const list = await filesOf(batch.id);
    expect(list.items.map(({ name, status }: { name: string; status: string }) => [name, status])).toEqual([
      ['broken.epw', 'refused'],
      ['new.epw', 'review'],
    ]);
    const { items } = (await engineer.agent.get(`${base}/weather-batches`).query({ limit: 1 }).expect(200)).body;
    expect(items).toEqual([done]);
  });

  it('that is damaged is refused with a reason, and nothing of it is stored', async () => {
    const batch = await begin('damaged');
    const whole = await zipBytes({ 'a.epw': first.text });
    await sendArchive(batch.id, whole.subarray(0, whole.length - 40)).expect(200);
    const done = await ended(batch.id);
    expect(done.archives).toMatchObject([
      { status: 'refused', problem: expect.stringContaining('not a whole zip archive') },
    ]);
    expect((await filesOf(batch.id)).total).toBe(0);
  });

  it('is told from a plain file by its content, both ways', async () => {
    const batch = await begin('confused');
    const zip = await zipBytes({ 'a.epw': 'LOCATION' });
    const plain = await engineer.agent.post(`${base}/weather-files`).attach('file', zip, 'a.epw').expect(415);
    expect(plain.body.message).toContain('is a zip archive');
    const archive = await sendArchive(batch.id, Buffer.from(first.text), 'a.zip').expect(415);
    expect(archive.body.message).toContain('is not a zip archive');
    expect(await road.waitingUploads()).toEqual([]);
  });
});

describe('acts on many files', () => {
  it('accept what can be accepted and say of each other file why not', async () => {
    const { items } = (await engineer.agent.get(`${base}/weather-files`).expect(200)).body;
    const ids = items.map(({ id }: { id: string }) => id);
    const answer = await engineer.agent
      .post(`${base}/weather-files/acts`)
      .send({ act: 'accept', fileIds: ids })
      .expect(200);
    expect(answer.body.done).toHaveLength(3);
    const problems = new Map(
      answer.body.problems.map((each: { name: string; message: string }) => [each.name, each.message]),
    );
    expect(problems.get('broken.epw')).toContain('was refused');
    expect(problems.get(third.name)).toContain('withdrawn');
    expect(answer.body.done.length + answer.body.problems.length).toBe(ids.length);
  });

  it('supersede an accepted file by another of its station, and only by that', async () => {
    const better = first.text.replace('COMMENTS 1,', 'COMMENTS 1,A better copy. ');
    const { file } = await desk.upload('better.epw', better);
    await desk.readToTheEnd(file.id);
    await desk.accept(file.id);
    const { items } = (await engineer.agent.get(`${base}/weather-files`).query({ status: 'accepted' }).expect(200))
      .body;
    const idOf = (name: string): string => items.find((each: { name: string }) => each.name === name)?.id;
    const supersede = (fileIds: string[]) =>
      engineer.agent
        .post(`${base}/weather-files/acts`)
        .send({ act: 'supersede', fileIds, byFileId: file.id })
        .expect(200);
    const wrong = await supersede([idOf('new.epw'), file.id]);
    expect(wrong.body.done).toEqual([]);
    expect(wrong.body.problems.map(({ message }: { message: string }) => message)).toEqual([
      expect.stringContaining('another station'),
      'A file cannot supersede itself.',
    ]);
    expect((await supersede([idOf(first.name)])).body.done).toEqual([idOf(first.name)]);
    expect((await desk.record(idOf(first.name))).file.status).toBe('superseded');
    expect((await supersede([idOf(first.name)])).body.problems[0].message).toContain('must be accepted');
  });

  it('ask for a reason and at least one file, each fault located', async () => {
    const send = async (body: object) =>
      (await engineer.agent.post(`${base}/weather-files/acts`).send(body).expect(400)).body.problems;
    expect(await send({ act: 'withdraw', fileIds: [], reason: ' ' })).toEqual([
      { path: 'body.fileIds', message: 'Choose a file.' },
      { path: 'body.reason', message: 'Say why.' },
    ]);
    expect((await send({ act: 'erase', fileIds: [] }))[0].path).toBe('body.act');
  });
});

describe('the library', () => {
  const names = async (query: Record<string, string | number>): Promise<string[]> =>
    (await engineer.agent.get(`${base}/weather-files`).query(query).expect(200)).body.items.map(
      ({ name }: { name: string }) => name,
    );

  it('is narrowed by status, text and kind, and sorted by name, station and completeness', async () => {
    expect(await names({ status: 'refused' })).toEqual(['broken.epw']);
    expect(await names({ text: 'BETTER' })).toEqual(['better.epw']);
    expect(await names({ text: '100%_' })).toEqual([]);
    expect(await names({ kind: 'actual' })).toEqual([]);
    const byName = await names({ sort: 'name', order: 'asc' });
    expect(byName).toEqual(byName.toSorted((a, b) => (a.toLowerCase() < b.toLowerCase() ? -1 : 1)));
    const byStation = await names({ sort: 'station', order: 'asc', status: 'accepted' });
    expect(byStation.toSorted()).toEqual((await names({ status: 'accepted' })).toSorted());
    expect(await names({ sort: 'complete', order: 'desc' })).toContain('broken.epw');
    expect(await names({ status: 'stopped' })).toEqual([]);
  });
});
