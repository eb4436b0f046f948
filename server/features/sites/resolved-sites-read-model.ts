import type { Knex } from 'knex';
import { choiceOf, type StationChoice } from '#engine/interpolation/station-choice.ts';
import { makeStationFinder, type StationFinder } from '#engine/interpolation/station-finder.ts';
import { type SiteFlagName, siteFlags } from '#engine/sites/site-flags.ts';
import { listSiteRows, listStationsOfTeam, type SiteRow, type StationOfTeam } from './site-read-model.ts';

/** A site with the station that stands for it: the chosen one, else the default of method 8. */
export interface ResolvedSite extends Omit<SiteRow, 'stationId' | 'stationReason'> {
  readonly station: ResolvedStation | null;
  readonly flags: readonly SiteFlagName[];
  /** Far or different in height by default, and nobody has chosen yet. */
  readonly toSettle: boolean;
}

export interface ResolvedStation {
  readonly id: string;
  readonly name: string;
  readonly chosen: boolean;
  readonly reason: string | null;
  readonly distanceKm: number;
  /** Station less site, m; null while the site's height is not known. */
  readonly heightDifferenceM: number | null;
}

/** Every site of a programme, or those of some ids, with its station, in the order of their letters. 10,000 sites and 3,000 stations take about 0.1 s. */
export async function sitesOfProgramme(
  db: Knex,
  key: { teamId: string; programmeId: string; siteIds?: readonly string[] },
): Promise<readonly ResolvedSite[]> {
  const [rows, stations] = await Promise.all([listSiteRows(db, key), listStationsOfTeam(db, key.teamId)]);
  const resolve = makeSiteResolver(stations);
  return rows.map(resolve);
}

/** @param stations all of the team's; those without a year stand for a site only when a person chose them */
export function makeSiteResolver(stations: readonly StationOfTeam[]): (row: SiteRow) => ResolvedSite {
  const byId = new Map(stations.map((station) => [station.id, station]));
  const find: StationFinder = makeStationFinder(stations.filter(hasYears));
  return ({ stationId, stationReason, ...row }) => {
    const chosen = stationId === null ? undefined : byId.get(stationId);
    const choice = chosen === undefined ? find(row) : choiceOf(row, chosen);
    const station = choice === null ? undefined : byId.get(choice.id);
    const flags = siteFlags({
      ...row,
      station: choice === null || station === undefined ? null : { ...choice, hasYears: hasYears(station) },
    });
    return {
      ...row,
      station:
        choice === null || station === undefined
          ? null
          : resolvedOf({ choice, name: station.name, chosen: chosen !== undefined, reason: stationReason }),
      flags,
      toSettle: chosen === undefined && (flags.includes('far') || flags.includes('height')),
    };
  };
}

export function hasYears({ actualYears, typicalYears }: StationOfTeam): boolean {
  return actualYears + typicalYears > 0;
}

function resolvedOf(of: {
  choice: StationChoice;
  name: string;
  chosen: boolean;
  reason: string | null;
}): ResolvedStation {
  const { choice, name, chosen, reason } = of;
  const { id, distanceKm, heightDifferenceM } = choice;
  return { id, name, chosen, reason: chosen ? reason : null, distanceKm, heightDifferenceM };
}
