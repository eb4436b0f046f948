import type { Knex } from 'knex';
import type { ResolvedClock } from '#engine/clock/resolved-clock.ts';
import type { RunFigures } from './run-key.ts';

export interface NewRun {
  readonly teamId: string;
  readonly weatherYearId: string;
  readonly briefVersionId: string;
  readonly methodVersion: string;
  readonly heightM: number;
  readonly adjustedFromM: number | null;
  readonly clock: ResolvedClock;
  readonly keyHash: string;
  readonly figures: RunFigures;
  readonly hourClassCodes: Uint8Array;
  readonly resultHash: string;
}

export async function hasRun(
  db: Knex,
  key: { weatherYearId: string; briefVersionId: string; keyHash: string },
): Promise<boolean> {
  const { rows } = await db.raw<{ rows: unknown[] }>(
    `select 1 from runs
     where runs.weather_year_id = :weatherYearId and runs.brief_version_id = :briefVersionId and runs.key_hash = :keyHash`,
    key,
  );
  return rows.length > 0;
}

/** @returns the id, or null when the same run is there already: a run is stored once and never changed */
export async function insertRun(transaction: Knex.Transaction, run: NewRun): Promise<string | null> {
  const { rows } = await transaction.raw<{ rows: { id: string }[] }>(
    `insert into runs (team_id, weather_year_id, brief_version_id, method_version, height_m, adjusted_from_m, clock,
       key_hash, result, hour_classes, result_hash)
     values (:teamId, :weatherYearId, :briefVersionId, :methodVersion, :heightM, :adjustedFromM, cast(:clock as jsonb), :keyHash,
       cast(:figures as jsonb), :hourClasses, :resultHash)
     on conflict (weather_year_id, brief_version_id, key_hash) do nothing
     returning id`,
    {
      teamId: run.teamId,
      weatherYearId: run.weatherYearId,
      briefVersionId: run.briefVersionId,
      methodVersion: run.methodVersion,
      heightM: run.heightM,
      adjustedFromM: run.adjustedFromM,
      clock: JSON.stringify(run.clock),
      keyHash: run.keyHash,
      figures: JSON.stringify(run.figures),
      hourClasses: Buffer.from(run.hourClassCodes),
      resultHash: run.resultHash,
    },
  );
  return rows[0]?.id ?? null;
}
