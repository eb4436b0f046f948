import type { Knex } from 'knex';
import type { Role } from '#contract/accounts.ts';

export interface InvitationView {
  readonly id: string;
  readonly email: string;
  readonly role: Role;
  readonly membershipEndsAt: Date | null;
  readonly invitedBy: string;
  readonly madeAt: Date;
  readonly expiresAt: Date;
  readonly acceptedAt: Date | null;
  readonly revokedAt: Date | null;
}

const INVITATION = `
  select invitations.id, invitations.email, invitations.role, invitations.membership_ends_at as "membershipEndsAt",
    people.name as "invitedBy", invitations.made_at as "madeAt", invitations.expires_at as "expiresAt",
    invitations.accepted_at as "acceptedAt", invitations.revoked_at as "revokedAt"
  from invitations join people on people.id = invitations.invited_by`;

export async function listInvitationViews(db: Knex, teamId: string): Promise<readonly InvitationView[]> {
  const { rows } = await db.raw<{ rows: InvitationView[] }>(
    `${INVITATION} where invitations.team_id = ? order by invitations.made_at desc, invitations.id limit 200`,
    [teamId],
  );
  return rows;
}

/** `null` when the team has no such invitation. */
export async function findInvitationView(
  db: Knex,
  key: { teamId: string; invitationId: string },
): Promise<InvitationView | null> {
  const { rows } = await db.raw<{ rows: InvitationView[] }>(
    `${INVITATION} where invitations.team_id = :teamId and invitations.id = :invitationId`,
    key,
  );
  return rows[0] ?? null;
}

const OPEN = 'invitations.accepted_at is null and invitations.revoked_at is null and invitations.expires_at > :at';

/** What a link is for; `null` when it does not hold. */
export async function findOpenInvitation(
  db: Knex,
  key: { keyHash: string; at: Date },
): Promise<{ invitationId: string; teamName: string; role: Role; email: string; hasAccount: boolean } | null> {
  const { rows } = await db.raw<{
    rows: { invitationId: string; teamName: string; role: Role; email: string; hasAccount: boolean }[];
  }>(
    `select invitations.id as "invitationId", teams.name as "teamName", invitations.role, invitations.email,
       exists (select 1 from people where people.email = invitations.email) as "hasAccount"
     from invitations join teams on teams.id = invitations.team_id
     where invitations.key_hash = :keyHash and ${OPEN}`,
    key,
  );
  return rows[0] ?? null;
}

/** Open invitations to the person's own address. */
export async function listInvitationsTo(
  db: Knex,
  key: { personId: string; at: Date },
): Promise<{ id: string; teamName: string; role: Role }[]> {
  const { rows } = await db.raw<{ rows: { id: string; teamName: string; role: Role }[] }>(
    `select invitations.id, teams.name as "teamName", invitations.role
     from invitations
     join teams on teams.id = invitations.team_id
     join people on people.id = :personId and people.email = invitations.email
     where ${OPEN}
     order by invitations.made_at desc`,
    key,
  );
  return rows;
}

export interface InvitedPerson {
  readonly personId: string;
  readonly inTeam: boolean;
  readonly wantsMail: boolean;
}

/** Who has the address that is to be invited; `null` where nobody has. */
export async function findInvitedPerson(
  db: Knex,
  key: { teamId: string; email: string; at: Date },
): Promise<InvitedPerson | null> {
  const { rows } = await db.raw<{ rows: InvitedPerson[] }>(
    `select people.id as "personId", not ('invitation' = any(people.notices_off)) as "wantsMail",
       exists (select 1 from memberships where memberships.team_id = :teamId and memberships.person_id = people.id
         and (memberships.ends_at is null or memberships.ends_at > :at)) as "inTeam"
     from people where people.email = :email`,
    key,
  );
  return rows[0] ?? null;
}

/** How a mail names the team and whoever invites. */
export async function findInviter(
  db: Knex,
  key: { teamId: string; by: string },
): Promise<{ teamName: string; name: string } | null> {
  const { rows } = await db.raw<{ rows: { teamName: string; name: string }[] }>(
    `select teams.name as "teamName", people.name from teams, people where teams.id = :teamId and people.id = :by`,
    key,
  );
  return rows[0] ?? null;
}
