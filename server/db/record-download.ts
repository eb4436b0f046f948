import type { Knex } from 'knex';
import type { auditActs } from '#contract/audit.ts';
import { inTransaction } from './in-transaction.ts';
import { recordAuditEvent } from './record-audit-event.ts';

/** Who takes something along. */
export interface Taker {
  readonly personId: string;
  /** Of the program that does it for the person. */
  readonly tokenId: string | null;
  readonly requestId: string;
}

/** Writes down that something leaves the product, before its first byte does: nobody can tell afterwards where it went. */
export function recordDownload(
  db: Knex,
  download: {
    teamId: string;
    act: (typeof auditActs)['downloads'][number];
    subject: Readonly<Record<string, unknown>>;
    taker: Taker;
  },
): Promise<void> {
  const { teamId, act, taker } = download;
  const { personId, tokenId, requestId } = taker;
  const subject = tokenId === null ? download.subject : { ...download.subject, tokenId };
  return inTransaction(db, (transaction) =>
    recordAuditEvent(transaction, { teamId, personId, act, subject, requestId }),
  );
}
