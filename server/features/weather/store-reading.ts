import type { Knex } from 'knex';
import type { TeamEvent } from '#contract/team-events.ts';
import type { ReadingStep } from '#contract/weather.ts';
import { READ_VERSION } from '#engine/conventions.ts';
import type { ReducedYear } from '#engine/reduction/reduce-year.ts';
import type { TableMapping } from '#engine/weather-files/table/table-mapping.ts';
import type { RefusedReading, UnmappedReading, UsableReading } from '#engine/weather-files/weather-file-reading.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { notifyTeamOfAll } from '../../jobs/team-feed.ts';
import { contentHash } from './content-hash.ts';
import { measuredHours } from './measured-hours.ts';
import { insertPart, keepMappingOfFile, setReadingResult } from './reading-store.ts';
import { lockFileBeingRead } from './weather-file-store.ts';
import { insertWeatherYear } from './weather-year-store.ts';

export type FileOutcome =
  | { readonly reading: RefusedReading | UnmappedReading; readonly reduced: null }
  | { readonly reading: UsableReading; readonly reduced: ReducedYear };

export interface ReadingToStore {
  readonly outcomes: readonly FileOutcome[];
  /** How a table was read, where that had been said of another of its shape. */
  readonly remembered: TableMapping | null;
  readonly untoldSteps: readonly ReadingStep[];
}

/**
 * Stores everything that was read of a file, and its new status, in one transaction; leaves alone a file that has moved on. A file
 * of several station-years keeps the first, and each further one becomes a file of its own with the same original.
 */
export async function storeReadings(
  db: Knex,
  file: { teamId: string; id: string },
  reading: ReadingToStore,
): Promise<void> {
  const { teamId, id } = file;
  const { outcomes, remembered, untoldSteps } = reading;
  await inTransaction(db, async (transaction) => {
    const now = await lockFileBeingRead(transaction, { teamId, fileId: id });
    if (now === null) return;
    // What was said of the shape may be said otherwise later; this file stays read as it was.
    if (remembered !== null) await keepMappingOfFile(transaction, { teamId, fileId: id, mapping: remembered });
    const events: TeamEvent[] = untoldSteps.map((step) => ({
      kind: 'weather-file',
      fileId: id,
      status: 'reading',
      step,
    }));
    for (const [place, outcome] of outcomes.entries()) {
      const fileId = place === 0 ? id : await insertPart(transaction, { file: now, partIndex: now.partIndex + place });
      if (fileId === null) continue;
      await storeOutcome(transaction, { teamId, fileId }, outcome);
      events.push({ kind: 'weather-file', fileId, status: outcome.reading.status, step: null });
    }
    if (now.batchId !== null) events.push({ kind: 'weather-batch', batchId: now.batchId });
    await notifyTeamOfAll(transaction, { teamId, events });
  });
}

async function storeOutcome(
  transaction: Knex.Transaction,
  key: { teamId: string; fileId: string },
  outcome: FileOutcome,
): Promise<void> {
  const { reading } = outcome;
  if (outcome.reduced !== null) await storeYear(transaction, key, outcome);
  await setReadingResult(transaction, {
    ...key,
    status: reading.status,
    part: reading.part,
    format: reading.format,
    declaredStation: reading.station,
    asks: reading.status === 'refused' ? [] : reading.asks,
    comments: reading.status === 'refused' ? null : reading.comments,
    findings: reading.findings,
    table: 'table' in reading ? reading.table : null,
  });
}

async function storeYear(
  transaction: Knex.Transaction,
  key: { teamId: string; fileId: string },
  { reading, reduced }: Extract<FileOutcome, { reading: UsableReading }>,
): Promise<void> {
  await insertWeatherYear(transaction, {
    ...key,
    reading,
    reduced,
    measuredHours: measuredHours(reduced.year.packed.flags),
    readVersion: READ_VERSION,
    contentHash: contentHash(reduced.year),
  });
}
