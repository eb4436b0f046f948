import type { Knex } from 'knex';
import type { Role } from '#contract/accounts.ts';
import { notify } from '../../mail/notify.ts';
import { writeMail } from '../../mail/write-mail.ts';
import { findInvitedPerson, findInviter } from './invitation-read-model.ts';

export interface InvitationToMail {
  readonly teamId: string;
  readonly email: string;
  readonly role: Role;
  readonly key: string;
  readonly by: string;
  readonly publicUrl: string;
  readonly at: Date;
}

/**
 * Tells the invited person. Somebody without an account gets the link by mail, which the leads read where no mail is sent. Somebody with
 * one is told as of anything else, and accepts on the account page, so that no link that opens an account lies with others.
 */
export async function mailInvitation(transaction: Knex.Transaction, invitation: InvitationToMail): Promise<void> {
  const { teamId, email, role, key, by, publicUrl, at } = invitation;
  const inviter = await findInviter(transaction, { teamId, by });
  if (inviter === null) throw new Error(`the team ${teamId} or the person ${by} is gone`);
  const words = `${inviter.name} invites you into the team ${inviter.teamName}, as ${role}.`;
  const person = await findInvitedPerson(transaction, { teamId, email, at });
  if (person !== null) {
    const { personId } = person;
    // Of no team: the leads would learn from their outbox that the address has an account.
    await notify(transaction, { personId, teamId: null, kind: 'invitation', words, path: '/account', publicUrl, at });
    return;
  }
  await writeMail(transaction, {
    teamId,
    recipient: email,
    subject: `Invitation into the team ${inviter.teamName}`,
    paragraphs: [
      words,
      'Muslin shows where evaporation can carry the cooling. The link makes your account; it works once, within fourteen days.',
    ],
    link: { words: 'Accept the invitation', url: `${publicUrl}/invitations/${key}` },
    foot: `Sent to ${email} because ${inviter.name} typed this address. If you do not know why, do nothing.`,
    opensAccount: false,
    at,
  });
}
