import { createHash } from 'node:crypto';
import type { Knex } from 'knex';
import type { ReadingStep } from '#contract/weather.ts';
import { reduceYear } from '#engine/reduction/reduce-year.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import type { Relief } from '#engine/weather-files/relief.ts';
import type { RefusedReading } from '#engine/weather-files/weather-file-reading.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { GzipProblem, inflateGzip, isGzip } from '../../storage/inflate-gzip.ts';
import type { OriginalStore } from '../../storage/original-store.ts';
import { findBatchState } from './batch-store.ts';
import { storeReading } from './store-reading.ts';
import { findWeatherFile, setReadingStep, type WeatherFileState } from './weather-file-store.ts';

/**
 * The work of the job `read-weather-file`: original bytes to findings and, where the file can be used, to a weather year.
 * Everything that is read is stored in one transaction at the end, so a crash on the way leaves the file as it was, and a
 * file that is no longer being read is left alone.
 */
export async function readStoredFile(
  deps: { db: Knex; storage: OriginalStore; relief: Relief },
  key: { teamId: string; fileId: string },
): Promise<void> {
  const file = await findWeatherFile(deps.db, key);
  if (file === null || file.status !== 'reading') return;
  if (file.batchId !== null && (await findBatchState(deps.db, { ...key, batchId: file.batchId })) === 'paused') return;

  await enterStep(deps.db, file, 'reading');
  const content = await contentOf(await originalOf(deps.storage, file));
  const reading =
    content instanceof GzipProblem
      ? unreadable(content)
      : readWeatherFile(content, file.name.replace(/\.gz$/i, ''), { relief: deps.relief });
  if (reading.status === 'refused' || reading.hours === null) {
    return await storeReading(deps.db, file, { reading, reduced: null });
  }

  await enterStep(deps.db, file, 'reducing');
  const reduced = reduceYear(reading);
  await enterStep(deps.db, file, 'storing');
  await storeReading(deps.db, file, { reading, reduced });
}

async function enterStep(db: Knex, file: WeatherFileState, step: ReadingStep): Promise<void> {
  await inTransaction(db, async (transaction) => {
    if (!(await setReadingStep(transaction, { teamId: file.teamId, fileId: file.id, step }))) return;
    await notifyTeam(transaction, {
      teamId: file.teamId,
      event: { kind: 'weather-file', fileId: file.id, status: 'reading', step },
    });
  });
}

/** What is inside a gzip file, whatever its name; any other file is its own content. */
async function contentOf(original: Uint8Array): Promise<Uint8Array | GzipProblem> {
  if (!isGzip(original)) return original;
  try {
    return await inflateGzip(original);
  } catch (error) {
    if (error instanceof GzipProblem) return error;
    throw error;
  }
}

function unreadable({ message }: GzipProblem): RefusedReading {
  const finding = { code: 'binary', severity: 'refuse', line: null, column: null, lastLine: null, count: 1 } as const;
  const whole = { variable: null, done: null };
  return { status: 'refused', part: '', format: null, station: null, findings: [{ ...finding, ...whole, message }] };
}

/** @throws Error when the stored bytes are not those that were uploaded */
async function originalOf(storage: OriginalStore, file: WeatherFileState): Promise<Uint8Array> {
  const bytes = await storage.read(file.storageKey);
  const fingerprint = createHash('sha256').update(bytes).digest('hex');
  if (fingerprint !== file.fingerprint)
    throw new Error(`the original of ${file.id} has the fingerprint ${fingerprint}`);
  return bytes;
}
