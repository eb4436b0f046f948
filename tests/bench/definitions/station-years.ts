/**
 * `load` and `size`: 1,000 station-years in the product's own schema (packed columns, read by the product's own loader over COPY)
 * against hourly rows: a narrow table with a primary key, read by select. The rows are made of ten of the same years and what
 * they take is multiplied. Time is processor time of this process and of the database's.
 */
import { readFileSync } from 'node:fs';
import type { Knex } from 'knex';
import { unpackYear } from '#engine/reduction/packed-columns.ts';
import type { PackedYear } from '#engine/reduction/weather-year.ts';
import { makeColumnCache } from '../../../server/features/runs/column-cache.ts';
import { listYearsToRescore } from '../../../server/features/runs/rescore-read-model.ts';
import { packedOver } from '../../../server/features/runs/shared-columns.ts';
import type { Bench } from '../bench.ts';
import { type StationYearCluster, withStationYears } from '../station-year-cluster.ts';

const STATION_YEARS = 1000;
const ROW_YEARS = 10;
const ROUNDS = 4;
const NS_PER_MS = 1e6;

/** Every station-year of the team as typed arrays, by the road that re-scoring takes. */
async function loadPacked({ db, teamId }: StationYearCluster): Promise<ReadonlyMap<string, PackedYear>> {
  const years = await listYearsToRescore(db, teamId);
  const accepted = new Map(years.map(({ weatherYearId, contentHash }) => [weatherYearId, contentHash]));
  const cache = makeColumnCache(db, { maxBytes: Number.POSITIVE_INFINITY });
  const columns = await cache.take({ teamId, years, accepted, signal: new AbortController().signal });
  return new Map([...columns].map(([id, shared]) => [id, packedOver(shared)]));
}

interface RowYear {
  readonly dryBulbC: Float64Array;
  readonly humidityRatio: Float64Array;
  readonly pressurePa: Float64Array;
}

/** Hourly rows of the first years, 4 bytes a value, with the key that finds a year. @returns those years, packed */
async function writeRows(cluster: StationYearCluster): Promise<readonly PackedYear[]> {
  const { ownerDb } = cluster;
  await ownerDb.raw(`
    create table hourly_values (
      station_year integer not null, slot smallint not null,
      dry_bulb_c real not null, humidity_ratio real not null, pressure_pa real not null, flags smallint not null,
      primary key (station_year, slot)
    );
    grant select on hourly_values to muslin_app`);
  const years = [...(await loadPacked(cluster)).values()].slice(0, ROW_YEARS);
  for (const [number, year] of years.entries()) {
    const { dryBulbC, humidityRatio, pressurePa } = unpackYear(year);
    await ownerDb.raw(
      `insert into hourly_values
       select ?::integer, slot - 1, dry_bulb_c, humidity_ratio, pressure_pa, flags
       from unnest(?::real[], ?::real[], ?::real[], ?::smallint[]) with ordinality
         as hours (dry_bulb_c, humidity_ratio, pressure_pa, flags, slot)`,
      [number, [...dryBulbC], [...humidityRatio], [...pressurePa], [...year.flags]],
    );
  }
  await ownerDb.raw('analyze hourly_values');
  return years;
}

async function loadRows(db: Knex): Promise<readonly RowYear[]> {
  const years: RowYear[] = [];
  for (let number = 0; number < ROW_YEARS; number++) {
    const rows: { dry_bulb_c: number; humidity_ratio: number; pressure_pa: number }[] = await db('hourly_values')
      .select('dry_bulb_c', 'humidity_ratio', 'pressure_pa')
      .where('station_year', number)
      .orderBy('slot');
    years.push({
      dryBulbC: Float64Array.from(rows, (row) => row.dry_bulb_c),
      humidityRatio: Float64Array.from(rows, (row) => row.humidity_ratio),
      pressurePa: Float64Array.from(rows, (row) => row.pressure_pa),
    });
  }
  return years;
}

