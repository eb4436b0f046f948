import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notifyTeam } from '../../jobs/team-feed.ts';
import { hashOfInvitationKey } from './invitation-key.ts';
import {
  holdInvitationOfKey,
  holdInvitationTo,
  type StoredInvitation,
  setInvitationAccepted,
} from './invitation-store.ts';
import { findMember, lockTeam, putMember } from './member-store.ts';

/** What accepting needs of another feature, handed in where the server is wired. */
export interface AcceptParts {
  /** Makes an account; refuses an address that has one. @returns the person's id */
  makePerson(transaction: Knex.Transaction, person: { email: string; name: string; password: string }): Promise<string>;
}

/**
 * Makes the account that an invitation was sent to, and its membership; all of it or nothing. Whoever holds the link has the mail, or was
 * given it by a lead. @returns the person's id
 */
export async function acceptAsNewPerson(
  { db, makePerson }: { db: Knex } & AcceptParts,
  given: { key: string; name: string; password: string; requestId: string; at: Date },
): Promise<string> {
  return await inTransaction(db, async (transaction) => {
    const keyHash = hashOfInvitationKey(given.key);
    const invitation = stillOpen(await holdInvitationOfKey(transaction, keyHash), given.at);
    const { name, password } = given;
    const personId = await makePerson(transaction, { email: invitation.email, name, password });
    await join(transaction, { invitation, personId, requestId: given.requestId, at: given.at });
    return personId;
  });
}

/** Accepts an invitation to the address of a person who is signed in; no other invitation is there for the person. */
export async function acceptOwnInvitation(
  db: Knex,
  given: { personId: string; invitationId: string; requestId: string; at: Date },
): Promise<void> {
  const { personId, requestId, at } = given;
  await inTransaction(db, async (transaction) => {
    const invitation = stillOpen(await holdInvitationTo(transaction, given), at);
    await join(transaction, { invitation, personId, requestId, at });
  });
}

function stillOpen(invitation: StoredInvitation | null, at: Date): StoredInvitation {
  if (
    invitation !== null &&
    invitation.acceptedAt === null &&
    invitation.revokedAt === null &&
    invitation.expiresAt > at
  )
    return invitation;
  throw new AppError(
    'link_not_valid',
    'This invitation was used already, was taken back, has expired, or was sent again with another link. Ask the lead of the team.',
  );
}

async function join(
  transaction: Knex.Transaction,
  given: { invitation: StoredInvitation; personId: string; requestId: string; at: Date },
): Promise<void> {
  const { invitation, personId, requestId, at } = given;
  const { id: invitationId, teamId, role, membershipEndsAt: endsAt } = invitation;
  await lockTeam(transaction, teamId);
  const member = await findMember(transaction, { teamId, personId });
  if (member !== null && (member.endsAt === null || member.endsAt > at))
    throw new AppError('wrong_state', 'You are in this team already.');
  await putMember(transaction, { teamId, personId, role, endsAt, at });
  await setInvitationAccepted(transaction, { invitationId, personId, at });
  const subject = { invitationId, role };
  await recordAuditEvent(transaction, { teamId, personId, act: 'invitation accepted', subject, requestId });
  await notifyTeam(transaction, { teamId, event: { kind: 'people' } });
}
