import type { Knex } from 'knex';
import type { ReadingStep } from '#contract/weather.ts';
import type { Ask, Finding } from '#engine/weather-files/finding.ts';
import type { TableGuess } from '#engine/weather-files/table/table-guess.ts';
import type { TableMapping } from '#engine/weather-files/table/table-mapping.ts';
import type { DeclaredStation } from '#engine/weather-files/weather-file-reading.ts';
import type { FileAnswers } from './file-answers.ts';
import { storableText } from './storable-text.ts';
import type { WeatherFileState } from './weather-file-store.ts';

/** Begins a reading anew that stopped for a fault of ours. */
export async function restartReading(
  transaction: Knex.Transaction,
  key: { teamId: string; fileId: string },
): Promise<boolean> {
  const result = await transaction.raw<{ rowCount: number }>(
    `update weather_files set step = 'received', failure = null
     where team_id = ? and id = ? and status = 'reading' and failure is not null`,
    [key.teamId, key.fileId],
  );
  return result.rowCount > 0;
}

/** @returns false when the file is no longer being read */
export async function setReadingStep(
  transaction: Knex.Transaction,
  change: { teamId: string; fileId: string; step: ReadingStep },
): Promise<boolean> {
  const result = await transaction.raw<{ rowCount: number }>(
    `update weather_files set step = :step where team_id = :teamId and id = :fileId and status = 'reading'`,
    change,
  );
  return result.rowCount > 0;
}

/** What reading found out about a file. */
export interface ReadingResult {
  readonly teamId: string;
  readonly fileId: string;
  readonly status: 'asks' | 'review' | 'refused';
  readonly part: string;
  readonly format: string | null;
  readonly declaredStation: DeclaredStation | null;
  readonly asks: readonly Ask[];
  readonly comments: string | null;
  readonly findings: readonly Finding[];
  /** Of a table whose columns nobody has confirmed. */
  readonly table: TableGuess | null;
}

/**
 * Ends the reading of a file with what was read and every finding, in the order in which they were found, in one statement. A table
 * keeps the shape that it asked by, so that its answer can be corrected.
 */
export async function setReadingResult(transaction: Knex.Transaction, result: ReadingResult): Promise<void> {
  const { table, declaredStation, asks, comments, findings } = result;
  await transaction.raw(
    `with told as (
       insert into findings (team_id, weather_file_id, position, code, severity, line, col, last_line, hours, variable,
         done, message)
       select :teamId, :fileId, found.position, found.code, found.severity, found.line, found."column", found."lastLine",
         found.count, found.variable, found.done, found.message
       from jsonb_to_recordset(cast(:findings as jsonb)) as found (
         position integer, code text, severity text, line integer, "column" integer, "lastLine" integer, count integer,
         variable text, done text, message text)
     )
     update weather_files
     set status = :status, step = null, failure = null, part = :part, format = :format,
       declared_station = cast(:declaredStation as jsonb), asks = cast(:asks as jsonb), comments = :comments,
       table_guess = cast(:table as jsonb), shape_key = coalesce(:shapeKey, shape_key)
     where team_id = :teamId and id = :fileId`,
    {
      ...result,
      part: storableText(result.part),
      declaredStation: declaredStation === null ? null : storableJson(declaredStation),
      asks: storableJson(asks),
      comments: comments === null ? null : storableText(comments),
      table: table === null ? null : storableJson(table),
      shapeKey: table?.shapeKey ?? null,
      findings: storableJson(findings.map((finding, position) => ({ ...finding, position }))),
    },
  );
}

/**
 * A further station-year of the same upload, about to be given what was read of it. @returns null when it stands already
 */
export async function insertPart(
  transaction: Knex.Transaction,
  part: { file: WeatherFileState; partIndex: number },
): Promise<string | null> {
  const { rows } = await transaction.raw<{ rows: { id: string }[] }>(
    `insert into weather_files (team_id, batch_id, name, bytes, fingerprint, storage_key, status, step, uploaded_by,
       uploaded_at, part_index, answers)
     select team_id, batch_id, name, bytes, fingerprint, storage_key, 'reading', 'storing', uploaded_by, uploaded_at,
       :partIndex, coalesce((select jsonb_object_agg(answer.key, answer.value) from jsonb_each(answers) as answer
         where answer.key in ('mapping', 'keepSuspect')), '{}')
     from weather_files where team_id = :teamId and id = :fileId
     on conflict (team_id, fingerprint, part_index) where status <> 'withdrawn' do nothing
     returning id`,
    { teamId: part.file.teamId, fileId: part.file.id, partIndex: part.partIndex },
  );
  return rows[0]?.id ?? null;
}

/** Notes beside a file how its table was read. */
export async function keepMappingOfFile(
  transaction: Knex.Transaction,
  read: { teamId: string; fileId: string; mapping: TableMapping },
): Promise<void> {
  await transaction.raw(
    `update weather_files set answers = answers || jsonb_build_object('mapping', cast(:mapping as jsonb))
     where team_id = :teamId and id = :fileId`,
    { ...read, mapping: storableJson(read.mapping) },
  );
}

/** Notes what a person has answered, and puts the file back to be read. */
export async function setAnswers(
  transaction: Knex.Transaction,
  change: { teamId: string; fileId: string; answers: FileAnswers },
): Promise<void> {
  await transaction.raw(
    `update weather_files set answers = cast(:answers as jsonb), status = 'reading', step = 'received', failure = null,
       refused_by = null, refused_at = null, refused_reason = null
     where team_id = :teamId and id = :fileId`,
    { ...change, answers: storableJson(change.answers) },
  );
}

/** Takes away what was read of a file that has not been accepted, before it is read anew. */
export async function clearReading(
  transaction: Knex.Transaction,
  key: { teamId: string; fileId: string },
): Promise<void> {
  await transaction.raw(
    `with gone as (delete from findings where team_id = :teamId and weather_file_id = :fileId)
     delete from weather_years where team_id = :teamId and weather_file_id = :fileId`,
    key,
  );
}

function storableJson(value: unknown): string {
  return JSON.stringify(value, (_, part: unknown) => (typeof part === 'string' ? storableText(part) : part));
}
