import type { Knex } from 'knex';
import { AppError } from '../../http/app-error.ts';
import type { Derived, DeriveTask } from '../../jobs/year-task.ts';
import type { YearThread } from '../../jobs/year-thread.ts';
import { readPackedYear } from './packed-year-read-model.ts';
import { findParentFile, type ParentFile } from './parent-year-read-model.ts';
import { type AskedChange, readChange } from './read-change.ts';

export interface DerivingParts {
  readonly db: Knex;
  readonly yearThread: Pick<YearThread, 'derive'>;
}

export interface AskedDerivation {
  readonly teamId: string;
  readonly fileId: string;
  readonly change: AskedChange;
  readonly signal: AbortSignal;
}

type UsableParent = ParentFile & { readonly weatherYearId: string; readonly stationId: string };

export interface DerivedFromParent extends Extract<Derived, { ok: true }> {
  readonly parent: UsableParent;
  readonly monthly: DeriveTask['monthly'];
}

/** What a change makes of an accepted year, for preview and saving alike. @throws AppError, every fault at once */
export async function deriveFromParent(
  { db, yearThread }: DerivingParts,
  { teamId, fileId, change, signal }: AskedDerivation,
): Promise<DerivedFromParent> {
  const parent = usableParent(await findParentFile(db, { teamId, fileId }));
  const monthly = readChange(change);
  const year = await readPackedYear(db, { teamId, weatherYearId: parent.weatherYearId });
  if (year === null) throw new Error(`the year of ${fileId} has gone`);
  const { humidityRule } = change;
  const { belowZero } = parent;
  const derived = await yearThread.derive({ parent: year, belowZero, monthly, humidityRule }, signal);
  if (derived.ok) return { ...derived, parent, monthly };
  throw new AppError(
    'invalid_input',
    'This change makes no weather.',
    derived.faults.map(({ month, message }) => ({ path: `body.monthly.${month}`, message: `${message}.` })),
  );
}

/** @throws AppError not_found, or wrong_state that says why nothing can be derived from the file */
export function usableParent(file: ParentFile | null): UsableParent {
  if (file === null) throw new AppError('not_found', 'There is no such weather file in this team.');
  const { status, kind, weatherYearId, stationId } = file;
  if (kind === 'derived')
    throw new AppError('wrong_state', 'This year is derived itself. Change the climate of the year that it came from.');
  if (status !== 'accepted' || weatherYearId === null || stationId === null)
    throw new AppError(
      'wrong_state',
      `Only an accepted weather year can be derived from; this file is ${statusWord(status)}.`,
    );
  return { ...file, weatherYearId, stationId };
}

function statusWord(status: ParentFile['status']): string {
  if (status === 'reading') return 'still being read';
  if (status === 'asks' || status === 'review') return 'not accepted yet';
  return status;
}
