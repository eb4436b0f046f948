import { createHash } from 'node:crypto';
import type { Knex } from 'knex';
import type { ReadingStep } from '#contract/weather.ts';
import { reduceYear } from '#engine/reduction/reduce-year.ts';
import { readWeatherFileParts } from '#engine/weather-files/read-weather-file-parts.ts';
import type { TableMapping } from '#engine/weather-files/table/table-mapping.ts';
import type { RefusedReading, WeatherFileReading } from '#engine/weather-files/weather-file-reading.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { GzipProblem } from '../../storage/inflate-gzip.ts';
import type { OriginalMemory, OriginalStore } from '../../storage/original-store.ts';
import { findMapping } from './mapping-store.ts';
import { contentOf } from './original-content.ts';
import { type ReadingKnowledge, readOptions } from './read-options.ts';
import { setReadingStep } from './reading-store.ts';
import { type FileOutcome, storeReadings } from './store-reading.ts';
import { type FileToRead, findFileToRead, type WeatherFileState } from './weather-file-store.ts';

export type ReadingDeps = { readonly db: Knex; readonly storage: OriginalStore } & ReadingKnowledge;

/** Nobody could follow the steps of a file no larger than this, a year of hours in any format. */
const QUICK_BYTES = 2_000_000;

/**
 * The work of the job `read-weather-file`: original bytes to findings and, where the file can be used, to weather years.
 * Everything that is read is stored in one transaction at the end, so a crash on the way leaves the file as it was, and a
 * file that is no longer being read is left alone.
 */
export async function readStoredFile(deps: ReadingDeps, key: { teamId: string; fileId: string }): Promise<void> {
  const found = await findFileToRead(deps.db, key);
  if (found === null || found.file.status !== 'reading' || found.paused) return;
  const { file } = found;

  const steps = new ReadingSteps(deps.db, file);
  await steps.enter('reading');
  const memory = idleMemory.pop() ?? deps.storage.newMemory?.();
  const { readings, remembered } = await readParts(deps, found, memory).finally(() => {
    if (memory !== undefined) idleMemory.push(memory);
  });
  await steps.enter('reducing');
  const outcomes = readings.map(reduced);
  await steps.enter('storing');
  await storeReadings(deps.db, file, { outcomes, remembered, untoldSteps: steps.untold });
}

/** For originals, as many as are read side by side; a reading keeps nothing of the bytes that it came from. */
const idleMemory: OriginalMemory[] = [];

interface PartsRead {
  readonly readings: readonly WeatherFileReading[];
  /** How the table was read, where that had been said of another of its shape. */
  readonly remembered: TableMapping | null;
}

async function readParts(
  deps: ReadingDeps,
  { file, teamHasRulesOff }: FileToRead,
  memory: OriginalMemory | undefined,
): Promise<PartsRead> {
  const content = await contentOf(await originalOf(deps.storage, file, memory));
  if (content instanceof GzipProblem) return { readings: [unreadable(content)], remembered: null };
  const name = file.name.replace(/\.gz$/i, '');
  const readings = readWeatherFileParts(content, name, await readOptions(deps, { file, station: null }));
  const first = { readings, remembered: null };
  const [reading] = readings;
  if (reading === undefined) throw new Error(`nothing was read of ${file.id}`);
  if ('table' in reading) {
    // Somebody has said before what tables of this shape hold.
    const mapping = file.answers.mapping ?? (await findMapping(deps.db, { ...file, shapeKey: reading.table.shapeKey }));
    if (mapping === null || file.answers.mapping !== undefined) return first;
    const answered = { ...file, answers: { ...file.answers, mapping } };
    const options = await readOptions(deps, { file: answered, station: null });
    return { readings: readWeatherFileParts(content, name, options), remembered: mapping };
  }
  if (reading.station === null || !teamHasRulesOff) return first;
  // Its station may have rules that do not hold there; which station it is shows only now.
  const options = await readOptions(deps, { file, station: reading.station });
  return options.rulesOff.length > (file.answers.rulesOff?.length ?? 0)
    ? { readings: readWeatherFileParts(content, name, options), remembered: null }
    : first;
}

function reduced(reading: WeatherFileReading): FileOutcome {
  if (reading.status === 'refused' || reading.hours === null) return { reading, reduced: null };
  return { reading, reduced: reduceYear(reading) };
}

/**
 * Tells the team how far the reading of a file has come. A small file is read within some hundredths of a second: its steps are told
 * together with its result, which spares thousands of files three transactions each.
 */
class ReadingSteps {
  /** Steps entered and not told, in their order. */
  readonly untold: ReadingStep[] = [];
  readonly #db: Knex;
  readonly #file: WeatherFileState;

  constructor(db: Knex, file: WeatherFileState) {
    this.#db = db;
    this.#file = file;
  }

  async enter(step: ReadingStep): Promise<void> {
    const { bytes, id, teamId } = this.#file;
    if (bytes <= QUICK_BYTES) {
      this.untold.push(step);
      return;
    }
    await inTransaction(this.#db, async (transaction) => {
      if (!(await setReadingStep(transaction, { teamId, fileId: id, step }))) return;
      await notifyTeam(transaction, { teamId, event: { kind: 'weather-file', fileId: id, status: 'reading', step } });
    });
  }
}

function unreadable({ message }: GzipProblem): RefusedReading {
  const finding = { code: 'binary', severity: 'refuse', line: null, column: null, lastLine: null, count: 1 } as const;
  const whole = { variable: null, done: null };
  return { status: 'refused', part: '', format: null, station: null, findings: [{ ...finding, ...whole, message }] };
}

/** @throws Error when the stored bytes are not those that were uploaded */
async function originalOf(
  storage: OriginalStore,
  file: WeatherFileState,
  memory: OriginalMemory | undefined,
): Promise<Uint8Array> {
  const bytes = await storage.read(file.storageKey, memory);
  const fingerprint = createHash('sha256').update(bytes).digest('hex');
  if (fingerprint !== file.fingerprint)
    throw new Error(`the original of ${file.id} has the fingerprint ${fingerprint}`);
  return bytes;
}
