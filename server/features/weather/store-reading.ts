import type { Knex } from 'knex';
import { READ_VERSION } from '#engine/conventions.ts';
import type { ReducedYear } from '#engine/reduction/reduce-year.ts';
import type { RefusedReading, UnmappedReading, UsableReading } from '#engine/weather-files/weather-file-reading.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { contentHash } from './content-hash.ts';
import { measuredHours } from './measured-hours.ts';
import { insertFindings, insertPart, lockWeatherFile, setReadingResult } from './weather-file-store.ts';
import { insertDepressionHours, insertDesignValues, insertWeatherYear } from './weather-year-store.ts';

export type FileOutcome =
  | { readonly reading: RefusedReading | UnmappedReading; readonly reduced: null }
  | { readonly reading: UsableReading; readonly reduced: ReducedYear };

/**
 * Stores everything that was read of a file, and its new status, in one transaction; leaves alone a file that has moved on. A file
 * of several station-years keeps the first, and each further one becomes a file of its own with the same original.
 */
export async function storeReadings(
  db: Knex,
  file: { teamId: string; id: string },
  outcomes: readonly FileOutcome[],
): Promise<void> {
  const { teamId, id } = file;
  await inTransaction(db, async (transaction) => {
    const now = await lockWeatherFile(transaction, { teamId, fileId: id });
    if (now === null || now.status !== 'reading') return;
    for (const [place, outcome] of outcomes.entries()) {
      const fileId = place === 0 ? id : await insertPart(transaction, { file: now, partIndex: now.partIndex + place });
      if (fileId !== null) await storeOutcome(transaction, { teamId, fileId }, outcome);
    }
    if (now.batchId !== null) {
      await notifyTeam(transaction, { teamId, event: { kind: 'weather-batch', batchId: now.batchId } });
    }
  });
}

async function storeOutcome(
  transaction: Knex.Transaction,
  key: { teamId: string; fileId: string },
  outcome: FileOutcome,
): Promise<void> {
  const { reading } = outcome;
  await insertFindings(transaction, { ...key, findings: reading.findings });
  if (outcome.reduced !== null) await storeYear(transaction, key, outcome);
  await setReadingResult(transaction, {
    ...key,
    status: reading.status,
    part: reading.part,
    format: reading.format,
    declaredStation: reading.station,
    asks: reading.status === 'refused' ? [] : reading.asks,
    comments: reading.status === 'refused' ? null : reading.comments,
    table: 'table' in reading ? reading.table : null,
  });
  await notifyTeam(transaction, {
    teamId: key.teamId,
    event: { kind: 'weather-file', fileId: key.fileId, status: reading.status, step: null },
  });
}

async function storeYear(
  transaction: Knex.Transaction,
  key: { teamId: string; fileId: string },
  { reading, reduced }: Extract<FileOutcome, { reading: UsableReading }>,
): Promise<void> {
  const { teamId } = key;
  const weatherYearId = await insertWeatherYear(transaction, {
    ...key,
    reading,
    reduced,
    measuredHours: measuredHours(reduced.year.packed.flags),
    readVersion: READ_VERSION,
    contentHash: contentHash(reduced.year),
  });
  await insertDepressionHours(transaction, { teamId, weatherYearId, bins: reduced.depressionHours });
  await insertDesignValues(transaction, { teamId, weatherYearId, design: reduced.design });
}
