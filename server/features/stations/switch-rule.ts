import type { Knex } from 'knex';
import type { AuditAct } from '#contract/audit.ts';
import type { RuleName } from '#engine/weather-files/quality/quality-options.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { deleteRuleOff, lockStation, upsertRuleOff } from './station-store.ts';

interface RuleKey {
  readonly teamId: string;
  readonly stationId: string;
  readonly rule: RuleName;
}

/** Switches a rule off at a station, in the caller's transaction: what is read of its files from now on goes by that. */
export async function switchRuleOff(
  transaction: Knex.Transaction,
  off: RuleKey & { reason: string; personId: string; at: Date },
): Promise<void> {
  await upsertRuleOff(transaction, off);
}

/** The same as an act of its own. */
export async function setRuleOff(
  db: Knex,
  off: RuleKey & { reason: string; personId: string; requestId: string | null; at: Date },
): Promise<void> {
  await changeRule(db, off, {
    act: 'rule switched off',
    reason: off.reason,
    change: (transaction) => switchRuleOff(transaction, off),
  });
}

/** Lets a rule hold again; one that holds already stays as it is. */
export async function setRuleOn(db: Knex, on: RuleKey & { personId: string; requestId: string | null }): Promise<void> {
  await changeRule(db, on, {
    act: 'rule switched on',
    reason: null,
    change: (transaction) => deleteRuleOff(transaction, on),
  });
}

async function changeRule(
  db: Knex,
  key: RuleKey & { personId: string; requestId: string | null },
  what: { act: AuditAct; reason: string | null; change: (transaction: Knex.Transaction) => Promise<void> },
): Promise<void> {
  const { teamId, stationId, rule, personId, requestId } = key;
  await inTransaction(db, async (transaction) => {
    if ((await lockStation(transaction, { teamId, stationId })) === null) {
      throw new AppError('not_found', 'There is no such station in this team.');
    }
    await what.change(transaction);
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: what.act,
      subject: { stationId, rule, reason: what.reason },
      requestId,
    });
  });
}
