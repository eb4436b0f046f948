import type { Knex } from 'knex';
import { READ_VERSION } from '#engine/conventions.ts';
import type { ReducedYear } from '#engine/reduction/reduce-year.ts';
import type { RefusedReading, UnmappedReading, UsableReading } from '#engine/weather-files/weather-file-reading.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { contentHash } from './content-hash.ts';
import { measuredHours } from './measured-hours.ts';
import { insertFindings, lockWeatherFile, setReadingResult } from './weather-file-store.ts';
import { insertDepressionHours, insertDesignValues, insertWeatherYear } from './weather-year-store.ts';

export type FileOutcome =
  | { readonly reading: RefusedReading | UnmappedReading; readonly reduced: null }
  | { readonly reading: UsableReading; readonly reduced: ReducedYear };

/** Stores everything that was read of a file, and its new status, in one transaction; leaves alone a file that has moved on. */
export async function storeReading(
  db: Knex,
  file: { teamId: string; id: string },
  outcome: FileOutcome,
): Promise<void> {
  const { teamId, id: fileId } = file;
  const { reading } = outcome;
  await inTransaction(db, async (transaction) => {
    const now = await lockWeatherFile(transaction, { teamId, fileId });
    if (now === null || now.status !== 'reading') return;
    await insertFindings(transaction, { teamId, fileId, findings: reading.findings });
    if (outcome.reduced !== null) await storeYear(transaction, { teamId, fileId }, outcome);
    await setReadingResult(transaction, {
      teamId,
      fileId,
      status: reading.status,
      format: reading.format,
      declaredStation: reading.station,
      asks: reading.status === 'refused' ? [] : reading.asks,
      comments: reading.status === 'refused' ? null : reading.comments,
    });
    await notifyTeam(transaction, {
      teamId,
      event: { kind: 'weather-file', fileId, status: reading.status, step: null },
    });
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
