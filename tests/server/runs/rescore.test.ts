import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { makeWebThreads } from '../../../server/app.ts';
import { officeBrief } from '../../../server/features/briefs/presets.ts';
import { makeColumnCache } from '../../../server/features/runs/column-cache.ts';
import { type RescoreThreads, rescore } from '../../../server/features/runs/rescore.ts';
import { bytesOfYear, listYearsToRescore } from '../../../server/features/runs/rescore-read-model.ts';
import { packedOver } from '../../../server/features/runs/shared-columns.ts';
import { makeSharedJudging } from '../../../server/features/runs/shared-judging.ts';
import { readPackedYear } from '../../../server/features/weather/packed-year-read-model.ts';
import type { WebThreads } from '../../../server/jobs/web-threads.ts';
import type { RescoreAnswer } from '../../../src/contract/rescore.ts';
import type { Brief } from '../../../src/engine/brief/brief.ts';
import { METHOD_VERSION } from '../../../src/engine/conventions.ts';
import { hourClasses } from '../../../src/engine/hour-classes/hour-class.ts';
import { judgeYear } from '../../../src/engine/run/judge-year.ts';
import type { Ledger } from '../../../src/engine/run/run-result.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { cloneStationYears } from '../../support/station-years.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let viewer: Member;
let desk: TeamDesk;
let threads: WebThreads;
const goesOn = new AbortController().signal;
const drierBrief: Brief = { ...officeBrief(), effDirect: 0.7, caps: { roomRhPct: 55 } };

async function uploadAndAccept(nth: number): Promise<string> {
  const { name, text } = demoEpw(nth);
  const { file } = await desk.upload(name, text);
  await desk.readToTheEnd(file.id);
  await desk.accept(file.id);
  await desk.mapWithoutPending();
  return file.id;
}

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  viewer = await team.join('viewer');
  desk = deskOf(team, await team.join('engineer'));
  threads = makeWebThreads();
  await road.startWorker();
  await uploadAndAccept(0);
  await uploadAndAccept(1);
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(async () => {
  await threads.close();
  await road.close();
});

/** A ledger as lists and the map tell it. */
function classHours(ledger: Ledger | undefined) {
  if (ledger === undefined) return null;
  const { classes, demand, met } = ledger;
  return { classes: hourClasses.map((hourClass) => classes[hourClass]), demand, met };
}

const pathOf = ({ teamId, programmeId }: { teamId: string; programmeId: string }) =>
  `/api/teams/${teamId}/programmes/${programmeId}/rescore`;

async function preview(body: object, query = ''): Promise<RescoreAnswer> {
  const answer = await viewer.agent
    .post(`${pathOf(team)}${query}`)
    .send(body)
    .expect(200);
  return answer.body;
}

