import type { Knex } from 'knex';
import type { Brief } from '#engine/brief/brief.ts';
import type { ResolvedClock } from '#engine/clock/resolved-clock.ts';
import type { RunFigures } from './run-key.ts';

/** A stored run with what it was made from. */
export interface RunToRepeat {
  readonly teamId: string;
  readonly weatherYearId: string;
  readonly methodVersion: string;
  readonly heightM: number;
  readonly adjustedFromM: number | null;
  readonly clock: ResolvedClock;
  readonly keyHash: string;
  readonly figures: RunFigures;
  readonly hourClassCodes: Buffer;
  readonly resultHash: string;
  readonly contentHash: string;
  readonly readVersion: string;
  readonly briefHash: string;
  readonly brief: Brief;
}

/** Of whatever team: for who keeps the installation, never for a request. `null` when there is no such run. */
export async function findRunToRepeat(db: Knex, runId: string): Promise<RunToRepeat | null> {
  const { rows } = await db.raw<{ rows: RunToRepeat[] }>(
    `select runs.team_id as "teamId", runs.weather_year_id as "weatherYearId", runs.method_version as "methodVersion",
       runs.height_m as "heightM", runs.adjusted_from_m as "adjustedFromM", runs.clock, runs.key_hash as "keyHash", runs.result as figures,
       runs.hour_classes as "hourClassCodes", runs.result_hash as "resultHash",
       weather_years.content_hash as "contentHash", weather_years.read_version as "readVersion",
       brief_versions.hash as "briefHash", brief_versions.body as brief
     from runs
     join weather_years on weather_years.team_id = runs.team_id and weather_years.id = runs.weather_year_id
     join brief_versions on brief_versions.team_id = runs.team_id and brief_versions.id = runs.brief_version_id
     where runs.id = ?`,
    [runId],
  );
  return rows[0] ?? null;
}
