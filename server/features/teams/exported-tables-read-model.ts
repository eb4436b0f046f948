/** What an export of a team holds as tables, each with its columns in words and the rows that it takes. */
import type { Knex } from 'knex';

export interface ExportedTable {
  readonly entry: string;
  readonly from: string;
  readonly order: string;
  /** SQL by head of the column. */
  readonly columns: Readonly<Record<string, string>>;
}

const SITE = `sites join programmes on programmes.id = sites.programme_id
  left join stations on stations.id = sites.station_id`;
const RUN = `runs join weather_years on weather_years.id = runs.weather_year_id
  left join stations on stations.id = weather_years.station_id
  join brief_versions on brief_versions.id = runs.brief_version_id
  join briefs on briefs.id = brief_versions.brief_id`;
const runIdentity = {
  Run: 'runs.id',
  Station: 'stations.name',
  'Weather file': 'weather_years.weather_file_id',
  Kind: 'weather_years.kind',
  Year: 'weather_years.year',
  'Height (m)': 'runs.height_m',
  Brief: 'briefs.name',
  Version: 'brief_versions.version',
  Method: 'runs.method_version',
};

/** Each of them is of the team `:teamId` by `team_id` of its first table. */
export const exportedTables: readonly ExportedTable[] = [
  {
    entry: 'people.csv',
    from: 'memberships join people on people.id = memberships.person_id',
    order: 'people.name, people.id',
    columns: {
      Name: 'people.name',
      'E-mail': 'people.email',
      Role: 'memberships.role',
      Since: 'memberships.since',
      'Member until': 'memberships.ends_at',
    },
  },
  {
    entry: 'stations.csv',
    from: 'stations',
    order: 'stations.name, stations.id',
    columns: {
      Station: 'stations.id',
      Name: 'stations.name',
      'WMO number': 'stations.wmo_number',
      'Latitude (°)': 'stations.latitude',
      'Longitude (°)': 'stations.longitude',
      'Elevation (m)': 'stations.elevation_m',
      'UTC offset (min)': 'stations.utc_offset_min',
      'Time zone': 'stations.zone',
      'Merged into': 'stations.merged_into',
    },
  },
  {
    entry: 'weather-files.csv',
    from: `weather_files join people on people.id = weather_files.uploaded_by
      left join weather_years on weather_years.weather_file_id = weather_files.id`,
    order: 'weather_files.uploaded_at, weather_files.id',
    columns: {
      'Weather file': 'weather_files.id',
      Name: 'weather_files.name',
      Part: 'weather_files.part',
      Format: 'weather_files.format',
      Status: 'weather_files.status',
      'SHA-256': 'weather_files.fingerprint',
      Bytes: 'weather_files.bytes::float8',
      Licence: 'weather_files.licence',
      'To be named': 'weather_files.attribution',
      Station: 'weather_files.station_id',
      Kind: 'weather_years.kind',
      Year: 'weather_years.year',
      Hours: 'weather_years.slots',
      Facts: 'weather_years.facts',
      'Uploaded by': 'people.name',
      'Uploaded at': 'weather_files.uploaded_at',
    },
  },
  {
    entry: 'findings.csv',
    from: 'findings',
    order: 'findings.weather_file_id, findings.position',
    columns: {
      'Weather file': 'findings.weather_file_id',
      Severity: 'findings.severity',
      Code: 'findings.code',
      Line: 'findings.line',
      'Last line': 'findings.last_line',
      Hours: 'findings.hours',
      Finding: 'findings.message',
      Done: 'findings.done',
    },
  },
  {
    entry: 'sites.csv',
    from: SITE,
    order: 'programmes.name, sites.programme_id, length(sites.letters), sites.letters',
    columns: {
      Programme: 'programmes.name',
      Site: 'sites.id',
      Letters: 'sites.letters',
      Name: 'sites.name',
      'Latitude (°)': 'sites.latitude',
      'Longitude (°)': 'sites.longitude',
      'Elevation (m)': 'sites.elevation_m',
      'Design load (kW)': 'sites.design_load_kw',
      'Chosen station': 'stations.name',
      'Reason for the station': 'sites.station_reason',
      Gates: 'sites.gates',
      Water: 'sites.water',
      Notes: 'sites.notes',
      'Removed at': 'sites.removed_at',
      'Removed because': 'sites.removed_reason',
    },
  },
  {
    entry: 'briefs.jsonl',
    from: `brief_versions join briefs on briefs.id = brief_versions.brief_id
      join programmes on programmes.id = briefs.programme_id join people on people.id = brief_versions.made_by`,
    order: 'programmes.name, briefs.name, briefs.id, brief_versions.version',
    columns: {
      programme: 'programmes.name',
      brief: 'briefs.name',
      briefId: 'briefs.id',
      version: 'brief_versions.version',
      madeBy: 'people.name',
      madeAt: 'brief_versions.made_at',
      sha256: 'brief_versions.hash',
      body: 'brief_versions.body',
    },
  },
  {
    entry: 'runs.csv',
    from: RUN,
    order: 'briefs.name, brief_versions.version, runs.id',
    columns: {
      ...runIdentity,
      Usable: 'runs.usable',
      Score: 'runs.score',
      Verdict: 'runs.verdict',
      'Demand (h)': 'runs.demand_hours',
      'Met (h)': 'runs.met_hours',
      'Water (L/kWh)': 'runs.litres_per_kwh',
      'Electricity saved (%)': 'runs.saved_pct',
      'Longest spell (h)': 'runs.spell_hours',
      'Made at': 'runs.made_at',
      'SHA-256 of the result': 'runs.result_hash',
    },
  },
  {
    entry: 'runs.jsonl',
    from: RUN,
    order: 'briefs.name, brief_versions.version, runs.id',
    columns: { ...runIdentity, Result: 'runs.result' },
  },
  {
    entry: 'audit-events.csv',
    from: 'audit_events left join people on people.id = audit_events.person_id',
    order: 'audit_events.id',
    columns: {
      Number: 'audit_events.id::float8',
      At: 'audit_events.at',
      Who: 'people.name',
      Act: 'audit_events.act',
      Subject: 'audit_events.subject',
      Request: 'audit_events.request_id',
    },
  },
];

