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
  const { placeKind, placeId } = asked;
  if (placeKind === 'sites') await mustBeSite(db, asked);
  const [place] = await placesToJudge({ db, cache }, { ...asked, places: [{ placeKind, id: placeId }] });
  if (place === undefined) throw noWeather(placeKind);
  return place;
}

async function mustBeSite(db: Knex, { teamId, programmeId, placeId }: PlaceAsked): Promise<void> {
  const [site] = await sitesOfProgramme(db, { teamId, programmeId, siteIds: [placeId] });
  if (site === undefined)
    throw new AppError('not_found', 'There is no such site in this programme, or it was removed.');
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

/** The same of many places, those that have gone meanwhile left out. */
export async function placesToJudge(
  { db, cache }: { db: Knex; cache: ColumnCache },
  asked: {
    readonly teamId: string;
    readonly programmeId: string;
    readonly places: readonly { readonly placeKind: PlaceKind; readonly id: string }[];
    readonly signal: AbortSignal;
  },
): Promise<readonly (PlaceToJudge & { readonly id: string })[]> {
  const { teamId, programmeId, signal } = asked;
  const siteIds = asked.places.flatMap(({ placeKind, id }) => (placeKind === 'sites' ? [id] : []));
  const [all, sites] = await Promise.all([
    listYearsToRescore(db, teamId),
    siteIds.length === 0 ? [] : sitesOfProgramme(db, { teamId, programmeId, siteIds }),
  ]);
  const siteById = new Map(sites.map((site) => [site.id, site]));
  const stationOf = ({ placeKind, id }: (typeof asked.places)[number]) =>
    placeKind === 'stations' ? id : siteById.get(id)?.station?.id;
  const wanted = new Set(asked.places.map(stationOf));
  const years = all.filter(({ stationId }) => wanted.has(stationId));
  const accepted = new Map(all.map(({ weatherYearId, contentHash }) => [weatherYearId, contentHash]));
  const stations = new Map(
    stationsOf(years, await cache.take({ teamId, years, accepted, signal })).map((each) => [each.stationId, each]),
  );
  const humidityFrom = new Map(years.map(readFrom));
  return asked.places.flatMap((place) => {
    const station = stations.get(stationOf(place) ?? '');
    if (station === undefined) return [];
    const site = siteById.get(place.id);
    return [{ id: place.id, station: site === undefined ? station : atHeightOf(site, station), humidityFrom }];
  });
}
