import type { Knex } from 'knex';
import type { FileStatus, ReadingStep } from '#contract/weather.ts';
import type { Ask } from '#engine/weather-files/finding.ts';
import type { DeclaredStation } from '#engine/weather-files/weather-file-reading.ts';
import type { FileAnswers } from './file-answers.ts';
import { storableText } from './storable-text.ts';

/** What the verbs look at before they change a file. */
export interface WeatherFileState {
  readonly id: string;
  readonly teamId: string;
  readonly name: string;
  readonly fingerprint: string;
  readonly storageKey: string;
  readonly batchId: string | null;
  readonly bytes: number;
  readonly uploadedBy: string;
  readonly uploadedAt: Date;
  /** Which of the years of one upload it is, counted from 0, and its name; empty when the upload holds one. */
  readonly partIndex: number;
  readonly part: string;
  readonly answers: FileAnswers;
  readonly format: string | null;
  readonly status: FileStatus;
  readonly step: ReadingStep | null;
  readonly failure: string | null;
  readonly stationId: string | null;
  readonly declaredStation: DeclaredStation | null;
  readonly asks: readonly Ask[];
  readonly shapeKey: string | null;
}

const STATE_COLUMNS = `
  weather_files.id, weather_files.team_id as "teamId", weather_files.name, weather_files.fingerprint,
  weather_files.storage_key as "storageKey", weather_files.batch_id as "batchId",
  weather_files.bytes::double precision as bytes, weather_files.uploaded_by as "uploadedBy",
  weather_files.uploaded_at as "uploadedAt", weather_files.part_index as "partIndex", weather_files.part,
  weather_files.answers, weather_files.format, weather_files.status, weather_files.step, weather_files.failure,
  weather_files.station_id as "stationId", weather_files.declared_station as "declaredStation", weather_files.asks,
  weather_files.shape_key as "shapeKey"`;

/** The file as it stands; `null` when the team has no such file. */
export async function findWeatherFile(
  db: Knex,
  key: { teamId: string; fileId: string },
): Promise<WeatherFileState | null> {
  const { rows } = await db.raw<{ rows: WeatherFileState[] }>(
    `select ${STATE_COLUMNS} from weather_files where weather_files.team_id = ? and weather_files.id = ?`,
    [key.teamId, key.fileId],
  );
  return rows[0] ?? null;
}

/** A file to be read, with what decides whether and how. */
export interface FileToRead {
  readonly file: WeatherFileState;
  /** Its batch waits. */
  readonly paused: boolean;
  /** Some station of the team has a rule that does not hold there. */
  readonly teamHasRulesOff: boolean;
}

/** All that is asked before a file is read, in one statement; null when the team has no such file. */
export async function findFileToRead(db: Knex, key: { teamId: string; fileId: string }): Promise<FileToRead | null> {
  const { rows } = await db.raw<{ rows: (WeatherFileState & Omit<FileToRead, 'file'>)[] }>(
    `select ${STATE_COLUMNS},
       exists (select 1 from weather_batches
         where weather_batches.id = weather_files.batch_id and weather_batches.state = 'paused') as paused,
       exists (select 1 from rules_off where rules_off.team_id = weather_files.team_id) as "teamHasRulesOff"
     from weather_files where weather_files.team_id = ? and weather_files.id = ?`,
    [key.teamId, key.fileId],
  );
  const [row] = rows;
  if (row === undefined) return null;
  const { paused, teamHasRulesOff, ...file } = row;
  return { file, paused, teamHasRulesOff };
}

/** A file as it stands, held until the transaction ends, so that nobody else moves the file on meanwhile. */
export async function lockWeatherFile(
  transaction: Knex.Transaction,
  key: { teamId: string; fileId: string },
): Promise<WeatherFileState | null> {
  const { rows } = await transaction.raw<{ rows: WeatherFileState[] }>(
    `select ${STATE_COLUMNS} from weather_files
     where weather_files.team_id = ? and weather_files.id = ? for no key update`,
    [key.teamId, key.fileId],
  );
  return rows[0] ?? null;
}

/**
 * The same for what is about to be stored of its reading. This transaction then does not wait for the disk: a server that crashes
 * forgets whole transactions, last ones first, and the end of the job with this one, so that the file is read once more.
 */
