import type { Knex } from 'knex';
import type { ClimateDifference } from '#engine/climate/climate-difference.ts';
import type { HumidityRule, MonthlyChange } from '#engine/climate/monthly-change.ts';
import { storableText } from './storable-text.ts';

/** Format of a file that was not read but derived: its bytes are JSON. */
export const DERIVED_FORMAT = 'derived';

/**
 * The file of a derived year, accepted as it is saved, at its parent's station. @returns its id, or null when the team has the
 * same change of the same weather already
 */
export async function insertDerivedFile(
  transaction: Knex.Transaction,
  file: {
    teamId: string;
    parentFileId: string;
    name: string;
    bytes: number;
    fingerprint: string;
    storageKey: string;
    personId: string;
    at: Date;
  },
): Promise<string | null> {
  const { rows } = await transaction.raw<{ rows: { id: string }[] }>(
    `insert into weather_files (team_id, name, bytes, fingerprint, storage_key, format, status, declared_station, station_id,
       licence, attribution, uploaded_by, uploaded_at, accepted_by, accepted_at)
     select parent.team_id, :name, :bytes, :fingerprint, :storageKey, :format, 'accepted', parent.declared_station,
       parent.station_id, parent.licence, parent.attribution, :personId, :at, :personId, :at
     from weather_files as parent
     where parent.team_id = :teamId and parent.id = :parentFileId
     on conflict (team_id, fingerprint, part_index) where status <> 'withdrawn' do nothing
     returning id`,
    { ...file, name: storableText(file.name), format: DERIVED_FORMAT },
  );
  return rows[0]?.id ?? null;
}

/** What a derived year was made of. */
export async function insertDerivation(
  transaction: Knex.Transaction,
  derivation: {
    teamId: string;
    weatherYearId: string;
    parentYearId: string;
    humidityRule: HumidityRule;
    monthly: readonly MonthlyChange[];
    cappedHours: number;
    difference: ClimateDifference;
  },
): Promise<void> {
  await transaction.raw(
    `insert into derived_years (team_id, weather_year_id, parent_year_id, humidity_rule, monthly, capped_hours, difference)
     values (:teamId, :weatherYearId, :parentYearId, :humidityRule, cast(:monthly as jsonb), :cappedHours,
       cast(:difference as jsonb))`,
    {
      ...derivation,
      monthly: JSON.stringify(derivation.monthly),
      difference: JSON.stringify(derivation.difference),
    },
  );
}
