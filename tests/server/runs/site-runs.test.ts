import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { briefHash } from '../../../server/features/briefs/brief-hash.ts';
import { repeatRun } from '../../../server/features/runs/repeat-run.ts';
import { contentHash } from '../../../server/features/weather/content-hash.ts';
import { readPackedYear } from '../../../server/features/weather/packed-year-read-model.ts';
import type { MapSite, MapStation } from '../../../src/contract/programme-map.ts';
import type { Brief } from '../../../src/engine/brief/brief.ts';
import { saturationHumidityRatio } from '../../../src/engine/psychrometrics/moist-air.ts';
import { packYear, unpackYear } from '../../../src/engine/reduction/packed-columns.ts';
import type { WeatherYear } from '../../../src/engine/reduction/weather-year.ts';
import { judgeYear } from '../../../src/engine/run/judge-year.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let planner: Member;
let desk: TeamDesk;
let station: MapStation;
let brief: Brief;
const programme = () => `/api/teams/${team.teamId}/programmes/${team.programmeId}`;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  planner = await team.join('planner');
  desk = deskOf(team, await team.join('engineer'));
  await road.startWorker();
  const { name, text } = demoEpw(0);
  const { file } = await desk.upload(name, text);
  await desk.readToTheEnd(file.id);
  await desk.accept(file.id);
  const [first] = (await desk.mapWithoutPending()).stations;
  if (first === undefined) throw new Error('the station is on the map');
  station = first;
  const { rows } = await road.db.raw<{ rows: { body: Brief }[] }>('select body from brief_versions');
  brief = rows[0]?.body as Brief;
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

/** A site some kilometres north of the station. */
async function makeSite(name: string, elevationM: number | null): Promise<{ id: string; revision: number }> {
  const { latitude, longitude } = station;
  const answer = await planner.agent
    .post(`${programme()}/sites`)
    .send({ name, latitude: latitude + 0.05, longitude, elevationM })
    .expect(200);
  return answer.body;
}

async function siteOnMap(id: string): Promise<MapSite> {
  const found = (await desk.mapWithoutPending()).sites.find((site) => site.id === id);
  if (found === undefined) throw new Error('the site is on the map');
  return found;
}

const figuresOf = ({
  score,
  scoreNote,
  words,
  verdict,
  yearsMeeting,
  yearsCounted,
  range,
  ledger,
  ...rest
}: MapSite) => {
  const { litresPerKwh, savedPct, worstSpellHours, severityKh, grade } = rest;
  const ofYear = { ledger, litresPerKwh, savedPct, worstSpellHours, severityKh };
  return { score, scoreNote, words, verdict, yearsMeeting, yearsCounted, range, ...ofYear, grade };
};

interface StoredRun {
  readonly id: string;
  readonly weatherYearId: string;
  readonly heightM: number;
  readonly adjustedFromM: number | null;
  readonly score: number | null;
}

async function storedRuns(): Promise<readonly StoredRun[]> {
  const { rows } = await road.db.raw<{ rows: StoredRun[] }>(
    `select id, weather_year_id as "weatherYearId", height_m as "heightM", adjusted_from_m as "adjustedFromM", score
     from runs order by made_at, id`,
  );
  return rows;
}

/** Standard atmosphere, Pa (ICAO Doc 7488: 101,325 Pa, 288.15 K, 6.5 K/km, exponent 5.2559). */
const standardPa = (heightM: number) => 101_325 * (1 - (0.0065 * heightM) / 288.15) ** 5.2559;