export async function lockFileBeingRead(
  transaction: Knex.Transaction,
  key: { teamId: string; fileId: string },
): Promise<WeatherFileState | null> {
  const { rows } = await transaction.raw<{ rows: (WeatherFileState & { commit: string })[] }>(
    `select ${STATE_COLUMNS}, set_config('synchronous_commit', 'off', true) as commit from weather_files
     where weather_files.team_id = ? and weather_files.id = ? and weather_files.status = 'reading' for no key update`,
    [key.teamId, key.fileId],
  );
  const [row] = rows;
  if (row === undefined) return null;
  const { commit: _commit, ...file } = row;
  return file;
}

/** The team's file with these bytes that still stands (withdrawn ones do not count). */
export async function findStandingFile(
  db: Knex,
  key: { teamId: string; fingerprint: string },
): Promise<WeatherFileState | null> {
  const { rows } = await db.raw<{ rows: WeatherFileState[] }>(
    `select ${STATE_COLUMNS} from weather_files
     where weather_files.team_id = ? and weather_files.fingerprint = ? and weather_files.status <> 'withdrawn'
     order by weather_files.part_index limit 1`,
    [key.teamId, key.fingerprint],
  );
  return rows[0] ?? null;
}

/** @returns the new file's id, or null when the team already has these bytes (also when another upload is just storing them) */
export async function insertWeatherFile(
  transaction: Knex.Transaction,
  file: {
    teamId: string;
    batchId: string | null;
    name: string;
    bytes: number;
    fingerprint: string;
    storageKey: string;
    uploadedBy: string;
    uploadedAt: Date;
  },
): Promise<string | null> {
  const { rows } = await transaction.raw<{ rows: { id: string }[] }>(
    `insert into weather_files (team_id, batch_id, name, bytes, fingerprint, storage_key, status, step, uploaded_by,
       uploaded_at)
     values (:teamId, :batchId, :name, :bytes, :fingerprint, :storageKey, 'reading', 'received', :uploadedBy, :uploadedAt)
     on conflict (team_id, fingerprint, part_index) where status <> 'withdrawn' do nothing
     returning id`,
    { ...file, name: storableText(file.name) },
  );
  return rows[0]?.id ?? null;
}

export async function setAccepted(
  transaction: Knex.Transaction,
  acceptance: { teamId: string; fileId: string; stationId: string; personId: string; at: Date },
): Promise<void> {
  await transaction.raw(
    `update weather_files
     set status = 'accepted', station_id = :stationId, accepted_by = :personId, accepted_at = :at
     where team_id = :teamId and id = :fileId`,
    acceptance,
  );
}

export async function setWithdrawn(
  transaction: Knex.Transaction,
  withdrawal: { teamId: string; fileId: string; personId: string; at: Date; reason: string },
): Promise<void> {
  await transaction.raw(
    `update weather_files
     set status = 'withdrawn', step = null, withdrawn_by = :personId, withdrawn_at = :at, withdrawn_reason = :reason
     where team_id = :teamId and id = :fileId`,
    { ...withdrawal, reason: storableText(withdrawal.reason) },
  );
}

/** Every file of the same bytes is under the same licence. */
export async function setFileLicence(
  transaction: Knex.Transaction,
  change: { teamId: string; fingerprint: string; licence: string; attribution: string | null },
): Promise<void> {
  await transaction.raw(
    `update weather_files set licence = :licence, attribution = :attribution
     where team_id = :teamId and fingerprint = :fingerprint`,
    { ...change, attribution: change.attribution === null ? null : storableText(change.attribution) },
  );
}

export async function setRefused(
  transaction: Knex.Transaction,
  refusal: { teamId: string; fileId: string; personId: string; at: Date; reason: string },
): Promise<void> {
  await transaction.raw(
    `update weather_files
     set status = 'refused', refused_by = :personId, refused_at = :at, refused_reason = :reason
     where team_id = :teamId and id = :fileId`,
    { ...refusal, reason: storableText(refusal.reason) },
  );
}

export async function setSuperseded(
  transaction: Knex.Transaction,
  change: { teamId: string; fileId: string; byFileId: string; personId: string; at: Date },
): Promise<void> {
  await transaction.raw(
    `update weather_files
     set status = 'superseded', superseded_by = :byFileId, superseded_by_person = :personId, superseded_at = :at
     where team_id = :teamId and id = :fileId`,
    change,
  );
}
