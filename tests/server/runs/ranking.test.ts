import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { officeBrief } from '../../../server/features/briefs/presets.ts';
import { readPackedYear } from '../../../server/features/weather/packed-year-read-model.ts';
import type { Ranking } from '../../../src/contract/ranking.ts';
import { placeToRank } from '../../../src/engine/ranking/place-to-rank.ts';
import { rankPlaces } from '../../../src/engine/ranking/rank-places.ts';
import { judgeYear } from '../../../src/engine/run/judge-year.ts';
import { placeFigures } from '../../../src/engine/score/place-figures.ts';
import { scoreRange } from '../../../src/engine/score/score-range.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

const STATIONS = 3;
let road: Road;
let team: RoadTeam;
let planner: Member;
let desk: TeamDesk;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  planner = await team.join('planner');
  desk = deskOf(team, await team.join('engineer'));
  await road.startWorker();
  for (let nth = 0; nth < STATIONS; nth++) {
    const { name, text } = demoEpw(nth);
    const { file } = await desk.upload(name, text);
    await desk.readToTheEnd(file.id);
    await desk.accept(file.id);
  }
  await desk.mapWithoutPending();
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

const programme = () => `/api/teams/${team.teamId}/programmes/${team.programmeId}`;

async function rank(body: object): Promise<Ranking> {
  const answer = await planner.agent.post(`${programme()}/ranking`).send(body).expect(200);
  return answer.body;
}

/** What the engine makes of the stored years, one by one. */
async function byTheEngine(view: Ranking['view']) {
  const brief = officeBrief();
  const { rows } = await road.db.raw<{ rows: { id: string; stationId: string; elevationM: number; zone: string }[] }>(
    `select weather_years.id, station_id as "stationId", elevation_m as "elevationM", zone
     from weather_years join stations on stations.id = station_id`,
  );
  const order = (await desk.map()).stations.toSorted((one, other) => (other.score ?? 0) - (one.score ?? 0));
  const places = [];
  for (const { id } of order) {
    const row = rows.find(({ stationId }) => stationId === id);
    const year = await readPackedYear(road.db, { teamId: team.teamId, weatherYearId: row?.id ?? '' });
    if (year === null || row === undefined) throw new Error('the year is stored');
    const input = { year, brief, zone: row.zone, heightM: row.elevationM };
    const figures = placeFigures({ brief, runs: [{ kind: year.kind, year: year.year, result: judgeYear(input) }] });
    places.push(placeToRank({ id, figures, range: scoreRange({ ...input, humidityFrom: 'dew point' }) }));
  }
  return rankPlaces({ places, weights: brief.score.map(({ weight }) => weight), view, seed: 1 });
}

describe('the ranking of a programme', () => {
  it.each(['near the brief', 'any weights'] as const)('is the engine’s own of its places: %s', async (view) => {
    const ranking = await rank({ view, k: 2 });
    const expected = await byTheEngine(view);
    expect(ranking.places.map(({ id, rank: place }) => [id, place])).toEqual(
      expected.places.map(({ id, rank: place }) => [id, place]),
    );
    for (const [at, { rankShares, topShare }] of ranking.places.entries()) {
      const shares = expected.places[at]?.rankShares ?? [];
      for (const [rankAt, share] of rankShares.entries()) expect(share).toBeCloseTo(shares[rankAt] ?? -1, 4);
      expect(topShare).toBeCloseTo((shares[0] ?? 0) + (shares[1] ?? 0), 4);
      expect(rankShares.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 3);
    }
    expect(ranking).toMatchObject({ view, draws: 10_000, k: 2, leftOut: 0, notRanked: [] });
    expect(ranking.neighbours).toHaveLength(STATIONS - 1);
  });

  it('ranks only the places that are named, and says of the others why not', async () => {
    const { stations } = await desk.map();
    const { latitude = 0, longitude = 0 } = stations[0] ?? {};
    const site = { name: 'Far off', latitude: latitude + 3, longitude, elevationM: null };
    const { body } = await planner.agent.post(`${programme()}/sites`).send(site).expect(200);
    const named = [stations[0]?.id, stations[1]?.id, body.id];
    const ranking = await rank({ placeIds: named });
    expect(ranking.places.map(({ id }) => id).toSorted()).toEqual([stations[0]?.id, stations[1]?.id].toSorted());
    expect(ranking.notRanked).toEqual([
      { placeKind: 'sites', id: body.id, name: 'Far off', reason: 'grade D is not ranked' },
    ]);
  });

  it('leaves out what is beyond the most, and knows nothing of another team', async () => {
    const { stations } = await desk.map();
    const placeIds = stations.map(({ id }) => id);
    expect(await rank({ placeIds, most: 2 })).toMatchObject({ leftOut: 1 });
    const others = await road.makeTeam('Another team');
    const path = `/api/teams/${others.teamId}/programmes/${others.programmeId}/ranking`;
    const { body } = await others.lead.agent.post(path).send({ placeIds }).expect(200);
    expect(body).toMatchObject({ places: [], notRanked: [], leftOut: 0 });
  });
});
