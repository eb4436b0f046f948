import type { Knex } from 'knex';
import type { RuleName } from '#engine/weather-files/quality/quality-options.ts';
import type { DeclaredStation } from '#engine/weather-files/weather-file-reading.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { lockWeatherFile, setAccepted, type WeatherFileState } from './weather-file-store.ts';
import { setYearStation } from './weather-year-store.ts';

/** The place that a file declares, with nothing left open. */
export interface KnownPlace {
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly utcOffsetH: number;
  readonly wmoNumber: string | null;
}

/** What accepting needs of the other features, handed in where the server is wired. */
export interface AcceptanceParts {
  /** The id of the team's station that the file belongs to, made when there is none. */
  findOrMakeStation(transaction: Knex.Transaction, declared: KnownPlace & { teamId: string }): Promise<string>;
  /** Switches a rule off for the files of a station that are read from now on. */
  switchRuleOff(
    transaction: Knex.Transaction,
    off: { teamId: string; stationId: string; rule: RuleName; reason: string; personId: string; at: Date },
  ): Promise<void>;
  /** Queues the judging of a year by the team's briefs. */
  queueRuns(transaction: Knex.Transaction, year: { teamId: string; weatherYearId: string }): Promise<void>;
}

export interface Acceptance {
  readonly teamId: string;
  readonly fileId: string;
  readonly personId: string;
  readonly requestId: string | null;
  readonly at: Date;
}

/** Takes a file that waits for review into the count: its station is found or made, its year is judged. */
export async function acceptWeatherFile(deps: { db: Knex } & AcceptanceParts, acceptance: Acceptance): Promise<void> {
  const { teamId, fileId, personId, requestId, at } = acceptance;
  await inTransaction(deps.db, async (transaction) => {
    const file = await lockWeatherFile(transaction, { teamId, fileId });
    if (file === null) throw new AppError('not_found', 'There is no such weather file in this team.');
    const declared = placeOfAcceptable(file);
    const stationId = await deps.findOrMakeStation(transaction, { ...declared, teamId });
    for (const { rule, reason } of file.answers.rulesOff ?? []) {
      await deps.switchRuleOff(transaction, { teamId, stationId, rule, reason, personId, at });
    }
    await setAccepted(transaction, { teamId, fileId, stationId, personId, at });
    const weatherYearId = await setYearStation(transaction, { teamId, fileId, stationId });
    await deps.queueRuns(transaction, { teamId, weatherYearId });
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'weather file accepted',
      subject: { fileId, name: file.name, fingerprint: file.fingerprint, stationId },
      requestId,
    });
    await notifyTeam(transaction, {
      teamId,
      event: { kind: 'weather-file', fileId, status: 'accepted', step: null },
    });
  });
}

/** @throws AppError wrong_state that says what the file is now and what would mend it */
function placeOfAcceptable(file: WeatherFileState): KnownPlace {
  if (file.status !== 'review') throw new AppError('wrong_state', whyNotAcceptable(file));
  const place = file.declaredStation === null ? null : knownPlace(file.declaredStation);
  if (place === null) {
    throw new AppError(
      'wrong_state',
      'This file does not say in full where its station stands. Give its position, elevation and UTC offset.',
    );
  }
  return place;
}

function knownPlace(declared: DeclaredStation): KnownPlace | null {
  const { latitude, longitude, elevationM, utcOffsetH } = declared;
  if (latitude === null || longitude === null || elevationM === null || utcOffsetH === null) return null;
  return { name: declared.name, latitude, longitude, elevationM, utcOffsetH, wmoNumber: declared.wmoNumber };
}

function whyNotAcceptable(file: WeatherFileState): string {
  switch (file.status) {
    case 'reading':
      return file.failure === null
        ? 'This file is still being read.'
        : 'Reading this file stopped for a fault of ours. Let it be read once more.';
    case 'asks':
      return ['This file asks before it can be accepted:', ...file.asks.map((ask) => ask.message)].join(' ');
    case 'accepted':
      return 'This file was already accepted.';
    case 'refused':
      return 'This file was refused when it was read. Its findings say why.';
    case 'withdrawn':
      return 'This file was withdrawn. Upload it again to use it.';
    default:
      return 'This file was superseded by another and counts no longer.';
  }
}
