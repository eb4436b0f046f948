import type { Knex } from 'knex';
import type { NoticeKind } from '#contract/notices.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { setName, setNoticesOff } from './account-store.ts';

interface Act {
  readonly personId: string;
  readonly requestId: string;
}

export async function renamePerson(db: Knex, { personId, name, requestId }: Act & { name: string }): Promise<void> {
  await inTransaction(db, async (transaction) => {
    await setName(transaction, { personId, name });
    const subject = { name };
    await recordAuditEvent(transaction, { teamId: null, personId, act: 'person renamed', subject, requestId });
  });
}

export async function changeNoticesOff(
  db: Knex,
  { personId, off, requestId }: Act & { off: readonly NoticeKind[] },
): Promise<void> {
  await inTransaction(db, async (transaction) => {
    const kinds = [...new Set(off)];
    await setNoticesOff(transaction, { personId, off: kinds });
    const subject = { off: kinds };
    await recordAuditEvent(transaction, { teamId: null, personId, act: 'notices chosen', subject, requestId });
  });
}
