import type { StationCandidate } from '#contract/site-record.ts';
import { rankStations, type SiteToServe } from '#engine/interpolation/station-choice.ts';
import { gradePlace } from '#engine/score/grade-place.ts';
import { hasYears } from './resolved-sites-read-model.ts';
import type { StationOfTeam } from './site-read-model.ts';

const MOST = 12;

/** The stations for a site, best first: a dozen, and the chosen one wherever it stands. */
export function rankCandidates(
  site: SiteToServe & { readonly heightFromRelief: boolean },
  stations: readonly StationOfTeam[],
  chosenId: string | null = null,
): StationCandidate[] {
  const byId = new Map(stations.map((station) => [station.id, station]));
  const ranked = rankStations({ site, stations: stations.filter((each) => hasYears(each) || each.id === chosenId) });
  return ranked
    .filter(({ id }, rank) => rank < MOST || id === chosenId)
    .flatMap((choice) => {
      const station = byId.get(choice.id);
      if (station === undefined) return [];
      const { distanceKm, heightDifferenceM } = choice;
      const { grade } = gradePlace({
        ...{ distanceKm, heightDifferenceM: heightDifferenceM ?? 0, heightFromRelief: site.heightFromRelief },
        years: { actual: station.actualYears, typical: station.typicalYears > 0 },
        // What was measured is a matter of the years that a brief can use: nothing is held against a station here.
        ...{ measuredSharePct: 100, flagsInformative: true, kind: 'station' },
      });
      return [{ ...station, ...choice, grade }];
    });
}