/** The station's year at another height, by hand: 6.5 K/km, the ratio of standard pressures, moisture kept up to saturation. */
async function movedByHand(weatherYearId: string, toM: number): Promise<WeatherYear> {
  const year = await readPackedYear(road.db, { teamId: team.teamId, weatherYearId });
  if (year === null) throw new Error('the year is stored');
  const { dryBulbC, humidityRatio, pressurePa } = unpackYear(year.packed);
  const ratio = standardPa(toM) / standardPa(station.elevationM);
  const moved = {
    dryBulbC: dryBulbC.map((value) => value - 0.0065 * (toM - station.elevationM)),
    pressurePa: pressurePa.map((value) => value * ratio),
    humidityRatio: humidityRatio.slice(),
  };
  for (const [slot, value] of moved.humidityRatio.entries()) {
    const most = saturationHumidityRatio(moved.dryBulbC[slot] ?? 0, moved.pressurePa[slot] ?? 0);
    moved.humidityRatio[slot] = Math.min(value, most);
  }
  return { ...year, packed: packYear({ ...moved, flags: year.packed.flags }) };
}

describe('a site whose height a person gave', () => {
  it('is judged by its station’s weather moved to its height in steps of 10 m, as by hand', async () => {
    const elevationM = Math.round(station.elevationM / 10) * 10 + 403;
    const { id } = await makeSite('Upper yard', elevationM);
    const site = await siteOnMap(id);
    const run = (await storedRuns()).at(-1);
    const heightM = Math.round(elevationM / 10) * 10;
    expect(run).toMatchObject({ heightM, adjustedFromM: station.elevationM });
    const place = await planner.agent.get(`${programme()}/sites/${id}/place`).expect(200);
    const { zone, latitude, longitude } = place.body.station;
    const year = await movedByHand(run?.weatherYearId ?? '', heightM);
    const byHand = judgeYear({ year, brief, zone, heightM, position: { latitude, longitude } });
    expect(site.score).toBe(byHand.score);
    expect(site.ledger?.met).toBe(byHand.ledger.met);
    expect(site.severityKh).toBeCloseTo(byHand.severityKh, 2);
    expect(site.ledger?.met).not.toBe(station.ledger?.met);
    expect(place.body).toMatchObject({
      site: { id, letters: 'a', heightAdjusted: true, heightUsedM: heightM, elevationSource: 'person' },
      shown: { runId: run?.id, score: site.score },
      grade: 'D',
    });
  });

  it('shares its run with another of the same step, and `muslin rerun` proves it', async () => {
    const before = await storedRuns();
    const upper = before.at(-1);
    const { id } = await makeSite('Beside the upper yard', (upper?.heightM ?? 0) + 4);
    const site = await siteOnMap(id);
    expect(await storedRuns()).toEqual(before);
    expect(site.score).toBe(upper?.score);
    const repeated = await repeatRun(road.db, { briefHash, contentHash }, upper?.id ?? '');
    expect(repeated).toMatchObject({ outcome: 'repeated', differs: [] });
  });

  it('is judged anew when it gets another height; the run of the old height stays', async () => {
    const { id, revision } = await makeSite('Hill', station.elevationM + 200);
    const first = await siteOnMap(id);
    const before = await storedRuns();
    const elevationM = station.elevationM + 600;
    await planner.agent.patch(`${programme()}/sites/${id}`).send({ revision, elevationM }).expect(200);
    const second = await siteOnMap(id);
    const after = await storedRuns();
    expect(after.slice(0, before.length)).toEqual(before);
    expect(after).toHaveLength(before.length + 1);
    expect(second.ledger).not.toEqual(first.ledger);
  });
});

