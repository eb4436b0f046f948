import { demoWeatherFile } from './demo-weather-file.ts';
import type { DemoStation } from './stations.ts';

/** One more invented station, which the demo does not hold: for trying out an upload. */
export const sampleStation: DemoStation = {
  name: 'Quagga Well',
  latitude: -30.1,
  longitude: 19.9,
  elevationM: 968,
  utcOffsetH: 2,
  climate: 'desert interior',
  dryBulbC: [25.5, 11],
  dailyRangeK: [16, 16],
  dewPointC: [8, -0.5],
  year: null,
  faults: ['long gap', 'pressure spike'],
};

export function sampleUpload(): { name: string; text: string } {
  return demoWeatherFile(sampleStation);
}
