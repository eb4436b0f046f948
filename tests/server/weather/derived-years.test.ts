import { createHash } from 'node:crypto';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { officeBrief } from '../../../server/features/briefs/presets.ts';
import { readPackedYear } from '../../../server/features/weather/packed-year-read-model.ts';
import type { DerivedPreview } from '../../../src/contract/climate.ts';
import type { WeatherFile } from '../../../src/contract/weather.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { eventually } from '../../support/eventually.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk, toBuffer } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let engineer: Member;
let desk: TeamDesk;
/** Accepted typical years: one that is derived from, one that only waits for review. */
let parentId: string;
let waitingId: string;
let stationId: string;

const epw = demoEpw(0);
const everyMonth = (shiftK: number, ratioChangePct = 0) =>
  Array.from({ length: 12 }, () => ({ shiftK, maxShiftK: shiftK, minShiftK: shiftK, ratioChangePct }));
/** An example, no published scenario. */
const warmer = { humidityRule: 'ratio-kept', monthly: everyMonth(2) };

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  engineer = await team.join('engineer');
  desk = deskOf(team, engineer);
  await road.startWorker();
  const [parent, waiting] = [await desk.upload(epw.name, epw.text), await desk.upload('other.epw', demoEpw(1).text)];
  [parentId, waitingId] = [parent.file.id, waiting.file.id];
  for (const id of [parentId, waitingId]) await desk.readToTheEnd(id);
  stationId = (await desk.accept(parentId)).body.stationId;
  await desk.mapWithoutPending();
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

const filePath = (fileId: string) => `/api/teams/${team.teamId}/weather-files/${fileId}`;
const programmePath = () => `/api/teams/${team.teamId}/programmes/${team.programmeId}`;
const preview = (fileId: string, change: object) =>
  engineer.agent.post(`${filePath(fileId)}/derived-preview`).send(change);
const derive = (fileId: string, change: object) =>
  engineer.agent.post(`${filePath(fileId)}/derived-years`).send(change);

async function saved(name: string, change: object): Promise<WeatherFile> {
  const { body } = await derive(parentId, { name, ...change }).expect(200);
  return body;
}

/** The place once every derived year of the station is judged. */
const placeWith = (count: number) =>
  eventually('the derived years', async () => {
    const place = await desk.place(stationId);
    return place.derived.length === count && place;
  });

