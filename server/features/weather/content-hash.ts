import { createHash } from 'node:crypto';
import { READ_VERSION } from '#engine/conventions.ts';
import { packedBytes } from '#engine/reduction/packed-columns.ts';
import type { WeatherYear } from '#engine/reduction/weather-year.ts';

/**
 * SHA-256, hexadecimal, of a weather year as reduced: its packed columns, UTC offset, kind (an actual one with its year) and
 * READ_VERSION. Two files that reduce to the same year have the same hash; it is the weather's part of a run's key.
 */
export function contentHash(weatherYear: WeatherYear): string {
  const { dryBulb, humidityRatio, pressure, flags } = packedBytes(weatherYear.packed);
  const kind = weatherYear.year === null ? weatherYear.kind : `${weatherYear.kind} ${weatherYear.year}`;
  // The lengths of the columns follow from the number of slots, so nothing can slide from one part into the next.
  const head = [READ_VERSION, kind, weatherYear.utcOffsetMin, flags.length].join('|');
  return createHash('sha256')
    .update(`${head}\n`)
    .update(dryBulb)
    .update(humidityRatio)
    .update(pressure)
    .update(flags)
    .digest('hex');
}