describe('re-scoring by a draft brief', () => {
  it('gives, to the byte, what the saved runs of the same brief hold, and the scores of the map', async () => {
    const { rows } = await road.db.raw<{ rows: { body: Brief }[] }>('select body from brief_versions');
    const answer = await preview({ body: rows[0]?.body ?? {} }, '?hashes=yes');
    const runs = await road.db.raw<{ rows: { weatherYearId: string; resultHash: string }[] }>(
      `select weather_year_id as "weatherYearId", result_hash as "resultHash" from runs order by weather_year_id`,
    );
    expect(runs.rows).toHaveLength(2);
    const previewed = answer.judged.map(({ weatherYearId, resultHash }) => ({ weatherYearId, resultHash }));
    expect(previewed.toSorted((one, other) => (one.weatherYearId < other.weatherYearId ? -1 : 1))).toEqual(runs.rows);
    const { stations } = await desk.map();
    const onMap = stations.map(({ id, name, latitude, longitude, elevationM, ...figures }) => ({ id, figures }));
    expect(
      answer.stations.map(({ stationId: id, shownWeatherYearId, restsOn, ...figures }) => ({ id, figures })),
    ).toEqual(onMap);
    for (const { stationId, ledger } of answer.stations) {
      expect(ledger).toEqual(classHours((await desk.place(stationId)).shown?.ledger));
    }
    expect(answer.methodVersion).toBe(METHOD_VERSION);
  });

  it('judges a brief that nobody has saved, and stores nothing', async () => {
    const before = await road.countRows();
    const answer = await preview({ body: drierBrief });
    const years = await listYearsToRescore(road.db, team.teamId);
    expect(answer.judged.map(({ weatherYearId }) => weatherYearId)).toEqual(
      years.map(({ weatherYearId }) => weatherYearId),
    );
    for (const { weatherYearId, stationId, zone, elevationM, latitude, longitude } of years) {
      const year = await readPackedYear(road.db, { teamId: team.teamId, weatherYearId });
      if (year === null) throw new Error('the year is stored');
      const position = { latitude, longitude };
      const { ledger, score } = judgeYear({ year, brief: drierBrief, zone, heightM: elevationM, position });
      expect(answer.stations.find((each) => each.stationId === stationId)).toMatchObject({
        ledger: classHours(ledger),
        score,
        restsOn: [weatherYearId],
      });
    }
    expect(answer.judged.every(({ resultHash }) => resultHash === null)).toBe(true);
    expect(await road.countRows()).toEqual(before);
  });

  it('answers the stations that are named, and knows nothing of another team’s', async () => {
    const [first] = (await desk.map()).stations;
    const named = await preview({ body: drierBrief, stationIds: [first?.id] });
    expect(named.stations.map(({ stationId }) => stationId)).toEqual([first?.id]);

    const others = await road.makeTeam('Another team');
    const { agent } = others.lead;
    await agent.post(pathOf(team)).send({ body: drierBrief }).expect(404);
    await agent
      .post(pathOf({ ...others, programmeId: team.programmeId }))
      .send({ body: drierBrief })
      .expect(404);
    const { body } = await agent
      .post(pathOf(others))
      .send({ body: drierBrief, stationIds: [first?.id] })
      .expect(200);
    expect(body).toMatchObject({ stations: [], judged: [] });
  });

  it('says every fault of a draft at once, each at its path', async () => {
    const body = { ...officeBrief(), effDirect: 1.4, cycles: 1, caps: { roomRhPct: 'damp' } };
    const answer = await viewer.agent.post(pathOf(team)).send({ body }).expect(400);
    const paths = answer.body.problems.map(({ path }: { path: string }) => path);
    expect(paths.toSorted()).toEqual(['body.body.caps.roomRhPct', 'body.body.cycles', 'body.body.effDirect']);
  });

  it('sees a file that was accepted or withdrawn since', async () => {
    const fileId = await uploadAndAccept(2);
    expect((await preview({ body: drierBrief })).stations).toHaveLength(3);
    await desk.withdraw(fileId);
    const after = await preview({ body: drierBrief });
    expect(after.stations).toHaveLength(2);
    expect(after.judged).toHaveLength(2);
  });
});

describe('many station-years', () => {
  it('stop being judged as soon as the client has gone, and the next request is answered', async () => {
    await cloneStationYears(road.database.ownerDb, { teamId: team.teamId, stations: 60 });
    const gone = new AbortController();
    let taken = 0;
    const counting: RescoreThreads = {
      ...threads,
      rescore: (task, on) => {
        taken += 1;
        if (taken === 3) gone.abort(new Error('the client has gone'));
        return threads.rescore(task, on);
      },
    };
    const cache = makeColumnCache(road.db, { maxBytes: 100_000_000 });
    const parts = { db: road.db, cache, threads: counting, shared: makeSharedJudging() };
    const asked = {
      teamId: team.teamId,
      programmeId: team.programmeId,
      siteIds: [],
      brief: drierBrief,
      stationIds: null,
      withHashes: false,
    };
    await expect(rescore(parts, { ...asked, signal: gone.signal })).rejects.toThrow('the client has gone');
    expect(taken).toBe(3);
    const answer = await rescore({ ...parts, threads }, { ...asked, signal: goesOn });
    expect(answer.stations).toHaveLength(62);
    const named = new Map((await desk.map()).stations.map(({ id, name }) => [id, name]));
    const scoresOf = (cloned: boolean) => {
      const some = answer.stations.filter(({ stationId }) => named.get(stationId)?.startsWith('Clone ') === cloned);
      return new Set(some.map(({ score }) => score));
    };
    expect(scoresOf(true)).toEqual(scoresOf(false));
  });

  it('are judged in batches when they do not fit into memory together, with the same answer', async () => {
    const years = await listYearsToRescore(road.db, team.teamId);
    const small = years.slice(0, 7).reduce((sum, year) => sum + bytesOfYear(year), 0);
    const asked = {
      teamId: team.teamId,
      programmeId: team.programmeId,
      siteIds: [],
      brief: drierBrief,
      stationIds: null,
      withHashes: true,
      signal: goesOn,
    };
    const tight = makeColumnCache(road.db, { maxBytes: small });
    const inBatches = await rescore({ db: road.db, threads, cache: tight, shared: null }, asked);
    expect(tight.heldBytes()).toBeLessThanOrEqual(small);
    const atOnce = await rescore(
      { db: road.db, threads, cache: makeColumnCache(road.db, { maxBytes: 100_000_000 }), shared: null },
      asked,
    );
    expect(inBatches.stations).toEqual(atOnce.stations);
    expect(inBatches.judged).toEqual(atOnce.judged);
  });
});

