import type { Knex } from 'knex';
import type { Role } from '#contract/accounts.ts';
import { brokenConstraint } from '../../db/database-errors.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { refuseLeadFromOutside } from './change-member.ts';
import { newInvitationKey } from './invitation-key.ts';
import { mailInvitation } from './invitation-mail.ts';
import { findInvitedPerson } from './invitation-read-model.ts';
import {
  holdInvitation,
  insertInvitation,
  renewInvitation,
  type StoredInvitation,
  setInvitationRevoked,
} from './invitation-store.ts';
import { endOfDay, lastDayOf } from './last-day.ts';

const HOLDS_MS = 14 * 24 * 3_600_000;

interface InvitationDeps {
  readonly db: Knex;
  readonly publicUrl: string;
}

interface Act {
  readonly teamId: string;
  readonly by: string;
  readonly requestId: string;
  readonly at: Date;
}

/** Invites somebody by mail. @returns the id of the invitation */
export async function invite(
  { db, publicUrl }: InvitationDeps,
  order: Act & { email: string; role: Role; lastDay: string | null },
): Promise<string> {
  const { teamId, by, requestId, at, email, role, lastDay } = order;
  const membershipEndsAt = endOfDay(lastDay);
  refuseLeadFromOutside({ role, endsAt: membershipEndsAt });
  if (membershipEndsAt !== null && membershipEndsAt <= at) {
    const message = 'This day is over. Give a later one.';
    throw new AppError('invalid_input', message, [{ path: 'body.lastDay', message }]);
  }
  return await inTransaction(db, async (transaction) => {
    const person = await findInvitedPerson(transaction, { teamId, email, at });
    if (person?.inTeam) throw new AppError('wrong_state', 'This person is in the team already. Change the role there.');
    const { key, keyHash } = newInvitationKey();
    const expiresAt = new Date(at.getTime() + HOLDS_MS);
    const stored = { teamId, email, role, membershipEndsAt, keyHash, by, at, expiresAt };
    const invitationId = await insertInvitation(transaction, stored).catch((error: unknown) => {
      if (brokenConstraint(error)?.constraint !== 'invitations_open') throw error;
      throw new AppError('wrong_state', 'This address has an invitation. Send it again, or take it back first.');
    });
    await mailInvitation(transaction, { teamId, email, role, key, by, publicUrl, at });
    const subject = { invitationId, email, role, lastDay };
    await recordAuditEvent(transaction, { teamId, personId: by, act: 'person invited', subject, requestId });
    await notifyTeam(transaction, { teamId, event: { kind: 'people' } });
    return invitationId;
  });
}

/** Sends an invitation once more under a new key, and lets it hold as long as a new one. */
export async function resendInvitation(
  { db, publicUrl }: InvitationDeps,
  order: Act & { invitationId: string },
): Promise<void> {
  const { teamId, by, requestId, at, invitationId } = order;
  await inTransaction(db, async (transaction) => {
    const { email, role, membershipEndsAt } = await unsettled(transaction, order);
    const { key, keyHash } = newInvitationKey();
    await renewInvitation(transaction, { invitationId, keyHash, expiresAt: new Date(at.getTime() + HOLDS_MS) });
    await mailInvitation(transaction, { teamId, email, role, key, by, publicUrl, at });
    const subject = { invitationId, email, role, lastDay: lastDayOf(membershipEndsAt) };
    await recordAuditEvent(transaction, { teamId, personId: by, act: 'invitation sent again', subject, requestId });
    await notifyTeam(transaction, { teamId, event: { kind: 'people' } });
  });
}

export async function revokeInvitation(db: Knex, order: Act & { invitationId: string }): Promise<void> {
  const { teamId, by, requestId, at, invitationId } = order;
  await inTransaction(db, async (transaction) => {
    const { email } = await unsettled(transaction, order);
    await setInvitationRevoked(transaction, { invitationId, by, at });
    const subject = { invitationId, email };
    await recordAuditEvent(transaction, { teamId, personId: by, act: 'invitation revoked', subject, requestId });
    await notifyTeam(transaction, { teamId, event: { kind: 'people' } });
  });
}

async function unsettled(
  transaction: Knex.Transaction,
  key: { teamId: string; invitationId: string },
): Promise<StoredInvitation> {
  const invitation = await holdInvitation(transaction, key);
  if (invitation === null) throw new AppError('not_found', 'There is no such invitation in this team.');
  if (invitation.acceptedAt !== null) throw new AppError('wrong_state', 'This invitation was accepted.');
  if (invitation.revokedAt !== null) throw new AppError('wrong_state', 'This invitation was taken back.');
  return invitation;
}
