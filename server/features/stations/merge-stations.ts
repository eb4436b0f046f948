import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import type { StationParts } from './move-station.ts';
import { listYearsOfStation, lockStation, lockStationsOfTeam, setMergedInto } from './station-store.ts';

/** Takes the files and years of another station into this one; the other is drawn no longer. The years are judged anew at this place. */
export async function mergeStations(
  deps: { db: Knex } & StationParts,
  merge: {
    teamId: string;
    stationId: string;
    otherStationId: string;
    reason: string;
    personId: string;
    requestId: string | null;
  },
): Promise<void> {
  const { teamId, stationId, otherStationId, personId, requestId, reason } = merge;
  await inTransaction(deps.db, async (transaction) => {
    // No file finds its station meanwhile.
    await lockStationsOfTeam(transaction, teamId);
    const kept = await lockStation(transaction, { teamId, stationId });
    const other = await lockStation(transaction, { teamId, stationId: otherStationId });
    if (kept === null || other === null) throw new AppError('not_found', 'There is no such station in this team.');
    if (stationId === otherStationId) throw new AppError('wrong_state', 'A station cannot be merged into itself.');
    const moved = await listYearsOfStation(transaction, { teamId, stationId: otherStationId });
    await setMergedInto(transaction, { teamId, stationId: otherStationId, intoId: stationId });
    for (const weatherYearId of moved) await deps.queueRuns(transaction, { teamId, weatherYearId });
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'stations merged',
      subject: { stationId, otherStationId, otherName: other.name, years: moved.length, reason },
      requestId,
    });
  });
}
