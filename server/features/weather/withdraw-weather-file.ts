import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { lockWeatherFile, setWithdrawn, type WeatherFileState } from './weather-file-store.ts';

export interface Withdrawal {
  readonly teamId: string;
  readonly fileId: string;
  readonly personId: string;
  readonly requestId: string | null;
  readonly at: Date;
  readonly reason: string;
}

export interface WithdrawalParts {
  /** Queues the judging of years that sites of the team need now: a station without weather stands for none by itself. */
  queueSiteRunsOf(transaction: Knex.Transaction, team: { teamId: string }): Promise<void>;
}

/** Takes a file out of the count. Its record, its bytes and its runs stay; the same bytes may be uploaded again. */
export async function withdrawWeatherFile(
  { db, queueSiteRunsOf }: { db: Knex } & WithdrawalParts,
  withdrawal: Withdrawal,
): Promise<void> {
  const { teamId, fileId, personId, requestId, reason } = withdrawal;
  await inTransaction(db, async (transaction) => {
    const file = await lockWeatherFile(transaction, { teamId, fileId });
    if (file === null) throw new AppError('not_found', 'There is no such weather file in this team.');
    checkWithdrawable(file);
    await setWithdrawn(transaction, withdrawal);
    await queueSiteRunsOf(transaction, { teamId });
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'weather file withdrawn',
      subject: { fileId, name: file.name, was: file.status, reason },
      requestId,
    });
    await notifyTeam(transaction, {
      teamId,
      event: { kind: 'weather-file', fileId, status: 'withdrawn', step: null },
    });
  });
}

function checkWithdrawable(file: WeatherFileState): void {
  if (file.status === 'withdrawn') throw new AppError('wrong_state', 'This file was already withdrawn.');
  if (file.status === 'superseded') {
    throw new AppError('wrong_state', 'This file was superseded by another and counts no longer.');
  }
  if (file.status === 'reading' && file.failure === null) {
    throw new AppError('wrong_state', 'This file is still being read. Withdraw it when reading has ended.');
  }
}
