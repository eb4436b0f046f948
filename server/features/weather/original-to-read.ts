import type { Knex } from 'knex';
import type { OriginalToRead } from '../../jobs/year-task.ts';
import type { OriginalStore } from '../../storage/original-store.ts';
import { DERIVED_FORMAT } from './derived-year-store.ts';
import { contentOf } from './original-content.ts';
import { findWeatherFile } from './weather-file-store.ts';

/** An original and what it was read by, to be read once more; null for a derived year, which no lines hold, and where it is gone. */
export async function originalToRead(
  { db, storage }: { db: Knex; storage: OriginalStore },
  key: { teamId: string; fileId: string },
): Promise<OriginalToRead | null> {
  const file = await findWeatherFile(db, key);
  if (file === null || file.format === DERIVED_FORMAT) return null;
  const content = await contentOf(await storage.read(file.storageKey)).catch(() => null);
  if (content === null || content instanceof Error) return null;
  const { place, mapping, answers, keepSuspect, fillLongGaps, rulesOff = [] } = file.answers;
  return {
    content,
    name: file.name.replace(/\.gz$/i, ''),
    part: file.part,
    options: {
      ...(place === undefined ? {} : { place }),
      ...(mapping === undefined ? {} : { mapping }),
      ...(answers === undefined ? {} : { answers }),
      ...(keepSuspect === undefined ? {} : { keepSuspect }),
      ...(fillLongGaps === undefined ? {} : { fillLongGaps }),
      ...(file.part === '' ? {} : { part: file.part }),
      rulesOff: rulesOff.map(({ rule }) => rule),
    },
  };
}
