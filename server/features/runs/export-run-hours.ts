import { Readable } from 'node:stream';
import type { Knex } from 'knex';
import type { Role } from '#contract/accounts.ts';
import { briefSentence } from '#engine/brief/brief-sentence.ts';
import { changeWords } from '#engine/climate/change-words.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { weatherYearText } from '#engine/run/hours-csv.ts';
import { recordDownload, type Taker } from '../../db/record-download.ts';
import { AppError } from '../../http/app-error.ts';
import type { YearThread } from '../../jobs/year-thread.ts';
import { readPackedYear } from '../weather/packed-year-read-model.ts';
import { yearAtHeight } from './height-used.ts';
import { findRunToExport, type RunToExport } from './run-to-export-read-model.ts';

/** So much at a time, so that a slow reader holds nothing up. */
const CHUNK_BYTES = 64 * 1024;

export interface ExportParts {
  readonly db: Knex;
  readonly yearThread: Pick<YearThread, 'writeHours'>;
}

/**
 * Every hour of a stored run as CSV: the table that `muslin hours` writes, with the classes that the run holds.
 * @throws AppError not_found; wrong_state for a run of another method, whose classes are not made anew
 */
export async function exportRunHours(
  { db, yearThread }: ExportParts,
  asked: {
    teamId: string;
    runId: string;
    role: Role | null;
    closed: readonly string[];
    taker: Taker;
    signal: AbortSignal;
  },
): Promise<{ body: Readable; fileName: string }> {
  const run = await findRunToExport(db, asked);
  if (run === null) throw new AppError('not_found', 'There is no such run in this team.');
  if (!mayTakeAlong(run, asked.role)) throw underLicence(run);
  if (run.methodVersion !== METHOD_VERSION) throw anotherMethod(run);
  const { weatherYearId, brief, heightM, clock, zone } = run;
  const asMeasured = await readPackedYear(db, { teamId: asked.teamId, weatherYearId });
  if (asMeasured === null) throw new Error(`the weather year of the run ${asked.runId} has gone`);
  const year = yearAtHeight(asMeasured, run);
  const origin = originOf(run);
  const written = await yearThread.writeHours({ year, brief, heightM, clock, zone, origin }, asked.signal);
  if (!run.hourClassCodes.equals(written.hourClassCodes))
    throw new Error(`the hours of the run ${asked.runId} no longer come to the classes that it holds`);
  const fileName = fileNameOf(run);
  const { teamId, runId, taker } = asked;
  const subject = { runId, name: fileName, fileId: run.weatherFileId };
  await recordDownload(db, { teamId, act: 'hours of a run downloaded', subject, taker });
  return { body: Readable.from(chunksOf(written.bytes)), fileName };
}

/**
 * The table holds the weather of every hour. Where its licence allows nobody to pass it on, or is not known, only those who answer
 * for the files take it along, for the team's own checks.
 */
function mayTakeAlong({ licence }: RunToExport, role: Role | null): boolean {
  if (licence !== 'no redistribution' && licence !== 'unknown') return true;
  return role === 'engineer' || role === 'lead';
}

function underLicence({ fileName, licence }: RunToExport): AppError {
  const why = licence === 'unknown' ? 'is not known, so it counts as “no redistribution”' : 'allows no redistribution';
  return new AppError(
    'not_allowed',
    `The licence of “${fileName}” ${why}. An engineer of the team can take the hours along, or say on its record what the licence is.`,
  );
}

function licenceText({ licence, attribution }: RunToExport): string {
  return attribution === null ? licence : `${licence}; ${attribution}`;
}

function anotherMethod({ methodVersion }: RunToExport): AppError {
  return new AppError(
    'wrong_state',
    `This run was made under method ${methodVersion}; this release computes by ${METHOD_VERSION}. The release of that name writes its hours, or export the run that was made anew.`,
  );
}

function originOf(run: RunToExport) {
  const { fileName, stationName, briefName, briefVersion, brief, zone } = run;
  return {
    file: fileName,
    station: stationName,
    weatherYear: `${yearSentence(run)}${heightSentence(run)}`,
    licence: licenceText(run),
    brief: `${briefName}, version ${briefVersion}`,
    briefSentence: briefSentence(brief),
    zone,
  };
}

function heightSentence({ heightM, adjustedFromM }: RunToExport): string {
  return adjustedFromM === null ? '' : `; moved from ${adjustedFromM} m to the height of a site, ${heightM} m`;
}

function yearSentence(run: RunToExport): string {
  if (run.derivation === null) return weatherYearText(run);
  const { parentFileName, monthly, humidityRule } = run.derivation;
  return `derived from ${parentFileName}: ${changeWords(monthly, humidityRule)}; not measured`;
}

/** "korrel-pan-typical-school-hall-v3.csv": station, year, brief and its version. */
function fileNameOf({ stationName, kind, year, fileName, briefName, briefVersion }: RunToExport): string {
  const ofYear = kind === 'derived' ? `derived-${fileName}` : kind === 'actual' ? String(year) : kind;
  return `${[stationName, ofYear, briefName].map(slug).join('-')}-v${briefVersion}.csv`;
}

/** Letters, digits and hyphens of any script, no longer than any file system takes. */
function slug(text: string): string {
  const joined = text
    .normalize('NFC')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, '-');
  return joined.replace(/^-+|-+$/g, '').slice(0, 40) || 'unnamed';
}

function* chunksOf(bytes: Uint8Array): Generator<Buffer> {
  for (let from = 0; from < bytes.length; from += CHUNK_BYTES)
    yield Buffer.from(bytes.subarray(from, from + CHUNK_BYTES));
}
