import type { Knex } from 'knex';
import type { YearKind } from '#engine/reduction/weather-year.ts';
import type { Verdict } from '#engine/run/run-result.ts';

export interface StationPlace {
  readonly id: string;
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
}

/** The team's stations with an accepted year, by name. */
export async function listStationPlaces(db: Knex, teamId: string): Promise<readonly StationPlace[]> {
  const { rows } = await db.raw<{ rows: StationPlace[] }>(
    `select stations.id, stations.name, stations.latitude, stations.longitude, stations.elevation_m as "elevationM"
     from stations
     where stations.team_id = ? and exists (
       select 1 from weather_years
       join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
       where weather_years.team_id = stations.team_id and weather_years.station_id = stations.id)
     order by stations.name, stations.id`,
    [teamId],
  );
  return rows;
}

export interface AcceptedYear {
  readonly stationId: string;
  readonly weatherYearId: string;
  readonly kind: YearKind;
  readonly year: number | null;
  readonly hours: number;
  /** Hours whose dry bulb and humidity are both as the source measured them. */
  readonly measuredHours: number;
  /** Every hour carries the same source flag, so the flags tell nothing. */
  readonly flagsUniform: boolean;
  /** Background work on its file stopped for a fault of ours. */
  readonly failed: boolean;
}

/** Every accepted year of the team, newest file first. */
export async function listAcceptedYears(db: Knex, teamId: string): Promise<readonly AcceptedYear[]> {
  const { rows } = await db.raw<{ rows: AcceptedYear[] }>(
    `select weather_years.station_id as "stationId", weather_years.id as "weatherYearId", weather_years.kind,
       weather_years.year, weather_years.slots as hours,
       weather_years.measured_hours as "measuredHours",
       exists (
         select 1 from findings
         where findings.weather_file_id = weather_files.id and findings.code = 'source-flags-uniform'
       ) as "flagsUniform",
       weather_files.failure is not null as failed
     from weather_years
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     where weather_years.team_id = ?
     order by weather_years.created_at desc, weather_years.id`,
    [teamId],
  );
  return rows;
}

/** A run by what the map and lists tell of it. */
export interface RunInShort {
  readonly id: string;
  readonly weatherYearId: string;
  readonly heightM: number;
  /** null: the weather is as it was measured. */
  readonly adjustedFromM: number | null;
  readonly usable: boolean;
  readonly monthsShort: readonly number[];
  readonly score: number | null;
  readonly scoreExact: number | null;
  readonly verdict: Verdict;
  /** Notes of the gates that fail. */
  readonly gatesFailed: readonly string[];
  /** In the order of the brief's score. */
  readonly rawComponents: readonly (number | null)[];
  /** Hours of each class, in the order of `hourClasses`. */
  readonly classes: readonly number[];
  readonly demand: number;
  readonly met: number;
  readonly litresPerKwh: number | null;
  readonly savedPct: number | null;
  readonly worstSpellHours: number | null;
  readonly severityKh: number;
}

type RunFacts = readonly [
  ...[id: string, weatherYearId: string, heightM: number, adjustedFromM: number | null, usable: boolean],
  ...[monthsShort: readonly number[], score: number | null, scoreExact: number | null, verdict: Verdict],
  ...[gatesFailed: readonly string[], rawComponents: readonly (number | null)[], classes: readonly number[]],
  ...[demand: number, met: number, litresPerKwh: number | null, savedPct: number | null],
  ...[worstSpellHours: number | null, severityKh: number],
];

interface RunsAsked {
  readonly teamId: string;
  readonly briefVersionId: string;
  readonly methodVersion: string;
}

/** Runs are only ever added, or removed whole with their year: as many as before, and none made later, are the same ones. */
const kept = new Map<string, { readonly stamp: string; readonly runs: readonly RunInShort[] }>();
/** Over all brief versions, some 1 kB each. */
const MOST_KEPT = 60_000;
/** So few years are read for themselves, unless all are at hand. */
const FEW_YEARS = 100;

