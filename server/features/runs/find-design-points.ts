import type { Knex } from 'knex';
import type { DesignPoints } from '#contract/design-points.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { designOfYear, sizeAtDesignPoints } from '#engine/sizing/design-points.ts';
import { AppError } from '../../http/app-error.ts';
import { readPackedYear } from '../weather/packed-year-read-model.ts';
import { yearAtHeight } from './height-used.ts';
import { findRunToExport } from './run-to-export-read-model.ts';

/**
 * The plant of a run at the design values of its year, which is moved to the run's height first where that is a site's.
 * @throws AppError not_found; wrong_state for a run of another method
 */
export async function findDesignPoints(
  db: Knex,
  asked: { teamId: string; runId: string; closed: readonly string[] },
): Promise<DesignPoints> {
  const run = await findRunToExport(db, asked);
  if (run === null) throw new AppError('not_found', 'There is no such run in this team.');
  if (run.methodVersion !== METHOD_VERSION)
    throw new AppError(
      'wrong_state',
      `This run was made under method ${run.methodVersion}; this release computes by ${METHOD_VERSION}. The release of that name tells its design points.`,
    );
  const { weatherYearId, brief, heightM } = run;
  const stored = await readPackedYear(db, { teamId: asked.teamId, weatherYearId });
  if (stored === null) throw new Error(`the weather year of the run ${asked.runId} has gone`);
  const year = yearAtHeight(stored, run);
  const { points, caution } = sizeAtDesignPoints({ year, design: designOfYear(year), brief, heightM });
  return {
    follows: brief.limit.kind === 'tower' ? 'wet bulb' : 'dry bulb',
    points: points.map((point) => ({ ...point, state: point.state === null ? null : { ...point.state } })),
    caution,
  };
}
