import type { Knex } from 'knex';
import { clockOfBrief } from '#engine/clock/clock-of-brief.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { readPackedYear } from '../weather/packed-year-read-model.ts';
import { runKey, runResultHash } from './run-key.ts';
import { hasRun, insertRun } from './run-store.ts';
import { findYearToJudge } from './year-to-judge-read-model.ts';

export interface YearAndBrief {
  readonly teamId: string;
  readonly weatherYearId: string;
  readonly briefVersionId: string;
}

/**
 * Judges one accepted weather year by one brief version and stores the run. The same inputs are stored once however often
 * it is called; a year that no longer counts is left alone.
 */
export async function judgeStoredYear(db: Knex, key: YearAndBrief): Promise<void> {
  const inputs = await findYearToJudge(db, key);
  if (inputs === null) return;
  const year = await readPackedYear(db, key);
  if (year === null) return;

  const { brief, zone, elevationM: heightM, latitude, longitude } = inputs;
  const position = { latitude, longitude };
  const clock = clockOfBrief({ year, brief, zone, position });
  const keyHash = runKey({
    contentHash: inputs.contentHash,
    heightM,
    clock,
    briefHash: inputs.briefHash,
    methodVersion: METHOD_VERSION,
  });
  if (await hasRun(db, { ...key, keyHash })) return;

  const { hourClassCodes, ...figures } = judgeYear({ year, brief, zone, heightM, position });
  await inTransaction(db, async (transaction) => {
    const runId = await insertRun(transaction, {
      ...key,
      methodVersion: figures.methodVersion,
      heightM,
      clock,
      keyHash,
      figures,
      hourClassCodes,
      resultHash: runResultHash(figures, hourClassCodes),
    });
    if (runId === null) return;
    await notifyTeam(transaction, {
      teamId: key.teamId,
      event: { kind: 'run', runId, stationId: inputs.stationId },
    });
  });
}
