import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { notify } from '../../mail/notify.ts';
import { takeFinishedBatches } from './finished-batch-store.ts';

/** A browser that sends many files one after another leaves no longer gap between them. */
const REST_SECONDS = 60;

/** Tells whoever brought a batch that all of it has been read; each batch once. */
export async function tellFinishedImports({ db, publicUrl }: { db: Knex; publicUrl: string }, at: Date): Promise<void> {
  await inTransaction(db, async (transaction) => {
    for (const { teamId, batchId, name, personId } of await takeFinishedBatches(transaction, {
      at,
      restSeconds: REST_SECONDS,
    })) {
      const words = `The import “${name}” has been read.`;
      const path = `/teams/${teamId}/weather?batch=${batchId}`;
      await notify(transaction, { personId, teamId, kind: 'import finished', words, path, publicUrl, at });
    }
  });
}
