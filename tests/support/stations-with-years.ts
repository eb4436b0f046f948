/** Stations that can stand for sites, without reading files: each with an accepted typical year whose hours are all nought. */
import type { Knex } from 'knex';

export interface StationWithYear {
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
}

/** @returns the ids, in the order given */
export async function insertStationsWithYears(
  ownerDb: Knex,
  { teamId, personId, stations }: { teamId: string; personId: string; stations: readonly StationWithYear[] },
): Promise<readonly string[]> {
  const { rows } = await ownerDb.raw<{ rows: { id: string }[] }>(
    `with given as (
       select *, gen_random_uuid() as id, gen_random_uuid() as file_id
       from jsonb_to_recordset(cast(:stations as jsonb))
         as given (place integer, name text, latitude float8, longitude float8, "elevationM" float8)
     ), new_stations as (
       insert into stations (id, team_id, name, latitude, longitude, elevation_m, utc_offset_min, zone)
       select id, :teamId, name, latitude, longitude, "elevationM", 0, 'Etc/UTC' from given
     ), new_files as (
       insert into weather_files (id, team_id, name, bytes, fingerprint, storage_key, status, station_id, uploaded_by,
         accepted_by, accepted_at)
       select file_id, :teamId, 'blank.epw', 0, encode(sha256(file_id::text::bytea), 'hex'), file_id::text, 'accepted', id,
         :personId, :personId, now()
       from given
     ), new_years as (
       insert into weather_years (team_id, weather_file_id, station_id, kind, utc_offset_min, slots, layout, dry_bulb,
         humidity_ratio, pressure, flags, histogram, depression_hours, humidity_from, below_zero, facts, read_version,
         content_hash)
       select :teamId, file_id, id, 'typical', 0, 8760, 1, two, two, two, one, '', array_fill(0::smallint, array[768]), 'dew point', 'water', '{}', 'none', id::text
       from given, (select decode(repeat('0000', 8760), 'hex') as two, decode(repeat('00', 8760), 'hex') as one) as blank
     )
     select id from given order by place`,
    { teamId, personId, stations: JSON.stringify(stations.map((station, place) => ({ ...station, place }))) },
  );
  return rows.map(({ id }) => id);
}
