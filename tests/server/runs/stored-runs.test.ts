import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { migrationSource } from '../../../migrations/source.ts';
import { officeBrief } from '../../../server/features/briefs/presets.ts';
import { judgeStoredYear } from '../../../server/features/runs/judge-year.ts';
import { queueMissingRuns } from '../../../server/features/runs/queue-runs.ts';
import { type RunFigures, runResultHash } from '../../../server/features/runs/run-key.ts';
import { contentHash } from '../../../server/features/weather/content-hash.ts';
import { readPackedYear } from '../../../server/features/weather/packed-year-read-model.ts';
import { canonicalJson } from '../../../src/engine/brief/canonical-json.ts';
import { METHOD_VERSION } from '../../../src/engine/conventions.ts';
import { DEPRESSION_BINS } from '../../../src/engine/reduction/depression-hours.ts';
import { unpackYear } from '../../../src/engine/reduction/packed-columns.ts';
import { reduceYear } from '../../../src/engine/reduction/reduce-year.ts';
import { judgeYear } from '../../../src/engine/run/judge-year.ts';
import { readWeatherFile } from '../../../src/engine/weather-files/read-weather-file.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let desk: TeamDesk;
const epw = demoEpw(0);

interface StoredRun {
  readonly weatherYearId: string;
  readonly briefVersionId: string;
  readonly zone: string;
  readonly elevationM: number;
  readonly heightM: number;
  readonly methodVersion: string;
  readonly result: RunFigures;
  readonly hourClasses: Buffer;
  readonly resultHash: string;
}

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  desk = deskOf(team, await team.join('engineer'));
  await road.startWorker();
  const { file } = await desk.upload(epw.name, epw.text);
  await desk.readToTheEnd(file.id);
  await desk.accept(file.id);
  await desk.mapWithoutPending();
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

async function storedRuns(): Promise<readonly StoredRun[]> {
  const { rows } = await road.db.raw<{ rows: StoredRun[] }>(
    `select runs.weather_year_id as "weatherYearId", runs.brief_version_id as "briefVersionId", stations.zone,
       stations.elevation_m as "elevationM", runs.height_m as "heightM", runs.method_version as "methodVersion",
       runs.result, runs.hour_classes as "hourClasses", runs.result_hash as "resultHash"
     from runs
     join weather_years on weather_years.id = runs.weather_year_id
     join stations on stations.id = weather_years.station_id`,
  );
  return rows;
}

async function onlyRun(): Promise<StoredRun> {
  const [run, ...others] = await storedRuns();
  if (run === undefined) throw new Error('no run is stored');
  expect(others).toEqual([]);
  return run;
}

function readOfFile() {
  const reading = readWeatherFile(Buffer.from(epw.text), epw.name);
  if (reading.status === 'refused' || reading.hours === null) throw new Error('the demo file is read');
  return reduceYear(reading);
}

async function depressionHoursStored(): Promise<readonly number[]> {
  const { rows } = await road.db.raw<{ rows: [{ hours: readonly number[] }] }>(
    'select depression_hours as hours from weather_years',
  );
  return rows[0].hours;
}

