import type { Knex } from 'knex';
import { zoneIsKnown, zoneOffset } from '#engine/clock/zone-offset.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { listYearsOfStation, lockStation, setStationPlace } from './station-store.ts';

/** What a change of stations needs of another feature, handed in where the server is wired. */
export interface StationParts {
  /** Queues the judging of a year by the team's briefs. */
  queueRuns(transaction: Knex.Transaction, year: { teamId: string; weatherYearId: string }): Promise<void>;
}

export interface StationMove {
  readonly teamId: string;
  readonly stationId: string;
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly zone: string;
  readonly reason: string;
  readonly personId: string;
  readonly requestId: string | null;
}

/**
 * Corrects where a station stands. Its years are judged anew, since limits are derated by its height and schedules follow its zone;
 * runs that were made before stay beside the new ones.
 */
export async function moveStation(deps: { db: Knex } & StationParts, move: StationMove): Promise<void> {
  const { teamId, stationId, personId, requestId, reason, ...place } = move;
  if (!zoneIsKnown(place.zone)) {
    const message = `This server knows no time zone “${place.zone}”. Give a name such as Europe/Rome.`;
    throw new AppError('invalid_input', message, [{ path: 'body.zone', message }]);
  }
  await inTransaction(deps.db, async (transaction) => {
    const was = await lockStation(transaction, { teamId, stationId });
    if (was === null) throw new AppError('not_found', 'There is no such station in this team.');
    await setStationPlace(transaction, { teamId, stationId, ...place, utcOffsetMin: standardOffsetMin(place.zone) });
    for (const weatherYearId of await listYearsOfStation(transaction, { teamId, stationId })) {
      await deps.queueRuns(transaction, { teamId, weatherYearId });
    }
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'station moved',
      subject: { stationId, was, now: place, reason },
      requestId,
    });
  });
}

/** Winter and summer of one year; the smaller offset is that of standard time in either hemisphere. */
const MOMENTS_MS = [Date.UTC(2024, 0, 1), Date.UTC(2024, 6, 1)] as const;

function standardOffsetMin(zone: string): number {
  return Math.min(...MOMENTS_MS.map(zoneOffset(zone)));
}