describe('the columns in memory', () => {
  it('are those of the store, are loaded once, and anew when the content is another', async () => {
    const cache = makeColumnCache(road.db, { maxBytes: 100_000_000 });
    const years = (await listYearsToRescore(road.db, team.teamId)).slice(-2);
    const accepted = new Map(years.map(({ weatherYearId, contentHash }) => [weatherYearId, contentHash]));
    const asked = { teamId: team.teamId, programmeId: team.programmeId, siteIds: [], years, accepted, signal: goesOn };
    const first = await cache.take(asked);
    expect(first.size).toBe(2);
    for (const [weatherYearId, columns] of first) {
      const stored = await readPackedYear(road.db, { teamId: team.teamId, weatherYearId });
      expect(packedOver(columns)).toEqual(stored?.packed);
    }
    const [changed, kept] = years.map(({ weatherYearId }) => weatherYearId);
    const second = await cache.take(asked);
    expect(second.get(kept ?? '')).toBe(first.get(kept ?? ''));
    const third = await cache.take({ ...asked, accepted: new Map([...accepted, [changed ?? '', 'another content']]) });
    expect(third.get(kept ?? '')).toBe(first.get(kept ?? ''));
    expect(third.get(changed ?? '')).not.toBe(first.get(changed ?? ''));
    expect(cache.heldBytes()).toBe(2 * 8760 * 7);
  });

  it('stay within their bytes: the team that was used longest ago leaves first', async () => {
    const teams = [];
    for (const name of ['One', 'Two', 'Three']) {
      const made = await road.makeTeam(name);
      const theirs = deskOf(made, made.lead);
      const { name: fileName, text } = demoEpw(0);
      const { file } = await theirs.upload(fileName, text);
      await theirs.readToTheEnd(file.id);
      await theirs.accept(file.id);
      const years = await listYearsToRescore(road.db, made.teamId);
      const accepted = new Map(years.map(({ weatherYearId, contentHash }) => [weatherYearId, contentHash]));
      teams.push({ teamId: made.teamId, years, accepted, signal: goesOn });
    }
    const [one, two, three] = teams;
    if (one === undefined || two === undefined || three === undefined) throw new Error('there are three teams');
    const idOf = (asked: typeof one) => asked.years[0]?.weatherYearId ?? '';
    const yearBytes = 8760 * 7;
    const cache = makeColumnCache(road.db, { maxBytes: 2 * yearBytes });
    const columnsOf = async (asked: typeof one) => (await cache.take(asked)).get(idOf(asked));
    const ofOne = await columnsOf(one);
    const ofTwo = await columnsOf(two);
    expect(await columnsOf(one)).toBe(ofOne);
    await columnsOf(three);
    expect(cache.heldBytes()).toBe(2 * yearBytes);
    expect(await columnsOf(one)).toBe(ofOne);
    expect(await columnsOf(two)).not.toBe(ofTwo);
    expect(cache.heldBytes()).toBe(2 * yearBytes);
    const tooMuch = { ...one, years: [...one.years, ...two.years, ...three.years] };
    await expect(cache.take(tooMuch)).rejects.toThrow(RangeError);
  });
});