describe('a change of climate', () => {
  it('is previewed with months and depression hours before and after, and stores nothing', async () => {
    const before = await road.countRows();
    const { body }: { body: DerivedPreview } = await preview(parentId, warmer).expect(200);
    expect(body.words).toBe('dry bulb +2.0 K in every month, days not stretched, humidity ratio kept');
    expect(body.cappedHours).toBe(0);
    const { facts } = await desk.record(parentId);
    const { difference } = body;
    expect(difference.meanDryBulbC.before).toBe(facts?.meanDryBulbC);
    expect(difference.meanDryBulbC.after - difference.meanDryBulbC.before).toBeCloseTo(2, 6);
    expect(difference.months).toHaveLength(12);
    for (const { before: from, after: to } of difference.months) {
      expect((to?.meanC ?? 0) - (from?.meanC ?? 0)).toBeCloseTo(2, 6);
      expect((to?.meanMaxC ?? 0) - (from?.meanMaxC ?? 0)).toBeCloseTo(2, 6);
      // With the humidity ratio kept the wet bulb rises, but by less than the air.
      const riseK = (to?.meanWetBulbC ?? 0) - (from?.meanWetBulbC ?? 0);
      expect(riseK).toBeGreaterThan(0);
      expect(riseK).toBeLessThan(2);
    }
    const counts = new Map(facts?.depressionHours.map(({ atLeastK, hours }) => [atLeastK, hours]));
    for (const row of difference.depressionHours) {
      expect(row.before).toBe(counts.get(row.atLeastK));
      expect(row.after).toBeGreaterThanOrEqual(row.before);
    }
    expect(await road.countRows()).toEqual(before);
  });

  it('counts the hours whose humidity is held at saturation', async () => {
    const colder = await preview(parentId, { humidityRule: 'ratio-kept', monthly: everyMonth(-6) }).expect(200);
    expect(colder.body.cappedHours).toBeGreaterThan(100);
    const damper = await preview(parentId, { humidityRule: 'ratio-scaled', monthly: everyMonth(0, 60) }).expect(200);
    expect(damper.body.cappedHours).toBeGreaterThan(100);
    const same = await preview(parentId, { humidityRule: 'rh-kept', monthly: everyMonth(-6) }).expect(200);
    expect(same.body.cappedHours).toBe(0);
  });

  it('is the same whether it is typed or comes as a table, and a table tells every fault at its place', async () => {
    const typed = await preview(parentId, { ...warmer, monthly: everyMonth(1.5) }).expect(200);
    const lines = Array.from({ length: 12 }, (_none, month) => `${month + 1};1,5`).join('\n');
    const table = `month;shift_K\n${lines}\n`;
    const uploaded = await preview(parentId, { humidityRule: 'ratio-kept', table }).expect(200);
    expect(uploaded.body).toEqual(typed.body);

    const faulty = table.replace('3;1,5', '3;warm').replace('5;1,5', '5;99');
    const refused = await preview(parentId, { humidityRule: 'ratio-kept', table: faulty }).expect(400);
    expect(refused.body.problems).toMatchObject([
      { path: 'body.table', line: 4, column: 2, message: '“warm” is no number.' },
      { path: 'body.table', line: 6, column: 2, message: expect.stringContaining('-20 to 20 K') },
    ]);
    const scaled = await preview(parentId, { humidityRule: 'ratio-scaled', table }).expect(400);
    expect(scaled.body.problems[0].message).toContain('ratio_change_pct');
  });

  it('tells every fault of typed values at its path', async () => {
    const monthly = everyMonth(1).map((each, month) => {
      if (month === 1) return { ...each, shiftK: 21 };
      return month === 6 ? { ...each, minShiftK: -26 } : each;
    });
    const outside = await preview(parentId, { ...warmer, monthly }).expect(400);
    expect(outside.body.problems.map(({ path }: { path: string }) => path)).toEqual([
      'body.monthly.1.shiftK',
      'body.monthly.6.minShiftK',
    ]);
    const turned = everyMonth(0).map((each, month) =>
      month === 3 ? { ...each, maxShiftK: -25, minShiftK: 25 } : each,
    );
    const none = await preview(parentId, { ...warmer, monthly: turned }).expect(400);
    expect(none.body.problems).toEqual([
      { path: 'body.monthly.3', message: 'the swing of its days would vanish or turn over.' },
    ]);
    for (const change of [{ humidityRule: 'ratio-kept' }, { ...warmer, table: '' }])
      expect((await preview(parentId, change).expect(400)).body.problems[0].path).toBe('body.monthly');
    const unnamed = await derive(parentId, { ...warmer, name: ' ', monthly: everyMonth(1).slice(1) }).expect(400);
    const paths = unnamed.body.problems.map(({ path }: { path: string }) => path);
    expect(paths.toSorted()).toEqual(['body.monthly', 'body.name']);
  });

  it('is made of accepted years alone', async () => {
    const waiting = await preview(waitingId, warmer).expect(409);
    expect(waiting.body.message).toContain('not accepted yet');
    await preview(team.teamId, warmer).expect(404);
  });
});

