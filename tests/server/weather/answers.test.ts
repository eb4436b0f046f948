/** What a file asks, what a person answers, and what becomes of it. */
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import type { TableMapping } from '../../../src/engine/weather-files/table/table-mapping.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let engineer: Member;
let desk: TeamDesk;
let files: string;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  engineer = await team.join('engineer');
  desk = deskOf(team, engineer);
  files = `/api/teams/${team.teamId}/weather-files`;
  await road.startWorker();
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

const answer = (fileId: string, answers: object) => engineer.agent.put(`${files}/${fileId}/answers`).send(answers);
const epw = demoEpw(0);
const HEADER_LINES = 8;

/** The hours of an invented year as a plain table, each with a note that makes its bytes its own. */
function plainTable(note: string, years: readonly number[] = [2023]): string {
  const rows = epw.text.split('\r\n').slice(HEADER_LINES).filter(Boolean);
  const body = years.flatMap((year) =>
    rows.map((row) => {
      const [, month = '', day = '', hour = '', , , dry, dew, , pressure] = row.split(',');
      const time = new Date(Date.UTC(year, Number(month) - 1, Number(day), Number(hour))).toISOString().slice(0, 16);
      return `${time.replace('T', ' ')},${dry},${dew},${Number(pressure) / 100},${note}`;
    }),
  );
  return ['time,air temp,dew,press,note', ...body].join('\n');
}

const place = {
  name: 'Table of the mast',
  latitude: -26.6,
  longitude: 20.6,
  elevationM: epw.station.elevationM,
  utcOffsetH: 2,
};

describe('a plain table', () => {
  let mapping: TableMapping;

  it('asks once for its columns, with a guess and the rows under it', async () => {
    const { file } = await desk.upload('mast.csv', plainTable('a'));
    const record = await desk.readToTheEnd(file.id);
    expect(record.file).toMatchObject({ status: 'asks', format: 'table', kind: null });
    expect(record.table?.columns.map(({ name }) => name)).toEqual(['time', 'air temp', 'dew', 'press', 'note']);
    expect(record.table?.sample).toHaveLength(10);
    if (record.table?.mapping == null) throw new Error('no guess');
    mapping = record.table.mapping;
    expect(mapping).toMatchObject({ dryBulb: { column: 'air temp', unit: 'C' }, dewPoint: { column: 'dew' } });

    const told = await answer(file.id, {
      mapping: { ...mapping, time: { ...mapping.time, scale: 'standard' } },
      place,
    }).expect(200);
    expect(told.body).toMatchObject({ status: 'reading', step: 'received' });
    const read = await desk.readToTheEnd(file.id);
    expect(read.file).toMatchObject({ status: 'review', kind: 'actual', year: 2023, station: place });
    expect(read.facts?.hours).toBe(8760);
    expect(read.answers.place).toEqual(place);
    expect(read.table).toBeNull();
  });

  it('of the same shape is read by the answer that was given, without asking again for its columns', async () => {
    const { file } = await desk.upload('mast-again.csv', plainTable('b'));
    const record = await desk.readToTheEnd(file.id);
    // It still does not say where it stands.
    expect(record.asks.map(({ what }) => what)).toContain('place-missing');
    expect(record.facts?.hours).toBe(8760);
    await answer(file.id, { place }).expect(200);
    const read = await desk.readToTheEnd(file.id);
    expect(read.file.status).toBe('review');
    // Kept beside the file: what is said of the shape later does not touch it.
    expect(read.answers.mapping).toMatchObject({ dryBulb: mapping.dryBulb, time: { scale: 'standard' } });
  });

  it('is read otherwise when its answer is corrected, and so are the next ones of its shape', async () => {
    const inCelsius: TableMapping = { ...mapping, dryBulb: { column: 'air', unit: 'C' } };
    const named = (note: string) => plainTable(note).replace('air temp', 'air');
    const { file } = await desk.upload('mast-f.csv', named('f'));
    await desk.readToTheEnd(file.id);
    await answer(file.id, { mapping: { ...inCelsius, dryBulb: { column: 'air', unit: 'F' } }, place }).expect(200);
    await desk.readToTheEnd(file.id);
    await answer(file.id, { mapping: inCelsius, place }).expect(200);
    const corrected = await desk.readToTheEnd(file.id);
    expect(corrected.file.status).toBe('review');

    const { file: next } = await desk.upload('mast-g.csv', named('g'));
    const read = await desk.readToTheEnd(next.id);
    expect(read.asks.map(({ what }) => what)).not.toContain('unit-guess');
    expect(read.facts?.meanDryBulbC).toBe(corrected.facts?.meanDryBulbC);
  });

  it('that holds several years becomes a file for each, all with the same original', async () => {
    const { file } = await desk.upload('two-years.csv', plainTable('c', [2021, 2022]));
    const record = await desk.readToTheEnd(file.id);
    expect(record.file.part).toBe('2021');
    expect(record.parts.map(({ part }) => part)).toEqual(['2022']);
    const other = await desk.record(record.parts[0]?.fileId ?? '');
    expect(other.file).toMatchObject({ part: '2022', fingerprint: record.file.fingerprint, year: 2022 });
    // Each is answered by itself.
    await answer(other.file.id, { place }).expect(200);
    expect((await desk.readToTheEnd(other.file.id)).file).toMatchObject({ status: 'review', year: 2022, part: '2022' });
    expect((await desk.record(file.id)).file.status).toBe('asks');
    const again = await desk.upload('renamed.csv', plainTable('c', [2021, 2022]));
    expect(again).toMatchObject({ known: true, file: { id: file.id } });
  });

  it('is refused a mapping that names what is not there, each fault located', async () => {
    const { file } = await desk.upload('mast-3.csv', plainTable('d').replace('air temp', 'warmth'));
    await desk.readToTheEnd(file.id);
    const wrong = { ...mapping, dryBulb: { column: 'warmth', unit: 'R' }, years: 'leap' };
    const { body } = await answer(file.id, { mapping: wrong }).expect(400);
    expect(body.problems.map(({ path }: { path: string }) => path)).toEqual([
      'body.mapping.years',
      'body.mapping.dryBulb.unit',
    ]);
    await answer(file.id, { mapping: { ...mapping, dryBulb: { column: 'no such column', unit: 'C' } } }).expect(200);
    const record = await desk.readToTheEnd(file.id);
    expect(record.file.status).toBe('asks');
    expect(record.findings.map(({ message }) => message).join(' ')).toContain('no such column');
  });
});

