import type { Knex } from 'knex';
import type { SiteDuty } from '#contract/site-record.ts';
import type { SiteWater } from '#contract/site-water.ts';
import type { GateAnswer } from '#engine/run/run-result.ts';

interface ProgrammeKey {
  readonly teamId: string;
  readonly programmeId: string;
}

export interface SiteRow {
  readonly id: string;
  readonly letters: string;
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number | null;
  readonly elevationSource: 'person' | 'file' | 'relief' | null;
  readonly reliefM: number | null;
  readonly kmFromLand: number;
  readonly designLoadKw: number | null;
  /** The station that a person chose; one that was merged since is the one that it became. */
  readonly stationId: string | null;
  readonly stationReason: string | null;
  readonly gates: readonly GateAnswer[];
  readonly importId: string | null;
  readonly revision: number;
}

const COLUMNS = `sites.id, sites.letters, sites.name, sites.latitude, sites.longitude, sites.elevation_m as "elevationM",
  sites.elevation_source as "elevationSource", sites.relief_m as "reliefM", sites.km_from_land as "kmFromLand",
  sites.design_load_kw as "designLoadKw", coalesce(chosen.merged_into, sites.station_id) as "stationId",
  sites.station_reason as "stationReason", sites.gates, sites.import_id as "importId", sites.revision`;
const ROWS = `sites left join stations as chosen on chosen.id = sites.station_id`;
const PRESENT = `sites.team_id = :teamId and sites.programme_id = :programmeId and sites.removed_at is null`;

/** Every site of a programme, or those of some ids, in the order of their letters. */
export async function listSiteRows(
  db: Knex,
  { siteIds, ...key }: ProgrammeKey & { siteIds?: readonly string[] },
): Promise<readonly SiteRow[]> {
  const named = siteIds === undefined ? '' : 'and sites.id = any(:siteIds::uuid[])';
  const { rows } = await db.raw<{ rows: SiteRow[] }>(
    `select ${COLUMNS} from ${ROWS} where ${PRESENT} ${named} order by length(sites.letters), sites.letters`,
    { ...key, ...(siteIds === undefined ? {} : { siteIds: `{${siteIds.join(',')}}` }) },
  );
  return rows;
}

export interface SiteRecordRow extends SiteRow {
  readonly water: Partial<SiteWater>;
  readonly notes: string;
  readonly madeBy: string;
  readonly madeAt: Date;
}

/** `null` when the programme has no such site, or it was removed. */
export async function findSiteRecord(db: Knex, key: ProgrammeKey & { siteId: string }): Promise<SiteRecordRow | null> {
  const { rows } = await db.raw<{ rows: SiteRecordRow[] }>(
    `select ${COLUMNS}, sites.water, sites.notes, people.name as "madeBy", sites.made_at as "madeAt"
     from ${ROWS} join people on people.id = sites.made_by
     where ${PRESENT} and sites.id = :siteId`,
    { ...key },
  );
  return rows[0] ?? null;
}

export interface SiteChangeRow {
  readonly revision: number;
  readonly by: string;
  readonly at: Date;
  readonly fields: readonly { readonly field: string; readonly was: string; readonly now: string }[];
}

/** What was changed of a site after a revision, newest first. */
export async function listSiteChanges(
  db: Knex,
  asked: { teamId: string; siteId: string; after: number },
): Promise<readonly SiteChangeRow[]> {
  const { rows } = await db.raw<{ rows: SiteChangeRow[] }>(
    `select site_changes.revision, people.name as by, site_changes.changed_at as at, site_changes.fields
     from site_changes join people on people.id = site_changes.changed_by
     where site_changes.team_id = :teamId and site_changes.site_id = :siteId and site_changes.revision > :after
     order by site_changes.revision desc limit 100`,
    { ...asked },
  );
  return rows;
}

export async function listSiteDuties(db: Knex, key: { teamId: string; siteId: string }): Promise<readonly SiteDuty[]> {
  const { rows } = await db.raw<{ rows: SiteDuty[] }>(
    `select duty, owner, to_char(due_on, 'YYYY-MM-DD') as "dueOn", to_char(done_on, 'YYYY-MM-DD') as "doneOn", note
     from site_duties where team_id = :teamId and site_id = :siteId order by duty`,
    { ...key },
  );
  return rows;
}

export interface StationOfTeam {
  readonly id: string;
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  /** Accepted years that are not derived from others. */
  readonly actualYears: number;
  readonly typicalYears: number;
}

/** The team's stations, with or without years, in the order of their ids. */
export async function listStationsOfTeam(db: Knex, teamId: string): Promise<readonly StationOfTeam[]> {
  const { rows } = await db.raw<{ rows: StationOfTeam[] }>(
    `select stations.id, stations.name, stations.latitude, stations.longitude, stations.elevation_m as "elevationM",
       count(weather_files.id) filter (where weather_years.kind = 'actual')::integer as "actualYears",
       count(weather_files.id) filter (where weather_years.kind = 'typical')::integer as "typicalYears"
     from stations
     left join weather_years on weather_years.team_id = stations.team_id and weather_years.station_id = stations.id
     left join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     where stations.team_id = ? and stations.merged_into is null
     group by stations.id order by stations.id`,
    [teamId],
  );
  return rows;
}

/** Gates that the newest versions of the programme's briefs ask. */
export async function listAskedGates(db: Knex, key: ProgrammeKey): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { gate: string }[] }>(
    `select distinct gate
     from briefs
     join lateral (
       select body from brief_versions where brief_versions.brief_id = briefs.id order by version desc limit 1
     ) as newest on true
     cross join lateral jsonb_array_elements_text(newest.body -> 'gates') as gate
     where briefs.team_id = :teamId and briefs.programme_id = :programmeId
     order by gate`,
    { ...key },
  );
  return rows.map(({ gate }) => gate);
}
