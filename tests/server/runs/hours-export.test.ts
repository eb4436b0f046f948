/** The hours of a run as a table, over HTTP: every class is found again from the rows, by an oracle apart from the engine. */
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { officeBrief } from '../../../server/features/briefs/presets.ts';
import type { Place } from '../../../src/contract/place.ts';
import { hourClasses } from '../../../src/engine/hour-classes/hour-class.ts';
import { checkRow } from '../../engine/run/oracle/check-row.ts';
import { csvRecords, csvRows } from '../../support/csv-rows.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { samples } from '../../support/sample-size.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

/** A prime, so that every hour of the day is looked at. */
const EVERY_ROWS = samples(31, 1);

let road: Road;
let team: RoadTeam;
let engineer: Member;
let desk: TeamDesk;
let place: Place;
let runId: string;
let fileId: string;
let text: string;
let headers: Readonly<Record<string, string>>;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  engineer = await team.join('engineer');
  desk = deskOf(team, engineer);
  await road.startWorker();
  const named = demoEpw(0).text.replace(/^LOCATION,[^,]*/, 'LOCATION,=1+cmd() | "Ñandú"');
  const { file } = await desk.upload('+formula.epw', named);
  await desk.readToTheEnd(file.id);
  const { stationId } = (await desk.accept(file.id)).body;
  await desk.mapWithoutPending();
  place = await desk.place(stationId);
  runId = place.shown?.runId ?? '';
  fileId = file.id;
  await setLicence('attribution', 'The mast of Ñandú').expect(200);
  ({ text, headers } = await exported(await team.join('planner')).expect(200));
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

const exported = (who: Member, id = runId) => who.agent.get(`/api/teams/${team.teamId}/runs/${id}/hours.csv`).buffer();

const setLicence = (licence: string, attribution: string | null) =>
  engineer.agent.put(`/api/teams/${team.teamId}/weather-files/${fileId}/licence`).send({ licence, attribution });

describe('the hours of a run as a table', () => {
  it('hold the run’s classes, each of which is found again from its row', async () => {
    expect(headers['content-type']).toBe('text/csv; charset=utf-8');
    const rows = csvRecords(text);
    const codes = await desk.runHours(runId);
    expect(rows.map((row) => row.class)).toEqual([...codes].map((code) => hourClasses[code]));
    for (const [hourClass, hours] of Object.entries(place.shown?.ledger.classes ?? {}))
      expect(rows.filter((row) => row.class === hourClass).length, hourClass).toBe(hours);

    const found = rows.filter((_row, at) => at % EVERY_ROWS === 0).map((row) => checkRow(officeBrief(), row));
    expect(found.filter((answer) => answer !== 'same' && answer !== 'near a threshold')).toEqual([]);
    expect(found.filter((answer) => answer === 'near a threshold').length).toBeLessThanOrEqual(found.length / 100);
    expect(found.length).toBeGreaterThanOrEqual(Math.floor(8760 / EVERY_ROWS));
  });

  it('are named after station, year and brief version, and say above the columns what they are', () => {
    const disposition = decodeURIComponent(headers['content-disposition'] ?? '');
    expect(disposition).toMatch(/^attachment; .*1-cmd-ñandú.*-typical-.*-v1\.csv/);
    const about = new Map(
      csvRows(text).flatMap(([name = '', value = '']) => (name.startsWith('# ') ? [[name, value]] : [])),
    );
    expect(about.get('# weather year')).toBe('typical year');
    expect(about.get('# licence of the weather')).toBe('attribution; The mast of Ñandú');
    expect(about.get('# brief')).toBe(`${place.brief.name}, version 1`);
    expect(about.get('# requirement')).toBe(place.brief.sentence);
    expect(about.get('# method version')).toBe(place.brief.methodVersion);
  });

  it('hold no cell of text that a spreadsheet would take for a formula', () => {
    expect(text).toContain(`\n# file,'+formula.epw\n`);
    const formulas = csvRows(text)
      .flat()
      .filter((cell) => /^\s*[=+\-@]/.test(cell) && !/^-\d+(\.\d+)?$/.test(cell));
    expect(formulas).toEqual([]);
  });

  it('go along with nobody but the engineers while the licence of the weather allows no redistribution', async () => {
    const planner = await team.join('planner');
    for (const [licence, says] of [
      ['unknown', 'is not known'],
      ['no redistribution', 'allows no redistribution'],
    ] as const) {
      await setLicence(licence, null).expect(200);
      const { body } = await planner.agent.get(`/api/teams/${team.teamId}/runs/${runId}/hours.csv`).expect(403);
      expect(body.message).toContain(says);
      await exported(engineer).expect(200);
    }
    await setLicence('open', null).expect(200);
    await exported(planner).expect(200);
  });

  it('are for those who may export', async () => {
    await exported(await team.join('viewer')).expect(403);
    await exported(engineer, team.teamId).expect(404);
  });

  it('of another method are left to the release that made them', async () => {
    const { ownerDb } = road.database;
    await ownerDb.raw(`update runs set method_version = 'earlier' where id = ?`, [runId]);
    const { body } = await exported(engineer).expect(409);
    expect(body).toMatchObject({ code: 'wrong_state', message: expect.stringContaining('method earlier') });
    await ownerDb.raw('update runs set method_version = ? where id = ?', [place.brief.methodVersion, runId]);
  });
});
