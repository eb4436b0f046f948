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
     where stations.team_id = :teamId
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
