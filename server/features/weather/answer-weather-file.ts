import type { Knex } from 'knex';
import type { FileAnswers } from '#contract/weather-reading.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { findFilesOfShape, keepMapping } from './mapping-store.ts';
import { clearReading, setAnswers } from './reading-store.ts';
import { queueReading } from './receive-weather-file.ts';
import { lockWeatherFile, type WeatherFileState } from './weather-file-store.ts';

export interface Answering {
  readonly teamId: string;
  readonly fileId: string;
  readonly answers: FileAnswers;
  readonly personId: string;
  readonly requestId: string | null;
  readonly at: Date;
}

/**
 * Notes what a person says of a file and has it read anew by that. How a table is read is remembered by its shape, and every other
 * file of that shape that waits for the same answer is read too.
 */
export async function answerWeatherFile(db: Knex, answering: Answering): Promise<void> {
  const { teamId, fileId, answers, personId, requestId, at } = answering;
  await inTransaction(db, async (transaction) => {
    const file = await lockWeatherFile(transaction, { teamId, fileId });
    if (file === null) throw new AppError('not_found', 'There is no such weather file in this team.');
    checkAnswerable(file);
    await readAnew(transaction, { teamId, fileId, answers });
    const { mapping } = answers;
    if (mapping !== undefined && file.shapeKey !== null) {
      const shape = { teamId, shapeKey: file.shapeKey };
      await keepMapping(transaction, { ...shape, mapping, personId, at });
      for (const other of await findFilesOfShape(transaction, shape)) {
        const waiting = await lockWeatherFile(transaction, { teamId, fileId: other });
        if (waiting?.status === 'asks') {
          await readAnew(transaction, { teamId, fileId: other, answers: { ...waiting.answers, mapping } });
        }
      }
    }
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'weather file answered',
      subject: { fileId, name: file.name, answers },
      requestId,
    });
  });
}

async function readAnew(
  transaction: Knex.Transaction,
  change: { teamId: string; fileId: string; answers: WeatherFileState['answers'] },
): Promise<void> {
  const { teamId, fileId } = change;
  await clearReading(transaction, { teamId, fileId });
  await setAnswers(transaction, change);
  await queueReading(transaction, { teamId, fileId });
}

function checkAnswerable({ status, failure }: WeatherFileState): void {
  switch (status) {
    case 'asks':
    case 'review':
    case 'refused':
      return;
    case 'reading':
      if (failure !== null) return;
      throw new AppError('wrong_state', 'This file is still being read. Answer when reading has ended.');
    case 'accepted':
      throw new AppError(
        'wrong_state',
        'This file was accepted as it was read. Withdraw it and upload it again to read it otherwise.',
      );
    default:
      throw new AppError('wrong_state', 'This file counts no longer. Upload it again to read it otherwise.');
  }
}
