import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import path from 'node:path';
import type { Deps } from '../deps.ts';
import { queueRuns } from '../features/runs/queue-runs.ts';
import { findOrMakeStation } from '../features/stations/find-or-make-station.ts';
import { switchRuleOff } from '../features/stations/switch-rule.ts';
import { acceptWeatherFile } from '../features/weather/accept-weather-file.ts';
import { receiveWeatherFile } from '../features/weather/receive-weather-file.ts';
import { setLicence } from '../features/weather/set-licence.ts';

type FileDeps = Pick<Deps, 'db' | 'storage' | 'now'>;

export interface OwnFile {
  readonly teamId: string;
  readonly personId: string;
}

/** Uploads a file of our own disk as a person would, through the same verb. @returns its id, also when the team had it */
export async function receiveFromDisk(deps: FileDeps, from: OwnFile & { readonly file: string }): Promise<string> {
  const bytes = await readFile(from.file);
  const { fileId } = await receiveWeatherFile(deps, {
    teamId: from.teamId,
    personId: from.personId,
    tokenId: null,
    requestId: null,
    at: deps.now(),
    batchId: null,
    upload: {
      name: path.basename(from.file),
      bytes: bytes.length,
      fingerprint: createHash('sha256').update(bytes).digest('hex'),
      temporaryPath: from.file,
    },
  });
  return fileId;
}

/** Accepts a file that waits for review, as a person would. */
export async function acceptAs(deps: FileDeps, file: OwnFile & { readonly fileId: string }): Promise<void> {
  const { db, now } = deps;
  await acceptWeatherFile({ db, findOrMakeStation, switchRuleOff, queueRuns }, { ...file, requestId: null, at: now() });
}

/** Says of an invented file that anybody may pass it on. */
export async function openLicenceAs(deps: FileDeps, file: OwnFile & { readonly fileId: string }): Promise<void> {
  const licence = { licence: 'open', attribution: 'Invented weather of the demo' } as const;
  await setLicence(deps.db, { ...file, ...licence, requestId: null });
}