/** Processor time, ms, of this process and of the database process that serves the one connection. */
async function bothProcessorMs(db: Knex, work: () => Promise<unknown>): Promise<number> {
  const { rows } = await db.raw<{ rows: { pid: number }[] }>('select pg_backend_pid() as pid');
  const served = () => Number(readFileSync(`/proc/${rows[0]?.pid}/schedstat`, 'utf8').split(' ')[0]) / NS_PER_MS;
  const servedBefore = served();
  const before = process.cpuUsage();
  await work();
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1000 + served() - servedBefore;
}

/** A row holds 4 bytes a value, so both sides are compared at that. */
function sameHours(packed: readonly PackedYear[], rows: readonly RowYear[]): boolean {
  const same = (one: Float64Array, other: Float64Array = new Float64Array(0)) =>
    one.length === other.length && one.every((value, slot) => Math.fround(value) === Math.fround(other[slot] ?? 0));
  return packed.every((year, number) => {
    const { dryBulbC, humidityRatio, pressurePa } = unpackYear(year);
    const row = rows[number];
    return (
      same(dryBulbC, row?.dryBulbC) && same(humidityRatio, row?.humidityRatio) && same(pressurePa, row?.pressurePa)
    );
  });
}

export const loadBench: Bench = {
  name: 'load',
  about: '1,000 station-years from PostgreSQL into typed arrays, hourly rows by select / packed columns by COPY',
  gate: 15,
  compare: 'at least',
  run: () =>
    withStationYears(STATION_YEARS, async (cluster) => {
      const packed = await writeRows(cluster);
      let plainMs = Number.POSITIVE_INFINITY;
      let oursMs = Number.POSITIVE_INFINITY;
      let rows: readonly RowYear[] = [];
      let loaded = 0;
      for (let round = 0; round < ROUNDS; round++) {
        const plain = await bothProcessorMs(cluster.db, async () => {
          rows = await loadRows(cluster.db);
        });
        const ours = await bothProcessorMs(cluster.db, async () => {
          loaded = (await loadPacked(cluster)).size;
        });
        // The first round warms up.
        if (round === 0) continue;
        plainMs = Math.min(plainMs, (plain * STATION_YEARS) / ROW_YEARS);
        oursMs = Math.min(oursMs, ours);
      }
      const fault = loaded !== STATION_YEARS ? `${loaded} station-years were loaded` : null;
      return {
        ratio: plainMs / oursMs,
        plain: `${(plainMs / 1000).toFixed(1)} s, by scaling from ${ROW_YEARS}`,
        ours: `${(oursMs / 1000).toFixed(2)} s`,
        fault: fault ?? (sameHours(packed, rows) ? null : 'the rows hold other hours than the columns'),
      };
    }),
};

export const sizeBench: Bench = {
  name: 'size',
  about: 'bytes on disk of a station-year with its keys, hourly rows / our table with facts and depression hours',
  gate: 8,
  compare: 'at least',
  run: () =>
    withStationYears(STATION_YEARS, async (cluster) => {
      const years = await writeRows(cluster);
      const slots = years.reduce((sum, year) => sum + year.flags.length, 0);
      const { rows } = await cluster.ownerDb.raw<{
        rows: { plain: number; ours: number; hours: number; held: number }[];
      }>(
        `select pg_total_relation_size('hourly_values')::double precision as plain,
           pg_total_relation_size('weather_years')::double precision as ours,
           (select count(*) from hourly_values)::integer as hours, (select count(*) from weather_years)::integer as held`,
      );
      const { plain = 0, ours = 1, hours = 0, held = 0 } = rows[0] ?? {};
      const plainBytes = plain / ROW_YEARS;
      const oursBytes = ours / STATION_YEARS;
      return {
        ratio: plainBytes / oursBytes,
        plain: `${(plainBytes / 1000).toFixed(0)} kB`,
        ours: `${(oursBytes / 1000).toFixed(1)} kB`,
        fault: hours === slots && held === STATION_YEARS ? null : `${hours} rows and ${held} station-years were stored`,
      };
    }),
};
