import { queryOptions, useQuery } from '@tanstack/react-query';
import type { WeatherFile, YearFacts } from '../../contract/weather.ts';
import { getWeatherYearColumns } from '../../contract/weather-reading.ts';
import { SLOTS_PER_LEAP_YEAR, SLOTS_PER_YEAR } from '../../engine/conventions.ts';
import { depressionColumn, wetBulbColumn } from '../../engine/reduction/derived-columns.ts';
import { packedFromBytes, unpackYear, type YearColumns } from '../../engine/reduction/packed-columns.ts';
import type { PackedYear } from '../../engine/reduction/weather-year.ts';
import { callForBytes } from '../../lib/api-client.ts';
import { useTeam } from '../../lib/team-scope.ts';

/** The hours of a weather year with what follows from them. */
export interface RecordYear extends YearColumns {
  readonly packed: PackedYear;
  readonly wetBulbC: Float64Array;
  readonly depressionK: Float64Array;
  /** Mean of the hours whose pressure is known; null when none is. */
  readonly meanPressurePa: number | null;
}

const BYTES_PER_SLOT = 7;

/** @throws RangeError when the bytes are not those of one year */
export function recordYearOf(bytes: Uint8Array): RecordYear {
  const slots = bytes.length / BYTES_PER_SLOT;
  if (slots !== SLOTS_PER_YEAR && slots !== SLOTS_PER_LEAP_YEAR) {
    throw new RangeError(
      `${bytes.length} bytes are no weather year of ${SLOTS_PER_YEAR} or ${SLOTS_PER_LEAP_YEAR} slots`,
    );
  }
  const packed = packedFromBytes({
    dryBulb: bytes.subarray(0, 2 * slots),
    humidityRatio: bytes.subarray(2 * slots, 4 * slots),
    pressure: bytes.subarray(4 * slots, 6 * slots),
    flags: bytes.subarray(6 * slots),
  });
  const columns = unpackYear(packed);
  const wetBulbC = wetBulbColumn(packed);
  const depressionK = depressionColumn(columns.dryBulbC, wetBulbC);
  return { ...columns, packed, wetBulbC, depressionK, meanPressurePa: meanOf(columns.pressurePa) };
}

function meanOf(values: Float64Array): number | null {
  const known = values.filter((value) => !Number.isNaN(value));
  return known.length === 0 ? null : known.reduce((sum, value) => sum + value, 0) / known.length;
}

/** The hours of a file's year. They change only when the file is read anew, and its figures with them. */
export function useRecordYear(file: WeatherFile, facts: YearFacts) {
  const { teamId } = useTeam();
  const params = { teamId, fileId: file.id };
  const { meanDryBulbC, meanWetBulbC, measured, repaired, missing } = facts;
  return useQuery(
    queryOptions<RecordYear>({
      queryKey: [getWeatherYearColumns.path, params, meanDryBulbC, meanWetBulbC, measured, repaired, missing],
      queryFn: async ({ signal }) =>
        recordYearOf(await callForBytes(getWeatherYearColumns, { params, query: {} }, { signal })),
      staleTime: Number.POSITIVE_INFINITY,
    }),
  );
}
