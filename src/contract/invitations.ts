import * as z from 'zod/mini';
import { Email, LinkKey, Name, NewPassword, Role, Session } from './accounts.ts';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';
import { EndDate } from './members.ts';

const TeamParams = z.strictObject({ teamId: z.uuid() });
const InvitationParams = z.strictObject({ teamId: z.uuid(), invitationId: z.uuid() });
const mailing = { ...ordinary, perMinute: 30 };

export const Invitation = z.object({
  id: z.uuid(),
  email: z.string(),
  role: Role,
  /** Last day of a member from outside; null for a member of the house. */
  lastDay: z.nullable(z.string()),
  invitedBy: z.string(),
  madeAt: z.iso.datetime(),
  expiresAt: z.iso.datetime(),
  state: z.enum(['open', 'expired', 'accepted', 'revoked']),
});
export type Invitation = z.infer<typeof Invitation>;

export const listInvitations = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/invitations',
  summary: "The team's invitations, newest first.",
  params: TeamParams,
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(Invitation) })),
  errors: [],
  allow: 'teams.people',
  limits: ordinary,
});

export const invite = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/invitations',
  summary: 'Invite somebody into the team by mail.',
  params: TeamParams,
  query: empty,
  body: json(z.strictObject({ email: Email, role: Role, lastDay: z.nullable(EndDate) })),
  response: json(Invitation),
  errors: ['wrong_state'],
  allow: 'teams.people',
  limits: mailing,
});

export const resendInvitation = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/invitations/:invitationId/mail',
  summary: 'Send an invitation once more, with a new link; the old link stops working.',
  params: InvitationParams,
  query: empty,
  body: none,
  response: json(Invitation),
  errors: ['wrong_state'],
  allow: 'teams.people',
  limits: mailing,
});

export const revokeInvitation = endpoint({
  method: 'DELETE',
  path: '/api/teams/:teamId/invitations/:invitationId',
  summary: 'Take an invitation back; its link stops working at once.',
  params: InvitationParams,
  query: empty,
  body: none,
  response: json(Invitation),
  errors: ['wrong_state'],
  allow: 'teams.people',
  limits: ordinary,
});

export const openInvitation = endpoint({
  method: 'POST',
  path: '/api/invitations/opening',
  summary: 'What the link of an invitation is for.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ key: LinkKey })),
  response: json(
    z.object({ invitationId: z.uuid(), teamName: z.string(), role: Role, email: z.string(), hasAccount: z.boolean() }),
  ),
  errors: ['link_not_valid'],
  allow: 'anyone',
  limits: mailing,
});

export const acceptAsNewPerson = endpoint({
  method: 'POST',
  path: '/api/invitations/acceptance',
  summary: 'Accept an invitation by its link and make the account that it was sent to.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ key: LinkKey, name: Name, password: NewPassword })),
  response: json(Session),
  errors: ['link_not_valid', 'wrong_state'],
  allow: 'anyone',
  limits: { ...ordinary, perMinute: 20 },
});

export const listOwnInvitations = endpoint({
  method: 'GET',
  path: '/api/account/invitations',
  summary: "Open invitations to the reader's own e-mail address.",
  params: empty,
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(z.object({ id: z.uuid(), teamName: z.string(), role: Role })) })),
  errors: [],
  allow: 'accounts.own',
  limits: ordinary,
});

export const acceptOwnInvitation = endpoint({
  method: 'POST',
  path: '/api/account/invitations/:invitationId/acceptance',
  summary: "Accept an invitation to the reader's own e-mail address.",
  params: z.strictObject({ invitationId: z.uuid() }),
  query: empty,
  body: none,
  response: json(Session),
  errors: ['link_not_valid', 'wrong_state'],
  allow: 'accounts.own',
  limits: mailing,
});
