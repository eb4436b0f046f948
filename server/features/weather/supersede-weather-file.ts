import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { lockWeatherFile, setSuperseded } from './weather-file-store.ts';

/**
 * A better file of the same station takes the place of an accepted one, which counts no longer. Runs and signed figures that rest on it stay as
 * they are.
 */
export async function supersedeWeatherFile(
  db: Knex,
  change: { teamId: string; fileId: string; byFileId: string; personId: string; requestId: string | null; at: Date },
): Promise<void> {
  const { teamId, fileId, byFileId, personId, requestId } = change;
  await inTransaction(db, async (transaction) => {
    // Always in the same order, so that two that supersede each other's file do not wait for one another.
    const [first = '', second = ''] = [fileId, byFileId].sort();
    const held = [await lockWeatherFile(transaction, { teamId, fileId: first })];
    if (first !== second) held.push(await lockWeatherFile(transaction, { teamId, fileId: second }));
    const file = held.find((each) => each?.id === fileId);
    const better = held.find((each) => each?.id === byFileId);
    if (file == null || better == null) {
      throw new AppError('not_found', 'There is no such weather file in this team.');
    }
    if (file.id === better.id) throw new AppError('wrong_state', 'A file cannot supersede itself.');
    if (file.status !== 'accepted' || better.status !== 'accepted') {
      throw new AppError('wrong_state', 'Both files must be accepted before one can supersede the other.');
    }
    if (file.stationId !== better.stationId) {
      throw new AppError(
        'wrong_state',
        `“${better.name}” belongs to another station, so it cannot stand for this file.`,
      );
    }
    await setSuperseded(transaction, change);
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'weather file superseded',
      subject: { fileId, name: file.name, byFileId, byName: better.name },
      requestId,
    });
    await notifyTeam(transaction, {
      teamId,
      event: { kind: 'weather-file', fileId, status: 'superseded', step: null },
    });
  });
}
