/** How the years of a team are parted: batches that fit into memory, then portions that threads take one after another. */
import type { StationToRescore } from '../../jobs/web-task.ts';
import { bytesOfYear, type YearToRescore } from './rescore-read-model.ts';

/** More would make the last thread wait long for the others, and a client that has gone be worked for in vain. */
const MOST_YEARS = 32;
/** Portions for each thread, so that none waits long for the last one of another. */
const PORTIONS_PER_THREAD = 4;

/** Whole stations in their order, as many as fit. */
export function inBatches(years: readonly YearToRescore[], maxBytes: number): readonly (readonly YearToRescore[])[] {
  const batches: YearToRescore[][] = [];
  let bytes = 0;
  for (const station of stationGroups(years)) {
    const size = station.reduce((sum, year) => sum + bytesOfYear(year), 0);
    const last = batches.at(-1);
    if (last === undefined || bytes + size > maxBytes) {
      batches.push([...station]);
      bytes = size;
    } else {
      last.push(...station);
      bytes += size;
    }
  }
  return batches;
}

/** Portions for each thread, in their order: every station always goes to the same one, which keeps what it derived from its years. */
export function portionsOfThreads(
  stations: readonly StationToRescore[],
  threads: number,
): readonly (readonly StationToRescore[])[][] {
  const total = stations.reduce((sum, { years }) => sum + years.length, 0);
  const most = Math.min(MOST_YEARS, Math.ceil(total / (threads * PORTIONS_PER_THREAD)));
  const shares = Array.from({ length: threads }, (): StationToRescore[] => []);
  for (const station of stations) shares[threadOf(station, threads)]?.push(station);
  return shares.map((share) => inPortions(share, most));
}

/** The last of a random id is as good as any number. */
function threadOf({ stationId }: StationToRescore, threads: number): number {
  return Number.parseInt(stationId.slice(-6), 16) % threads;
}

/** Whole stations in their order, about so many years a portion. */
function inPortions(stations: readonly StationToRescore[], most: number): (readonly StationToRescore[])[] {
  const chunks: StationToRescore[][] = [];
  let years = 0;
  for (const station of stations) {
    const last = chunks.at(-1);
    if (last === undefined || years + station.years.length > most) {
      chunks.push([station]);
      years = station.years.length;
    } else {
      last.push(station);
      years += station.years.length;
    }
  }
  return chunks;
}

/** Stations with their years' columns; a year whose columns have gone since it was listed is left out. */
export function stationsOf(
  years: readonly YearToRescore[],
  columns: ReadonlyMap<string, SharedArrayBuffer>,
): readonly StationToRescore[] {
  return stationGroups(years).map((group) => {
    const [{ stationId, zone, latitude, longitude, elevationM }] = group;
    return {
      stationId,
      zone,
      heightM: elevationM,
      adjustedFromM: null,
      position: { latitude, longitude },
      years: group.flatMap(({ weatherYearId, contentHash, kind, year, utcOffsetMin }) => {
        const found = columns.get(weatherYearId);
        return found === undefined ? [] : [{ weatherYearId, contentHash, kind, year, utcOffsetMin, columns: found }];
      }),
    };
  });
}

/** Years come ordered by station. */
function stationGroups(years: readonly YearToRescore[]): readonly [YearToRescore, ...YearToRescore[]][] {
  const groups: [YearToRescore, ...YearToRescore[]][] = [];
  for (const year of years) {
    const last = groups.at(-1);
    if (last?.[0].stationId === year.stationId) last.push(year);
    else groups.push([year]);
  }
  return groups;
}
