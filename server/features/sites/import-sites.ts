import type { Knex } from 'knex';
import { MOST_SITE_ROWS } from '#contract/site-imports.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { type JudgedImport, judgeImport, type RowToImport } from './judge-import.ts';
import type { SiteAct, SiteDeps } from './make-site.ts';
import { elevationOf } from './site-ground.ts';
import {
  deleteLeftRows,
  type ImportedSite,
  type ImportKey,
  insertImportedSites,
  insertSiteImport,
  type LockedImport,
  lockSiteImport,
  markImportDone,
  upsertImportRows,
} from './site-import-store.ts';
import { siteLetters } from './site-letters.ts';
import { takeSiteNumbers } from './site-store.ts';

const DAY_MS = 86_400_000;
/** Sites of one statement. */
const AT_ONCE = 5_000;

/** Begins an import; rows that others began and never finished go after a day. */
export async function startSiteImport(db: Knex, start: SiteAct & { name: string }): Promise<string> {
  return await inTransaction(db, async (transaction) => {
    await deleteLeftRows(transaction, { teamId: start.teamId, before: new Date(start.at.getTime() - DAY_MS) });
    return await insertSiteImport(transaction, start);
  });
}

/** Keeps a portion of the rows. @returns how many wait now */
export async function addSiteImportRows(
  db: Knex,
  portion: ImportKey & { rows: readonly { line: number; cells: object }[] },
): Promise<number> {
  return await inTransaction(db, async (transaction) => {
    receiving(await lockSiteImport(transaction, portion));
    const rows = await upsertImportRows(transaction, portion);
    if (rows > MOST_SITE_ROWS) {
      throw new AppError('too_large', 'A table may have 50,000 rows at most. Divide it, and import its parts.');
    }
    return rows;
  });
}

/** What can be said against an import that still waits. */
export async function checkSiteImport(deps: SiteDeps, key: ImportKey): Promise<JudgedImport> {
  await inTransaction(deps.db, async (transaction) => receiving(await lockSiteImport(transaction, key)));
  return await judgeImport(deps, key);
}

/** Makes the rows sites: all of them, but for duplicates where these are to be skipped, or none. */
export async function finishSiteImport(
  deps: SiteDeps,
  finish: SiteAct & ImportKey & { duplicates: 'skip' | 'keep' },
): Promise<void> {
  const { teamId, programmeId, importId, personId, requestId } = finish;
  await inTransaction(deps.db, async (transaction) => {
    const { name } = receiving(await lockSiteImport(transaction, finish));
    const judged = await judgeImport({ ...deps, db: transaction }, finish);
    if (judged.rows === 0) throw new AppError('wrong_state', 'No row was sent yet.');
    if (judged.faults.length > 0) throw faultsOf(judged);
    const doubles = new Set(judged.duplicates.map(({ row }) => row));
    const taken = finish.duplicates === 'skip' ? judged.ready.filter((row) => !doubles.has(row)) : judged.ready;
    const first = await takeSiteNumbers(transaction, { teamId, programmeId, count: taken.length });
    if (first === null) throw new AppError('not_found', 'There is no such programme in this team.');
    const sites = taken.map((row, index) => importedOf(row, siteLetters(first + index)));
    for (let from = 0; from < sites.length; from += AT_ONCE) {
      await insertImportedSites(transaction, { ...finish, sites: sites.slice(from, from + AT_ONCE) });
    }
    await markImportDone(transaction, { ...finish, sites: sites.length });
    await recordAuditEvent(transaction, {
      ...{ teamId, personId, requestId, act: 'sites imported' },
      subject: { programmeId, importId, name, sites: sites.length, skipped: judged.ready.length - sites.length },
    });
    await deps.queueSiteRuns(transaction, { teamId, programmeId });
    await notifyTeam(transaction, { teamId, event: { kind: 'sites', programmeId } });
  });
}

function importedOf(row: RowToImport, letters: string): ImportedSite {
  const { name, latitude, longitude, designLoadKw, notes, stationId, stationReason, ground } = row;
  return {
    ...{ letters, name, latitude, longitude, designLoadKw, notes, stationId, stationReason },
    ...ground,
    ...elevationOf(row.elevationM, ground, 'file'),
  };
}

function receiving(found: LockedImport | null): LockedImport {
  if (found === null) throw new AppError('not_found', 'There is no such import in this programme.');
  if (found.status !== 'receiving') throw new AppError('wrong_state', 'This import is finished already.');
  return found;
}

function faultsOf({ faults }: JudgedImport): AppError {
  const problems = faults.slice(0, 100).map(({ line, column, message }) => ({ line, path: column, message }));
  return new AppError('invalid_input', `The table has ${faults.length} faults; nothing was imported.`, problems);
}
