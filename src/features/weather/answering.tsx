import type { WeatherFileRecord } from '../../contract/weather.ts';

/** What a file asks, as a form for those who may answer; nothing while it asks nothing. */
export function Answering({ record }: { record: WeatherFileRecord }) {
  if (record.file.status !== 'asks') return null;
  return null;
}
