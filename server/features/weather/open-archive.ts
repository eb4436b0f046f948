import { randomUUID } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { pipeline } from 'node:stream/promises';
import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { cleanUploadName } from '../../http/upload-name.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import type { OriginalStore } from '../../storage/original-store.ts';
import { countZipMembers, ZipProblem, zipMembers } from '../../storage/zip-members.ts';
import {
  type ArchiveState,
  endArchive,
  findArchive,
  findBatchState,
  type LeftOut,
  setArchiveOpening,
  setArchiveProgress,
} from './batch-store.ts';
import { whyNoWeatherFile } from './no-weather-file.ts';
import { queueOpening } from './receive-archive.ts';
import { receiveWeatherFile } from './receive-weather-file.ts';
import { findWeatherFile } from './weather-file-store.ts';

/** How the names of folders begin into which archives are opened. */
export const OPENED_PREFIX = 'muslin-archive-';

type Deps = {
  readonly db: Knex;
  readonly storage: OriginalStore;
  /** Told of each entry that is done for good. */
  readonly progressed: () => Promise<void>;
};

/**
 * The work of the job `open-weather-archive`: every file that may be weather is received as if it had been uploaded by itself. Done
 * again after a crash it finds what it has received already by its fingerprint, so that nothing is doubled.
 */
export async function openArchive(deps: Deps, key: { teamId: string; archiveId: string }): Promise<void> {
  const archive = await findArchive(deps.db, key);
  if (archive === null || archive.batchState !== 'running') return;
  if (archive.status !== 'waiting' && archive.status !== 'opening') return;
  const folder = await mkdtemp(path.join(tmpdir(), OPENED_PREFIX));
  try {
    const file = path.join(folder, `archive-${randomUUID()}`);
    await pipeline(await deps.storage.get(archive.storageKey), createWriteStream(file, { flags: 'wx', mode: 0o600 }));
    await receiveMembers(deps, archive, { file, folder });
  } catch (error) {
    if (!(error instanceof ZipProblem)) throw error;
    await endArchive(deps.db, { ...keyOf(archive), status: 'refused', problem: error.message });
    await tell(deps.db, archive);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

/** So many entries are opened by one job; the next begins with all its tries, so that a large archive does not use them up. */
const ENTRIES_PER_JOB = 20;

async function receiveMembers(
  deps: Deps,
  archive: ArchiveState,
  { file, folder }: { file: string; folder: string },
): Promise<void> {
  const members = await countZipMembers(file);
  if (!(await setArchiveOpening(deps.db, { ...keyOf(archive), members }))) return;
  const { nextEntry: from, opened } = archive;
  const done = { nextEntry: from, opened, leftOut: [...archive.leftOut] };
  for await (const member of zipMembers({ file, folder, unwanted: whyNoWeatherFile, from })) {
    if (member.entry > done.nextEntry) {
      done.nextEntry = member.entry;
      if (!(await goesOn(deps, archive, done))) return;
      if (member.entry - from >= ENTRIES_PER_JOB) return await handOn(deps, archive);
    }
    if (member.kind === 'left out') done.leftOut.push({ path: member.path, why: member.why });
    else {
      const known = await receiveMember(deps, archive, member);
      if (known === null) done.opened++;
      else done.leftOut.push(known);
    }
  }
  done.nextEntry = members;
  if (!(await goesOn(deps, archive, done))) return;
  await endArchive(deps.db, { ...keyOf(archive), status: 'opened', problem: null });
  await tell(deps.db, archive);
}

/** Writes down how far the opening is. @returns false when somebody has paused or cancelled it meanwhile */
async function goesOn(
  { db, progressed }: Deps,
  archive: ArchiveState,
  done: { nextEntry: number; opened: number; leftOut: readonly LeftOut[] },
): Promise<boolean> {
  const stands = await setArchiveProgress(db, { ...keyOf(archive), ...done });
  await progressed();
  await tell(db, archive);
  const state = await findBatchState(db, archive);
  if (state === 'paused') await endArchive(db, { ...keyOf(archive), status: 'waiting', problem: null });
  return stands && state === 'running';
}

async function handOn({ db }: Deps, archive: ArchiveState): Promise<void> {
  await inTransaction(db, (transaction) => queueOpening(transaction, keyOf(archive)));
}

/** @returns why it is left out, where the team has its bytes already; null once it is a file of the batch */
async function receiveMember(
  deps: Deps,
  archive: ArchiveState,
  member: { path: string; bytes: number; fingerprint: string; temporaryPath: string },
): Promise<LeftOut | null> {
  const { teamId, batchId } = archive;
  const { path, bytes, fingerprint, temporaryPath } = member;
  const name = cleanUploadName(path);
  const { fileId, known } = await receiveWeatherFile(deps, {
    teamId,
    batchId,
    personId: archive.madeBy,
    tokenId: null,
    requestId: null,
    at: new Date(),
    upload: { name, bytes, fingerprint, temporaryPath },
  });
  const file = known ? await findWeatherFile(deps.db, { teamId, fileId }) : null;
  // Opened again after a crash, an archive meets what it has brought itself.
  if (file === null || (file.batchId === batchId && file.name === name)) return null;
  return { path, why: `These are the same bytes as “${file.name}”, which is here already.` };
}

function keyOf({ teamId, id }: ArchiveState): { teamId: string; archiveId: string } {
  return { teamId, archiveId: id };
}

async function tell(db: Knex, { teamId, batchId }: ArchiveState): Promise<void> {
  await notifyTeam(db, { teamId, event: { kind: 'weather-batch', batchId } });
}
