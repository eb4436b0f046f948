import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { officeBrief } from '../../../server/features/briefs/presets.ts';
import type { PlaceEstimate, Surface, SurfaceAnswer } from '../../../src/contract/surface.ts';
import { estimateBetween } from '../../../src/engine/interpolation/estimate-between.ts';
import { greatCircleKm } from '../../../src/engine/interpolation/great-circle-km.ts';
import { rawOfParts } from '../../../src/engine/score/raw-of-parts.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

const NO_SCORE = -32_768;

let road: Road;
let team: RoadTeam;
let viewer: Member;
let desk: TeamDesk;
let withTwo: SurfaceAnswer;

const under = (path: string): string => `/api/teams/${team.teamId}/programmes/${team.programmeId}/${path}`;

async function surface(query = ''): Promise<SurfaceAnswer> {
  return (await viewer.agent.get(under(`surface${query}`)).expect(200)).body;
}

async function surfaceThere(query = ''): Promise<Surface> {
  const answer = await surface(query);
  if (answer.surface === null) throw new Error(answer.off ?? 'no surface');
  return answer.surface;
}

async function estimate(latitude: number, longitude: number): Promise<PlaceEstimate> {
  return (await viewer.agent.get(under(`estimate?latitude=${latitude}&longitude=${longitude}`)).expect(200)).body;
}

async function addStation(nth: number): Promise<void> {
  const { name, text } = demoEpw(nth);
  const { file } = await desk.upload(name, text);
  await desk.readToTheEnd(file.id);
  await desk.accept(file.id);
  await desk.mapWithoutPending();
}

/** What the wire says of cells and scores, in the units of the page. */
function unpacked({ cells, scores }: Surface) {
  if (cells === null) throw new Error('no cells came');
  const bytes = (text: string) => Uint8Array.from(Buffer.from(text, 'base64')).buffer;
  const along = (text: string, [least, greatest]: [number, number]) =>
    [...new Uint16Array(bytes(text))].map((share) => least + ((greatest - least) * share) / 65_535);
  return {
    latitudes: along(cells.latitudes, [cells.south, cells.north]),
    longitudes: along(cells.longitudes, [cells.west, cells.east]),
    support: [...new Uint8Array(bytes(cells.support))],
    triangles: new Uint32Array(bytes(cells.triangles)),
    scores: [...new Int16Array(bytes(scores))],
  };
}

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  viewer = await team.join('viewer');
  desk = deskOf(team, await team.join('engineer'));
  await road.startWorker();
  await addStation(0);
  await addStation(1);
  withTwo = await surface();
  await addStation(2);
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

