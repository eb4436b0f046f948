import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { lockWeatherFile, setRefused } from './weather-file-store.ts';

/** A person decides against a file that waits for review or asks. Its record and its bytes stay. */
export async function refuseWeatherFile(
  db: Knex,
  refusal: { teamId: string; fileId: string; personId: string; requestId: string | null; at: Date; reason: string },
): Promise<void> {
  const { teamId, fileId, personId, requestId, reason } = refusal;
  await inTransaction(db, async (transaction) => {
    const file = await lockWeatherFile(transaction, { teamId, fileId });
    if (file === null) throw new AppError('not_found', 'There is no such weather file in this team.');
    if (file.status !== 'review' && file.status !== 'asks') {
      throw new AppError(
        'wrong_state',
        `Only files that wait for review or ask can be refused; this one is ${file.status === 'reading' ? 'still being read' : file.status}.`,
      );
    }
    await setRefused(transaction, refusal);
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'weather file refused',
      subject: { fileId, name: file.name, reason },
      requestId,
    });
    await notifyTeam(transaction, { teamId, event: { kind: 'weather-file', fileId, status: 'refused', step: null } });
  });
}
