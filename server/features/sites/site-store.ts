import type { Knex } from 'knex';
import type { DutyName } from '#contract/site-record.ts';
import type { SiteWater } from '#contract/site-water.ts';
import type { GateAnswer } from '#engine/run/run-result.ts';

interface ProgrammeKey {
  readonly teamId: string;
  readonly programmeId: string;
}
export interface SiteKey extends ProgrammeKey {
  readonly siteId: string;
}

/** What a person may change of a site, and what follows from its position. */
export interface SiteFacts {
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number | null;
  readonly elevationSource: 'person' | 'file' | 'relief' | null;
  readonly reliefM: number | null;
  readonly kmFromLand: number;
  readonly designLoadKw: number | null;
  readonly stationId: string | null;
  readonly stationReason: string | null;
  readonly gates: readonly GateAnswer[];
  readonly water: Partial<SiteWater>;
  readonly notes: string;
}

/** Gives the numbers of the next letters of a programme; `null` without the programme. @returns the number of the first */
export async function takeSiteNumbers(
  transaction: Knex.Transaction,
  asked: ProgrammeKey & { count: number },
): Promise<number | null> {
  const { rows } = await transaction.raw<{ rows: { first: number }[] }>(
    `update programmes set site_letters_given = site_letters_given + :count
     where team_id = :teamId and id = :programmeId
     returning site_letters_given - :count + 1 as first`,
    { ...asked },
  );
  return rows[0]?.first ?? null;
}

export async function insertSite(
  transaction: Knex.Transaction,
  site: ProgrammeKey & SiteFacts & { letters: string; personId: string },
): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    `insert into sites (team_id, programme_id, letters, name, latitude, longitude, elevation_m, elevation_source, relief_m,
       km_from_land, design_load_kw, station_id, station_reason, gates, water, notes, made_by, changed_by)
     values (:teamId, :programmeId, :letters, :name, :latitude, :longitude, :elevationM, :elevationSource, :reliefM,
       :kmFromLand, :designLoadKw, :stationId, :stationReason, cast(:gates as jsonb), cast(:water as jsonb), :notes,
       :personId, :personId)
     returning id`,
    { ...site, gates: JSON.stringify(site.gates), water: JSON.stringify(site.water) },
  );
  return rows[0].id;
}

export interface LockedSite extends SiteFacts {
  readonly letters: string;
  readonly revision: number;
}

/** A site, held until the transaction ends; `null` when the programme has none such, or it was removed. */
export async function lockSite(transaction: Knex.Transaction, key: SiteKey): Promise<LockedSite | null> {
  const { rows } = await transaction.raw<{ rows: LockedSite[] }>(
    `select letters, name, latitude, longitude, elevation_m as "elevationM", elevation_source as "elevationSource",
       relief_m as "reliefM", km_from_land as "kmFromLand", design_load_kw as "designLoadKw", station_id as "stationId",
       station_reason as "stationReason", gates, water, notes, revision
     from sites where team_id = :teamId and programme_id = :programmeId and id = :siteId and removed_at is null
     for no key update`,
    { ...key },
  );
  return rows[0] ?? null;
}

export interface FieldChange {
  readonly field: string;
  readonly was: string;
  readonly now: string;
}

/** Stores a changed site as its next revision, with what was changed. */
export async function updateSite(
  transaction: Knex.Transaction,
  change: SiteKey & SiteFacts & { revision: number; personId: string; at: Date; fields: readonly FieldChange[] },
): Promise<void> {
  const values = {
    ...change,
    gates: JSON.stringify(change.gates),
    water: JSON.stringify(change.water),
    fields: JSON.stringify(change.fields),
  };
  await transaction.raw(
    `update sites set name = :name, latitude = :latitude, longitude = :longitude, elevation_m = :elevationM,
       elevation_source = :elevationSource, relief_m = :reliefM, km_from_land = :kmFromLand,
       design_load_kw = :designLoadKw, station_id = :stationId, station_reason = :stationReason,
       gates = cast(:gates as jsonb), water = cast(:water as jsonb), notes = :notes,
       revision = :revision, changed_by = :personId, changed_at = :at
     where team_id = :teamId and id = :siteId`,
    values,
  );
  await transaction.raw(
    `insert into site_changes (team_id, site_id, revision, changed_by, changed_at, fields)
     values (:teamId, :siteId, :revision, :personId, :at, cast(:fields as jsonb))`,
    values,
  );
}

/** Marks sites as removed. @returns those that were there */
export async function markRemoved(
  transaction: Knex.Transaction,
  removal: ProgrammeKey & { siteIds: readonly string[]; personId: string; at: Date; reason: string },
): Promise<readonly { id: string; letters: string; name: string }[]> {
  const { rows } = await transaction.raw<{ rows: { id: string; letters: string; name: string }[] }>(
    `update sites set removed_by = :personId, removed_at = :at, removed_reason = :reason
     where team_id = :teamId and programme_id = :programmeId and id = any(cast(:ids as uuid[])) and removed_at is null
     returning id, letters, name`,
    { ...removal, ids: [...removal.siteIds] },
  );
  return rows;
}

export async function upsertDuty(
  transaction: Knex.Transaction,
  duty: {
    teamId: string;
    siteId: string;
    duty: DutyName;
    owner: string;
    dueOn: string | null;
    doneOn: string | null;
    note: string;
    personId: string;
    at: Date;
  },
): Promise<void> {
  await transaction.raw(
    `insert into site_duties (team_id, site_id, duty, owner, due_on, done_on, note, set_by, set_at)
     values (:teamId, :siteId, :duty, :owner, cast(:dueOn as date), cast(:doneOn as date), :note, :personId, :at)
     on conflict (site_id, duty) do update set owner = excluded.owner, due_on = excluded.due_on,
       done_on = excluded.done_on, note = excluded.note, set_by = excluded.set_by, set_at = excluded.set_at`,
    { ...duty },
  );
}
