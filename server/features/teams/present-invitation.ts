import type { Invitation } from '#contract/invitations.ts';
import type { InvitationView } from './invitation-read-model.ts';
import { lastDayOf } from './last-day.ts';

export function presentInvitation(view: InvitationView, now: Date): Invitation {
  const { id, email, role, membershipEndsAt, invitedBy, madeAt, expiresAt, acceptedAt, revokedAt } = view;
  const open = expiresAt > now ? 'open' : 'expired';
  return {
    id,
    email,
    role,
    lastDay: lastDayOf(membershipEndsAt),
    invitedBy,
    madeAt: madeAt.toISOString(),
    expiresAt: expiresAt.toISOString(),
    state: acceptedAt !== null ? 'accepted' : revokedAt !== null ? 'revoked' : open,
  };
}