export type ExportedRow = Readonly<Record<string, unknown>>;

const ROWS_AT_ONCE = 500;

/** The rows of a table in portions, so that none of them has to be held whole. */
export async function* rowsOfTable(
  transaction: Knex.Transaction,
  { table, teamId }: { table: ExportedTable; teamId: string },
): AsyncGenerator<readonly ExportedRow[]> {
  const columns = Object.entries(table.columns).map(([head, sql]) => `${sql} as "${head}"`);
  const [first = ''] = table.from.trim().split(/\s/);
  await transaction.raw(
    `declare exported no scroll cursor for
     select ${columns.join(', ')} from ${table.from} where ${first}.team_id = ? order by ${table.order}`,
    [teamId],
  );
  for (;;) {
    const { rows } = await transaction.raw<{ rows: ExportedRow[] }>(`fetch ${ROWS_AT_ONCE} from exported`);
    if (rows.length === 0) break;
    yield rows;
  }
  await transaction.raw('close exported');
}

export interface ExportedOriginal {
  readonly name: string;
  readonly fingerprint: string;
  readonly licence: string;
  readonly storageKey: string;
}

/** The bytes that were uploaded, each once, by name. */
export async function listOriginals(db: Knex, teamId: string): Promise<readonly ExportedOriginal[]> {
  const { rows } = await db.raw<{ rows: ExportedOriginal[] }>(
    `select distinct on (weather_files.fingerprint) weather_files.name, weather_files.fingerprint, weather_files.licence,
       weather_files.storage_key as "storageKey"
     from weather_files where weather_files.team_id = ?
     order by weather_files.fingerprint, weather_files.uploaded_at`,
    [teamId],
  );
  return rows;
}