describe('a site whose height the relief gave', () => {
  it('has its station’s figures and a grade of C at best', async () => {
    const { id } = await makeSite('Somewhere', null);
    const site = await siteOnMap(id);
    const { grade: _ofStation, ...figures } = figuresOf({ ...site, ...station } as MapSite);
    expect(figuresOf(site)).toMatchObject(figures);
    expect(site).toMatchObject({ heightAdjusted: false, gatesNotKnown: 3 });
    expect(['C', 'D']).toContain(site.grade);
  });

  it('is excluded with the reason of a gate that fails', async () => {
    const { id, revision } = await makeSite('Dry ground', null);
    const gates = [
      { gate: 'water available', answer: 'fail', note: 'the borehole is dry' },
      { gate: 'hygiene', answer: 'pass', note: '' },
    ];
    await planner.agent.patch(`${programme()}/sites/${id}`).send({ revision, gates }).expect(200);
    const site = await siteOnMap(id);
    const note = 'excluded: water available: the borehole is dry';
    expect(site).toMatchObject({ score: null, scoreNote: note, gatesNotKnown: 1 });
    expect(site.gatesFailed).toEqual(['water available: the borehole is dry']);
    expect(site.ledger).toEqual(station.ledger);
    const { body } = await planner.agent.get(`${programme()}/sites/${id}/place`).expect(200);
    expect(body.shown).toMatchObject({ score: null, scoreNote: note });
    const answers = body.shown.gates.map(({ gate, answer }: { gate: string; answer: string }) => [gate, answer]);
    expect(answers).toContainEqual(['water available', 'fail']);
    expect(answers).toContainEqual(['exclusions of use', 'not known']);
  });
});

describe('the table of sites', () => {
  it('shows the figures of the map and is sorted by them, what has none last', async () => {
    const { sites } = await desk.mapWithoutPending();
    const { body } = await planner.agent.get(`${programme()}/sites?sort=score&order=desc&limit=3`).expect(200);
    const byScore = sites.toSorted((one, other) => (other.score ?? -1) - (one.score ?? -1));
    expect(body.items.map(({ id }: { id: string }) => id)).toEqual(byScore.slice(0, 3).map(({ id }) => id));
    const last = await planner.agent.get(`${programme()}/sites?sort=score&order=asc`).expect(200);
    expect(last.body.items.at(-1)).toMatchObject({ name: 'Dry ground', figures: { score: null } });
    for (const { id, figures } of body.items) {
      const onMap = sites.find((site) => site.id === id);
      expect(onMap && figuresOf(onMap)).toEqual(figures);
    }
    const unsorted = await planner.agent.get(`${programme()}/sites`).expect(200);
    expect(unsorted.body.items.map(({ figures }: { figures: unknown }) => figures)).toEqual(sites.map(figuresOf));
  });
});

describe('sites under a draft', () => {
  it('have, to the byte, the figures of the map under the same brief, judged together or one by one', async () => {
    const { sites } = await desk.mapWithoutPending();
    expect(sites.length).toBeGreaterThan(4);
    const ask = async (siteIds: readonly string[]) => {
      const { body } = await planner.agent
        .post(`${programme()}/rescore`)
        .send({ body: brief, stationIds: [], siteIds })
        .expect(200);
      return body;
    };
    const together = await ask(sites.map(({ id }) => id));
    expect(together.sites).toEqual(sites.map((site) => ({ siteId: site.id, ...figuresOf(site) })));
    expect(together.stations).toEqual([]);
    for (const [at, { id }] of sites.entries()) expect((await ask([id])).sites).toEqual([together.sites[at]]);
    const tighter = { ...brief, caps: { roomRhPct: 50 } };
    const { body } = await planner.agent
      .post(`${programme()}/rescore`)
      .send({ body: tighter, siteIds: [sites[0]?.id] })
      .expect(200);
    expect(body.sites[0].ledger).not.toEqual(sites[0]?.ledger);
    expect(body.stations).toHaveLength(1);
  });
});

describe('a file that is withdrawn', () => {
  it('leaves its sites to another station, whose weather is judged at their heights', async () => {
    const { name, text } = demoEpw(1);
    const { file } = await desk.upload(name, text);
    await desk.readToTheEnd(file.id);
    await desk.accept(file.id);
    await desk.mapWithoutPending();
    const [upper] = (await desk.map()).sites;
    const files = await planner.agent.get(`/api/teams/${team.teamId}/weather-files`).expect(200);
    const first = files.body.items.find(({ id }: { id: string }) => id !== file.id);
    await desk.withdraw(first.id);
    const after = await siteOnMap(upper?.id ?? '');
    expect(after.stationId).not.toBe(upper?.stationId);
    expect(after.score).not.toBeNull();
  });
});
