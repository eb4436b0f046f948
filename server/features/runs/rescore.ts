import type { Knex } from 'knex';
import type { RescoreAnswer } from '#contract/rescore.ts';
import type { Brief } from '#engine/brief/brief.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import type { RescoredStation, StationToRescore } from '../../jobs/web-task.ts';
import type { WebThreads } from '../../jobs/web-threads.ts';
import type { ColumnCache } from './column-cache.ts';
import { AT_THE_STATION, gradeOfYears } from './grade-of-years.ts';
import { presentFigures, shownYearOf } from './present-figures.ts';
import { inBatches, inChunks, stationsOf } from './rescore-portions.ts';
import { listYearsToRescore, type YearToRescore } from './rescore-read-model.ts';
import { type ScoredStation, surfaceOf } from './surface.ts';
import type { SurfaceGrounds } from './surface-ground.ts';

export type RescoreThreads = Pick<WebThreads, 'threads' | 'rescore'>;

export interface RescoreParts {
  readonly db: Knex;
  readonly threads: RescoreThreads;
  readonly cache: ColumnCache;
}

export interface RescoreAsked {
  readonly teamId: string;
  readonly brief: Brief;
  /** Null: every station of the team. */
  readonly stationIds: readonly string[] | null;
  readonly withHashes: boolean;
  /** Asks for the surface too. */
  readonly surface?: { readonly grounds: SurfaceGrounds; readonly held: string | undefined };
  readonly signal: AbortSignal;
}

/**
 * What every station of a team comes to under a draft brief, judged anew from the packed columns of its accepted years.
 * @throws the reason of `signal`; threads then take no further portion
 */
export async function rescore(parts: RescoreParts, asked: RescoreAsked): Promise<RescoreAnswer> {
  const begun = performance.now();
  const all = await listYearsToRescore(parts.db, asked.teamId);
  const wanted = asked.stationIds === null ? null : new Set(asked.stationIds);
  const years = wanted === null ? all : all.filter(({ stationId }) => wanted.has(stationId));
  const accepted = new Map(all.map(({ weatherYearId, contentHash }) => [weatherYearId, contentHash]));
  const stations: RescoredStation[] = [];
  let loadMs = 0;
  for (const batch of inBatches(years, parts.cache.maxBytes)) {
    const loading = performance.now();
    const { teamId, signal } = asked;
    const columns = await parts.cache.take({ teamId, years: batch, accepted, signal });
    loadMs += performance.now() - loading;
    stations.push(...(await judgeBatch(parts.threads, { ...asked, stations: stationsOf(batch, columns) })));
  }
  return {
    methodVersion: METHOD_VERSION,
    stations: stations.map((station) => presentStation(station, years)),
    sites: [],
    judged: judgedYears(years, stations),
    surface:
      asked.surface === undefined || wanted !== null
        ? null
        : await surfaceOf(asked.surface.grounds, {
            stations: scoredStations(stations, years),
            anchors: asked.brief.score,
            held: asked.surface.held,
            signal: asked.signal,
          }),
    loadMs,
    totalMs: performance.now() - begun,
  };
}

function scoredStations(stations: readonly RescoredStation[], years: readonly YearToRescore[]): ScoredStation[] {
  const places = new Map(years.map((year) => [year.stationId, year]));
  return stations.flatMap(({ stationId, score, raw }) => {
    const place = places.get(stationId);
    if (score === null || place === undefined) return [];
    const { latitude, longitude, elevationM } = place;
    return [{ latitude, longitude, elevationM, raw }];
  });
}

function presentStation(station: RescoredStation, years: readonly YearToRescore[]): RescoreAnswer['stations'][number] {
  const { stationId, shown, shownWeatherYearId, restsOn } = station;
  const usable = new Set(station.usable);
  const own = years.filter((year) => year.stationId === stationId);
  const grade = gradeOfYears(
    own.map((year) => ({ ...year, hours: year.slots, usable: usable.has(year.weatherYearId) })),
    AT_THE_STATION,
  );
  const figures = { ...station, yearsCounted: restsOn.length, shown: shown === null ? null : shownYearOf(shown) };
  return { stationId, shownWeatherYearId, restsOn: [...restsOn], ...presentFigures(figures, grade.grade) };
}

/** Every thread takes portions until none is left; the first fault ends it for all. */
async function judgeBatch(
  threads: RescoreThreads,
  asked: RescoreAsked & { readonly stations: readonly StationToRescore[] },
): Promise<readonly RescoredStation[]> {
  const { brief, withHashes } = asked;
  const chunks = inChunks(asked.stations, threads.threads);
  const answers: (readonly RescoredStation[])[] = chunks.map(() => []);
  const failed = new AbortController();
  const signal = AbortSignal.any([asked.signal, failed.signal]);
  let next = 0;
  const takePortions = async (): Promise<void> => {
    for (let mine = next++; mine < chunks.length; mine = next++) {
      const stations = chunks[mine] ?? [];
      answers[mine] = await threads.rescore({ brief, stations, withHashes }, signal);
    }
  };
  try {
    await Promise.all(Array.from({ length: threads.threads }, takePortions));
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
