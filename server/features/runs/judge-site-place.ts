import type { Knex } from 'knex';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { siteGates } from '#engine/score/site-gates.ts';
import { AppError } from '../../http/app-error.ts';
import type { ProgrammeBrief } from '../briefs/brief-read-model.ts';
import { sitesOfProgramme } from '../sites/resolved-sites-read-model.ts';
import { heightUsed } from './height-used.ts';
import { byStation, type JudgedStation, judgeStation } from './judge-station.ts';
import type { SiteOfStation } from './present-place.ts';
import { whereSiteStands } from './programme-places.ts';
import { listStationYears } from './station-years-read-model.ts';

/**
 * A site as a place: the runs of its station's years at its own height.
 * @throws AppError not_found; wrong_state while no station with weather stands for it
 */
export async function judgeSitePlace(
  db: Knex,
  {
    teamId,
    programmeId,
    siteId,
    brief,
  }: { teamId: string; programmeId: string; siteId: string; brief: ProgrammeBrief },
): Promise<SiteOfStation & { judged: JudgedStation }> {
  const [site] = await sitesOfProgramme(db, { teamId, programmeId, siteIds: [siteId] });
  if (site === undefined)
    throw new AppError('not_found', 'There is no such site in this programme, or it was removed.');
  const stationId = site.station?.id;
  if (stationId === undefined)
    throw new AppError('wrong_state', 'No station stands for this site yet: accept a weather file of one near it.');
  const asked = { teamId, briefVersionId: brief.briefVersionId, methodVersion: METHOD_VERSION, stationId };
  const [asMeasured] = byStation(await listStationYears(db, asked));
  if (asMeasured === undefined)
    throw new AppError('wrong_state', 'The station of this site has no accepted weather year. Choose another.');
  const height = heightUsed(site, asMeasured[0].elevationM);
  const [moved] = height.adjusted
    ? byStation(await listStationYears(db, { ...asked, heightM: height.heightM }))
    : [asMeasured];
  if (moved === undefined) throw new AppError('wrong_state', 'The weather of this site has just changed. Ask again.');
  return {
    ...{ site, height, gates: siteGates(brief.body, site.gates) },
    judged: judgeStation(brief.body, moved, whereSiteStands(site)),
  };
}
