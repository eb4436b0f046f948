import type { Knex } from 'knex';
import type { WeatherFile, YearFacts } from '#contract/weather.ts';
import { presentFacts, presentWeatherFile } from './present-weather-file.ts';
import { listFilesOfStation } from './weather-file-read-model.ts';

/** The files of a station with what their years were reduced to, for the page that shows them side by side. */
export async function filesOfStation(
  db: Knex,
  key: { teamId: string; stationId: string },
): Promise<{ file: WeatherFile; weatherYearId: string | null; facts: YearFacts | null }[]> {
  const views = await listFilesOfStation(db, key);
  return views.map(({ weatherYearId, facts, ...view }) => ({
    file: presentWeatherFile(view),
    weatherYearId,
    facts: facts === null ? null : presentFacts(facts),
  }));
}
