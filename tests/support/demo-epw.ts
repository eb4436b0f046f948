import { demoWeatherFile } from '../../data/demo/demo-weather-file.ts';
import { type DemoStation, demoStations } from '../../data/demo/stations.ts';

export interface DemoEpw {
  readonly station: DemoStation;
  readonly name: string;
  readonly text: string;
}

/** The file of the nth invented station that records a typical year without faults: 8760 hours, read to `review`. */
export function demoEpw(nth: number): DemoEpw {
  const clean = demoStations.filter(({ year, faults }) => year === null && faults.length === 0);
  const station = clean[nth];
  if (station === undefined) throw new RangeError(`the demo has ${clean.length} clean typical years`);
  return { station, ...demoWeatherFile(station) };
}