describe('a derived year', () => {
  let file: WeatherFile;

  it('is saved with its parent, its change and its rule, as the very year that was previewed', async () => {
    const { body: shown } = await preview(parentId, warmer).expect(200);
    const { score: scoreBefore } = (await desk.place(stationId)).shown ?? {};
    file = await saved('Two kelvin warmer', warmer);
    expect(file).toMatchObject({
      name: 'Two kelvin warmer',
      status: 'accepted',
      format: 'derived',
      kind: 'derived',
      year: null,
      stationId,
      parent: { fileId: parentId, name: epw.name, kind: 'typical', year: null, status: 'accepted' },
    });
    const record = await desk.record(file.id);
    expect(record.derivation).toEqual({
      humidityRule: 'ratio-kept',
      monthly: warmer.monthly,
      cappedHours: shown.cappedHours,
      difference: shown.difference,
    });
    expect(record.facts?.meanDryBulbC).toBe(shown.difference.meanDryBulbC.after);
    const parent = await desk.record(parentId);
    expect(parent.children).toEqual([{ fileId: file.id, name: 'Two kelvin warmer', status: 'accepted' }]);
    expect([parent.derivation, parent.file.parent]).toEqual([null, null]);

    const { rows } = await road.db.raw<{ rows: { id: string; hash: string }[] }>(
      `select weather_years.id, weather_years.content_hash as hash from weather_years
       where weather_years.weather_file_id in (?, ?) order by weather_years.kind desc`,
      [parentId, file.id],
    );
    const [parentYear, derivedYear] = rows;
    expect(derivedYear?.hash).toBe(shown.contentHash);
    const read = (id = '') => readPackedYear(road.db, { teamId: team.teamId, weatherYearId: id });
    const [from, to] = [await read(parentYear?.id), await read(derivedYear?.id)];
    expect(to?.packed.dryBulb).toEqual(from?.packed.dryBulb.map((value) => (value === -32768 ? value : value + 200)));
    expect(to?.packed.humidityRatio).toEqual(from?.packed.humidityRatio);

    const place = await placeWith(1);
    expect(place.shown?.score).toBe(scoreBefore);
  });

  it('keeps what it was made of as its original, and says who made it in the audit trail', async () => {
    const { body: text, headers } = await engineer.agent
      .get(`${filePath(file.id)}/original`)
      .buffer()
      .parse(toBuffer)
      .expect(200);
    expect(headers['content-disposition']).toContain('Two kelvin warmer.json');
    expect(createHash('sha256').update(text).digest('hex')).toBe(file.fingerprint);
    const { fingerprint } = (await desk.record(parentId)).file;
    expect(JSON.parse(text.toString('utf8'))).toMatchObject({ humidityRule: 'ratio-kept', parent: { fingerprint } });
    const { rows } = await road.db.raw(
      `select audit_events.act, audit_events.person_id as "personId", audit_events.subject
       from audit_events where audit_events.subject ->> 'fileId' = ? order by audit_events.id`,
      [file.id],
    );
    expect(rows).toEqual([
      {
        act: 'weather year derived',
        personId: engineer.personId,
        subject: {
          fileId: file.id,
          name: 'Two kelvin warmer',
          fingerprint: file.fingerprint,
          parentFileId: parentId,
          change: 'dry bulb +2.0 K in every month, days not stretched, humidity ratio kept',
        },
      },
      {
        act: 'original downloaded',
        personId: engineer.personId,
        subject: { fileId: file.id, name: 'Two kelvin warmer', fingerprint: file.fingerprint },
      },
    ]);
    expect(await road.waitingUploads()).toEqual([]);
  });

  it('is judged and stands beside its parent, in no figure, no median and no choice of the place', async () => {
    const place = await placeWith(1);
    expect(place.years.map(({ kind }) => kind)).toEqual(['typical']);
    expect(place.shown?.runId).toBe(place.years[0]?.runId);
    expect(place.gradeColumns.find(({ column }) => column === 'kind')?.reason).not.toContain('derived');
    const [derived] = place.derived;
    expect(derived).toMatchObject({
      weatherFileId: file.id,
      name: 'Two kelvin warmer',
      words: 'dry bulb +2.0 K in every month, days not stretched, humidity ratio kept',
      parent: { weatherFileId: parentId, kind: 'typical', status: 'accepted' },
    });
    expect(derived?.parent.figures?.runId).toBe(place.shown?.runId);
    expect(derived?.parent.figures?.met).toBe(place.shown?.ledger.met);
    expect(derived?.figures.demand).toBeGreaterThan(derived?.parent.figures?.demand ?? 0);
    expect(await desk.runHours(derived?.figures.runId ?? '')).toHaveLength(8760);
    const [listed] = (await desk.map()).stations;
    expect(listed?.score).toBe(place.shown?.score);
    const path = `/api/teams/${team.teamId}/runs/${derived?.figures.runId}/hours.csv`;
    const table = await engineer.agent.get(path).buffer().expect(200);
    expect(table.headers['content-disposition']).toContain('-derived-two-kelvin-warmer-');
    expect(table.text).toContain(`# weather year,"derived from ${epw.name}: dry bulb +2.0 K in every month,`);
    const draft = { stationId, body: officeBrief() };
    const { body: effect } = await engineer.agent.post(`${programmePath()}/briefs/preview`).send(draft).expect(200);
    expect(effect.kind).toBe('typical');
  });

  it('is not made twice, nor of a derived year; the same effect is the same change', async () => {
    const before = await road.countRows();
    const unused = { ...warmer, monthly: everyMonth(2, 7) };
    const again = await derive(parentId, { ...unused, name: 'Again' }).expect(409);
    expect(again.body.message).toContain('“Two kelvin warmer”');
    const ofDerived = await derive(file.id, { ...warmer, name: 'Warmer still' }).expect(409);
    expect(ofDerived.body.message).toContain('derived itself');
    const both = await Promise.all(
      ['One', 'Other'].map((name) => derive(parentId, { ...warmer, humidityRule: 'rh-kept', name })),
    );
    expect(both.map(({ status }) => status).toSorted()).toEqual([200, 409]);
    await placeWith(2);
    const after = await road.countRows();
    expect(after['public.weather_years']).toBe((before['public.weather_years'] ?? 0) + 1);
    expect(after['public.derived_years']).toBe((before['public.derived_years'] ?? 0) + 1);
    const other = both.find(({ status }) => status === 200);
    expect((await desk.withdraw(other?.body.id)).body.status).toBe('withdrawn');
    await placeWith(1);
  });

  it('cannot be changed in the database by what serves requests', async () => {
    for (const statement of ['update derived_years set capped_hours = 1', 'delete from derived_years'])
      await expect(road.db.raw(statement)).rejects.toThrow('permission denied');
  });

  it('says so when its parent is withdrawn, and is then no score of the place', async () => {
    await desk.withdraw(parentId, 'The sensor stood in the sun.');
    const orphan = await desk.record(file.id);
    expect(orphan.file).toMatchObject({ status: 'accepted', parent: { fileId: parentId, status: 'withdrawn' } });
    const place = await desk.place(stationId);
    expect(place).toMatchObject({ shown: null, years: [] });
    expect(place.derived[0]?.parent).toMatchObject({ status: 'withdrawn', figures: null });
    // A draft of a brief is shown on a measured year or on none.
    const draft = { stationId, body: officeBrief() };
    await engineer.agent.post(`${programmePath()}/briefs/preview`).send(draft).expect(404);
    expect((await desk.map()).stations[0]).toMatchObject({
      score: null,
      scoreNote: expect.stringContaining('derived'),
    });
    const late = await derive(parentId, { ...warmer, monthly: everyMonth(3), name: 'Late' }).expect(409);
    expect(late.body.message).toContain('withdrawn');

    expect((await desk.withdraw(file.id, 'Its parent is gone.')).body.status).toBe('withdrawn');
    expect((await desk.map()).stations).toEqual([]);
  });
});
