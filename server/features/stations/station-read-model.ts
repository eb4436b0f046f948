import type { Knex } from 'knex';
import type { RuleName } from '#engine/weather-files/quality/quality-options.ts';

export interface StationView {
  readonly id: string;
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly utcOffsetMin: number;
  readonly zone: string;
  readonly wmoNumber: string | null;
  readonly years: number;
  readonly files: number;
}

const STATION = `
  select stations.id, stations.name, stations.latitude, stations.longitude, stations.elevation_m as "elevationM",
    stations.utc_offset_min as "utcOffsetMin", stations.zone, stations.wmo_number as "wmoNumber",
    count(weather_files.id) filter (where weather_files.status = 'accepted')::integer as years,
    count(weather_files.id)::integer as files
  from stations
  left join weather_files on weather_files.station_id = stations.id`;

/** One page of the team's stations by name. */
export async function listStationViews(
  db: Knex,
  page: { teamId: string; text?: string | undefined; page: number; limit: number },
): Promise<{ views: readonly StationView[]; total: number }> {
  const pattern = page.text ? `%${page.text.replace(/[\\%_]/g, (character) => `\\${character}`)}%` : '%';
  const where = `stations.team_id = :teamId and stations.merged_into is null
    and (stations.name ilike :pattern or coalesce(stations.wmo_number, '') ilike :pattern)`;
  const values = { teamId: page.teamId, pattern };
  const [listed, counted] = await Promise.all([
    db.raw<{ rows: StationView[] }>(
      `${STATION} where ${where} group by stations.id
       order by lower(stations.name), stations.id limit :limit offset :skipped`,
      { ...values, limit: page.limit, skipped: (page.page - 1) * page.limit },
    ),
    db.raw<{ rows: [{ total: number }] }>(`select count(*)::integer as total from stations where ${where}`, values),
  ]);
  return { views: listed.rows, total: counted.rows[0].total };
}

/** `null` when the team has no such station, or it was merged into another. */
export async function findStationView(
  db: Knex,
  key: { teamId: string; stationId: string },
): Promise<StationView | null> {
  const { rows } = await db.raw<{ rows: StationView[] }>(
    `${STATION} where stations.team_id = :teamId and stations.id = :stationId and stations.merged_into is null
     group by stations.id`,
    key,
  );
  return rows[0] ?? null;
}

export interface RuleOffView {
  readonly rule: RuleName;
  readonly reason: string;
  readonly setBy: string;
  readonly setAt: Date;
}

export async function listRulesOff(
  db: Knex,
  key: { teamId: string; stationId: string },
): Promise<readonly RuleOffView[]> {
  const { rows } = await db.raw<{ rows: RuleOffView[] }>(
    `select rules_off.rule, rules_off.reason, people.name as "setBy", rules_off.set_at as "setAt"
     from rules_off join people on people.id = rules_off.set_by
     where rules_off.team_id = :teamId and rules_off.station_id = :stationId
     order by rules_off.rule`,
    key,
  );
  return rows;
}
