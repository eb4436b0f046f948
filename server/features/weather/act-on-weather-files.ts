import type { Knex } from 'knex';
import { AppError } from '../../http/app-error.ts';
import { type AcceptanceParts, acceptWeatherFile } from './accept-weather-file.ts';
import { refuseWeatherFile } from './refuse-weather-file.ts';
import { supersedeWeatherFile } from './supersede-weather-file.ts';
import { findWeatherFile } from './weather-file-store.ts';
import { type WithdrawalParts, withdrawWeatherFile } from './withdraw-weather-file.ts';

export type WeatherFileAct =
  | { readonly act: 'accept' }
  | { readonly act: 'refuse'; readonly reason: string }
  | { readonly act: 'withdraw'; readonly reason: string }
  | { readonly act: 'supersede'; readonly byFileId: string };

export interface ActsAnswer {
  readonly done: string[];
  readonly problems: { readonly fileId: string; readonly name: string; readonly message: string }[];
}

/** Does the same to many files, each by itself: one that cannot be does not hold up the others. */
export async function actOnWeatherFiles(
  deps: { db: Knex } & AcceptanceParts & WithdrawalParts,
  input: {
    teamId: string;
    fileIds: readonly string[];
    act: WeatherFileAct;
    by: { personId: string; requestId: string | null; at: Date };
  },
): Promise<ActsAnswer> {
  const { teamId, act, by } = input;
  const answer: ActsAnswer = { done: [], problems: [] };
  for (const fileId of new Set(input.fileIds)) {
    const key = { teamId, fileId, ...by };
    try {
      if (act.act === 'accept') await acceptWeatherFile(deps, key);
      else if (act.act === 'refuse') await refuseWeatherFile(deps.db, { ...key, reason: act.reason });
      else if (act.act === 'withdraw') await withdrawWeatherFile(deps, { ...key, reason: act.reason });
      else await supersedeWeatherFile(deps.db, { ...key, byFileId: act.byFileId });
      answer.done.push(fileId);
    } catch (error) {
      if (!(error instanceof AppError)) throw error;
      const file = await findWeatherFile(deps.db, { teamId, fileId });
      answer.problems.push({ fileId, name: file?.name ?? 'a file that is not there', message: error.message });
    }
  }
  return answer;
}
