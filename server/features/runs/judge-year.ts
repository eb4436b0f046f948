import type { Knex } from 'knex';
import { clockOfBrief } from '#engine/clock/clock-of-brief.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import type { WeatherYear } from '#engine/reduction/weather-year.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { readPackedYear } from '../weather/packed-year-read-model.ts';
import { yearAtHeight } from './height-used.ts';
import { runKey, runResultHash } from './run-key.ts';
import { hasRun, insertRun, type NewRun } from './run-store.ts';
import { findYearToJudge, type YearToJudge } from './year-to-judge-read-model.ts';

export interface YearAndBrief {
  readonly teamId: string;
  readonly weatherYearId: string;
  readonly briefVersionId: string;
  /** Heights of sites, m, that the weather is moved to; left out: the station's own. */
  readonly heightsM?: readonly number[];
}

/**
 * Judges one accepted weather year by one brief version and stores the run, or one for each height. The same inputs are stored once
 * however often it is called; a year that no longer counts is left alone.
 */
export async function judgeStoredYear(db: Knex, { heightsM, ...key }: YearAndBrief): Promise<void> {
  const inputs = await findYearToJudge(db, key);
  if (inputs === null) return;
  const year = await readPackedYear(db, key);
  if (year === null) return;
  const runs: NewRun[] = [];
  for (const heightM of heightsM ?? [inputs.elevationM]) {
    const run = await judgeAt(db, { key, inputs, year, heightM });
    if (run !== null) runs.push(run);
  }
  if (runs.length === 0) return;
  await inTransaction(db, async (transaction) => {
    let runId: string | null = null;
    for (const run of runs) runId = (await insertRun(transaction, run)) ?? runId;
    if (runId === null) return;
    await notifyTeam(transaction, {
      teamId: key.teamId,
      event: { kind: 'run', runId, stationId: inputs.stationId },
    });
  });
}

/** `null` when the same run is there already. */
async function judgeAt(
  db: Knex,
  of: { key: Omit<YearAndBrief, 'heightsM'>; inputs: YearToJudge; year: WeatherYear; heightM: number },
): Promise<NewRun | null> {
  const { key, inputs, heightM } = of;
  const { brief, briefHash, contentHash, zone, latitude, longitude, elevationM } = inputs;
  const adjustedFromM = heightM === elevationM ? null : elevationM;
  const position = { latitude, longitude };
  const clock = clockOfBrief({ year: of.year, brief, zone, position });
  const keyHash = runKey({ contentHash, heightM, adjustedFromM, clock, briefHash, methodVersion: METHOD_VERSION });
  if (await hasRun(db, { ...key, keyHash })) return null;
  const year = yearAtHeight(of.year, { heightM, adjustedFromM });
  const { hourClassCodes, ...figures } = judgeYear({ year, brief, zone, heightM, position });
  return {
    ...key,
    ...{ methodVersion: figures.methodVersion, heightM, adjustedFromM, clock, keyHash, figures, hourClassCodes },
    resultHash: runResultHash(figures, hourClassCodes),
  };
}
