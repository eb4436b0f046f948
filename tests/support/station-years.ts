/** Many accepted weather years without reading many files: clones of some that came by the main road, each its own station. */
import type { Knex } from 'knex';

/**
 * Makes so many new stations of a team, each with a clone of one of the team's accepted years in turn. The content hash is each
 * clone's own, so that nothing takes one for another.
 */
export async function cloneStationYears(
  ownerDb: Knex,
  { teamId, stations }: { teamId: string; stations: number },
): Promise<void> {
  await ownerDb.raw(
    `with template as (
       select weather_years.*, stations.name, stations.latitude, stations.longitude, stations.elevation_m,
         stations.utc_offset_min as offset_min, stations.zone, weather_files.accepted_by,
         row_number() over (order by weather_years.id) - 1 as place, count(*) over () as total
       from weather_years
       join stations on stations.id = weather_years.station_id
       join weather_files on weather_files.id = weather_years.weather_file_id
       where weather_years.team_id = :teamId and weather_files.status = 'accepted'
     ), clones as (
       select template.*, number, gen_random_uuid() as new_station_id, gen_random_uuid() as file_id
       from generate_series(1, :stations::integer) as number
       join template on template.place = number % template.total
     ), new_stations as (
       insert into stations (id, team_id, name, latitude, longitude, elevation_m, utc_offset_min, zone)
       select new_station_id, team_id, 'Clone ' || lpad(number::text, 5, '0'), latitude, longitude, elevation_m, offset_min,
         zone
       from clones
     ), new_files as (
       insert into weather_files (id, team_id, name, bytes, fingerprint, storage_key, status, station_id, uploaded_by,
         accepted_by, accepted_at)
       select file_id, team_id, 'clone.epw', 0, encode(sha256(file_id::text::bytea), 'hex'), file_id::text, 'accepted',
         new_station_id, accepted_by, accepted_by, now()
       from clones
     )
     insert into weather_years (team_id, weather_file_id, station_id, kind, year, utc_offset_min, slots, layout, dry_bulb,
       humidity_ratio, pressure, flags, histogram, depression_hours, humidity_from, below_zero, facts, read_version, content_hash)
     select team_id, file_id, new_station_id, kind, year, utc_offset_min, slots, layout, dry_bulb, humidity_ratio, pressure,
       flags, histogram, depression_hours, humidity_from, below_zero, facts, read_version, content_hash || ' ' || number
     from clones`,
    { teamId, stations },
  );
}
