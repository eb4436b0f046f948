import type { Knex } from 'knex';
import type { RuleName } from '#engine/weather-files/quality/quality-options.ts';
import type { DeclaredStation } from '#engine/weather-files/weather-file-reading.ts';
import { STATION_WITHIN } from './same-station.ts';

/** Rules that are switched off at the team's station that a file means; none where there is no such station. */
export async function findRulesOff(
  db: Knex,
  { teamId, station }: { teamId: string; station: DeclaredStation },
): Promise<readonly RuleName[]> {
  const { latitude, longitude, name, wmoNumber } = station;
  if (latitude === null || longitude === null) return [];
  const { rows } = await db.raw<{ rows: { rule: RuleName }[] }>(
    `select distinct rules_off.rule
     from rules_off join stations on stations.id = rules_off.station_id
     where stations.team_id = :teamId and stations.merged_into is null
       and (stations.wmo_number = :wmoNumber or lower(stations.name) = lower(:name))
       and abs(stations.latitude - :latitude) <= :deg
       and least(abs(stations.longitude - :longitude), 360 - abs(stations.longitude - :longitude)) <= :deg`,
    { teamId, wmoNumber, name, latitude, longitude, deg: STATION_WITHIN.deg },
  );
  return rows.map(({ rule }) => rule);
}
