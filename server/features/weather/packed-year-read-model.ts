import type { Knex } from 'knex';
import { packedFromBytes } from '#engine/reduction/packed-columns.ts';
import type { WeatherYear, YearKind } from '#engine/reduction/weather-year.ts';

interface PackedRow {
  readonly kind: YearKind;
  readonly year: number | null;
  readonly utcOffsetMin: number;
  readonly dryBulb: Buffer;
  readonly humidityRatio: Buffer;
  readonly pressure: Buffer;
  readonly flags: Buffer;
}

/** The packed columns of a weather year, the facts that every figure is computed from; `null` when the team has no such year. */
export async function readPackedYear(
  db: Knex,
  key: { teamId: string; weatherYearId: string },
): Promise<WeatherYear | null> {
  const { rows } = await db.raw<{ rows: PackedRow[] }>(
    `select weather_years.kind, weather_years.year, weather_years.utc_offset_min as "utcOffsetMin",
       weather_years.dry_bulb as "dryBulb", weather_years.humidity_ratio as "humidityRatio", weather_years.pressure,
       weather_years.flags
     from weather_years
     where weather_years.team_id = ? and weather_years.id = ?`,
    [key.teamId, key.weatherYearId],
  );
  const row = rows[0];
  if (row === undefined) return null;
  return { kind: row.kind, year: row.year, utcOffsetMin: row.utcOffsetMin, packed: packedFromBytes(row) };
}
