import type { SiteToServe, StationChoice, StationToChoose } from '#engine/interpolation/station-choice.ts';
import { makeStationFinder, type StationFinder } from '#engine/interpolation/station-finder.ts';

/** Sets of stations whose answers are kept, the latest: a table is sorted far more often than a station comes. */
const MOST_SETS = 4;
const MOST_ANSWERS = 60_000;

const kept = new Map<string, StationFinder>();

/** The default station of a site; the same set of stations answers a place that it has answered before from memory. */
export function defaultStations(stations: readonly StationToChoose[]): StationFinder {
  const set = JSON.stringify(
    stations.map(({ id, latitude, longitude, elevationM }) => [id, latitude, longitude, elevationM]),
  );
  const find = kept.get(set) ?? remembering(makeStationFinder(stations));
  kept.delete(set);
  kept.set(set, find);
  for (const oldest of kept.keys()) if (kept.size > MOST_SETS) kept.delete(oldest);
  return find;
}

function remembering(find: StationFinder): StationFinder {
  const answers = new Map<string, StationChoice | null>();
  return (site: SiteToServe) => {
    const place = `${site.latitude} ${site.longitude} ${site.elevationM}`;
    const known = answers.get(place);
    if (known !== undefined) return known;
    const answer = find(site);
    if (answers.size < MOST_ANSWERS) answers.set(place, answer);
    return answer;
  };
}
