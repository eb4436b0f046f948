import type { Knex } from 'knex';
import type { FileStatus } from '#contract/weather.ts';
import type { BelowZeroPhase } from '#engine/psychrometrics/moist-air.ts';
import type { YearKind } from '#engine/reduction/weather-year.ts';
import type { UsableReading } from '#engine/weather-files/weather-file-reading.ts';

/** A weather file as the parent of a derived year. */
export interface ParentFile {
  readonly fileId: string;
  readonly name: string;
  readonly status: FileStatus;
  readonly fingerprint: string;
  readonly stationId: string | null;
  /** Null while nothing of the file could be read. */
  readonly weatherYearId: string | null;
  readonly kind: YearKind | null;
  readonly contentHash: string;
  readonly belowZero: BelowZeroPhase;
  readonly humidityFrom: UsableReading['humidityFrom'];
}

/** `null` when the team has no such file. */
export async function findParentFile(db: Knex, key: { teamId: string; fileId: string }): Promise<ParentFile | null> {
  const { rows } = await db.raw<{ rows: ParentFile[] }>(
    `select weather_files.id as "fileId", weather_files.name, weather_files.status, weather_files.fingerprint,
       weather_files.station_id as "stationId",
       weather_years.id as "weatherYearId", weather_years.kind, weather_years.content_hash as "contentHash",
       weather_years.below_zero as "belowZero", weather_years.humidity_from as "humidityFrom"
     from weather_files
     left join weather_years on weather_years.weather_file_id = weather_files.id
     where weather_files.team_id = ? and weather_files.id = ?`,
    [key.teamId, key.fileId],
  );
  return rows[0] ?? null;
}
