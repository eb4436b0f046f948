import type { Knex } from 'knex';
import type { Role } from '#contract/accounts.ts';

export interface StoredInvitation {
  readonly id: string;
  readonly teamId: string;
  readonly teamName: string;
  readonly email: string;
  readonly role: Role;
  readonly membershipEndsAt: Date | null;
  readonly expiresAt: Date;
  readonly acceptedAt: Date | null;
  readonly revokedAt: Date | null;
}

const INVITATION = `
  select invitations.id, invitations.team_id as "teamId", teams.name as "teamName", invitations.email, invitations.role,
    invitations.membership_ends_at as "membershipEndsAt", invitations.expires_at as "expiresAt",
    invitations.accepted_at as "acceptedAt", invitations.revoked_at as "revokedAt"
  from invitations join teams on teams.id = invitations.team_id`;

export async function insertInvitation(
  transaction: Knex.Transaction,
  invitation: {
    teamId: string;
    email: string;
    role: Role;
    membershipEndsAt: Date | null;
    keyHash: string;
    by: string;
    at: Date;
    expiresAt: Date;
  },
): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    `insert into invitations (team_id, email, role, membership_ends_at, key_hash, invited_by, made_at, expires_at)
     values (:teamId, :email, :role, :membershipEndsAt, :keyHash, :by, :at, :expiresAt) returning id`,
    invitation,
  );
  return rows[0].id;
}

/** Held until the transaction ends, so that of two who use an invitation the second sees what the first has done. */
export async function holdInvitation(
  transaction: Knex.Transaction,
  key: { teamId: string; invitationId: string },
): Promise<StoredInvitation | null> {
  const { rows } = await transaction.raw<{ rows: StoredInvitation[] }>(
    `${INVITATION} where invitations.team_id = :teamId and invitations.id = :invitationId for update of invitations`,
    key,
  );
  return rows[0] ?? null;
}

export async function holdInvitationOfKey(
  transaction: Knex.Transaction,
  keyHash: string,
): Promise<StoredInvitation | null> {
  const { rows } = await transaction.raw<{ rows: StoredInvitation[] }>(
    `${INVITATION} where invitations.key_hash = ? for update of invitations`,
    [keyHash],
  );
  return rows[0] ?? null;
}

/** Of the person's own address alone. */
export async function holdInvitationTo(
  transaction: Knex.Transaction,
  key: { personId: string; invitationId: string },
): Promise<StoredInvitation | null> {
  const { rows } = await transaction.raw<{ rows: StoredInvitation[] }>(
    `${INVITATION} where invitations.id = :invitationId
       and invitations.email = (select people.email from people where people.id = :personId)
     for update of invitations`,
    key,
  );
  return rows[0] ?? null;
}

export async function renewInvitation(
  transaction: Knex.Transaction,
  change: { invitationId: string; keyHash: string; expiresAt: Date },
): Promise<void> {
  await transaction.raw(
    'update invitations set key_hash = :keyHash, expires_at = :expiresAt where id = :invitationId',
    change,
  );
}

export async function setInvitationAccepted(
  transaction: Knex.Transaction,
  change: { invitationId: string; personId: string; at: Date },
): Promise<void> {
  await transaction.raw(
    'update invitations set accepted_by = :personId, accepted_at = :at where id = :invitationId',
    change,
  );
}

export async function setInvitationRevoked(
  transaction: Knex.Transaction,
  change: { invitationId: string; by: string; at: Date },
): Promise<void> {
  await transaction.raw('update invitations set revoked_by = :by, revoked_at = :at where id = :invitationId', change);
}
