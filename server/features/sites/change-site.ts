import type { Knex } from 'knex';
import type { AuditAct } from '#contract/audit.ts';
import type { SiteWater } from '#contract/site-water.ts';
import { rankStations } from '#engine/interpolation/station-choice.ts';
import type { GateAnswer } from '#engine/run/run-result.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import type { SiteAct, SiteDeps } from './make-site.ts';
import { hasYears } from './resolved-sites-read-model.ts';
import { siteDifference } from './site-difference.ts';
import { elevationOf, groundAt } from './site-ground.ts';
import { listSiteChanges, listStationsOfTeam, type StationOfTeam } from './site-read-model.ts';
import { type LockedSite, lockSite, type SiteFacts, updateSite } from './site-store.ts';

/** What is sent is changed, the rest stays. */
export interface SitePatch {
  readonly name?: string | undefined;
  readonly latitude?: number | undefined;
  readonly longitude?: number | undefined;
  /** null takes the height of the relief. */
  readonly elevationM?: number | null | undefined;
  readonly designLoadKw?: number | null | undefined;
  /** null takes the default of the method. */
  readonly station?: { readonly id: string; readonly reason: string | null } | null | undefined;
  readonly gates?: readonly GateAnswer[] | undefined;
  readonly water?: SiteWater | undefined;
  readonly notes?: string | undefined;
}

/**
 * Changes a site that nobody has changed since the revision that the caller saw. Whoever comes second is told what the first one did,
 * and nothing of either is lost: the first stands, the second still holds theirs.
 * @throws AppError conflict
 */
export async function changeSite(
  { db, relief, queueSiteRuns }: SiteDeps,
  change: SiteAct & { siteId: string; revision: number; patch: SitePatch; act?: AuditAct },
): Promise<void> {
  const { teamId, programmeId, siteId, personId, requestId, patch, at } = change;
  await inTransaction(db, async (transaction) => {
    const was = await lockSite(transaction, { teamId, programmeId, siteId });
    if (was === null) throw new AppError('not_found', 'There is no such site in this programme, or it was removed.');
    if (was.revision !== change.revision) throw await conflictOf(transaction, change, was);
    const stations = await listStationsOfTeam(transaction, teamId);
    const now = withPlace(was, patch, (position) => groundAt(relief, position));
    const changed = withStation(now, patch, stations);
    const names = new Map(stations.map(({ id, name }) => [id, name]));
    const fields = siteDifference(was, changed, (id) => names.get(id) ?? 'a station that is gone');
    if (fields.length === 0) return;
    const revision = was.revision + 1;
    await updateSite(transaction, { teamId, programmeId, siteId, ...changed, revision, personId, at, fields });
    await recordAuditEvent(transaction, {
      ...{ teamId, personId, requestId, act: change.act ?? 'site changed' },
      subject: { programmeId, siteId, letters: was.letters, name: changed.name, revision, fields },
    });
    await queueSiteRuns(transaction, { teamId, programmeId });
    await notifyTeam(transaction, { teamId, event: { kind: 'sites', programmeId } });
  });
}

function withPlace(
  was: LockedSite,
  patch: SitePatch,
  ground: (position: { latitude: number; longitude: number }) => { reliefM: number | null; kmFromLand: number },
): SiteFacts {
  const { letters: _letters, revision: _revision, ...facts } = was;
  const latitude = patch.latitude ?? was.latitude;
  const longitude = patch.longitude ?? was.longitude;
  const moved = latitude !== was.latitude || longitude !== was.longitude;
  const there = moved ? ground({ latitude, longitude }) : { reliefM: was.reliefM, kmFromLand: was.kmFromLand };
  const given = patch.elevationM === undefined && was.elevationSource !== 'relief' ? was.elevationM : patch.elevationM;
  // The same height sent again does not make a person its source.
  const source = given === was.elevationM && was.elevationSource === 'file' ? 'file' : 'person';
  const sameRelief = given === was.elevationM && was.elevationSource === 'relief' && !moved;
  return {
    ...facts,
    name: patch.name ?? was.name,
    ...{ latitude, longitude, ...there },
    ...elevationOf(sameRelief ? null : (given ?? null), there, source),
    designLoadKw: patch.designLoadKw === undefined ? was.designLoadKw : patch.designLoadKw,
    gates: patch.gates ?? was.gates,
    water: patch.water ?? was.water,
    notes: patch.notes ?? was.notes,
  };
}

/** Another station than the first of the ranking asks for a reason (method 8). */
function withStation(facts: SiteFacts, { station }: SitePatch, stations: readonly StationOfTeam[]): SiteFacts {
  if (station === undefined) return facts;
  if (station === null) return { ...facts, stationId: null, stationReason: null };
  const chosen = stations.find(({ id }) => id === station.id);
  if (chosen === undefined || !hasYears(chosen))
    throw stationFault('id', 'Choose a station of the team that has an accepted year.');
  const [first] = rankStations({ site: facts, stations: stations.filter(hasYears) });
  if (first?.id !== chosen.id && station.reason === null) {
    const name = stations.find(({ id }) => id === first?.id)?.name ?? 'another';
    throw stationFault('reason', `${name} stands first in the ranking. Say why ${chosen.name} is chosen instead.`);
  }
  return { ...facts, stationId: chosen.id, stationReason: station.reason };
}

function stationFault(field: string, message: string): AppError {
  return new AppError('invalid_input', message, [{ path: `body.station.${field}`, message }]);
}

async function conflictOf(
  transaction: Knex.Transaction,
  { teamId, siteId, revision }: { teamId: string; siteId: string; revision: number },
  was: LockedSite,
): Promise<AppError> {
  const changes = await listSiteChanges(transaction, { teamId, siteId, after: revision });
  const [newest] = changes;
  if (newest === undefined) {
    return new AppError('conflict', `The site is at revision ${was.revision}; there is no ${revision}. Load it again.`);
  }
  const fields = [...new Set(changes.flatMap((change) => change.fields.map(({ field }) => field)))];
  const when = newest.at.toISOString().slice(0, 16).replace('T', ' ');
  const people = [...new Set(changes.map(({ by }) => by))].join(' and ');
  const problems = changes.flatMap((change) =>
    change.fields.map(({ field, was: before, now }) => ({
      path: field,
      message: `${change.by} changed ${field} from “${before}” to “${now}”.`,
    })),
  );
  const message = `${people} changed ${fields.join(', ')} of ${was.name} meanwhile (last on ${when} UTC). Nothing of yours was stored yet: look at what is there now, then save again or leave it.`;
  return new AppError('conflict', message, problems);
}
