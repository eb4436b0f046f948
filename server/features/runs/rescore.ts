import type { Knex } from 'knex';
import type { RescoreAnswer } from '#contract/rescore.ts';
import type { Brief } from '#engine/brief/brief.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import type { RescoredStation, StationToRescore } from '../../jobs/web-task.ts';
import type { WebThreads } from '../../jobs/web-threads.ts';
import { type ResolvedSite, sitesOfProgramme } from '../sites/resolved-sites-read-model.ts';
import type { ColumnCache } from './column-cache.ts';
import { heightUsed } from './height-used.ts';
import { presentRescoredSite, presentRescoredStation, type SiteToRescore } from './present-rescored.ts';
import { inBatches, portionsOfThreads, stationsOf } from './rescore-portions.ts';
import { listYearsToRescore, type YearToRescore } from './rescore-read-model.ts';
import type { SharedJudging } from './shared-judging.ts';
import type { ScoredStation } from './surface.ts';

export type RescoreThreads = Pick<WebThreads, 'threads' | 'rescore'>;

export interface RescoreParts {
  readonly db: Knex;
  readonly threads: RescoreThreads;
  readonly cache: ColumnCache;
  /** null: everything is judged for this asker alone. */
  readonly shared: SharedJudging | null;
}

export interface RescoreAsked {
  readonly teamId: string;
  readonly programmeId: string;
  readonly brief: Brief;
  /** Null: every station of the team. */
  readonly stationIds: readonly string[] | null;
  readonly siteIds: readonly string[];
  readonly withHashes: boolean;
  readonly signal: AbortSignal;
}

/**
 * What stations of a team and sites of a programme come to under a draft brief, judged anew from the packed columns of accepted years.
 * Sites of one station and height share one judging; a site at its station's height shares the station's.
 * @throws the reason of `signal`; threads then take no further portion
 */
export async function rescore(parts: RescoreParts, asked: RescoreAsked): Promise<RescoreAnswer> {
  const begun = performance.now();
  const { stations, sites, byStation, judged, loadMs } = await judgeUnder(parts, asked);
  const yearsOf = (stationId: string) => byStation.get(stationId) ?? [];
  return {
    methodVersion: METHOD_VERSION,
    stations: stations.map((station) => presentRescoredStation(station, yearsOf(station.stationId))),
    sites: sites.map((site) => {
      const found = site.place === null ? undefined : judged.get(keyOf(site.place));
      return presentRescoredSite(site, { brief: asked.brief, judged: found, years: yearsOf(found?.stationId ?? '') });
    }),
    judged: judgedYears(
      stations.flatMap(({ stationId }) => yearsOf(stationId)),
      stations,
    ),
    loadMs,
    totalMs: performance.now() - begun,
  };
}

interface JudgedUnder {
  /** The stations that were asked for, at their own heights, in the order of the map. */
  readonly stations: readonly RescoredStation[];
  readonly sites: readonly SiteToRescore[];
  readonly byStation: ReadonlyMap<string, readonly [YearToRescore, ...YearToRescore[]]>;
  /** Every station at every height that it was judged at. */
  readonly judged: ReadonlyMap<string, RescoredStation>;
  readonly loadMs: number;
}

async function judgeUnder(parts: RescoreParts, asked: RescoreAsked): Promise<JudgedUnder> {
  const [all, resolved] = await Promise.all([
    listYearsToRescore(parts.db, asked.teamId),
    asked.siteIds.length === 0 ? [] : sitesOfProgramme(parts.db, asked),
  ]);
  const byStation = groupYears(all);
  const sites = sitesToRescore(resolved, byStation);
  const wanted = asked.stationIds === null ? new Set(byStation.keys()) : new Set(asked.stationIds);
  const heights = heightsToJudge({ sites, wanted, byStation });
  const years = all.filter(({ stationId }) => heights.has(stationId));
  const accepted = new Map(all.map(({ weatherYearId, contentHash }) => [weatherYearId, contentHash]));
  const judged = new Map<string, RescoredStation>();
  let loadMs = 0;
  for (const batch of inBatches(years, parts.cache.maxBytes)) {
    const loading = performance.now();
    const { teamId, signal } = asked;
    const columns = await parts.cache.take({ teamId, years: batch, accepted, signal });
    loadMs += performance.now() - loading;
    const stations = stationsOf(batch, columns).flatMap((station) => atHeights(station, heights));
    const judge = (some: readonly StationToRescore[]) => judgeBatch(parts.threads, { ...asked, stations: some });
    const shared = asked.withHashes ? null : parts.shared;
    const found = shared === null ? judge(stations) : shared.take({ brief: asked.brief, stations }, judge);
    for (const each of await found) judged.set(keyOf(each), each);
  }
  const stations = [...byStation].flatMap(([stationId, [{ elevationM }]]) => {
    const station = wanted.has(stationId) ? judged.get(keyOf({ stationId, heightM: elevationM })) : undefined;
    return station === undefined ? [] : [station];
  });
  return { stations, sites, byStation, judged, loadMs };
}