/** The newest run of each weather year at each height under a brief version; read again only when there are others. */
export async function listRunsInShort(
  db: Knex,
  {
    weatherYearIds,
    ...asked
  }: RunsAsked & {
    /** Those of some years alone. */
    readonly weatherYearIds?: readonly string[];
  },
): Promise<readonly RunInShort[]> {
  const key = [asked.teamId, asked.briefVersionId, asked.methodVersion].join(' ');
  const held = kept.get(key);
  if (held === undefined && weatherYearIds !== undefined && weatherYearIds.length <= FEW_YEARS)
    return await readRuns(db, { ...asked, weatherYearIds });
  const stamp = await stampOfRuns(db, asked);
  const runs = held?.stamp === stamp ? held.runs : await readRuns(db, asked);
  kept.delete(key);
  kept.set(key, { stamp, runs });
  letOldestGo();
  if (weatherYearIds === undefined) return runs;
  const wanted = new Set(weatherYearIds);
  return runs.filter(({ weatherYearId }) => wanted.has(weatherYearId));
}

function letOldestGo(): void {
  let count = [...kept.values()].reduce((sum, { runs }) => sum + runs.length, 0);
  for (const [key, { runs }] of kept) {
    if (count <= MOST_KEPT || kept.size === 1) return;
    kept.delete(key);
    count -= runs.length;
  }
}

async function stampOfRuns(db: Knex, asked: RunsAsked): Promise<string> {
  const { rows } = await db.raw<{ rows: { stamp: string }[] }>(
    `select concat_ws(' ', count(*), max(made_at)) as stamp from runs
     where team_id = :teamId and brief_version_id = :briefVersionId and method_version = :methodVersion`,
    { ...asked },
  );
  return rows[0]?.stamp ?? '';
}

/** Each comes as one array, since thousands of rows of many columns take longer to be taken apart than to be read. */
async function readRuns(
  db: Knex,
  { weatherYearIds, ...asked }: RunsAsked & { readonly weatherYearIds?: readonly string[] },
): Promise<readonly RunInShort[]> {
  const ofYears = weatherYearIds === undefined ? '' : 'and runs.weather_year_id = any(:yearIds::uuid[])';
  const { rows } = await db.raw<{ rows: { facts: RunFacts }[] }>(
    `select distinct on (runs.weather_year_id, runs.height_m, runs.adjusted_from_m) json_build_array(
       runs.id, runs.weather_year_id, runs.height_m, runs.adjusted_from_m, runs.usable, runs.months_short, runs.score,
       runs.score_exact, runs.verdict, runs.gates_failed, runs.raw_components, runs.class_hours, runs.demand_hours,
       runs.met_hours, runs.litres_per_kwh, runs.saved_pct, runs.spell_hours, runs.severity_kh) as facts
     from runs
     where runs.team_id = :teamId and runs.brief_version_id = :briefVersionId and runs.method_version = :methodVersion
       ${ofYears}
     order by runs.weather_year_id, runs.height_m, runs.adjusted_from_m, runs.made_at desc, runs.id`,
    { ...asked, ...(weatherYearIds === undefined ? {} : { yearIds: `{${weatherYearIds.join(',')}}` }) },
  );
  return rows.map(({ facts }) => runOf(facts));
}

function runOf(facts: RunFacts): RunInShort {
  const [id, weatherYearId, heightM, adjustedFromM, usable, monthsShort, score, scoreExact, verdict] = facts;
  const [, , , , , , , , , gatesFailed, rawComponents, classes, demand, met, litresPerKwh, savedPct] = facts;
  const [worstSpellHours, severityKh] = [facts[16], facts[17]];
  return {
    id,
    weatherYearId,
    heightM,
    adjustedFromM,
    usable,
    monthsShort,
    score,
    scoreExact,
    verdict,
    gatesFailed,
    rawComponents,
    classes,
    demand,
    met,
    litresPerKwh,
    savedPct,
    worstSpellHours,
    severityKh,
  };
}
