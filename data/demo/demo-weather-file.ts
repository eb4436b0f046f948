import { inventWeather } from './invent-weather.ts';
import { recordWithFaults } from './recording-faults.ts';
import type { DemoStation } from './stations.ts';
import { writeEpw } from './write-epw.ts';

/** The weather file of an invented station: the same bytes every time. */
export function demoWeatherFile(station: DemoStation): { name: string; text: string } {
  const slug = station.name.toLowerCase().replaceAll(' ', '-');
  const period = station.year === null ? 'typical' : String(station.year);
  return { name: `${slug}-${period}.epw`, text: writeEpw(station, recordWithFaults(station, inventWeather(station))) };
}
