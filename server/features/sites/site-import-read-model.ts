import type { Knex } from 'knex';

export interface SiteImportView {
  readonly id: string;
  readonly name: string;
  readonly status: 'done' | 'undone';
  readonly sites: number;
  /** Its sites that were changed since, and are still there. */
  readonly changed: number;
  readonly madeBy: string;
  readonly madeAt: Date;
  readonly undoneBy: string | null;
  readonly undoneAt: Date | null;
}

const MOST_IMPORTS = 20;

/** The newest imports of a programme, or one of them. */
export async function listSiteImportViews(
  db: Knex,
  asked: { teamId: string; programmeId: string; importId?: string },
): Promise<readonly SiteImportView[]> {
  const one = asked.importId === undefined ? '' : 'and site_imports.id = :importId';
  const { rows } = await db.raw<{ rows: SiteImportView[] }>(
    `select site_imports.id, site_imports.name, site_imports.status, site_imports.sites,
       (select count(*) from sites where sites.import_id = site_imports.id and sites.revision > 1
          and sites.removed_at is null)::integer as changed,
       makers.name as "madeBy", site_imports.made_at as "madeAt", undoers.name as "undoneBy",
       site_imports.undone_at as "undoneAt"
     from site_imports
     join people as makers on makers.id = site_imports.made_by
     left join people as undoers on undoers.id = site_imports.undone_by
     where site_imports.team_id = :teamId and site_imports.programme_id = :programmeId
       and site_imports.status <> 'receiving' ${one}
     order by site_imports.made_at desc, site_imports.id desc limit ${MOST_IMPORTS}`,
    { ...asked },
  );
  return rows;
}

/** Waiting rows of an import by line. */
export async function listImportRows(
  db: Knex,
  { teamId, importId }: { teamId: string; importId: string },
): Promise<readonly { line: number; cells: Readonly<Record<string, string>> }[]> {
  const { rows } = await db.raw<{ rows: { line: number; cells: Record<string, string> }[] }>(
    `select line, cells from site_import_rows where team_id = :teamId and import_id = :importId order by line`,
    { teamId, importId },
  );
  return rows;
}

/** Notes of a programme's sites, by site. */
export async function listSiteNotes(
  db: Knex,
  key: { teamId: string; programmeId: string },
): Promise<ReadonlyMap<string, string>> {
  const { rows } = await db.raw<{ rows: { id: string; notes: string }[] }>(
    `select id, notes from sites
     where team_id = :teamId and programme_id = :programmeId and removed_at is null and notes <> ''`,
    { ...key },
  );
  return new Map(rows.map(({ id, notes }) => [id, notes]));
}
