import type { Knex } from 'knex';
import type { Brief } from '#engine/brief/brief.ts';
import { METHOD_VERSION, READ_VERSION } from '#engine/conventions.ts';
import type { WeatherYear } from '#engine/reduction/weather-year.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { readPackedYear } from '../weather/packed-year-read-model.ts';
import { yearAtHeight } from './height-used.ts';
import { runKey, runResultHash } from './run-key.ts';
import { findRunToRepeat, type RunToRepeat } from './run-to-repeat-read-model.ts';

export type RepeatedRun =
  | { readonly outcome: 'no such run' }
  /** A run is made again only under its own method (method 11): the release of that name does it. */
  | { readonly outcome: 'another method'; readonly methodVersion: string }
  | {
      readonly outcome: 'repeated';
      readonly methodVersion: string;
      readonly keyHash: string;
      readonly resultHash: string;
      /** Of the result that was made just now. */
      readonly repeatedHash: string;
      /** What is not as it was: empty when the run is the same to the byte. */
      readonly differs: readonly RunPart[];
    };

/** What a run can be found to differ in: what it was made from, its record, or what the same inputs give now. */
export type RunPart = 'weather year' | 'brief version' | 'key' | 'stored result' | 'repeated result';

/** The hashes that name what a run was made from, handed in by the features that own them. */
export interface RunHashes {
  readonly briefHash: (brief: Brief) => string;
  readonly contentHash: (year: WeatherYear) => string;
}

/** Judges the weather year of a stored run again, by the run's own brief version, height and clock, and compares bytes. */
export async function repeatRun(db: Knex, hashes: RunHashes, runId: string): Promise<RepeatedRun> {
  const run = await findRunToRepeat(db, runId);
  if (run === null) return { outcome: 'no such run' };
  const { methodVersion, keyHash, resultHash } = run;
  if (methodVersion !== METHOD_VERSION) return { outcome: 'another method', methodVersion };
  const year = await readPackedYear(db, run);
  if (year === null) return { outcome: 'no such run' };
  const { brief, heightM, clock } = run;
  // The stored clock holds all that the zone had to say.
  const { hourClassCodes, ...figures } = judgeYear({
    year: yearAtHeight(year, run),
    brief,
    heightM,
    clock,
    zone: 'UTC',
  });
  const repeatedHash = runResultHash(figures, hourClassCodes);
  // The hash of a year names the version of the reading, so that an older one cannot be formed anew.
  const weatherHolds = run.readVersion !== READ_VERSION || hashes.contentHash(year) === run.contentHash;
  return {
    outcome: 'repeated',
    methodVersion,
    keyHash,
    resultHash,
    repeatedHash,
    differs: [
      ...(weatherHolds ? [] : (['weather year'] as const)),
      ...(hashes.briefHash(brief) === run.briefHash ? [] : (['brief version'] as const)),
      ...(keyOf(run) === keyHash ? [] : (['key'] as const)),
      ...(runResultHash(run.figures, run.hourClassCodes) === resultHash ? [] : (['stored result'] as const)),
      ...(repeatedHash === resultHash ? [] : (['repeated result'] as const)),
    ],
  };
}

function keyOf({ contentHash, heightM, adjustedFromM, clock, briefHash, methodVersion }: RunToRepeat): string {
  return runKey({ contentHash, heightM, adjustedFromM, clock, briefHash, methodVersion });
}
