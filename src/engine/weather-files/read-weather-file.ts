import type { ReadOptions } from './read-options.ts';
import { readWeatherFileParts } from './read-weather-file-parts.ts';
import type { WeatherFileReading } from './weather-file-reading.ts';

/**
 * Reads one station-year of an hourly weather file: the one that `options.part` names, else the first. What a file holds beside
 * it, `readWeatherFileParts` gives.
 */
export function readWeatherFile(bytes: Uint8Array, name: string, options: ReadOptions = {}): WeatherFileReading {
  const readings = readWeatherFileParts(bytes, name, options);
  const reading = readings.find(({ part }) => part === options.part) ?? readings[0];
  if (reading === undefined) throw new Error('a file without a reading');
  return reading;
}
