import type { Knex } from 'knex';
import type { SiteFacts } from './site-store.ts';

interface ProgrammeKey {
  readonly teamId: string;
  readonly programmeId: string;
}
export interface ImportKey extends ProgrammeKey {
  readonly importId: string;
}

export async function insertSiteImport(
  transaction: Knex.Transaction,
  making: ProgrammeKey & { name: string; personId: string },
): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    `insert into site_imports (team_id, programme_id, name, made_by)
     values (:teamId, :programmeId, :name, :personId) returning id`,
    { ...making },
  );
  return rows[0].id;
}

/** Rows of imports that nobody finished are of no use to anyone. */
export async function deleteLeftRows(
  transaction: Knex.Transaction,
  left: { teamId: string; before: Date },
): Promise<void> {
  await transaction.raw(
    `delete from site_import_rows using site_imports
     where site_imports.id = site_import_rows.import_id and site_imports.team_id = :teamId
       and site_imports.status = 'receiving' and site_imports.made_at < :before`,
    { ...left },
  );
}

export interface LockedImport {
  readonly name: string;
  readonly status: 'receiving' | 'done' | 'undone';
}

/** An import, held until the transaction ends. */
export async function lockSiteImport(transaction: Knex.Transaction, key: ImportKey): Promise<LockedImport | null> {
  const { rows } = await transaction.raw<{ rows: LockedImport[] }>(
    `select name, status from site_imports where team_id = :teamId and programme_id = :programmeId and id = :importId
     for no key update`,
    { ...key },
  );
  return rows[0] ?? null;
}

/** Keeps a portion of rows; a line that is there already is replaced. @returns how many wait now */
export async function upsertImportRows(
  transaction: Knex.Transaction,
  { teamId, importId, rows }: ImportKey & { rows: readonly { line: number; cells: object }[] },
): Promise<number> {
  await transaction.raw(
    `insert into site_import_rows (team_id, import_id, line, cells)
     select :teamId, :importId, line, cells from jsonb_to_recordset(cast(:rows as jsonb)) as given (line integer, cells jsonb)
     on conflict (import_id, line) do update set cells = excluded.cells`,
    { teamId, importId, rows: JSON.stringify(rows) },
  );
  const counted = await transaction.raw<{ rows: [{ number: number }] }>(
    'select count(*)::integer as number from site_import_rows where import_id = :importId',
    { importId },
  );
  return counted.rows[0].number;
}

export type ImportedSite = Omit<SiteFacts, 'gates' | 'water'> & { readonly letters: string };

/** Makes many sites of an import with one statement. */
export async function insertImportedSites(
  transaction: Knex.Transaction,
  given: ImportKey & { personId: string; sites: readonly ImportedSite[] },
): Promise<void> {
  await transaction.raw(
    `insert into sites (team_id, programme_id, import_id, letters, name, latitude, longitude, elevation_m, elevation_source,
       relief_m, km_from_land, design_load_kw, station_id, station_reason, notes, made_by, changed_by)
     select :teamId, :programmeId, :importId, letters, name, latitude, longitude, "elevationM", "elevationSource", "reliefM",
       "kmFromLand", "designLoadKw", "stationId", "stationReason", notes, :personId, :personId
     from jsonb_to_recordset(cast(:sites as jsonb)) as given (letters text, name text, latitude float8, longitude float8,
       "elevationM" float8, "elevationSource" text, "reliefM" float8, "kmFromLand" float8, "designLoadKw" float8,
       "stationId" uuid, "stationReason" text, notes text)`,
    { ...given, sites: JSON.stringify(given.sites) },
  );
}

export async function markImportDone(
  transaction: Knex.Transaction,
  done: ImportKey & { sites: number },
): Promise<void> {
  await transaction.raw(
    `update site_imports set status = 'done', sites = :sites where team_id = :teamId and id = :importId`,
    { ...done },
  );
  await transaction.raw('delete from site_import_rows where team_id = :teamId and import_id = :importId', { ...done });
}

/** Takes the sites of an import off the programme. @returns how many were still there */
export async function markImportUndone(
  transaction: Knex.Transaction,
  undo: ImportKey & { personId: string; at: Date; reason: string },
): Promise<number> {
  await transaction.raw(
    `update site_imports set status = 'undone', undone_by = :personId, undone_at = :at
     where team_id = :teamId and id = :importId`,
    { ...undo },
  );
  const { rowCount } = await transaction.raw<{ rowCount: number }>(
    `update sites set removed_by = :personId, removed_at = :at, removed_reason = :reason
     where team_id = :teamId and import_id = :importId and removed_at is null`,
    { ...undo },
  );
  return rowCount;
}
