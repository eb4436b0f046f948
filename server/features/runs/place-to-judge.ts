import type { Knex } from 'knex';
import type { PlaceKind } from '#contract/place-doubts.ts';
import { AppError } from '../../http/app-error.ts';
import type { StationToRescore } from '../../jobs/web-task.ts';
import { sitesOfProgramme } from '../sites/resolved-sites-read-model.ts';
import type { ColumnCache } from './column-cache.ts';
import { heightUsed } from './height-used.ts';
import { stationsOf } from './rescore-portions.ts';
import { listYearsToRescore, type YearToRescore } from './rescore-read-model.ts';

export interface PlaceAsked {
  readonly teamId: string;
  readonly programmeId: string;
  readonly placeKind: PlaceKind;
  readonly placeId: string;
}

export interface PlaceToJudge {
  readonly station: StationToRescore;
  readonly humidityFrom: ReadonlyMap<string, 'dew point' | 'relative humidity'>;
}

/**
 * A station or site with its years in memory, ready for a thread.
 * @throws AppError not_found; wrong_state for a site without weather
 */
export async function placeToJudge(
  { db, cache }: { db: Knex; cache: ColumnCache },
  asked: PlaceAsked & { signal: AbortSignal },
): Promise<PlaceToJudge> {
  const { teamId, signal } = asked;
  const [all, site] = await Promise.all([listYearsToRescore(db, teamId), siteOf(db, asked)]);
  const stationId = site === null ? asked.placeId : site.station?.id;
  const years = all.filter((year) => year.stationId === stationId);
  const accepted = new Map(all.map(({ weatherYearId, contentHash }) => [weatherYearId, contentHash]));
  const columns = await cache.take({ teamId, years, accepted, signal });
  const [station] = stationsOf(years, columns);
  if (station === undefined) throw noWeather(asked.placeKind);
  return { station: site === null ? station : atHeightOf(site, station), humidityFrom: new Map(years.map(readFrom)) };
}

async function siteOf(db: Knex, { teamId, programmeId, placeKind, placeId }: PlaceAsked) {
  if (placeKind === 'stations') return null;
  const [site] = await sitesOfProgramme(db, { teamId, programmeId, siteIds: [placeId] });
  if (site === undefined)
    throw new AppError('not_found', 'There is no such site in this programme, or it was removed.');
  return site;
}

function atHeightOf(site: Parameters<typeof heightUsed>[0], station: StationToRescore): StationToRescore {
  const { heightM, adjusted } = heightUsed(site, station.heightM);
  return { ...station, heightM, adjustedFromM: adjusted ? station.heightM : null };
}

function noWeather(placeKind: PlaceKind): AppError {
  return placeKind === 'stations'
    ? new AppError('not_found', 'There is no such station on the map of this team.')
    : new AppError('wrong_state', 'No station with an accepted weather year stands for this site yet.');
}

/** A wet bulb is read as its dew point is: to half a kelvin. */
function readFrom({ weatherYearId, humidityFrom }: YearToRescore): [string, 'dew point' | 'relative humidity'] {
  return [weatherYearId, humidityFrom === 'relative humidity' ? 'relative humidity' : 'dew point'];
}
