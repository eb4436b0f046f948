import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { findYearOfFile, unsetJudgingFailure } from './failure-store.ts';
import { restartReading } from './reading-store.ts';
import { queueReading } from './receive-weather-file.ts';
import { lockWeatherFile, type WeatherFileState } from './weather-file-store.ts';

export interface RetryParts {
  queueRuns(transaction: Knex.Transaction, year: { teamId: string; weatherYearId: string }): Promise<void>;
}

/** Begins again what stopped for a fault of ours: the reading of a file, or the judging of its year. */
export async function retryWeatherFile(
  deps: { db: Knex } & RetryParts,
  retry: { teamId: string; fileId: string; personId: string; tokenId: string | null; requestId: string | null },
): Promise<void> {
  const { teamId, fileId, personId, requestId } = retry;
  await inTransaction(deps.db, async (transaction) => {
    const file = await lockWeatherFile(transaction, { teamId, fileId });
    if (file === null) throw new AppError('not_found', 'There is no such weather file in this team.');
    if (file.failure === null) throw new AppError('wrong_state', 'Nothing of this file has stopped.');
    await begin(deps, { transaction, file });
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'weather file tried again',
      subject: { fileId, name: file.name, tokenId: retry.tokenId },
      requestId,
    });
  });
}

async function begin(
  { queueRuns }: RetryParts,
  { transaction, file }: { transaction: Knex.Transaction; file: WeatherFileState },
): Promise<void> {
  const key = { teamId: file.teamId, fileId: file.id };
  if (file.status === 'reading') {
    if (await restartReading(transaction, key)) await queueReading(transaction, key);
    return;
  }
  const weatherYearId = await findYearOfFile(transaction, key);
  if (weatherYearId === null) throw new AppError('wrong_state', 'This file counts no longer.');
  const year = { teamId: file.teamId, weatherYearId };
  await unsetJudgingFailure(transaction, year);
  await queueRuns(transaction, year);
}
