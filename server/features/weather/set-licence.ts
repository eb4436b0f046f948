import type { Knex } from 'knex';
import type { Licence } from '#contract/weather-reading.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { lockWeatherFile, setFileLicence } from './weather-file-store.ts';

/** Notes under which licence a file may be passed on; every year of the same upload is under the same. */
export async function setLicence(
  db: Knex,
  change: {
    teamId: string;
    fileId: string;
    licence: Licence;
    attribution: string | null;
    personId: string;
    requestId: string | null;
  },
): Promise<void> {
  const { teamId, fileId, licence, attribution, personId, requestId } = change;
  await inTransaction(db, async (transaction) => {
    const file = await lockWeatherFile(transaction, { teamId, fileId });
    if (file === null) throw new AppError('not_found', 'There is no such weather file in this team.');
    if (licence === 'attribution' && !attribution) {
      throw new AppError('invalid_input', 'Name whom to name.', [
        { path: 'body.attribution', message: 'This licence asks for a name: say whom to name.' },
      ]);
    }
    await setFileLicence(transaction, {
      teamId,
      fingerprint: file.fingerprint,
      licence,
      attribution: attribution || null,
    });
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'licence of a weather file set',
      subject: { fileId, name: file.name, licence, attribution },
      requestId,
    });
    await notifyTeam(transaction, {
      teamId,
      event: { kind: 'weather-file', fileId, status: file.status, step: file.step },
    });
  });
}
