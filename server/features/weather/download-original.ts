import type { Readable } from 'node:stream';
import type { Knex } from 'knex';
import { recordDownload, type Taker } from '../../db/record-download.ts';
import { AppError } from '../../http/app-error.ts';
import type { OriginalStore } from '../../storage/original-store.ts';
import { DERIVED_FORMAT } from './derived-year-store.ts';
import { findWeatherFile } from './weather-file-store.ts';

/** The bytes of a weather file as they were uploaded; that they were taken along is written down first. */
export async function downloadOriginal(
  { db, storage }: { db: Knex; storage: Pick<OriginalStore, 'get'> },
  asked: { teamId: string; fileId: string; taker: Taker },
): Promise<{ body: Readable; fileName: string }> {
  const { teamId, fileId, taker } = asked;
  const file = await findWeatherFile(db, { teamId, fileId });
  if (file === null) throw new AppError('not_found', 'There is no such weather file in this team.');
  const body = await storage.get(file.storageKey);
  const subject = { fileId, name: file.name, fingerprint: file.fingerprint };
  try {
    await recordDownload(db, { teamId, act: 'original downloaded', subject, taker });
  } catch (error) {
    body.destroy();
    throw error;
  }
  return { body, fileName: file.format === DERIVED_FORMAT ? `${file.name}.json` : file.name };
}
