import type { Knex } from 'knex';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { addJob, addJobs } from '../../jobs/queue.ts';
import { type ResolvedSite, sitesOfProgramme } from '../sites/resolved-sites-read-model.ts';
import { heightUsed } from './height-used.ts';
import {
  listProgrammesWithSites,
  listRunsOfSites,
  listYearsAtStations,
  newestVersionsOfProgramme,
  type RunOfSites,
  type YearAtStation,
} from './site-runs-read-model.ts';

interface ProgrammeKey {
  readonly teamId: string;
  readonly programmeId: string;
}

/**
 * Queues the finding of what runs a programme's sites lack: once, however often it is asked for meanwhile. To be called with whatever
 * moves a site, its height or its station.
 */
export async function queueSiteRuns(transaction: Knex, { teamId, programmeId }: ProgrammeKey): Promise<void> {
  await addJob(transaction, {
    task: 'queue-site-runs',
    payload: { teamId, programmeId },
    jobKey: `runs of the sites of ${programmeId}`,
  });
}

/** The same for every programme with sites of a team, whose stations or briefs have changed, or of all teams. */
export async function queueSiteRunsOf(transaction: Knex, team: { teamId: string | null }): Promise<void> {
  for (const key of await listProgrammesWithSites(transaction, team)) await queueSiteRuns(transaction, key);
}

/**
 * The work of the job: under the newest version of every brief of the programme, each year of a station is judged at every height that its
 * sites need and that has no run yet. Sites of one station and height share a run; runs that no site needs any more stay.
 */
export async function queueMissingSiteRuns(db: Knex, key: ProgrammeKey): Promise<void> {
  const { teamId } = key;
  const [sites, years, briefVersionIds] = await Promise.all([
    sitesOfProgramme(db, key),
    listYearsAtStations(db, teamId),
    newestVersionsOfProgramme(db, key),
  ]);
  const needed = heightsByStation(sites, new Map(years.map(({ stationId, elevationM }) => [stationId, elevationM])));
  const runs = await listRunsOfSites(db, { teamId, briefVersionIds, methodVersion: METHOD_VERSION });
  const there = new Set(runs.map(keyOf));
  const jobs = briefVersionIds.flatMap((briefVersionId) =>
    years.flatMap(({ weatherYearId, stationId, elevationM }: YearAtStation) => {
      const heightsM = [...(needed.get(stationId) ?? [])].filter(
        (heightM) => !there.has(keyOf({ weatherYearId, briefVersionId, heightM, adjustedFromM: elevationM })),
      );
      const payload = { teamId, weatherYearId, briefVersionId, heightsM };
      return heightsM.length === 0
        ? []
        : [{ payload, jobKey: `${weatherYearId} ${briefVersionId} at heights of sites` }];
    }),
  );
  if (jobs.length > 0) await addJobs(db, 'judge-year', jobs);
}

/** Heights other than a station's own at which its weather is needed. */
function heightsByStation(
  sites: readonly ResolvedSite[],
  elevations: ReadonlyMap<string, number>,
): ReadonlyMap<string, ReadonlySet<number>> {
  const needed = new Map<string, Set<number>>();
  for (const site of sites) {
    const elevationM = site.station === null ? undefined : elevations.get(site.station.id);
    if (site.station === null || elevationM === undefined) continue;
    const { heightM, adjusted } = heightUsed(site, elevationM);
    if (!adjusted) continue;
    const heights = needed.get(site.station.id) ?? new Set<number>();
    needed.set(site.station.id, heights.add(heightM));
  }
  return needed;
}

function keyOf({ weatherYearId, briefVersionId, heightM, adjustedFromM }: RunOfSites): string {
  return `${weatherYearId} ${briefVersionId} ${heightM} ${adjustedFromM}`;
}
