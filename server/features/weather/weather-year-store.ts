import type { Knex } from 'knex';
import { bytesOf16, packedBytes } from '#engine/reduction/packed-columns.ts';
import type { ReducedYear } from '#engine/reduction/reduce-year.ts';
import { PACKED_LAYOUT } from '#engine/reduction/weather-year.ts';
import type { UsableReading } from '#engine/weather-files/weather-file-reading.ts';

export interface NewWeatherYear {
  readonly teamId: string;
  readonly fileId: string;
  readonly reading: Pick<UsableReading, 'humidityFrom' | 'belowZero'>;
  readonly reduced: ReducedYear;
  /** Hours whose dry bulb and humidity are both as the source measured them. */
  readonly measuredHours: number;
  readonly readVersion: string;
  readonly contentHash: string;
}

/** The year with its packed columns and facts. @returns its id */
export async function insertWeatherYear(transaction: Knex.Transaction, year: NewWeatherYear): Promise<string> {
  const { reading, reduced } = year;
  const { packed } = reduced.year;
  const bytes = packedBytes(packed);
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    `insert into weather_years (team_id, weather_file_id, kind, year, utc_offset_min, slots, layout, dry_bulb,
       humidity_ratio, pressure, flags, histogram, depression_hours, humidity_from, below_zero, facts, read_version,
       content_hash)
     values (:teamId, :fileId, :kind, :calendarYear, :utcOffsetMin, :slots, :layout, :dryBulb, :humidityRatio, :pressure,
       :flags, :histogram, cast(:depressionHours as smallint[]), :humidityFrom, :belowZero, cast(:facts as jsonb),
       :readVersion, :contentHash)
     returning id`,
    {
      teamId: year.teamId,
      fileId: year.fileId,
      kind: reduced.year.kind,
      calendarYear: reduced.year.year,
      utcOffsetMin: reduced.year.utcOffsetMin,
      slots: packed.flags.length,
      layout: PACKED_LAYOUT,
      dryBulb: asBuffer(bytes.dryBulb),
      humidityRatio: asBuffer(bytes.humidityRatio),
      pressure: asBuffer(bytes.pressure),
      flags: asBuffer(bytes.flags),
      histogram: asBuffer(bytesOf16(reduced.histogram)),
      depressionHours: `{${reduced.depressionHours.join(',')}}`,
      humidityFrom: reading.humidityFrom,
      belowZero: reading.belowZero,
      facts: JSON.stringify({ ...reduced.facts, measuredHours: year.measuredHours }),
      readVersion: year.readVersion,
      contentHash: year.contentHash,
    },
  );
  return rows[0].id;
}

/** The same bytes, not a copy. */
function asBuffer(bytes: Uint8Array): Buffer {
  return Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
}

/** Gives the year of a file its station. @returns the year's id */
export async function setYearStation(
  transaction: Knex.Transaction,
  place: { teamId: string; fileId: string; stationId: string },
): Promise<string> {
  const { rows } = await transaction.raw<{ rows: { id: string }[] }>(
    `update weather_years set station_id = :stationId
     where team_id = :teamId and weather_file_id = :fileId
     returning id`,
    place,
  );
  const [year] = rows;
  if (year === undefined) throw new Error(`the file ${place.fileId} waits for review without a weather year`);
  return year.id;
}