/** The stations of the team that have a score under a draft, with what it was formed of. @throws as `rescore` */
export async function scoredUnder(
  parts: RescoreParts,
  asked: Omit<RescoreAsked, 'stationIds' | 'siteIds' | 'withHashes'>,
): Promise<readonly ScoredStation[]> {
  const all = { ...asked, stationIds: null, siteIds: [], withHashes: false };
  const { stations, byStation } = await judgeUnder(parts, all);
  return stations.flatMap(({ stationId, score, raw }) => {
    const place = byStation.get(stationId)?.[0];
    if (score === null || place === undefined) return [];
    const { latitude, longitude, elevationM } = place;
    return [{ latitude, longitude, elevationM, raw }];
  });
}

function keyOf({ stationId, heightM }: { stationId: string; heightM: number }): string {
  return `${stationId} ${heightM}`;
}

function groupYears(
  years: readonly YearToRescore[],
): ReadonlyMap<string, readonly [YearToRescore, ...YearToRescore[]]> {
  const groups = new Map<string, [YearToRescore, ...YearToRescore[]]>();
  for (const year of years) {
    const own = groups.get(year.stationId);
    if (own === undefined) groups.set(year.stationId, [year]);
    else own.push(year);
  }
  return groups;
}

/** The sites with the station and height that they are judged at; null without a year to judge. */
function sitesToRescore(
  sites: readonly ResolvedSite[],
  byStation: ReadonlyMap<string, readonly [YearToRescore, ...YearToRescore[]]>,
): readonly SiteToRescore[] {
  return sites.map((site) => {
    const first = site.station === null ? undefined : byStation.get(site.station.id)?.[0];
    if (first === undefined) return { site, place: null };
    return { site, place: { stationId: first.stationId, heightM: heightUsed(site, first.elevationM).heightM } };
  });
}

/** Every height that a station is judged at: its own where it is asked for, and those of its sites. */
function heightsToJudge(on: {
  sites: readonly SiteToRescore[];
  wanted: ReadonlySet<string>;
  byStation: ReadonlyMap<string, readonly [YearToRescore, ...YearToRescore[]]>;
}): ReadonlyMap<string, ReadonlySet<number>> {
  const heights = new Map<string, Set<number>>();
  const add = (stationId: string, heightM: number): void => {
    heights.set(stationId, (heights.get(stationId) ?? new Set()).add(heightM));
  };
  for (const [stationId, [{ elevationM }]] of on.byStation) if (on.wanted.has(stationId)) add(stationId, elevationM);
  for (const { place } of on.sites) if (place !== null) add(place.stationId, place.heightM);
  return heights;
}

function atHeights(station: StationToRescore, heights: ReadonlyMap<string, ReadonlySet<number>>): StationToRescore[] {
  const elevationM = station.heightM;
  return [...(heights.get(station.stationId) ?? [])].map((heightM) => ({
    ...station,
    heightM,
    adjustedFromM: heightM === elevationM ? null : elevationM,
  }));
}

/** Every thread takes its portions, then what is left of the others'; the first fault ends it for all. */
async function judgeBatch(
  threads: RescoreThreads,
  asked: RescoreAsked & { readonly stations: readonly StationToRescore[] },
): Promise<readonly RescoredStation[]> {
  const { brief, withHashes } = asked;
  const portions = portionsOfThreads(asked.stations, threads.threads);
  const answers: (readonly RescoredStation[])[] = [];
  const failed = new AbortController();
  const signal = AbortSignal.any([asked.signal, failed.signal]);
  const takePortions = async (seat: number): Promise<void> => {
    const nextPortion = () => portions[seat]?.shift() ?? portions.find(({ length }) => length > 0)?.pop();
    for (let stations = nextPortion(); stations !== undefined; stations = nextPortion()) {
      answers.push(await threads.rescore({ brief, stations, withHashes }, { signal, seat }));
    }
  };
  try {
    await Promise.all(portions.map((_portions, seat) => takePortions(seat)));
  } catch (error) {
    failed.abort(error);
    throw error;
  }
  return answers.flat();
}

function judgedYears(years: readonly YearToRescore[], stations: readonly RescoredStation[]): RescoreAnswer['judged'] {
  const hashes = new Map(
    stations.flatMap(({ resultHashes }) => resultHashes.map((each) => [each.weatherYearId, each.resultHash])),
  );
  return years.map(({ weatherYearId, stationId, kind, year, contentHash }) => ({
    weatherYearId,
    stationId,
    kind,
    year,
    contentHash,
    resultHash: hashes.get(weatherYearId) ?? null,
  }));
}
