import type { Knex } from 'knex';

export interface NewStation {
  readonly teamId: string;
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly utcOffsetMin: number;
  readonly zone: string;
  readonly wmoNumber: string | null;
}

export async function insertStation(transaction: Knex.Transaction, station: NewStation): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    `insert into stations (team_id, name, latitude, longitude, elevation_m, utc_offset_min, zone, wmo_number)
     values (:teamId, :name, :latitude, :longitude, :elevationM, :utcOffsetMin, :zone, :wmoNumber)
     returning id`,
    { ...station },
  );
  return rows[0].id;
}

/** One acceptance of a team at a time looks for its station, so that two files of one station never make it twice. */
export async function lockStationsOfTeam(transaction: Knex.Transaction, teamId: string): Promise<void> {
  await transaction.raw('select 1 from teams where teams.id = ? for no key update', [teamId]);
}

/**
 * The team's station that a file means: same WMO number or same name, and within the given distances; the nearest in height
 * when several are.
 */
export async function findStationLike(
  db: Knex,
  wanted: {
    teamId: string;
    name: string;
    wmoNumber: string | null;
    latitude: number;
    longitude: number;
    elevationM: number;
    withinDeg: number;
    withinM: number;
  },
): Promise<string | null> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(
    `select stations.id
     from stations
     where stations.team_id = :teamId and stations.merged_into is null
       and (stations.wmo_number = :wmoNumber or lower(stations.name) = lower(:name))
       and abs(stations.latitude - :latitude) <= :withinDeg
       and least(abs(stations.longitude - :longitude), 360 - abs(stations.longitude - :longitude)) <= :withinDeg
       and abs(stations.elevation_m - :elevationM) <= :withinM
     order by abs(stations.elevation_m - :elevationM), stations.created_at, stations.id
     limit 1`,
    wanted,
  );
  return rows[0]?.id ?? null;
}

export interface StationPlace {
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly zone: string;
}

interface StationKey {
  readonly teamId: string;
  readonly stationId: string;
}

/** Where a station stands, held until the transaction ends; null when the team has none such, or it was merged. */
export async function lockStation(transaction: Knex.Transaction, key: StationKey): Promise<StationPlace | null> {
  const { rows } = await transaction.raw<{ rows: StationPlace[] }>(
    `select name, latitude, longitude, elevation_m as "elevationM", zone from stations
     where team_id = :teamId and id = :stationId and merged_into is null for no key update`,
    { ...key },
  );
  return rows[0] ?? null;
}

export async function setStationPlace(
  transaction: Knex.Transaction,
  place: StationKey & StationPlace & { utcOffsetMin: number },
): Promise<void> {
  await transaction.raw(
    `update stations set name = :name, latitude = :latitude, longitude = :longitude, elevation_m = :elevationM,
       zone = :zone, utc_offset_min = :utcOffsetMin
     where team_id = :teamId and id = :stationId`,
    { ...place },
  );
}

/** Accepted years of a station. */
export async function listYearsOfStation(db: Knex, key: StationKey): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(
    `select weather_years.id from weather_years
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     where weather_years.team_id = :teamId and weather_years.station_id = :stationId
     order by weather_years.id`,
    { ...key },
  );
  return rows.map(({ id }) => id);
}

/** Hands files, years and switched-off rules of a station over to another, and marks it as merged. */
export async function setMergedInto(
  transaction: Knex.Transaction,
  merge: StationKey & { intoId: string },
): Promise<void> {
  for (const table of ['weather_files', 'weather_years']) {
    await transaction.raw(
      `update ${table} set station_id = :intoId where team_id = :teamId and station_id = :stationId`,
      { ...merge },
    );
  }
  await transaction.raw(
    `insert into rules_off (team_id, station_id, rule, reason, set_by, set_at)
     select team_id, :intoId, rule, reason, set_by, set_at from rules_off
     where team_id = :teamId and station_id = :stationId
     on conflict (station_id, rule) do nothing`,
    { ...merge },
  );
  await transaction.raw('delete from rules_off where team_id = :teamId and station_id = :stationId', { ...merge });
  await transaction.raw(
    'update stations set merged_into = :intoId where team_id = :teamId and (id = :stationId or merged_into = :stationId)',
    { ...merge },
  );
}

export async function upsertRuleOff(
  transaction: Knex.Transaction,
  off: StationKey & { rule: string; reason: string; personId: string; at: Date },
): Promise<void> {
  await transaction.raw(
    `insert into rules_off (team_id, station_id, rule, reason, set_by, set_at)
     values (:teamId, :stationId, :rule, :reason, :personId, :at)
     on conflict (station_id, rule) do update
       set reason = excluded.reason, set_by = excluded.set_by, set_at = excluded.set_at`,
    { ...off },
  );
}

export async function deleteRuleOff(transaction: Knex.Transaction, key: StationKey & { rule: string }): Promise<void> {
  await transaction.raw('delete from rules_off where team_id = :teamId and station_id = :stationId and rule = :rule', {
    ...key,
  });
}
