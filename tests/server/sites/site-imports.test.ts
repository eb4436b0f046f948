import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { inTransaction } from '../../../server/db/in-transaction.ts';
import { upsertImportRows } from '../../../server/features/sites/site-import-store.ts';
import type { SiteImportCheck } from '../../../src/contract/site-imports.ts';
import type { SitePage } from '../../../src/contract/sites.ts';
import { guessSiteColumns } from '../../../src/engine/sites/site-columns.ts';
import { readTableFile } from '../../../src/features/sites/read-table-file.ts';
import { readTable } from '../../../src/features/sites/table-draft.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { insertStationsWithYears } from '../../support/stations-with-years.ts';

let road: Road;
let team: RoadTeam;
let planner: Member;
let programme: string;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  planner = await team.join('planner');
  programme = `/api/teams/${team.teamId}/programmes/${team.programmeId}`;
  const stations = [
    { name: 'Plain', latitude: 45, longitude: 10, elevationM: 60 },
    { name: 'East', latitude: 45, longitude: 10.5, elevationM: 70 },
  ];
  const { ownerDb } = road.database;
  await insertStationsWithYears(ownerDb, { teamId: team.teamId, personId: planner.personId, stations });
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

type Cells = Readonly<Record<string, string>>;

async function send(name: string, rows: readonly Cells[]): Promise<string> {
  const { body } = await planner.agent.post(`${programme}/site-imports`).send({ name }).expect(200);
  const lines = rows.map((cells, index) => ({ line: index + 2, cells }));
  await planner.agent.put(`${programme}/site-imports/${body.id}/rows`).send({ rows: lines }).expect(200);
  return `${programme}/site-imports/${body.id}`;
}
async function check(path: string): Promise<SiteImportCheck> {
  return (await planner.agent.post(`${path}/check`).expect(200)).body;
}
async function list(query: Record<string, string | number> = {}): Promise<SitePage> {
  return (
    await planner.agent
      .get(`${programme}/sites`)
      .query({ limit: 200, ...query })
      .expect(200)
  ).body;
}
async function exported(): Promise<string> {
  const { text } = await planner.agent
    .get(`${programme}/sites.csv`)
    .expect(200)
    .expect('Content-Type', /text\/csv/);
  return text;
}

