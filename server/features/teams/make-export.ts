import { mkdtemp, rm, stat } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { Readable } from 'node:stream';
import type { Knex } from 'knex';
import { EXPORT_DAYS } from '#contract/team-data.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { notify } from '../../mail/notify.ts';
import { type OriginalStore, originalKey } from '../../storage/original-store.ts';
import { fingerprintOfFile, writeZip, type ZipWriter } from '../../storage/write-zip.ts';
import { type ExportToMake, findExportToMake, setExportProgress, setExportReady } from './export-store.ts';
import {
  type ExportedOriginal,
  type ExportedTable,
  exportedTables,
  listOriginals,
  rowsOfTable,
} from './exported-tables-read-model.ts';
import { headOf, textOfRows } from './exported-text.ts';

/** How the names of folders begin in which exports are put together. */
export const EXPORT_PREFIX = 'muslin-export-';
const DAY_MS = 24 * 3_600_000;
/** Licences under which a file may be passed on; one that nobody has named counts as none. */
const PASSED_ON = new Set(['open', 'attribution', 'non-commercial']);

interface Deps {
  readonly db: Knex;
  readonly storage: OriginalStore;
  readonly publicUrl: string;
}
interface ExportKey {
  readonly teamId: string;
  readonly exportId: string;
}

/** The work of the job `export-team`: one archive of all that the team has, told of when it is there. Done again it begins anew. */
export async function makeExport(deps: Deps, key: ExportKey, at: Date): Promise<void> {
  const asked = await findExportToMake(deps.db, key);
  if (asked === null) return;
  const folder = await mkdtemp(path.join(tmpdir(), EXPORT_PREFIX));
  try {
    const file = path.join(folder, 'export.zip');
    const signal = new AbortController().signal;
    await writeZip(file, { signal, work: (zip) => fill(zip, deps, { key, asked, at }) });
    const storageKey = originalKey(await fingerprintOfFile(file));
    await deps.storage.put(storageKey, file);
    await finish(deps, { key, asked, at, storageKey, bytes: (await stat(file)).size });
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

interface Making {
  readonly key: ExportKey;
  readonly asked: ExportToMake;
  readonly at: Date;
}

async function fill(zip: ZipWriter, { db, storage }: Deps, { key, asked, at }: Making): Promise<void> {
  const originals = await listOriginals(db, key.teamId);
  const parts = exportedTables.length + originals.length + 1;
  let partsDone = 0;
  const done = () => setExportProgress(db, { ...key, parts, partsDone: ++partsDone });
  await addTables(zip, { db, teamId: key.teamId, done });
  const leftOut: { original: ExportedOriginal; why: string }[] = [];
  for (const original of originals) {
    const why = await addOriginal(zip, storage, original);
    if (why !== null) leftOut.push({ original, why });
    await done();
  }
  await zip.add('README.txt', Buffer.from(readme({ asked, at, leftOut })));
}

/** All tables as they were at one moment, whatever is done meanwhile. */
async function addTables(
  zip: ZipWriter,
  { db, teamId, done }: { db: Knex; teamId: string; done: () => Promise<void> },
): Promise<void> {
  const atOneMoment = { isolationLevel: 'repeatable read', readOnly: true } as const;
  await db.transaction(async (transaction) => {
    for (const table of exportedTables) {
      await zip.add(table.entry, Readable.from(textOf(transaction, { table, teamId }), { objectMode: false }));
      await done();
    }
  }, atOneMoment);
}

async function* textOf(
  transaction: Knex.Transaction,
  { table, teamId }: { table: ExportedTable; teamId: string },
): AsyncGenerator<Buffer> {
  yield Buffer.from(headOf(table));
  for await (const rows of rowsOfTable(transaction, { table, teamId })) yield Buffer.from(textOfRows(table, rows));
}

/** @returns why it was left out; null when it is in the archive */
async function addOriginal(
  zip: ZipWriter,
  storage: OriginalStore,
  { name, fingerprint, licence, storageKey }: ExportedOriginal,
): Promise<string | null> {
  if (!PASSED_ON.has(licence)) return `its licence is “${licence}”`;
  const content = await storage.get(storageKey).catch(() => null);
  if (content === null) return 'its bytes are gone';
  // The fingerprint keeps apart files of one name; slashes of a name would make folders.
  await zip.add(`originals/${fingerprint.slice(0, 12)}-${name.replace(/[/\\]/g, '_')}`, content);
  return null;
}

function readme({
  asked,
  at,
  leftOut,
}: Omit<Making, 'key'> & { leftOut: readonly { original: ExportedOriginal; why: string }[] }): string {
  const lines = [
    `All that the team “${asked.teamName}” had in Muslin on ${at.toISOString()}.`,
    '',
    'Tables are comma-separated values in UTF-8 (RFC 4180); *.jsonl hold a JSON object a line. Moments are in UTC.',
    'An apostrophe before a text keeps a spreadsheet from computing it and is no part of it.',
    'Weather files are named in tables by the ids of weather-files.csv, stations by those of stations.csv.',
    'originals/ holds the uploaded files whose licence lets them be passed on: mind what the licence asks for.',
    'A screening result is not a design.',
    '',
    leftOut.length === 0 ? 'No original was left out.' : 'Originals that were left out:',
    ...leftOut.map(({ original, why }) => `- ${original.name} (${original.fingerprint}): ${why}`),
  ];
  return `${lines.join('\r\n')}\r\n`;
}

async function finish(
  { db, publicUrl }: Deps,
  { key, asked, at, storageKey, bytes }: Making & { storageKey: string; bytes: number },
): Promise<void> {
  const expiresAt = new Date(at.getTime() + EXPORT_DAYS * DAY_MS);
  await inTransaction(db, async (transaction) => {
    if (!(await setExportReady(transaction, { ...key, bytes, storageKey, at, expiresAt }))) return;
    const words = `The export of the team “${asked.teamName}” is ready. It is kept for ${EXPORT_DAYS} days.`;
    const path = `/teams/${key.teamId}/team/data`;
    const told = { personId: asked.askedBy, teamId: key.teamId, words, path, publicUrl, at };
    await notify(transaction, { ...told, kind: 'export ready' });
    const { teamId, exportId } = key;
    const subject = { exportId, bytes };
    await recordAuditEvent(transaction, { teamId, personId: null, act: 'team export made', subject, requestId: null });
  });
}
