import type { Knex } from 'knex';
import type { BriefPreview } from '#contract/briefs.ts';
import { AppError } from '../../http/app-error.ts';
import type { WebThreads } from '../../jobs/web-threads.ts';
import { readPackedYear } from '../weather/packed-year-read-model.ts';
import { findExampleYear } from './example-year-read-model.ts';
import { readDraft } from './read-draft.ts';

export interface PreviewParts {
  readonly db: Knex;
  readonly threads: Pick<WebThreads, 'preview'>;
}

/** Judges one year of a station by a draft, by the same function that a saved run is made by; stores nothing. */
export async function previewBrief(
  { db, threads }: PreviewParts,
  asked: { teamId: string; programmeId: string; stationId: string; draft: unknown; signal: AbortSignal },
): Promise<BriefPreview> {
  const { teamId, programmeId, stationId } = asked;
  const example = await findExampleYear(db, { teamId, programmeId, stationId });
  const key = example === null ? null : { teamId, weatherYearId: example.weatherYearId };
  const year = key === null ? null : await readPackedYear(db, key);
  if (example === null || year === null)
    throw new AppError('not_found', 'There is no such station with an accepted weather year in this team.');
  const brief = readDraft(asked.draft);
  const { zone, elevationM: heightM, latitude, longitude } = example;
  const task = { year, brief, zone, heightM, position: { latitude, longitude } };
  const result = await threads.preview(task, asked.signal);
  return {
    station: { id: example.stationId, name: example.stationName },
    kind: year.kind,
    year: year.year,
    ledger: { ...result.ledger, classes: { ...result.ledger.classes } },
    verdict: result.verdict,
    tolerances: [...result.tolerances],
    gates: [...result.gates],
    score: result.score,
    scoreNote: result.scoreNote,
    words: result.words,
    parts: [...result.parts],
    hourClasses: Buffer.from(result.hourClassCodes).toString('base64'),
  };
}