describe('an import of sites', () => {
  test('tells every fault by line and column, also of rows that a browser would have held back, and stores nothing', async () => {
    const path = await send('Faulty.csv', [
      { name: 'Good', latitude: '45', longitude: '10' },
      { name: '', latitude: '90.1', longitude: '10' },
      { name: 'No such station', latitude: '45', longitude: '10', station: 'Nowhere' },
      { name: 'No reason', latitude: '45', longitude: '10', station: 'East' },
    ]);
    const { faults, rows } = await check(path);
    expect(rows).toBe(4);
    expect(faults.told.map(({ line, column }) => [line, column])).toEqual([
      [3, 'name'],
      [3, 'latitude'],
      [4, 'station'],
      [5, 'reason'],
    ]);
    const refused = await planner.agent.post(`${path}/finish`).send({ duplicates: 'keep' }).expect(400);
    expect(refused.body.problems[1]).toMatchObject({ line: 3, path: 'latitude' });
    expect((await list()).total).toBe(0);
    // The line put right, and sent again.
    const rest = [
      { line: 3, cells: { name: 'Mended', latitude: '45.3', longitude: '10' } },
      { line: 4, cells: { name: 'Default', latitude: '45.4', longitude: '10' } },
      {
        line: 5,
        cells: { name: 'Reasoned', latitude: '45.5', longitude: '10', station: 'east', reason: 'Same valley' },
      },
    ];
    await planner.agent.put(`${path}/rows`).send({ rows: rest }).expect(200);
    await planner.agent.post(`${path}/finish`).send({ duplicates: 'keep' }).expect(200);
    const { items } = await list();
    expect(items.map(({ letters, name }) => `${letters} ${name}`)).toEqual([
      'a Good',
      'b Mended',
      'c Default',
      'd Reasoned',
    ]);
    expect(items[3]?.station).toMatchObject({ name: 'East', chosen: true, reason: 'Same valley' });
    await planner.agent.post(`${path}/finish`).send({ duplicates: 'keep' }).expect(409);
  });

  test('finds duplicates in the table and among the sites, and leaves them out when told to', async () => {
    const path = await send('Again.csv', [
      { name: 'good', latitude: '50', longitude: '10' },
      { name: 'Beside', latitude: '45.30001', longitude: '10' },
      { name: 'New', latitude: '51', longitude: '10' },
      { name: 'New', latitude: '52', longitude: '10' },
    ]);
    expect((await check(path)).duplicates.told).toEqual([
      { line: 2, name: 'good', by: 'name', of: 'site a, Good' },
      { line: 3, name: 'Beside', by: 'place', of: 'site b, Mended' },
      { line: 5, name: 'New', by: 'name', of: 'line 4' },
    ]);
    const { body } = await planner.agent.post(`${path}/finish`).send({ duplicates: 'skip' }).expect(200);
    expect(body).toMatchObject({ name: 'Again.csv', status: 'done', sites: 1, changed: 0 });
  });

  test('doubts sites at sea and columns that seem swapped', async () => {
    const atlantic = [
      { name: 'West of Africa', latitude: '-30', longitude: '-20' },
      { name: 'Further north', latitude: '-25.7', longitude: '-10.1' },
    ];
    const atSea = await check(await send('Sea.csv', atlantic));
    expect(atSea.doubts.told.map(({ column }) => column)).toEqual(['latitude', 'latitude']);
    // Towns of Norway, written east before north: in the Arabian Sea.
    const norway = [
      ['Bergen', 60.39, 5.32],
      ['Oslo', 59.91, 10.75],
      ['Trondheim', 63.43, 10.4],
      ['Stavanger', 58.85, 5.73],
    ].map(([name, latitude, longitude]) => ({ name: `${name}`, latitude: `${longitude}`, longitude: `${latitude}` }));
    expect((await check(await send('Norway.csv', norway))).seemsSwapped).toBe(true);
    expect(atSea.seemsSwapped).toBe(false);
  });

  test('keeps formulas, emoji and names from right to left as text, and guards the table that leaves', async () => {
    const names = ['=cmd|calc', '@sum', '🏫 École "№5"', 'مدرسة النور', "'t Huis", 'a,b'];
    const path = await send(
      'Names.csv',
      names.map((name, at) => ({ name, latitude: `${40 + at}`, longitude: '9' })),
    );
    await planner.agent.post(`${path}/finish`).send({ duplicates: 'keep' }).expect(200);
    const before = await list();
    expect(before.items.map(({ name }) => name)).toEqual(expect.arrayContaining(names));
    const text = await exported();
    expect(text.startsWith('\uFEFFLetters,Name,')).toBe(true);
    expect(text).toContain("'=cmd|calc,40,9,");
    expect(text).toContain('"🏫 École ""№5""",42,9,');
    expect(text).toContain('East,Same valley,East,');
  });

  test('makes of its own table the same sites again', async () => {
    await planner.agent
      .post(`${programme}/sites`)
      .send({ name: "'=quoted", latitude: -0.1, longitude: 33, notes: '-x' });
    const text = await exported();
    const table = await readTableFile(new File([text], 'sites.csv'));
    const { rows, faults } = readTable(table, guessSiteColumns(table.heads));
    expect(faults).toEqual([]);
    const { rows: made } = await road.database.ownerDb.raw<{ rows: { id: string }[] }>(
      `insert into programmes (team_id, name) values (?, 'Again') returning id`,
      [team.teamId],
    );
    const again = { ...team, programmeId: made[0]?.id ?? '' };
    const before = programme;
    programme = `/api/teams/${team.teamId}/programmes/${again.programmeId}`;
    const path = await send(
      'Same.csv',
      rows.map(({ cells }) => cells),
    );
    await planner.agent.post(`${path}/finish`).send({ duplicates: 'keep' }).expect(200);
    const [here, textHere] = [await list(), await exported()];
    programme = before;
    const facts = ({ items }: SitePage) =>
      items.map(({ name, latitude, longitude, elevationM, designLoadKw, station, flags }) => ({
        ...{ name, latitude, longitude, elevationM, designLoadKw, station, flags },
      }));
    expect(facts(here)).toEqual(facts(await list()));
    expect(textHere).toBe(text);
  });

  test('is undone whole, and only once', async () => {
    const path = await send('Wrong.csv', [{ name: 'Mistake', latitude: '46', longitude: '11' }]);
    await planner.agent.post(`${path}/finish`).send({ duplicates: 'keep' }).expect(200);
    const before = (await list()).total;
    expect((await planner.agent.post(`${path}/undo`).expect(200)).body).toMatchObject({ status: 'undone', sites: 1 });
    expect((await list()).total).toBe(before - 1);
    await planner.agent.post(`${path}/undo`).expect(409);
    const { body } = await planner.agent.get(`${programme}/site-imports`).expect(200);
    expect(body.items[0]).toMatchObject({ name: 'Wrong.csv', status: 'undone', undoneBy: expect.any(String) });
  });

  test('takes 50,000 rows in portions, tells 300 faults among them, and no row more', {
    timeout: 120_000,
  }, async () => {
    const rows = Array.from({ length: 50_000 }, (_none, index) => ({
      name: `School ${index}`,
      latitude: index % 166 === 7 && index < 49_800 ? '99' : String(44 + (index % 250) / 200),
      longitude: String(19 + Math.floor(index / 250) / 200),
    }));
    const faulty = rows.filter(({ latitude }) => latitude === '99').length;
    expect(faulty).toBe(300);
    const path = await send('Large.csv', rows.slice(0, 2000));
    // The other portions go past HTTP, to the same table by the same statement.
    const importId = path.slice(path.lastIndexOf('/') + 1);
    const others = rows.map((cells, index) => ({ line: index + 2, cells })).slice(2000);
    await inTransaction(road.db, (transaction) =>
      upsertImportRows(transaction, { teamId: team.teamId, programmeId: team.programmeId, importId, rows: others }),
    );
    const { faults, rows: count, duplicates } = await check(path);
    expect([count, faults.count, faults.told.length, duplicates.count]).toEqual([50_000, 300, 300, 0]);
    const more = [{ line: 60_000, cells: { name: 'One more', latitude: '1', longitude: '2' } }];
    await planner.agent.put(`${path}/rows`).send({ rows: more }).expect(413);
  });
});