describe('a file whose pressure does not fit its elevation', () => {
  const elevation = epw.station.elevationM.toFixed(1);
  const tooLow = epw.text.replace(`,${elevation}\r\n`, `,${(epw.station.elevationM - 600).toFixed(1)}\r\n`);

  it('is read anew with the elevation that a person gives, and accepted there', async () => {
    const { file } = await desk.upload('asks.epw', tooLow);
    expect((await desk.readToTheEnd(file.id)).asks.map(({ what }) => what)).toEqual(['pressure-elevation']);
    await answer(file.id, { place: { elevationM: epw.station.elevationM } }).expect(200);
    const record = await desk.readToTheEnd(file.id);
    expect(record.file).toMatchObject({ status: 'review', station: { elevationM: epw.station.elevationM } });
    const accepted = await desk.accept(file.id);
    expect(accepted.body.status).toBe('accepted');
    // From then on it stands as it was read.
    expect((await answer(file.id, { keepSuspect: true }).expect(409)).body.message).toContain(
      'accepted as it was read',
    );
  });

  it('takes no place outside the world', async () => {
    const { file } = await desk.upload('asks-2.epw', tooLow.replace('COMMENTS 1,', 'COMMENTS 1,Again. '));
    await desk.readToTheEnd(file.id);
    const { body } = await answer(file.id, {
      place: { latitude: 91, longitude: -181, elevationM: 9001, utcOffsetH: 15 },
    }).expect(400);
    expect(body.problems).toHaveLength(4);
  });

  it('shows the rows that a finding concerns, and the hours as packed columns', async () => {
    const { items } = (await engineer.agent.get(files).query({ status: 'accepted' }).expect(200)).body;
    const id = items[0].id;
    const lines = await engineer.agent.get(`${files}/${id}/lines`).query({ from: 9, count: 2 }).expect(200);
    const all = tooLow.split('\r\n');
    expect(lines.body.lines).toEqual([
      { line: 9, text: all[8], cut: false },
      { line: 10, text: all[9], cut: false },
    ]);
    expect(lines.body.total).toBe(HEADER_LINES + 8760);
    await (await team.join('viewer')).agent.get(`${files}/${id}/lines`).query({ from: 1 }).expect(403);
    const columns = await engineer.agent.get(`${files}/${id}/columns`).buffer().expect(200);
    expect(columns.body.length).toBe(7 * 8760);
  });
});

describe('the licence of a file', () => {
  it('is unknown until somebody says it, asks whom to name, and holds for every part of the upload', async () => {
    const { items } = (await engineer.agent.get(files).query({ text: 'two-years' }).expect(200)).body;
    expect(items.map(({ licence }: { licence: string }) => licence)).toEqual(['unknown', 'unknown']);
    const set = (body: object) => engineer.agent.put(`${files}/${items[0].id}/licence`).send(body);
    expect((await set({ licence: 'attribution', attribution: ' ' }).expect(400)).body.problems[0].path).toBe(
      'body.attribution',
    );
    await set({ licence: 'attribution', attribution: 'The mast of the invented valley' }).expect(200);
    const after = (await engineer.agent.get(files).query({ text: 'two-years' }).expect(200)).body.items;
    for (const file of after)
      expect(file).toMatchObject({ licence: 'attribution', attribution: 'The mast of the invented valley' });
  });
});