describe('the surface between stations', () => {
  it('is off with two stations, and says why', async () => {
    expect(withTwo).toEqual({ off: 'A surface needs 3 stations with a score; there are 2.', surface: null });
  });

  it('lies within 100 km of stations, shows each station in its own cell, and nothing on the rim', async () => {
    const { latitudes, longitudes, support, scores, triangles } = unpacked(await surfaceThere());
    const { stations } = await desk.map();
    expect(stations).toHaveLength(3);
    for (const [cell, code] of support.entries()) {
      const middle = { latitude: latitudes[cell] ?? 0, longitude: longitudes[cell] ?? 0 };
      const nearestKm = Math.min(...stations.map((station) => greatCircleKm(middle, station)));
      if (code > 0) expect(nearestKm).toBeLessThan(100.5);
      if (code === 2) expect(nearestKm).toBeLessThan(50.5);
      expect(scores[cell] === NO_SCORE).toBe(code === 0);
    }
    for (const station of stations) {
      const away = latitudes.map((latitude, cell) =>
        greatCircleKm(station, { latitude, longitude: longitudes[cell] ?? 0 }),
      );
      const own = away.indexOf(Math.min(...away));
      expect(Math.round((scores[own] ?? 0) / 100)).toBe(station.score);
      expect(support[own]).toBe(2);
    }
    expect(Math.max(...triangles)).toBeLessThan(support.length);
  });

  it('tells the leave-one-out error that estimating each station from the two others gives', async () => {
    const { error, power, neighbours } = await surfaceThere();
    const { stations } = await desk.map();
    const places = await Promise.all(stations.map(({ id }) => desk.place(id)));
    const anchors = officeBrief().score;
    const known = places.map(({ station, shown }) => ({
      ...station,
      raw: rawOfParts((shown?.parts ?? []) as Parameters<typeof rawOfParts>[0]),
      exact: shown?.scoreExact ?? Number.NaN,
    }));
    const errors = known.map((station) => {
      const others = known.filter((other) => other !== station);
      const asked = { stations: others, anchors, indexPoints: false, each: 2, power };
      const found = estimateBetween({ ...asked, position: station, elevationM: station.elevationM });
      return (found.weighted.scoreExact ?? Number.NaN) - station.exact;
    });
    expect(neighbours).toBe(3);
    expect(error?.stations).toBe(3);
    const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
    expect(error?.bias).toBeCloseTo(mean(errors), 3);
    expect(error?.meanAbsolute).toBeCloseTo(mean(errors.map(Math.abs)), 3);
    expect(error?.rootMeanSquare).toBeCloseTo(Math.sqrt(mean(errors.map((each) => each * each))), 3);
  });

  it('sends no cells to whom holds them already', async () => {
    const first = await surfaceThere();
    const again = await surfaceThere(`?held=${first.cellsKey}`);
    expect(again).toEqual({ ...first, cells: null });
    expect((await surfaceThere('?held=others')).cells).toEqual(first.cells);
  });

  it('follows a draft, and under the saved brief it is the saved surface', async () => {
    const saved = await surfaceThere();
    const asked = (body: object) => viewer.agent.post(under('surface')).send({ body, held: saved.cellsKey });
    const draft = async (body: object): Promise<SurfaceAnswer> => (await asked(body).expect(200)).body;
    expect((await draft(officeBrief())).surface).toEqual({ ...saved, cells: null });
    const drier = await draft({ ...officeBrief(), caps: { roomRhPct: 45 } });
    expect(drier.surface?.cellsKey).toBe(saved.cellsKey);
    expect(drier.surface?.scores).not.toBe(saved.scores);
    await asked({}).expect(400);
  });
});

describe('an estimate', () => {
  it('at a station is the station, to the last figure', async () => {
    for (const { id, latitude, longitude, elevationM, score } of (await desk.map()).stations) {
      const found = await estimate(latitude, longitude);
      const { shown } = await desk.place(id);
      expect(found).toMatchObject({ score, elevationM, support: 'full', scoreExact: shown?.scoreExact });
      expect(found.parts.map(({ raw }) => raw)).toEqual(shown?.parts.map(({ raw }) => raw));
      expect(found.stations[0]).toMatchObject({ stationId: id, distanceKm: 0, weightPct: 100 });
    }
  });

  it('between stations names what it rests on, and is of grade D', async () => {
    const [station] = (await desk.map()).stations;
    if (station === undefined) throw new Error('no station');
    const found = await estimate(station.latitude + 0.3, station.longitude);
    expect(found.stations).toHaveLength(3);
    expect(found.stations[0]).toMatchObject({ name: station.name, score: station.score });
    expect(found.stations[0]?.distanceKm).toBeCloseTo(
      greatCircleKm(station, { ...station, latitude: station.latitude + 0.3 }),
      2,
    );
    expect(found.stations.reduce((sum, { weightPct }) => sum + weightPct, 0)).toBeCloseTo(100, 3);
    expect(found.grade).toBe('D');
    expect(found.gradeColumns.map(({ column }) => column)).toEqual(['distance', 'height difference', 'kind']);
    expect(found.error).toEqual((await surfaceThere()).error);
    expect(found.brief.version).toBe(1);
  });

  it('is given neither far from every station nor at sea, but says so', async () => {
    const far = await estimate(60, 60);
    expect(far).toMatchObject({ score: null, support: 'none', parts: [], atSea: false });
    expect(far.scoreNote).toBe('no station within 100 km and 300 m of height: nothing is estimated so far away');
    expect(await estimate(-40, 0)).toMatchObject({ score: null, atSea: true, elevationM: 0 });
  });

  it.each(['latitude=90.1&longitude=0', 'latitude=0&longitude=181', 'latitude=x&longitude=0', 'latitude=0'])(
    '%s is refused',
    async (query) => {
      await viewer.agent.get(under(`estimate?${query}`)).expect(400);
    },
  );
});