describe('a weather year in the store', () => {
  it('unpacks to the very columns that were packed, with the same hash', async () => {
    const run = await onlyRun();
    const stored = await readPackedYear(road.db, { teamId: team.teamId, weatherYearId: run.weatherYearId });
    const { year } = readOfFile();
    expect(stored).toEqual(year);
    const { rows } = await road.db.raw<{ rows: { hash: string }[] }>('select content_hash as hash from weather_years');
    expect(rows.map(({ hash }) => hash)).toEqual([contentHash(year)]);
  });

  it('holds each value within half a step of what was read', async () => {
    const reading = readWeatherFile(Buffer.from(epw.text), epw.name);
    if (reading.status === 'refused' || reading.hours === null) throw new Error('the demo file is read');
    const columns = unpackYear(reduceYear(reading).year.packed);
    // Half of 0.01 K, 2e-6 kg/kg and 2 Pa (layout 1), and the last bit of a double.
    const halves = { dryBulbC: 0.005, humidityRatio: 1e-6, pressurePa: 1 };
    let compared = 0;
    for (const name of ['dryBulbC', 'humidityRatio', 'pressurePa'] as const) {
      for (const [slot, value] of columns[name].entries()) {
        const read: number = reading.hours[name][slot] ?? Number.NaN;
        if (!Number.isNaN(read)) compared += 1;
        const holds = Number.isNaN(read) ? Number.isNaN(value) : Math.abs(value - read) <= halves[name] * (1 + 1e-9);
        if (!holds) expect.fail(`${name} of slot ${slot}: ${value}, read ${read}`);
      }
    }
    expect(compared).toBeGreaterThan(3 * 8600);
  });

  it('has depression hours by month that add up to the hours with a wet bulb', async () => {
    const reduced = readOfFile();
    const stored = await depressionHoursStored();
    expect(stored).toEqual([...reduced.depressionHours]);
    const total = stored.reduce((sum, hours) => sum + hours, 0);
    expect(total).toBe(reduced.facts.hours - reduced.facts.missing);
  });

  it('has them summed by the database over a threshold and months, as the engine does', async () => {
    const { rows } = await road.db.raw<{ rows: [{ hours: number }] }>(
      `select sum(counted.hours)::integer as hours
       from weather_years
       cross join unnest(depression_hours) with ordinality as counted (hours, place)
       where (counted.place - 1) % :bins >= 8 and (counted.place - 1) / :bins + 1 between 6 and 9`,
      { bins: DEPRESSION_BINS },
    );
    const { histogram } = readOfFile();
    const expected = histogram.reduce((sum, hours, place) => {
      const month = Math.floor(place / (24 * DEPRESSION_BINS)) + 1;
      return month >= 6 && month <= 9 && place % DEPRESSION_BINS >= 8 ? sum + hours : sum;
    }, 0);
    expect(expected).toBeGreaterThan(0);
    expect(rows[0].hours).toBe(expected);
  });

  it('keeps every one of them when their migration is taken back and made again', async () => {
    const before = await depressionHoursStored();
    const { ownerDb } = road.database;
    const migration = { migrationSource, name: '0005-depression-array' };
    // By itself, as the years are to stay: without what later migrations do at the end of a transaction.
    await ownerDb.raw('alter table weather_years disable trigger user');
    await ownerDb.migrate.down(migration);
    const { rows } = await ownerDb.raw<{ rows: { month: number; binK: number; hours: number }[] }>(
      'select month, bin_k as "binK", hours from depression_hours',
    );
    await ownerDb.migrate.up(migration);
    await ownerDb.raw('alter table weather_years enable trigger user');
    const among = new Array<number>(before.length).fill(0);
    for (const { month, binK, hours } of rows) among[(month - 1) * DEPRESSION_BINS + binK] = hours;
    expect(among).toEqual(before);
    expect(await depressionHoursStored()).toEqual(before);
  });
});

describe('a stored run', () => {
  it('holds, byte for byte, what the engine says of the stored columns', async () => {
    const run = await onlyRun();
    const year = await readPackedYear(road.db, { teamId: team.teamId, weatherYearId: run.weatherYearId });
    if (year === null) throw new Error('the year is stored');
    const { hourClassCodes, ...figures } = judgeYear({
      year,
      brief: officeBrief(),
      zone: run.zone,
      heightM: run.elevationM,
    });
    expect(canonicalJson(run.result)).toBe(canonicalJson(figures));
    expect(Buffer.compare(run.hourClasses, Buffer.from(hourClassCodes))).toBe(0);
    expect(run).toMatchObject({ methodVersion: METHOD_VERSION, heightM: epw.station.elevationM });
  });

  it('verifies by its hash, which any change breaks', async () => {
    const run = await onlyRun();
    expect(runResultHash(run.result, run.hourClasses)).toBe(run.resultHash);
    const otherFigures = { ...run.result, severityKh: run.result.severityKh + 1e-9 };
    expect(runResultHash(otherFigures, run.hourClasses)).not.toBe(run.resultHash);
    const otherHours = Uint8Array.from(run.hourClasses).with(0, 11);
    expect(runResultHash(run.result, otherHours)).not.toBe(run.resultHash);
  });

  it('is stored once, however often the year is judged', async () => {
    const { weatherYearId, briefVersionId } = await onlyRun();
    const key = { teamId: team.teamId, weatherYearId, briefVersionId };
    await judgeStoredYear(road.db, key);
    await Promise.all([judgeStoredYear(road.db, key), judgeStoredYear(road.db, key)]);
    await queueMissingRuns(road.db);
    await desk.mapWithoutPending();
    await onlyRun();
  });

  it('cannot be changed or removed by the application', async () => {
    await expect(road.db.raw(`update runs set height_m = 0`)).rejects.toThrow('permission denied');
    await expect(road.db.raw('delete from runs')).rejects.toThrow('permission denied');
    await expect(road.db.raw(`update brief_versions set version = 9`)).rejects.toThrow('permission denied');
  });

  it('stands beside that of another zone of the station; the newest is shown', async () => {
    const before = await onlyRun();
    const { weatherYearId, briefVersionId } = before;
    await road.db.raw(`update stations set zone = 'America/New_York'`);
    await judgeStoredYear(road.db, { teamId: team.teamId, weatherYearId, briefVersionId });
    expect(await storedRuns()).toHaveLength(2);
    const [station] = (await desk.map()).stations;
    const place = await desk.place(station?.id ?? '');
    expect(place.station.zone).toBe('America/New_York');
    const { rows } = await road.db.raw<{ rows: { id: string }[] }>('select id from runs order by made_at desc limit 1');
    expect(place.shown?.runId).toBe(rows[0]?.id);
  });
});
